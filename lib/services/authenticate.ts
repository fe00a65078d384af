import { createHash } from "node:crypto";
import { database } from "@/db/client";
import { ownerOfToken, type PersonRow, personById, touchToken } from "@/db/queries/people";
import type { Role } from "@/lib/contracts/common";
import type { Actor } from "@/lib/engagement/roles";

/** A person who signed in or sent a token: an actor with an identity. */
export type PersonActor = Actor & { readonly id: string; readonly email: string };

/** What a session cookie claims. Everything else is read from the database. */
export interface SessionClaims {
  readonly personId: string;
  readonly sessionVersion: number;
}

/** Longer strings are not looked at: no token is that long. */
const LONGEST_TOKEN = 200;

/**
 * The actor behind a session, with the role of this moment; null when the
 * person is unknown or inactive, or the session version has risen since.
 */
export async function actorFromSession(claims: SessionClaims): Promise<PersonActor | null> {
  if (!/^[0-9a-f-]{36}$/i.test(claims.personId)) return null;
  const person = await personById(database(), claims.personId);
  if (!person?.active || person.sessionVersion !== claims.sessionVersion) return null;
  return toActor(person, "screen");
}

/**
 * The actor behind a personal access token; null when the token is unknown or
 * revoked, or its owner inactive. Notes the use at `nowMs`.
 */
export async function actorFromToken(token: string, nowMs: number): Promise<PersonActor | null> {
  if (token.length === 0 || token.length > LONGEST_TOKEN) return null;
  const found = await ownerOfToken(database(), hashToken(token));
  if (!found?.person.active) return null;
  await touchToken(database(), found.token.id, new Date(nowMs));
  return toActor(found.person, "token");
}

/** What is stored of a token: SHA-256 as hexadecimal. 32 random bytes need no salt and no slow hash. */
export function hashToken(token: string): string {
  return createHash("sha256").update(token, "utf8").digest("hex");
}

function toActor(person: PersonRow, via: "screen" | "token"): PersonActor {
  return {
    id: person.id,
    name: person.name,
    email: person.email,
    role: person.role as Role, // the table's check constraint admits these words only
    authorityId: person.authorityId,
    isSafetyOfficer: person.isSafetyOfficer,
    via,
  };
}
