import { z } from "zod";
import { screenAfterDwell } from "@/lib/services/screen-after-dwell";
import type { Task } from "../task";

const payloadShape = z.object({
  engagementId: z.uuid(),
  run: z.uuid().nullable(),
  afterId: z.uuid().nullable(),
  checked: z.int().min(0),
});

/** Screens the days after one engagement's dwell, a chunk of protected objects at a time. */
export const screenAfterDwellTask: Task = {
  name: "screen-after-dwell",
  run: (payload) => screenAfterDwell(payloadShape.parse(payload), Date.now()),
};
