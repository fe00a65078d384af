import { notFound } from "next/navigation";
import { EngagementView } from "@/app/_components/engagement/engagement-view";
import { requirePerson } from "@/app/_server/require-person";
import { Refusal } from "@/lib/engagement/refusal";
import { may } from "@/lib/engagement/roles";
import { engagementSheet } from "@/lib/services/engagement-sheet";

export const metadata = { title: "Engagement" };

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/** Coordinators read the engagements that they have notices about; the service decides, so no right is asked here. */
export default async function EngagementPage({ params }: { readonly params: Promise<{ id: string }> }) {
  const person = await requirePerson();
  const { id } = await params;
  if (!UUID.test(id)) notFound();
  const sheet = await engagementSheet(person, id, Date.now()).catch((error: unknown) => {
    if (error instanceof Refusal && error.status === 404) notFound();
    throw error;
  });
  return <EngagementView initial={sheet} readsBook={may(person, "read book")} />;
}
