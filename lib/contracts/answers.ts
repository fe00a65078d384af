import { z } from "zod";
import type { EngagementState } from "@/lib/engagement/states";
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

/** What the page behind an answer link shows; nothing of it needs a sign-in. */
export interface AnswerPageBody {
  readonly engagementNumber: number;
  readonly engagementState: EngagementState;
  readonly kind: "request" | "revised request" | "cancellation" | "completion";
  readonly authorityName: string;
  readonly authorityTimeZone: string;
  readonly stationName: string;
  readonly fragmentName: string;
  readonly dwellFrom: string;
  readonly dwellTo: string;
  readonly answerBy: string | null;
  readonly subject: string;
  /** The notice as it was sent. */
  readonly text: string;
  readonly canAnswer: boolean;
  /** Why the form takes no answer, in a sentence; null when it does. */
  readonly closedBecause: string | null;
  readonly answer: {
    readonly outcome: string;
    readonly conditions: string | null;
    readonly reasons: string | null;
    readonly answeredBy: string;
    readonly answeredAt: string;
  } | null;
}
