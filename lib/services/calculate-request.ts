import {
  type BeamScreenBody,
  beamScreenInput,
  type ImpulseEstimateBody,
  impulseEstimateInput,
  type PassSearchBody,
  passSearchInput,
} from "@/lib/contracts/calculations";
import { notAllowed, refused } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { beamScreenMs, passSearchMs, spanDays } from "./calculate-cost";
import { calculateCrossings } from "./calculate-crossings";
import type { Outcome } from "./calculate-outcome";
import { calculatePasses } from "./calculate-passes";
import { calculateElsewhere } from "./calculate-pool";
import { readInput } from "./read-input";

/** A calculation estimated to take less is done on the spot; the web server stands still so long at most. */
const ON_THE_SPOT_MS = 50;

/** Reads the body of a request; called only for those who may ask. */
export type ReadBody = () => Promise<unknown>;

/** Passes of many objects over one station; bad element sets are named by their index. */
export async function requestPassSearch(actor: Actor, readBody: ReadBody): Promise<PassSearchBody> {
  if (!may(actor, "search passes")) throw notAllowed("search passes");
  const input = readInput(passSearchInput, await readBody());
  return passSearchMs(input) < ON_THE_SPOT_MS
    ? calculatePasses(input)
    : calculateElsewhere("pass-search", input);
}

/** When each of many objects stands within an angle of the beam; bad element sets are named by their index. */
export async function requestBeamScreen(actor: Actor, readBody: ReadBody): Promise<BeamScreenBody> {
  if (!may(actor, "search passes")) throw notAllowed("screen a beam");
  const input = readInput(beamScreenInput, await readBody());
  const quick = beamScreenMs(input) < ON_THE_SPOT_MS;
  return bodyOrRefusal(quick ? calculateCrossings(input) : await calculateElsewhere("beam-screen", input));
}

/** What lasing an interval does to a fragment's orbit, and the best part of it. */
export async function requestImpulseEstimate(actor: Actor, readBody: ReadBody): Promise<ImpulseEstimateBody> {
  if (!may(actor, "estimate")) throw notAllowed("estimate an impulse");
  const input = readInput(impulseEstimateInput, await readBody());
  spanDays(input);
  // The choice of the best stretch alone takes some 100 ms.
  return bodyOrRefusal(await calculateElsewhere("impulse-estimate", input));
}

function bodyOrRefusal<T>(outcome: Outcome<T>): T {
  if (outcome.ok) return outcome.body;
  throw refused("The calculation can't be made.", [{ path: outcome.path, message: outcome.reason }]);
}
