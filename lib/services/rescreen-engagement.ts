import type { Transaction } from "@/db/client";
import { database } from "@/db/client";
import { voidAnswersOfEngagement } from "@/db/queries/answers";
import { changeEngagement, stationOfEngagement } from "@/db/queries/engagements";
import { askedAuthorities, authoritiesById } from "@/db/queries/notices";
import { inTransaction } from "@/db/transaction";
import { asState, isLive } from "@/lib/engagement/states";
import { storedEffect } from "./accept-dwell";
import { judgeOwn, tryClear } from "./clear-engagement";
import { judgedFacts } from "./decision-facts";
import { type Locked, lockEngagement } from "./engagement-lock";
import type { Judgement } from "./judge-dwell";
import { SYSTEM, writeLedger } from "./ledger";
import { revisedRound } from "./move-engagement";
import { type RoundMember, raiseNotices } from "./raise-notices";
import { queueAfterDwell } from "./screen-after-dwell";
import { sendBack } from "./send-back";

/**
 * Judges a live engagement again with the newest facts. What no longer holds goes
 * back to `proposed`; who is newly concerned is asked; what holds again is cleared.
 * Does nothing once the dwell has begun: then only a record can end it.
 */
export async function rescreenEngagement(id: string, nowMs: number): Promise<void> {
  if ((await stationOfEngagement(database(), id)) === null) return;
  await inTransaction(async (tx) => {
    const locked = await lockEngagement(tx, id);
    const { engagement } = locked;
    if (!isLive(asState(engagement.state)) || nowMs >= engagement.dwellFrom.getTime()) return;
    const judgement = await judgeOwn(tx, locked, nowMs);
    const updated = await keepNewest(tx, locked, judgement, nowMs);
    const reason = await reasonToReopen(tx, updated, judgement);
    const reopened = reason === null ? updated : await sendBack(tx, updated, SYSTEM, reason, nowMs);
    const asked = await askAnew(tx, reopened, engagement.laserSettingId, judgement, nowMs);
    await tryClear(tx, asked, nowMs);
  });
}

/** Takes over the newest element set and its figures; the ledger names both sets. */
async function keepNewest(
  tx: Transaction,
  locked: Locked,
  judgement: Judgement,
  nowMs: number,
): Promise<Locked> {
  const { engagement } = locked;
  const { elementSetId, laserSettingId, effect } = judgement;
  if (effect === null) return locked;
  if (elementSetId === engagement.elementSetId && laserSettingId === engagement.laserSettingId) return locked;
  const changed = await changeEngagement(
    tx,
    engagement.id,
    { elementSetId, laserSettingId, effect: storedEffect(effect, engagement.effect.aim) },
    nowMs,
  );
  await queueAfterDwell(tx, engagement.id);
  await writeLedger(tx, SYSTEM, {
    action: "judged engagement again on newer figures",
    subjectKind: "engagement",
    subjectId: engagement.id,
    subjectLabel: `E-${engagement.number}`,
    oldValues: { elementSetId: engagement.elementSetId, laserSettingId: engagement.laserSettingId },
    newValues: { elementSetId, laserSettingId },
  });
  return { ...locked, engagement: changed };
}

/** Why a cleared or confirmed engagement no longer holds, in words; null while it does. */
async function reasonToReopen(tx: Transaction, locked: Locked, judgement: Judgement): Promise<string | null> {
  const facts = await judgedFacts(tx, SYSTEM, locked.engagement.id, judgement);
  // A name was given for what was known then; what is unknown since needs new words.
  const unattested = facts.notChecked.filter(
    ({ rule, attestable }) => facts.confirmedBy.length > 0 && !(attestable && facts.attested.includes(rule)),
  );
  const causes = [
    ...facts.closed,
    ...facts.pending,
    ...unattested.map(({ cause }) => `not checked: ${cause}`),
  ];
  const missing = facts.unanswered.map((name) => `${name} has not answered.`);
  const words = causes.length > 0 ? causes : missing;
  return words.length > 0 ? words.join(" ") : null;
}

/** Asks who is newly concerned; after a change of the laser setting everybody, and old answers are void. */
async function askAnew(
  tx: Transaction,
  locked: Locked,
  formerLaserId: string,
  judgement: Judgement,
  nowMs: number,
): Promise<Locked> {
  const { engagement } = locked;
  const laserChanged = engagement.laserSettingId !== formerLaserId;
  const members = laserChanged
    ? await revisedRound(tx, engagement.id, judgement)
    : await newlyConcerned(tx, locked, judgement, nowMs);
  if (members.length === 0) return locked;
  const reason = "the laser setting was changed";
  const reopened = laserChanged ? await sendBack(tx, locked, SYSTEM, reason, nowMs) : locked;
  if (laserChanged) await voidAnswersOfEngagement(tx, engagement.id, reason, nowMs);
  const calendarSequence = engagement.calendarSequence + 1;
  const changed = await changeEngagement(tx, engagement.id, { calendarSequence }, nowMs);
  const round = { members, reason, change: "the laser setting", nowMs };
  const notices = await raiseNotices(tx, { engagementId: engagement.id, ...round });
  await writeLedger(tx, SYSTEM, {
    action: "asked anew about engagement",
    subjectKind: "engagement",
    subjectId: engagement.id,
    subjectLabel: `E-${engagement.number}`,
    reason: laserChanged ? reason : "the beam now concerns them",
    newValues: { notices },
  });
  return { ...reopened, engagement: changed };
}

/** Concerned authorities without a request, as long as their lead time still allows one. */
async function newlyConcerned(
  tx: Transaction,
  { engagement }: Locked,
  judgement: Judgement,
  nowMs: number,
): Promise<RoundMember[]> {
  const asked = new Set((await askedAuthorities(tx, engagement.id)).map(({ authority }) => authority.id));
  const leftMs = engagement.dwellFrom.getTime() - nowMs;
  const fresh = judgement.concerned.filter(
    ({ authorityId, leadTimeMin }) => !asked.has(authorityId) && leftMs >= leadTimeMin * 60_000,
  );
  const rows = await authoritiesById(
    tx,
    fresh.map(({ authorityId }) => authorityId),
  );
  return rows.map((authority) => ({
    authority,
    kind: "request",
    because: fresh.find(({ authorityId }) => authorityId === authority.id)?.because ?? "the beam concerns it",
  }));
}
