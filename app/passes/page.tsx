import { PageHeader } from "@/app/_components/page-header";
import { PassList } from "@/app/_components/pass-list/pass-list";
import { RunningSweeps } from "@/app/_components/sweep/running-sweeps";
import { requirePerson } from "@/app/_server/require-person";
import { may } from "@/lib/engagement/roles";
import { listFragments } from "@/lib/services/list-fragments";
import { listStations } from "@/lib/services/list-stations";

export const metadata = { title: "Passes" };

export default async function PassesPage() {
  const person = await requirePerson("search passes");
  const nowMs = Date.now();
  const [{ stations }, { fragments }] = await Promise.all([
    listStations(person, nowMs),
    listFragments(person, nowMs),
  ]);
  return (
    <>
      <PageHeader title="Passes">
        What rises over the stations, what the best permitted dwell does to the orbit, and what closes the
        rest.
      </PageHeader>
      <RunningSweeps mayCancel={may(person, "import elements")} />
      <PassList
        nowMs={nowMs}
        stations={stations.map(({ id, name }) => ({ id, name }))}
        fragments={fragments.map(({ id, name }) => ({ id, name }))}
      />
    </>
  );
}
