import type { Transaction } from "@/db/client";
import { voidAnswersOfEngagement } from "@/db/queries/answers";
import { voidConfirmations } from "@/db/queries/engagement-records";
import { changeEngagement, type EngagementRow } from "@/db/queries/engagements";
import { askedAuthorities, authoritiesById } from "@/db/queries/notices";
import { inTransaction } from "@/db/transaction";
import { type EngagementBody, moveInput } from "@/lib/contracts/engagements";
import { decide } from "@/lib/engagement/decide";
import type { DecisionFacts } from "@/lib/engagement/facts";
import { conflict, notAllowed, type Refusal } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import type { Interval } from "@/lib/planning/interval";
import { acceptedEffect, reasonsAgainst } from "./accept-dwell";
import { refuseStranger } from "./command-right";
import { coordinationFacts } from "./decision-facts";
import { dwellOf } from "./dwell-input";
import { factsOfRow, type Locked, lockEngagement } from "./engagement-lock";
import { overlapRefusal, refuseWhenHeld } from "./hold-conflict";
import { type Judgement, judgeDwell } from "./judge-dwell";
import { writeLedger } from "./ledger";
import { permit } from "./permit";
import { type RoundMember, raiseNotices } from "./raise-notices";
import { readBody } from "./read-input";
import { queueAfterDwell } from "./screen-after-dwell";
import { currentBody } from "./view-engagement";

/**
 * Gives an engagement other times in its pass. It goes back to `proposed`: answers
 * and confirmations are void, everybody concerned gets a revised notice. Refused
 * inside an authority's deadline for changes; 409 when somebody changed it meanwhile.
 */
export async function moveEngagement(
  actor: Actor,
  id: string,
  input: unknown,
  nowMs: number,
): Promise<EngagementBody> {
  if (!may(actor, "move own")) throw notAllowed("move an engagement");
  await refuseStranger(actor, "move", id, nowMs);
  const wanted = await readBody(moveInput, input);
  try {
    return await inTransaction(async (tx) => {
      const locked = await lockEngagement(tx, id);
      const facts = await coordinationFacts(tx, actor, id);
      if (locked.engagement.version !== wanted.version) throw staleVersion(locked.engagement);
      const dwell = dwellOf(wanted);
      if (!sameTimes(locked.engagement, dwell)) await move(tx, { locked, actor, facts, dwell, nowMs });
      return currentBody(tx, id, nowMs);
    });
  } catch (error) {
    throw overlapRefusal(error) ?? error;
  }
}

interface Move {
  readonly locked: Locked;
  readonly actor: Actor;
  readonly facts: DecisionFacts;
  readonly dwell: Interval;
  readonly nowMs: number;
}

async function move(tx: Transaction, args: Move): Promise<void> {
  const { locked, facts, dwell, nowMs } = args;
  const { engagement, station } = locked;
  await refuseWhenHeld(tx, station, { fragmentId: engagement.fragmentId, dwell, exceptId: engagement.id });
  const decision = decide(factsOfRow(engagement), "move", { ...facts, newFromMs: dwell.fromMs }, nowMs);
  // What was answered was said of other times: it neither stands in the way nor helps.
  const voided = await voidAnswersOfEngagement(tx, engagement.id, "the dwell was moved", nowMs);
  const { id: engagementId, passId } = engagement;
  const judgement = await judgeDwell(tx, { passId, ...dwell, nowMs, engagementId });
  const next = permit(decision, "The move", reasonsAgainst(judgement));
  const names = await voidConfirmations(tx, engagementId, nowMs);
  const changes = {
    state: next,
    dwellFrom: new Date(dwell.fromMs),
    dwellTo: new Date(dwell.toMs),
    effect: acceptedEffect(judgement, engagement.effect.aim),
    elementSetId: judgement.elementSetId,
    laserSettingId: judgement.laserSettingId,
    calendarSequence: engagement.calendarSequence + 1,
  };
  const changed = await changeEngagement(tx, engagementId, changes, nowMs);
  await queueAfterDwell(tx, engagementId);
  await tellMove(tx, args, changed, judgement, { answersVoided: voided.length, confirmationsVoided: names });
}

/** Revised notices and the ledger's row. */
async function tellMove(
  tx: Transaction,
  { locked: { engagement }, actor, nowMs }: Move,
  changed: EngagementRow,
  judgement: Judgement,
  voided: Record<string, number>,
): Promise<void> {
  const notices = await raiseNotices(tx, {
    engagementId: engagement.id,
    members: await revisedRound(tx, engagement.id, judgement),
    reason: "The dwell was moved to times that no longer concern you.",
    change: "the times of the dwell",
    former: { fromMs: engagement.dwellFrom.getTime(), toMs: engagement.dwellTo.getTime() },
    nowMs,
  });
  await writeLedger(tx, actor, {
    action: "moved engagement",
    subjectKind: "engagement",
    subjectId: engagement.id,
    subjectLabel: `E-${engagement.number}`,
    oldValues: spanValues(engagement),
    newValues: { ...spanValues(changed), notices, ...voided },
  });
}

/** Who hears of a change: the concerned anew, and those that no longer are, to cancel. */
export async function revisedRound(
  tx: Transaction,
  engagementId: string,
  judgement: Judgement,
): Promise<RoundMember[]> {
  const asked = await askedAuthorities(tx, engagementId);
  const askedIds = new Set(asked.map(({ authority }) => authority.id));
  const because = new Map(judgement.concerned.map((concerned) => [concerned.authorityId, concerned.because]));
  const rows = await authoritiesById(tx, [...new Set([...because.keys(), ...askedIds])]);
  return rows.map((authority): RoundMember => {
    const reason = because.get(authority.id);
    if (reason === undefined) return { authority, kind: "cancellation", because: "you had a request" };
    return { authority, kind: askedIds.has(authority.id) ? "revised request" : "request", because: reason };
  });
}

function sameTimes(row: EngagementRow, dwell: Interval): boolean {
  return row.dwellFrom.getTime() === dwell.fromMs && row.dwellTo.getTime() === dwell.toMs;
}

function spanValues(row: EngagementRow): Record<string, unknown> {
  return { state: row.state, from: row.dwellFrom.toISOString(), to: row.dwellTo.toISOString() };
}

/** 409 with the row as it now stands, so that the screen can show it without asking again. */
function staleVersion(row: EngagementRow): Refusal {
  const current = { ...spanValues(row), version: row.version };
  return conflict(
    `E-${row.number} was changed meanwhile: look at it again, then decide.`,
    Object.entries(current).map(([path, value]) => ({ path, message: String(value) })),
  );
}
