import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";
import { may } from "@/lib/engagement/roles";
import { listEngagements } from "@/lib/services/list-engagements";
import { WatchDesk } from "./watch-desk";

export const metadata = { title: "Watch" };

export default async function WatchPage() {
  const person = await requirePerson("read book");
  const nowMs = Date.now();
  const { engagements } = await listEngagements(person, { state: "proposed,cleared,confirmed" }, nowMs);
  return (
    <>
      <PageHeader title="Watch">
        What comes next at every station, with the time that is left. Times are UTC.
      </PageHeader>
      <WatchDesk nowMs={nowMs} initial={engagements} mayScrub={may(person, "scrub any")} />
    </>
  );
}
