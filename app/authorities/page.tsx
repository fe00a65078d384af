import Link from "next/link";
import { EmptyState } from "@/app/_components/empty-state";
import { Facts } from "@/app/_components/facts";
import { Figure, Figures } from "@/app/_components/figure";
import { PageHeader } from "@/app/_components/page-header";
import { numberText } from "@/app/_format/figures";
import { zoneTime } from "@/app/_format/utc";
import { requirePerson } from "@/app/_server/require-person";
import type { AuthorityBody } from "@/lib/contracts/authorities";
import { listAuthorities } from "@/lib/services/list-authorities";

export const metadata = { title: "Authorities" };

export default async function AuthoritiesPage() {
  const person = await requirePerson("read book");
  const nowMs = Date.now();
  const { authorities } = await listAuthorities(person);
  return (
    <>
      <PageHeader title="Authorities" aside={`${authorities.length} with a contact`}>
        Who is asked, who is told, and how long before. Lead times and deadlines are each authority’s own
        settings.
      </PageHeader>
      {authorities.length === 0 ? <EmptyState title="No authority has been set up" /> : null}
      <ul className="grid items-start gap-5 md:grid-cols-2 2xl:grid-cols-3">
        {authorities.map((authority) => (
          <li key={authority.id} id={authority.id} className="min-w-0">
            <AuthorityCard authority={authority} nowMs={nowMs} />
          </li>
        ))}
      </ul>
    </>
  );
}

function AuthorityCard({ authority, nowMs }: { readonly authority: AuthorityBody; readonly nowMs: number }) {
  return (
    <article className="sheet p-4 sm:p-5">
      <h2 className="text-lg font-bold">
        {authority.name} <span className="text-[0.9375rem] font-normal text-quiet">{authority.kind}</span>
      </h2>
      <div className="my-4">
        <Figures label={`Deadlines of ${authority.name}`}>
          <Figure
            value={numberText(authority.leadTimeMin)}
            unit="min"
            label="lead time"
            note="a request goes out at least this long before the dwell"
          />
          <Figure
            value={numberText(authority.changeDeadlineMin)}
            unit="min"
            label="change deadline"
            note="nearer to the dwell than this a change is refused: it is scrubbed instead"
          />
          <Figure
            value={numberText(authority.openNotices)}
            label="awaiting its answer"
            note="notices sent and not answered"
          />
        </Figures>
      </div>
      <Facts facts={contactFacts(authority, nowMs)} />
      <Concern authority={authority} />
    </article>
  );
}

function contactFacts(authority: AuthorityBody, nowMs: number) {
  return [
    {
      label: "E-mail",
      value: (
        <a className="link break-all" href={`mailto:${authority.email}`}>
          {authority.email}
        </a>
      ),
    },
    { label: "Telephone", value: authority.phone, figure: true },
    { label: "Out of hours", value: authority.outOfHoursPhone ?? "none given", figure: true },
    { label: "Duty hours", value: authority.dutyHours, note: `in ${authority.timeZone}` },
    { label: "Local time now", value: zoneTime(nowMs, authority.timeZone) ?? "unknown zone", figure: true },
    { label: "Answers here", value: authority.coordinators.join(", ") || "nobody signs in; by link only" },
  ];
}

function Concern({ authority }: { readonly authority: AuthorityBody }) {
  if (authority.stations.length === 0 && authority.volumes.length === 0) {
    return <p className="mt-3 text-quiet">It is not concerned by any station or airspace so far.</p>;
  }
  return (
    <p className="mt-3 text-quiet">
      {authority.stations.length > 0 ? "Asked about every engagement of " : null}
      {authority.stations.map((station, index) => (
        <span key={station.id}>
          {index > 0 ? ", " : null}
          <Link prefetch={false} className="link" href={`/stations/${station.id}`}>
            {station.name}
          </Link>
        </span>
      ))}
      {authority.stations.length > 0 ? ". " : null}
      {authority.volumes.length > 0
        ? `Asked where the beam crosses ${authority.volumes.map((volume) => volume.name).join(", ")}.`
        : null}
    </p>
  );
}
