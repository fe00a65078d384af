import { z } from "zod";
import { OUTCOMES } from "./common";

/** An authority's answer; the words an outcome needs are asked for by name. */
export const answerInput = z
  .strictObject({
    outcome: z.enum(OUTCOMES),
    conditions: z.string().trim().max(2000).nullish(),
    reasons: z.string().trim().max(2000).nullish(),
    /** Who answers; needed by link, taken from the sign-in otherwise. */
    name: z.string().trim().max(120).nullish(),
  })
  .superRefine((value, ctx) => {
    if (value.outcome === "no objection with conditions" && !value.conditions) {
      ctx.addIssue({ code: "custom", path: ["conditions"], message: "name the conditions" });
    }
    if (value.outcome === "objection" && !value.reasons) {
      ctx.addIssue({ code: "custom", path: ["reasons"], message: "an objection needs its reasons" });
    }
  });
export type AnswerInput = z.infer<typeof answerInput>;
