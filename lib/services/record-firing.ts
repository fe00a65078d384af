import type { Transaction } from "@/db/client";
import { insertFiring } from "@/db/queries/engagement-records";
import { engagementView, liveEngagementsOfFragment } from "@/db/queries/engagements";
import { inTransaction } from "@/db/transaction";
import { type EngagementBody, fireInput } from "@/lib/contracts/engagements";
import { decide } from "@/lib/engagement/decide";
import { checkFiring, type FiringClaim } from "@/lib/engagement/firing";
import { notAllowed, notFound } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { refuseStranger } from "./command-right";
import { coordinationFacts } from "./decision-facts";
import { endEngagement } from "./end-engagement";
import { factsOfRow, lockEngagement } from "./engagement-lock";
import { permit } from "./permit";
import { addJob } from "./queue";
import { readBody } from "./read-input";
import { currentBody } from "./view-engagement";

type FireInput = ReturnType<typeof fireInput.parse>;

/**
 * Records what was fired in a confirmed engagement, or that nothing was. Refused with
 * every reason when fields are missing or contradict each other. Other live
 * engagements of the fragment are judged again: its orbit is no longer the known one.
 */
export async function recordFiring(
  actor: Actor,
  id: string,
  input: unknown,
  nowMs: number,
): Promise<EngagementBody> {
  if (!may(actor, "record firing") || actor.id === null) throw notAllowed("record a firing");
  const recordedBy = actor.id;
  await refuseStranger(actor, "fire", id, nowMs);
  const record = await readBody(fireInput, input);
  return inTransaction(async (tx) => {
    await fire(tx, { actor, recordedBy, id, record, nowMs });
    return currentBody(tx, id, nowMs);
  });
}

async function fire(
  tx: Transaction,
  args: { actor: Actor; recordedBy: string; id: string; record: FireInput; nowMs: number },
): Promise<void> {
  const { actor, recordedBy, id, record, nowMs } = args;
  const { engagement } = await lockEngagement(tx, id);
  const view = await engagementView(tx, id);
  if (view === null) throw notFound("engagement");
  const claim = claimOf(record);
  const facts = factsOfRow(engagement);
  const { repetitionRateHz, pulseEnergyJ } = view.laser;
  const { dwellFromMs, dwellToMs } = facts;
  const faults = checkFiring(claim, { dwellFromMs, dwellToMs, repetitionRateHz, nowMs });
  permit(decide(facts, "fire", await coordinationFacts(tx, actor, id), nowMs), "The firing record", faults);
  const pulses = claim.pulses ?? 0;
  await insertFiring(tx, {
    engagementId: id,
    fragmentId: engagement.fragmentId,
    outcome: record.outcome,
    openedAt: claim.openedMs === null ? null : new Date(claim.openedMs),
    closedAt: claim.closedMs === null ? null : new Date(claim.closedMs),
    pulses,
    deliveredEnergyJ: pulses * pulseEnergyJ,
    interruptions: record.interruptions,
    note: record.note ?? null,
    recordedBy,
    recordedAt: new Date(nowMs),
  });
  const { outcome, openedMs, closedMs } = claim;
  const ending = {
    next: "fired",
    action: outcome === "not fired" ? "recorded that nothing was fired" : "recorded a firing",
    reason: record.note ?? null,
    fired: { outcome, openedMs, closedMs, pulses },
    newValues: { ...record, pulses },
  } as const;
  await endEngagement(tx, engagement, actor, ending, nowMs);
  if (outcome !== "not fired") await rescreenOthers(tx, engagement.fragmentId, id);
}

async function rescreenOthers(tx: Transaction, fragmentId: string, exceptId: string): Promise<void> {
  for (const engagementId of await liveEngagementsOfFragment(tx, fragmentId, exceptId)) {
    await addJob(
      tx,
      "rescreen-engagement",
      { engagementId },
      { jobKey: `rescreen-engagement ${engagementId}` },
    );
  }
}

function claimOf(record: FireInput): FiringClaim {
  return {
    outcome: record.outcome,
    openedMs: record.openedAt ? Date.parse(record.openedAt) : null,
    closedMs: record.closedAt ? Date.parse(record.closedAt) : null,
    pulses: record.pulses ?? null,
    interruptions: record.interruptions.map(({ at, secondsLost }) => ({ atMs: Date.parse(at), secondsLost })),
    note: record.note ?? null,
  };
}
