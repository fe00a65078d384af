import { z } from "zod";
import { sendNotice } from "@/lib/services/send-notice";
import type { Task } from "../task";

const payloadShape = z.object({ noticeId: z.uuid() });

/** Sends one notice; throws to be tried again when it could not go out yet. */
export const sendNoticeTask: Task = {
  name: "send-notice",
  run: (payload) => sendNotice(payloadShape.parse(payload).noticeId),
};
