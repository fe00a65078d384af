import { ButtonLink } from "@/app/_components/button";
import { EmptyState } from "@/app/_components/empty-state";
import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";
import { listLedger } from "@/lib/services/list-ledger";
import { LedgerFilters } from "./ledger-filters";
import { ledgerQueryOf, olderPath, readLedgerSearch } from "./ledger-search";
import { LedgerTable } from "./ledger-table";

export const metadata = { title: "Ledger" };

interface LedgerPageProps {
  readonly searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function LedgerPage({ searchParams }: LedgerPageProps) {
  const person = await requirePerson("read ledger");
  const search = readLedgerSearch(await searchParams);
  const { entries, nextBefore } = await listLedger(person, ledgerQueryOf(search));
  return (
    <>
      <PageHeader title="Ledger" aside="newest first">
        Who did what, when, why, with old and new values. Rows are only ever added; nobody can change or
        remove one.
      </PageHeader>
      <LedgerFilters search={search} />
      {entries.length === 0 ? (
        <EmptyState title="No entry matches" action={<ButtonLink href="/ledger">Show everything</ButtonLink>}>
          The filters above are joined: an entry has to fit all of them.
        </EmptyState>
      ) : (
        <LedgerTable entries={entries} />
      )}
      {nextBefore === null ? null : (
        <ButtonLink className="mt-4" href={olderPath(search, nextBefore)}>
          Older entries
        </ButtonLink>
      )}
    </>
  );
}
