import { database } from "@/db/client";
import { listPeopleRows, type PersonListRow } from "@/db/queries/people";
import type { Role } from "@/lib/contracts/common";
import type { PersonBody } from "@/lib/contracts/people";
import { notAllowed, notFound } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";

/** Refuses everybody who doesn't manage people. */
export function requirePeopleRight(actor: Actor): void {
  if (!may(actor, "manage people")) throw notAllowed("managing people");
}

/** Everybody with a sign-in, active ones first. */
export async function listPeople(actor: Actor): Promise<{ people: PersonBody[] }> {
  requirePeopleRight(actor);
  return { people: (await listPeopleRows(database())).map(toBody) };
}

/** One person, after a change. */
export async function readPerson(actor: Actor, id: string): Promise<PersonBody> {
  requirePeopleRight(actor);
  const [row] = await listPeopleRows(database(), id);
  if (!row) throw notFound("person");
  return toBody(row);
}

function toBody({ person, authorityName, liveTokens }: PersonListRow): PersonBody {
  return {
    id: person.id,
    name: person.name,
    email: person.email,
    role: person.role as Role, // by the check constraint
    isSafetyOfficer: person.isSafetyOfficer,
    authorityId: person.authorityId,
    authorityName,
    active: person.active,
    liveTokens,
    createdAt: person.createdAt.toISOString(),
  };
}
