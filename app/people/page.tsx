import { PageHeader } from "@/app/_components/page-header";
import { requirePerson } from "@/app/_server/require-person";
import { listPeople } from "@/lib/services/people";
import { PeopleTable } from "./people-table";

export const metadata = { title: "People" };

export default async function PeoplePage() {
  const person = await requirePerson("manage people");
  const { people } = await listPeople(person);
  return (
    <>
      <PageHeader title="People" aside={`${people.filter((p) => p.active).length} active`}>
        Who can sign in, and as what. Every change ends the person’s sessions, takes effect at their next
        request and stands in the ledger with its reason.
      </PageHeader>
      <PeopleTable initial={people} viewerId={person.id} />
    </>
  );
}
