import { cookies, headers } from "next/headers";
import { forbidden, redirect } from "next/navigation";
import { cache } from "react";
import { may, type Right } from "@/lib/engagement/roles";
import { actorFromSession, type PersonActor } from "@/lib/services/authenticate";
import { signInPath } from "./return-path";
import { readSession, sessionCookieName } from "./session";

/** Who looks at this page, or null; asked once per request. */
export const currentPerson = cache(async (): Promise<PersonActor | null> => {
  const claims = await readSession((await cookies()).get(sessionCookieName())?.value, Date.now());
  return claims ? actorFromSession(claims) : null;
});

/**
 * The person a page is for. Without a sign-in it leads to the sign-in page and
 * back; without the right it shows the refused page with status 403. Every page
 * calls it: the layout and the proxy decide nothing.
 */
export async function requirePerson(right?: Right): Promise<PersonActor> {
  const person = await currentPerson();
  if (!person) redirect(signInPath((await headers()).get("x-dwellbook-path")));
  if (right && !may(person, right)) forbidden();
  return person;
}
