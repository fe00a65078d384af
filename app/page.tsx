import { redirect } from "next/navigation";
import { homeFor } from "./_components/nav-items";
import { requirePerson } from "./_server/require-person";

/** The front door leads to where a person's day starts. */
export default async function HomePage() {
  redirect(homeFor(await requirePerson()));
}
