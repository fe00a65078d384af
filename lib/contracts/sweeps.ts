import { z } from "zod";
import { identifierText, type SpanBody } from "./common";

/** What a planner asks to be swept; every fragment unless some are named. */
export const sweepInput = z.strictObject({
  fragmentIds: z.array(identifierText).min(1).max(10_000).optional(),
});

/** A sweep with its progress. */
export interface SweepBody extends SpanBody {
  readonly id: string;
  readonly state: "running" | "done" | "cancelled";
  readonly reason: string;
  readonly startedAt: string;
  readonly finishedAt: string | null;
  /** Fragments in all, worked out, and given up on. */
  readonly fragments: { readonly total: number; readonly done: number; readonly failed: number };
  readonly passCount: number;
  /** One sentence for each thing that could not be worked out. */
  readonly failures: readonly {
    readonly fragmentId: string;
    readonly fragmentName: string;
    readonly message: string;
  }[];
}
