import type { SpanBody } from "./common";

/** A protected object that comes nearer than the threshold after a dwell. */
export interface AfterApproachBody {
  /** nudged: as the dwell leaves the fragment, at the median; untouched: as if nothing had been fired. */
  readonly path: "nudged" | "untouched";
  readonly name: string;
  readonly class: string;
  readonly at: string;
  readonly missKm: number;
  readonly relativeSpeedKmPerS: number;
  /** 2-D probability of a collision under the assumed covariance; null where there is none. */
  readonly probability: number | null;
  /** The nearest moment lies at an end of the days looked at. */
  readonly atEdge: boolean;
}

/** The days after a dwell: GET /api/engagements/:id/after-dwell. Advice, never a clearance. */
export interface AfterDwellBody extends SpanBody {
  /** waiting: a job will do it; running; done; refused: see reason. */
  readonly state: "waiting" | "running" | "done" | "refused";
  readonly reason: string | null;
  readonly thresholdKm: number;
  readonly checked: number;
  readonly total: number;
  /** Protected objects that could not be looked at, as "name: why". */
  readonly unseen: readonly string[];
  readonly updatedAt: string | null;
  readonly approaches: readonly AfterApproachBody[];
  /** What the figures rest on, in sentences. */
  readonly assumptions: readonly string[];
}
