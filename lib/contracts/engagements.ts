import { z } from "zod";
import type { EngagementState } from "@/lib/engagement/states";
import { identifierText, instantText, type SpanBody } from "./common";
import type { ClosureBody, EstimateBody } from "./passes";

export const bookInput = z.strictObject({ passId: identifierText, from: instantText, to: instantText });

/** A move: new times, with the version that the mover saw. */
export const moveInput = z.strictObject({
  from: instantText,
  to: instantText,
  version: z.number().int().positive(),
});

const past = z.string().trim().min(1);

/** The operators' checklist; every value is captured, none has a default. */
export const checklistInput = z.strictObject({
  airUnitCalledAt: instantText,
  spotterInPlace: z.literal(true, { error: "the spotter must be in place" }),
  interlockTestedAt: instantText,
  clockOffsetMs: z.number().min(-1000).max(1000),
  weather: past.max(300),
  crewedListCheckedAt: instantText,
});

export const confirmInput = z.strictObject({
  checklist: checklistInput,
  /** A person's word for each rule that reads "not checked" and may be attested. */
  attestations: z
    .array(z.strictObject({ rule: past.max(60), statement: past.max(500) }))
    .max(20)
    .default([]),
});

export const scrubInput = z.strictObject({ reason: past.max(500) });

export const fireInput = z.strictObject({
  outcome: z.enum(["fired", "in part", "not fired"]),
  openedAt: instantText.nullish(),
  closedAt: instantText.nullish(),
  /** Needed unless nothing was fired. */
  pulses: z.number().int().min(0).max(100_000_000).nullish(),
  interruptions: z
    .array(
      z.strictObject({ at: instantText, cause: past.max(200), secondsLost: z.number().min(0).max(86_400) }),
    )
    .max(200)
    .default([]),
  note: z.string().trim().max(2000).nullish(),
});

export const engagementQuery = z.strictObject({
  station: identifierText.optional(),
  fragment: identifierText.optional(),
  /** One state, or several with commas between them. */
  state: z.string().optional(),
  from: instantText.optional(),
  to: instantText.optional(),
});

export const noticeQuery = z.strictObject({ engagement: identifierText.optional() });

/** The ledger is read newest first; `before` takes the last id that was seen. */
export const ledgerQuery = z.strictObject({
  subjectKind: z.string().max(60).optional(),
  subjectId: z.string().max(100).optional(),
  actor: z.string().max(120).optional(),
  text: z.string().max(200).optional(),
  from: instantText.optional(),
  to: instantText.optional(),
  before: z.coerce.number().int().positive().optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
});

/** An engagement in a list. */
export interface EngagementBody extends SpanBody {
  readonly id: string;
  readonly number: number;
  readonly state: EngagementState;
  readonly version: number;
  readonly passId: string;
  readonly stationId: string;
  readonly stationName: string;
  readonly fragmentId: string;
  readonly fragmentName: string;
  readonly holdFrom: string;
  readonly holdUntil: string;
  readonly planner: string;
  readonly plannerId: string;
  readonly endReason: string | null;
  /** Confirmed, and its firing record is still missing long after the dwell. */
  readonly overdue: boolean;
  readonly perigeeDropM: number;
  readonly semiMajorAxisDropM: number;
  readonly createdAt: string;
}

/** Everything about one engagement. */
export interface EngagementSheetBody extends EngagementBody {
  readonly effect: EstimateBody;
  readonly closures: readonly ClosureBody[];
  /** What stands between it and `cleared`, in words; empty when nothing does. */
  readonly outstanding: readonly string[];
  readonly confirmations: readonly {
    readonly personName: string;
    readonly capacity: string;
    readonly confirmedAt: string;
    readonly checklist: z.infer<typeof checklistInput>;
  }[];
  readonly attestations: readonly {
    readonly rule: string;
    readonly statement: string;
    readonly personName: string;
    readonly attestedAt: string;
  }[];
  readonly notices: readonly NoticeBody[];
  readonly firing: {
    readonly outcome: string;
    readonly openedAt: string | null;
    readonly closedAt: string | null;
    readonly pulses: number;
    readonly deliveredEnergyJ: number;
    readonly interruptions: readonly {
      readonly at: string;
      readonly cause: string;
      readonly secondsLost: number;
    }[];
    readonly note: string | null;
    readonly recordedBy: string;
    readonly recordedAt: string;
  } | null;
  readonly history: readonly LedgerBody[];
  /** Commands this viewer may give now, with the refusals of those that are refused. */
  readonly commands: readonly {
    readonly command: "move" | "confirm" | "scrub" | "fire";
    readonly refusals: readonly string[];
  }[];
}

/** A notice, and the answer in force. */
export interface NoticeBody {
  readonly id: string;
  readonly engagementId: string;
  readonly engagementNumber: number;
  readonly engagementState: EngagementState;
  readonly authorityId: string;
  readonly authorityName: string;
  readonly kind: "request" | "revised request" | "cancellation" | "completion";
  readonly sequence: number;
  readonly toEmail: string;
  readonly subject: string;
  readonly delivery: "queued" | "sent" | "failed";
  readonly attempts: number;
  readonly lastError: string | null;
  readonly createdAt: string;
  readonly sentAt: string | null;
  readonly openedAt: string | null;
  readonly answerBy: string | null;
  readonly superseded: boolean;
  readonly dwellFrom: string;
  readonly dwellTo: string;
  readonly stationName: string;
  readonly fragmentName: string;
  readonly answer: {
    readonly outcome: string;
    readonly conditions: string | null;
    readonly reasons: string | null;
    readonly answeredBy: string;
    readonly answeredAt: string;
    readonly via: string;
  } | null;
}

/** One notice with its words as they were sent: GET /api/notices/:id. */
export interface NoticeSheetBody extends NoticeBody {
  readonly text: string;
}

export interface LedgerBody {
  readonly id: number;
  readonly at: string;
  readonly actor: string;
  readonly via: string;
  readonly action: string;
  readonly subjectKind: string;
  readonly subjectId: string | null;
  readonly subjectLabel: string;
  readonly reason: string | null;
  readonly oldValues: Record<string, unknown> | null;
  readonly newValues: Record<string, unknown> | null;
}
