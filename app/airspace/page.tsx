import { EmptyState } from "@/app/_components/empty-state";
import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";
import { listAirspace } from "@/lib/services/list-airspace";
import { listStations } from "@/lib/services/list-stations";
import { VolumeCard } from "./volume-card";

export const metadata = { title: "Airspace" };

export default async function AirspacePage() {
  const person = await requirePerson("read book");
  const nowMs = Date.now();
  const [{ volumes }, { stations }] = await Promise.all([
    listAirspace(person, nowMs),
    listStations(person, nowMs),
  ]);
  return (
    <>
      <PageHeader title="Airspace" aside={`${volumes.length} volumes`}>
        Where and when a beam would cross airspace that is in use. Beyond the known schedule a volume reads
        “not checked”, never open.
      </PageHeader>
      {volumes.length === 0 ? (
        <EmptyState title="No airspace volume has been entered">
          Plans then know of no airspace at all. That does not mean that the sky is free: ask your air unit.
        </EmptyState>
      ) : null}
      <ul className="grid items-start gap-5 xl:grid-cols-2">
        {volumes.map((volume) => (
          <li key={volume.id} id={volume.id} className="min-w-0">
            <VolumeCard volume={volume} stations={stations} />
          </li>
        ))}
      </ul>
    </>
  );
}
