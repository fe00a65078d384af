import { notFound } from "next/navigation";
import { GroundTrack } from "@/app/_components/ground-track/ground-track";
import { PassSheetView } from "@/app/_components/pass-sheet/pass-sheet-view";
import { requirePerson } from "@/app/_server/require-person";
import { Refusal } from "@/lib/engagement/refusal";
import { may } from "@/lib/engagement/roles";
import { passSheet } from "@/lib/services/pass-sheet";

export const metadata = { title: "Pass" };

/** Coordinators read the passes of their own notices; the service decides, so no right is asked here. */
export default async function PassPage({ params }: { readonly params: Promise<{ id: string }> }) {
  const person = await requirePerson();
  const { id } = await params;
  const sheet = await passSheet(person, id, Date.now()).catch((error: unknown) => {
    if (error instanceof Refusal && error.status === 404) notFound();
    throw error;
  });
  return (
    <PassSheetView
      initial={sheet}
      mayPropose={may(person, "propose")}
      ground={<GroundTrack sheet={sheet} />}
    />
  );
}
