import {
  type BeamScreenBody,
  beamScreenInput,
  type ImpulseEstimateBody,
  impulseEstimateInput,
  type PassSearchBody,
  passSearchInput,
} from "./calculations";
import { type ApiRoute, json } from "./openapi-route";
import type { PassSkyBody } from "./pass-surroundings";
import { type JudgementBody, judgementQuery, type PassBody, type PassSheetBody, passQuery } from "./passes";
import { type SweepBody, sweepInput } from "./sweeps";

/** Calculations that need no book. */
export const CALCULATIONS: readonly ApiRoute[] = [
  {
    method: "post",
    path: "/api/pass-search",
    tag: "calculations",
    summary: "Passes of many objects over one station, without the book.",
    body: passSearchInput,
    gives: json<PassSearchBody>()("Passes by rise, and refused sets by index.", "passes", "refused"),
    refusals: [413, 422],
  },
  {
    method: "post",
    path: "/api/beam-screen",
    tag: "calculations",
    summary: "When protected objects stand within a cone around a beam: pure geometry, nothing added.",
    body: beamScreenInput,
    gives: json<BeamScreenBody>()("Closures by time, and refused sets by index.", "closures", "refused"),
    refusals: [413, 422],
  },
  {
    method: "post",
    path: "/api/impulse-estimate",
    tag: "calculations",
    summary: "What a laser does to a fragment's orbit over a stretch of time.",
    body: impulseEstimateInput,
    gives: json<ImpulseEstimateBody>()(
      "Samples, the change of the orbit with its band, and the best stretch.",
      "samples",
      "deltaV",
      "semiMajorAxisBeforeKm",
      "semiMajorAxisAfterKm",
      "perigeeBeforeKm",
      "perigeeAfterKm",
      "best",
    ),
    refusals: [413, 422],
  },
];

/** Passes of the book, and the sweeps that find them. */
export const PASSES: readonly ApiRoute[] = [
  {
    method: "get",
    path: "/api/passes",
    tag: "passes",
    summary:
      "Every pass that matches, by rise, with closures, openings and the dwell on offer; the coming week unless told.",
    query: passQuery,
    gives: json<{ passes: PassBody[] }>()("Passes.", "passes"),
  },
  {
    method: "get",
    path: "/api/passes/{id}",
    tag: "passes",
    summary: "The pass sheet: samples, closures, openings, dwell and what they rest on.",
    gives: json<PassSheetBody>()("The sheet.", "id", "samples", "closures", "openings", "dwell", "estimate"),
    refusals: [404],
  },
  {
    method: "get",
    path: "/api/passes/{id}/judgement",
    tag: "passes",
    summary: "What booking a dwell of this pass would meet, and what it would do. Nothing is booked.",
    query: judgementQuery,
    gives: json<JudgementBody>()("The judgement.", "from", "to"),
    refusals: [404],
  },
  {
    method: "get",
    path: "/api/passes/{id}/sky",
    tag: "passes",
    summary: "Sun, Moon, the light on the fragment, and the protected objects near the beam of a pass.",
    gives: json<PassSkyBody>()("The sky.", "at", "sun", "moon", "darkness", "sunlight", "near"),
    refusals: [404],
  },
  {
    method: "get",
    path: "/api/passes/{id}/samples",
    tag: "passes",
    summary: "The samples of a pass as CSV.",
    gives: { status: 200, words: "One line every few seconds from rise to set.", mediaType: "text/csv" },
    refusals: [404],
  },
  {
    method: "get",
    path: "/api/sweeps",
    tag: "passes",
    summary: "The newest sweeps with their progress.",
    gives: json<{ sweeps: SweepBody[] }>()("Sweeps.", "sweeps"),
  },
  {
    method: "post",
    path: "/api/sweeps",
    tag: "passes",
    summary: "Starts a sweep of all fragments, or of those named.",
    body: sweepInput,
    gives: json<SweepBody>(201)("The sweep.", "id", "state", "fragments"),
    refusals: [422],
  },
  {
    method: "get",
    path: "/api/sweeps/{id}",
    tag: "passes",
    summary: "One sweep: how far it is, and what could not be worked out.",
    gives: json<SweepBody>()("The sweep.", "id", "state", "fragments"),
    refusals: [404],
  },
  {
    method: "post",
    path: "/api/sweeps/{id}/cancel",
    tag: "passes",
    summary: "Ends a running sweep; what was worked out stays.",
    gives: json<SweepBody>()("The sweep.", "id", "state", "fragments"),
    refusals: [404, 422],
  },
];
