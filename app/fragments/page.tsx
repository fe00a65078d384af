import { ButtonLink } from "@/app/_components/button";
import { EmptyState } from "@/app/_components/empty-state";
import { FragmentTable } from "@/app/_components/fragment/fragment-table";
import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";
import { may } from "@/lib/engagement/roles";
import { listFragments } from "@/lib/services/list-fragments";

export const metadata = { title: "Fragments" };

export default async function FragmentsPage() {
  const person = await requirePerson("read book");
  const { fragments } = await listFragments(person, Date.now());
  const mayImport = may(person, "import elements");
  return (
    <>
      <PageHeader
        title="Fragments"
        aside={`${fragments.length} in the book`}
        actions={mayImport ? <ButtonLink href="/import">Import element sets</ButtonLink> : null}
      >
        What is to be nudged: how fresh its orbit is, when it comes next and what has been done to it so far.
      </PageHeader>
      {fragments.length === 0 ? (
        <EmptyState
          title="No fragment is in the book yet"
          action={mayImport ? <ButtonLink href="/import">Import element sets</ButtonLink> : null}
        >
          Fragments come with their element sets.
        </EmptyState>
      ) : (
        <FragmentTable fragments={fragments} />
      )}
    </>
  );
}
