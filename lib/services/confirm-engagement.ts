import type { Transaction } from "@/db/client";
import { attestationsInForce, insertAttestations, insertConfirmation } from "@/db/queries/engagement-records";
import { changeEngagement, type EngagementRow } from "@/db/queries/engagements";
import { inTransaction } from "@/db/transaction";
import { confirmInput, type EngagementBody } from "@/lib/contracts/engagements";
import { checkChecklist } from "@/lib/engagement/checklist";
import { decide } from "@/lib/engagement/decide";
import type { DecisionFacts } from "@/lib/engagement/facts";
import { notAllowed, type Reason } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { judgeOwn } from "./clear-engagement";
import { refuseStranger } from "./command-right";
import { judgedFacts } from "./decision-facts";
import { factsOfRow, lockEngagement } from "./engagement-lock";
import { writeLedger } from "./ledger";
import { permit } from "./permit";
import { readBody } from "./read-input";
import { currentBody } from "./view-engagement";

type Confirmation = ReturnType<typeof confirmInput.parse>;

/**
 * Gives one of the two names that a confirmation needs, with the checklist's values.
 * The first, an operator's, leaves the engagement cleared; the second person's makes it
 * confirmed. The rules are read again: what closed meanwhile refuses it with every reason.
 */
export async function confirmEngagement(
  actor: Actor,
  id: string,
  input: unknown,
  nowMs: number,
): Promise<EngagementBody> {
  if (!may(actor, "confirm") && !may(actor, "second confirmation")) throw notAllowed("confirm an engagement");
  await refuseStranger(actor, "confirm", id, nowMs);
  const confirmation = await readBody(confirmInput, input);
  return inTransaction(async (tx) => {
    await confirm(tx, actor, id, confirmation, nowMs);
    return currentBody(tx, id, nowMs);
  });
}

async function confirm(
  tx: Transaction,
  actor: Actor,
  id: string,
  confirmation: Confirmation,
  nowMs: number,
): Promise<void> {
  const locked = await lockEngagement(tx, id);
  const { engagement } = locked;
  const known = await judgedFacts(tx, actor, id, await judgeOwn(tx, locked, nowMs));
  const given = confirmation.attestations.map(({ rule }) => rule);
  const facts: DecisionFacts = { ...known, attested: [...known.attested, ...given] };
  const more = [...checklistReasons(confirmation, nowMs), ...attestationReasons(confirmation, facts)];
  const next = permit(decide(factsOfRow(engagement), "confirm", facts, nowMs), "The confirmation", more);
  await keepWords(tx, actor, engagement, confirmation, nowMs);
  const changed = await changeEngagement(tx, id, { state: next }, nowMs);
  await writeLedger(tx, actor, {
    action: next === "confirmed" ? "confirmed engagement" : "gave the first confirmation of engagement",
    subjectKind: "engagement",
    subjectId: id,
    subjectLabel: `E-${engagement.number}`,
    oldValues: { state: engagement.state },
    newValues: {
      state: changed.state,
      checklist: confirmation.checklist,
      attestations: confirmation.attestations,
    },
  });
}

async function keepWords(
  tx: Transaction,
  actor: Actor,
  engagement: EngagementRow,
  { checklist, attestations }: Confirmation,
  nowMs: number,
): Promise<void> {
  if (actor.id === null) throw notAllowed("confirm without a name");
  const personId = actor.id;
  const capacity = actor.role === "operator" ? "operator" : "safety officer";
  const at = new Date(nowMs);
  await insertConfirmation(tx, {
    engagementId: engagement.id,
    personId,
    capacity,
    checklist,
    confirmedAt: at,
  });
  const there = await attestationsInForce(tx, engagement.id);
  const held = new Set(there.map(({ attestation }) => attestation.rule));
  const fresh = new Map(
    attestations.filter(({ rule }) => !held.has(rule)).map((words) => [words.rule, words.statement]),
  );
  await insertAttestations(
    tx,
    [...fresh].map(([rule, statement]) => ({
      engagementId: engagement.id,
      rule,
      statement,
      personId,
      attestedAt: at,
    })),
  );
}

function checklistReasons({ checklist }: Confirmation, nowMs: number): Reason[] {
  return checkChecklist(
    {
      airUnitCalledAtMs: Date.parse(checklist.airUnitCalledAt),
      interlockTestedAtMs: Date.parse(checklist.interlockTestedAt),
      crewedListCheckedAtMs: Date.parse(checklist.crewedListCheckedAt),
    },
    nowMs,
  );
}

/** A person's word stands only for what reads "not checked" and may be attested. */
function attestationReasons({ attestations }: Confirmation, facts: DecisionFacts): Reason[] {
  const open = new Set(facts.notChecked.filter((item) => item.attestable).map(({ rule }) => rule));
  return attestations.flatMap(({ rule }, index) =>
    open.has(rule)
      ? []
      : [{ path: `attestations.${index}.rule`, message: `There is nothing to attest about “${rule}”.` }],
  );
}
