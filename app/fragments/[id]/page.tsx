import { notFound } from "next/navigation";
import { ElementHistory } from "@/app/_components/fragment/element-history";
import { FragmentEngagements } from "@/app/_components/fragment/fragment-engagements";
import { FragmentHead } from "@/app/_components/fragment/fragment-head";
import { PassList } from "@/app/_components/pass-list/pass-list";
import { Section } from "@/app/_components/section";
import { requirePerson } from "@/app/_server/require-person";
import { Refusal } from "@/lib/engagement/refusal";
import { fragmentSheet } from "@/lib/services/fragment-sheet";

export const metadata = { title: "Fragment" };

export default async function FragmentPage({ params }: { readonly params: Promise<{ id: string }> }) {
  const person = await requirePerson("read book");
  const { id } = await params;
  const nowMs = Date.now();
  const sheet = await fragmentSheet(person, id, nowMs).catch((error: unknown) => {
    if (error instanceof Refusal && error.status === 404) notFound();
    throw error;
  });
  return (
    <div className="grid gap-5">
      <FragmentHead sheet={sheet} />
      <Section title="Engagements" intro="Every engagement of this fragment, newest first.">
        <FragmentEngagements engagements={sheet.engagements} />
      </Section>
      <Section title="Coming passes">
        <PassList nowMs={nowMs} fragmentId={sheet.id} stations={[]} fragments={[]} />
      </Section>
      <Section title="Element sets" intro="Kept for ever, as they came.">
        <ElementHistory sets={sheet.elementSets} />
      </Section>
    </div>
  );
}
