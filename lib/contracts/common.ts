import { z } from "zod";

/** ISO 8601 in UTC with Z; milliseconds optional on input, always present on output. */
export const instantText = z.iso.datetime({
  offset: false,
  error: "expected a UTC time like 2031-04-06T03:12:45.000Z",
});

export const identifierText = z.uuid({ error: "expected an identifier" });

/** The body of every error answer. */
export interface ErrorBody {
  readonly error: {
    readonly code: string;
    readonly message: string;
    readonly details: readonly { readonly path: string; readonly message: string }[];
  };
}

export const ROLES = ["planner", "operator", "coordinator", "administrator"] as const;
export type Role = (typeof ROLES)[number];

export const OUTCOMES = ["no objection", "no objection with conditions", "objection"] as const;
export type AnswerOutcome = (typeof OUTCOMES)[number];

/** A span on the wire. */
export interface SpanBody {
  readonly from: string;
  readonly to: string;
}
