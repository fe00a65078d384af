import type { SpanBody } from "./common";

/** An airspace volume: GET /api/airspace. */
export interface AirspaceVolumeBody {
  readonly id: string;
  readonly name: string;
  readonly version: number;
  readonly authorityId: string | null;
  readonly authorityName: string | null;
  /** Closed ring of [longitudeDeg, latitudeDeg]. */
  readonly ring: readonly (readonly [number, number])[];
  readonly floorText: string;
  readonly ceilingText: string;
  readonly floorM: number;
  readonly ceilingM: number;
  /** Spans that are not over; empty with `hoursKnown` false when nobody has told. */
  readonly activeSpans: readonly SpanBody[];
  readonly hoursKnown: boolean;
  readonly scheduleKnownUntil: string;
  readonly activeNow: boolean;
  readonly liftable: boolean;
  readonly source: string;
  /** Stations whose beam can reach it. */
  readonly stations: readonly { readonly id: string; readonly name: string }[];
}
