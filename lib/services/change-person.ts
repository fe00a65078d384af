import type { Transaction } from "@/db/client";
import { databaseFault } from "@/db/errors";
import {
  lockAdministrators,
  lockPerson,
  type PersonRow,
  revokeAllTokens,
  updatePerson,
} from "@/db/queries/people";
import { inTransaction } from "@/db/transaction";
import {
  endSessionsInput,
  type PersonBody,
  type PersonChange,
  personChangeInput,
} from "@/lib/contracts/people";
import { notAllowed, notFound, type Reason, refused } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import { writeLedger } from "./ledger";
import { readPerson, requirePeopleRight } from "./people";
import { readInput } from "./read-input";

type Settings = Pick<PersonRow, "role" | "authorityId" | "isSafetyOfficer" | "active">;

/**
 * Changes role, authority, safety duty or activity. All sessions of the person
 * end with it; who is deactivated also loses their tokens. Refused (422) when
 * nothing would change, for one's own role or activity, and when no active
 * administrator would be left.
 */
export async function changePerson(actor: Actor, id: string, input: unknown): Promise<PersonBody> {
  requirePeopleRight(actor);
  const change = readInput(personChangeInput, input);
  await inTransaction(async (tx) => {
    const administrators = await lockAdministrators(tx);
    // The actor may have lost the role since the request began.
    if (!administrators.some((a) => a.id === actor.id)) throw notAllowed("managing people");
    const person = await lockPerson(tx, id);
    if (!person) throw notFound("person");
    const before = settingsOf(person);
    const after = settingsAfter(before, change);
    const reasons = reasonsAgainst(actor, person, after, administrators);
    if (reasons.length > 0) throw refused("The person was not changed.", reasons);
    await applyChange(tx, id, after);
    await writeLedger(tx, actor, {
      action: actionOf(before, after),
      subjectKind: "person",
      subjectId: id,
      subjectLabel: person.name,
      reason: change.reason,
      oldValues: onlyDifferent(before, after),
      newValues: onlyDifferent(after, before),
    });
  });
  return readPerson(actor, id);
}

/** Ends all sessions of a person at once; their tokens stay. */
export async function endSessions(actor: Actor, id: string, input: unknown): Promise<void> {
  requirePeopleRight(actor);
  const { reason } = readInput(endSessionsInput, input);
  await inTransaction(async (tx) => {
    const person = await lockPerson(tx, id);
    if (!person) throw notFound("person");
    await updatePerson(tx, id, {});
    await writeLedger(tx, actor, {
      action: "ended all sessions",
      subjectKind: "person",
      subjectId: id,
      subjectLabel: person.name,
      reason,
    });
  });
}

async function applyChange(tx: Transaction, id: string, after: Settings): Promise<void> {
  try {
    await updatePerson(tx, id, after);
  } catch (error) {
    if (databaseFault(error)?.code !== "23503") throw error;
    const message = "there is no such authority";
    throw refused("The person was not changed.", [{ path: "authorityId", message }]);
  }
  if (!after.active) await revokeAllTokens(tx, id);
}

function settingsOf(person: PersonRow): Settings {
  const { role, authorityId, isSafetyOfficer, active } = person;
  return { role, authorityId, isSafetyOfficer, active };
}

/** A role other than coordinator has no authority: it goes by itself. */
function settingsAfter(before: Settings, change: PersonChange): Settings {
  const role = change.role ?? before.role;
  const asked = change.authorityId === undefined ? before.authorityId : change.authorityId;
  const leaves = change.authorityId === undefined && role !== "coordinator";
  return {
    role,
    authorityId: leaves ? null : asked,
    isSafetyOfficer: change.isSafetyOfficer ?? before.isSafetyOfficer,
    active: change.active ?? before.active,
  };
}

function reasonsAgainst(
  actor: Actor,
  person: PersonRow,
  after: Settings,
  administrators: PersonRow[],
): Reason[] {
  const reasons: Reason[] = [];
  const say = (path: string, message: string) => reasons.push({ path, message });
  const own = actor.id === person.id;
  if (actionOf(person, after) === "changed nothing of") say("", "nothing would change");
  if (own && after.role !== person.role) say("role", "nobody changes their own role");
  if (own && !after.active) say("active", "nobody deactivates themselves");
  if (after.role === "coordinator" && after.authorityId === null) {
    say("authorityId", "a coordinator answers for an authority: name it");
  }
  if (after.role !== "coordinator" && after.authorityId !== null) {
    say("authorityId", "only a coordinator has an authority");
  }
  const stays = after.active && after.role === "administrator";
  if (!stays && !administrators.some((a) => a.id !== person.id)) {
    say("role", "an active administrator has to be left");
  }
  return reasons;
}

/** What the ledger calls it. */
function actionOf(before: Settings, after: Settings): string {
  if (before.active !== after.active) return after.active ? "activated" : "deactivated";
  if (before.role !== after.role) return "changed role of";
  return Object.keys(onlyDifferent(before, after)).length > 0 ? "changed settings of" : "changed nothing of";
}

function onlyDifferent(values: Settings, other: Settings): Record<string, unknown> {
  const keys = ["role", "authorityId", "isSafetyOfficer", "active"] as const;
  return Object.fromEntries(keys.filter((k) => values[k] !== other[k]).map((k) => [k, values[k]]));
}
