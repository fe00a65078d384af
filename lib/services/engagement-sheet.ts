import { database, type Queryable } from "@/db/client";
import { attestationsInForce, confirmationsInForce, firingOf } from "@/db/queries/engagement-records";
import { type EngagementView, engagementView } from "@/db/queries/engagements";
import { findLedger } from "@/db/queries/ledger";
import { findNotices, hasNotice } from "@/db/queries/notices";
import type { EngagementSheetBody } from "@/lib/contracts/engagements";
import { decide } from "@/lib/engagement/decide";
import type { DecisionFacts } from "@/lib/engagement/facts";
import { notFound } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { asState, isLive } from "@/lib/engagement/states";
import { closureBody } from "./closure-body";
import { coordinationFacts, judgedFacts } from "./decision-facts";
import { engagementBody } from "./engagement-body";
import { factsOfRow } from "./engagement-lock";
import { type Judgement, judgeDwell } from "./judge-dwell";
import { scopeOf } from "./list-engagements";
import { ledgerBody } from "./list-ledger";
import { noticeBody } from "./notice-body";

const HISTORY_LIMIT = 500;

/**
 * Everything about one engagement, with what the viewer may do now and why not.
 * Coordinators get it when their authority has a notice of it, with their own notices only.
 */
export async function engagementSheet(actor: Actor, id: string, nowMs: number): Promise<EngagementSheetBody> {
  const authorityId = scopeOf(actor);
  const q = database();
  const view = await engagementView(q, id);
  const hidden = authorityId !== undefined && !(await hasNotice(q, id, authorityId));
  if (view === null || hidden) throw notFound("engagement");
  const judgement = await judgeLive(q, view, nowMs);
  const facts = judgement
    ? await judgedFacts(q, actor, id, judgement)
    : await coordinationFacts(q, actor, id);
  const notices = await findNotices(q, { engagementId: id, authorityId });
  return {
    ...engagementBody(view, nowMs),
    effect: effectBody(view),
    closures: judgement?.closures.map(closureBody) ?? [],
    outstanding: view.engagement.state === "proposed" ? outstandingOf(facts) : [],
    ...(await recordBodies(q, id)),
    notices: notices.map(noticeBody),
    history: may(actor, "read ledger") ? await historyOf(q, id) : [],
    commands: commandsOf(view, facts, nowMs),
  };
}

/** The rules as they stand, while they still matter. */
async function judgeLive(
  q: Queryable,
  { engagement }: EngagementView,
  nowMs: number,
): Promise<Judgement | null> {
  if (!isLive(asState(engagement.state)) || nowMs >= engagement.dwellFrom.getTime()) return null;
  return judgeDwell(q, {
    passId: engagement.passId,
    fromMs: engagement.dwellFrom.getTime(),
    toMs: engagement.dwellTo.getTime(),
    nowMs,
    engagementId: engagement.id,
  });
}

function effectBody({ engagement }: EngagementView): EngagementSheetBody["effect"] {
  const { aim: _aim, ...figures } = engagement.effect;
  return { from: engagement.dwellFrom.toISOString(), to: engagement.dwellTo.toISOString(), ...figures };
}

/** A missing answer is said once: by its rule, or here when the rule is silent. */
function outstandingOf(facts: DecisionFacts): string[] {
  const words = [...facts.closed, ...facts.pending];
  const missing = facts.unanswered.filter((name) => !words.some((sentence) => sentence.includes(name)));
  return [...words, ...missing.map((name) => `${name} has not answered.`)];
}

async function recordBodies(q: Queryable, id: string) {
  const names = await confirmationsInForce(q, id);
  const words = await attestationsInForce(q, id);
  const fired = await firingOf(q, id);
  return {
    confirmations: names.map(({ confirmation, personName }) => ({
      personName,
      capacity: confirmation.capacity,
      confirmedAt: confirmation.confirmedAt.toISOString(),
      checklist: confirmation.checklist,
    })),
    attestations: words.map(({ attestation, personName }) => ({
      rule: attestation.rule,
      statement: attestation.statement,
      personName,
      attestedAt: attestation.attestedAt.toISOString(),
    })),
    firing: fired && {
      outcome: fired.firing.outcome,
      openedAt: fired.firing.openedAt?.toISOString() ?? null,
      closedAt: fired.firing.closedAt?.toISOString() ?? null,
      pulses: fired.firing.pulses,
      deliveredEnergyJ: fired.firing.deliveredEnergyJ,
      interruptions: fired.firing.interruptions,
      note: fired.firing.note,
      recordedBy: fired.recordedByName,
      recordedAt: fired.firing.recordedAt.toISOString(),
    },
  };
}

async function historyOf(q: Queryable, id: string) {
  const rows = await findLedger(q, { subjectKind: "engagement", subjectId: id, limit: HISTORY_LIMIT });
  return rows.map(ledgerBody);
}

const COMMANDS = ["move", "confirm", "scrub", "fire"] as const;

/** Commands within the viewer's rights; a refused one comes with every reason. */
function commandsOf(
  view: EngagementView,
  facts: DecisionFacts,
  nowMs: number,
): EngagementSheetBody["commands"] {
  return COMMANDS.flatMap((command) => {
    const decision = decide(factsOfRow(view.engagement), command, facts, nowMs);
    if (decision.ok) return [{ command, refusals: [] }];
    if (decision.refusals.some(({ kind }) => kind === "right")) return [];
    return [{ command, refusals: decision.refusals.map(({ message }) => message) }];
  });
}
