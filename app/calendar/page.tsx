import { CalendarDesk } from "@/app/_components/calendar/calendar-desk";
import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";
import { may } from "@/lib/engagement/roles";
import { listFragments } from "@/lib/services/list-fragments";
import { listStations } from "@/lib/services/list-stations";
import "@/app/_components/calendar/calendar.css";

export const metadata = { title: "Calendar" };

export default async function CalendarPage() {
  const person = await requirePerson("read book");
  const nowMs = Date.now();
  const [{ stations }, { fragments }] = await Promise.all([
    listStations(person, nowMs),
    listFragments(person, nowMs),
  ]);
  return (
    <>
      <PageHeader title="Calendar">
        Booked dwells, and the passes most worth booking. Pick a pass to book its dwell; drag your own
        proposal to move it, or pick it and type the times.
      </PageHeader>
      <CalendarDesk
        nowMs={nowMs}
        personId={person.id}
        mayPropose={may(person, "propose")}
        stations={stations.map(({ id, name }) => ({ id, name }))}
        fragments={fragments.map(({ id, name }) => ({ id, name }))}
      />
    </>
  );
}
