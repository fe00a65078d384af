import { z } from "zod";
import { sweepChunk } from "@/lib/services/sweep-chunk";
import type { Task } from "../task";

const payloadShape = z.object({ chunkId: z.uuid() });

/** Works out the passes of a few fragments. */
export const sweepChunkTask: Task = {
  name: "sweep-chunk",
  run: (payload) => sweepChunk(payloadShape.parse(payload).chunkId, Date.now()),
};
