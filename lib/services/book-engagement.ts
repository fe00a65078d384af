import type { Transaction } from "@/db/client";
import { type EngagementRow, holdPass, insertEngagement, lockStation } from "@/db/queries/engagements";
import { authoritiesById } from "@/db/queries/notices";
import { passRowsById } from "@/db/queries/passes";
import { inTransaction } from "@/db/transaction";
import { bookInput, type EngagementBody } from "@/lib/contracts/engagements";
import { notAllowed, notFound } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import type { Interval } from "@/lib/planning/interval";
import { acceptedEffect } from "./accept-dwell";
import { tryClear } from "./clear-engagement";
import { dwellOf } from "./dwell-input";
import { overlapRefusal, refuseWhenHeld } from "./hold-conflict";
import { type Judgement, judgeDwell } from "./judge-dwell";
import { writeLedger } from "./ledger";
import { type RoundMember, raiseNotices } from "./raise-notices";
import { readBody } from "./read-input";
import { queueAfterDwell } from "./screen-after-dwell";
import { currentBody } from "./view-engagement";

/**
 * Books a dwell: holds the station and the fragment, asks every concerned
 * authority and writes the ledger, all in one transaction. Refuses in this order:
 * 403, 400 or 422 for the body, 404, 409 when the time is held, 422 with every reason of the rules.
 */
export async function bookEngagement(actor: Actor, input: unknown, nowMs: number): Promise<EngagementBody> {
  if (!may(actor, "propose") || actor.id === null) throw notAllowed("propose an engagement");
  const plannerId = actor.id;
  const wanted = await readBody(bookInput, input);
  const dwell = dwellOf(wanted);
  try {
    return await inTransaction((tx) => book(tx, { actor, plannerId, passId: wanted.passId, dwell, nowMs }));
  } catch (error) {
    throw overlapRefusal(error) ?? error;
  }
}

interface Booking {
  readonly actor: Actor;
  readonly plannerId: string;
  readonly passId: string;
  readonly dwell: Interval;
  readonly nowMs: number;
}

async function book(tx: Transaction, booking: Booking): Promise<EngagementBody> {
  const { passId, dwell, nowMs } = booking;
  const held = await holdPass(tx, passId);
  const station = held ? await lockStation(tx, held.stationId) : null;
  const [pass] = await passRowsById(tx, [passId]);
  if (!pass || !station) throw notFound("pass");
  await refuseWhenHeld(tx, station, { fragmentId: pass.fragmentId, dwell, exceptId: null });
  const judgement = await judgeDwell(tx, { passId, ...dwell, nowMs, engagementId: null });
  const effect = acceptedEffect(judgement, pass.plan?.aim ?? "decay");
  const engagement = await insertEngagement(tx, {
    passId,
    fragmentId: judgement.fragmentId,
    stationId: judgement.stationId,
    laserSettingId: judgement.laserSettingId,
    elementSetId: judgement.elementSetId,
    dwellFrom: new Date(dwell.fromMs),
    dwellTo: new Date(dwell.toMs),
    plannerId: booking.plannerId,
    effect,
    createdAt: new Date(nowMs),
    updatedAt: new Date(nowMs),
  });
  const notices = await askAll(tx, engagement, judgement, nowMs);
  await writeBooking(tx, booking, engagement, {
    station: station.name,
    fragment: pass.fragmentName,
    notices,
  });
  await queueAfterDwell(tx, engagement.id);
  // Where somebody is asked, only an answer can clear it.
  if (judgement.concerned.length === 0) await tryClear(tx, { station, engagement }, nowMs);
  return currentBody(tx, engagement.id, nowMs);
}

async function askAll(
  tx: Transaction,
  engagement: EngagementRow,
  judgement: Judgement,
  nowMs: number,
): Promise<string[]> {
  const rows = await authoritiesById(
    tx,
    judgement.concerned.map(({ authorityId }) => authorityId),
  );
  const members = judgement.concerned.flatMap(({ authorityId, because }): RoundMember[] => {
    const authority = rows.find(({ id }) => id === authorityId);
    return authority ? [{ authority, kind: "request", because }] : [];
  });
  return raiseNotices(tx, { engagementId: engagement.id, members, nowMs });
}

async function writeBooking(
  tx: Transaction,
  { actor }: Booking,
  engagement: EngagementRow,
  more: { station: string; fragment: string; notices: string[] },
): Promise<void> {
  await writeLedger(tx, actor, {
    action: "proposed engagement",
    subjectKind: "engagement",
    subjectId: engagement.id,
    subjectLabel: `E-${engagement.number}`,
    newValues: {
      ...more,
      state: engagement.state,
      from: engagement.dwellFrom.toISOString(),
      to: engagement.dwellTo.toISOString(),
    },
  });
}
