import { ButtonLink } from "@/app/_components/button";
import { EngagementList } from "@/app/_components/engagement/engagement-list";
import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";
import { listStations } from "@/lib/services/list-stations";

export const metadata = { title: "Engagements" };

export default async function EngagementsPage() {
  const person = await requirePerson("read book");
  const nowMs = Date.now();
  const { stations } = await listStations(person, nowMs);
  return (
    <>
      <PageHeader title="Engagements" actions={<ButtonLink href="/calendar">Calendar</ButtonLink>}>
        Every booked dwell: who is asked, what is answered, who confirmed, what was fired.
      </PageHeader>
      <EngagementList nowMs={nowMs} stations={stations.map(({ id, name }) => ({ id, name }))} />
    </>
  );
}
