import { z } from "zod";
import { rescreenEngagement } from "@/lib/services/rescreen-engagement";
import type { Task } from "../task";

const payloadShape = z.object({ engagementId: z.uuid() });

/** Judges one live engagement again after something it rests on has changed. */
export const rescreenEngagementTask: Task = {
  name: "rescreen-engagement",
  run: (payload) => rescreenEngagement(payloadShape.parse(payload).engagementId, Date.now()),
};
