import { ImportForm } from "@/app/_components/import-sets/import-form";
import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";

export const metadata = { title: "Import" };

export default async function ImportPage() {
  await requirePerson("import elements");
  return (
    <>
      <PageHeader title="Import">
        Good sets are stored with their raw text, and their passes are worked out at once. Bad ones are named
        by line and column; nothing of them is kept.
      </PageHeader>
      <ImportForm />
    </>
  );
}
