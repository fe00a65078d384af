import Link from "next/link";
import { redirect } from "next/navigation";
import { ButtonLink } from "@/app/_components/button";
import { homeFor } from "@/app/_components/nav-items";
import { PageHeader } from "@/app/_components/page-header";
import { InTime } from "@/app/_components/start/in-time";
import { NextEngagements } from "@/app/_components/start/next-engagements";
import { NextPass } from "@/app/_components/start/next-pass";
import { type WaitingLine, waitingLines } from "@/app/_components/start/waiting";
import { requirePerson } from "@/app/_server/require-person";
import type { EngagementBody } from "@/lib/contracts/engagements";
import type { PassBody } from "@/lib/contracts/passes";
import { may } from "@/lib/engagement/roles";
import { listEngagements } from "@/lib/services/list-engagements";
import { listFragments } from "@/lib/services/list-fragments";
import { searchPasses } from "@/lib/services/search-passes";

export const metadata = { title: "Start" };

const HOUR_MS = 3_600_000;

/** Where a day starts: coordinators at their notices, operators with what is booked, planners with the next pass. */
export default async function StartPage() {
  const person = await requirePerson();
  if (!may(person, "search passes")) redirect(homeFor(person));
  const nowMs = Date.now();
  const [{ engagements }, { fragments }, pass] = await Promise.all([
    listEngagements(person, { state: "proposed,cleared,confirmed" }, nowMs),
    listFragments(person, nowMs),
    nextPass(person, nowMs),
  ]);
  const coming = engagements.filter((e) => Date.parse(e.to) > nowMs).slice(0, 6);
  const waiting = waitingLines(engagements, fragments.filter((f) => f.awaitsNewElements).length);
  const parts = { coming, waiting, pass, nowMs };
  return may(person, "confirm") ? (
    <OperatorStart {...parts} />
  ) : (
    <PlannerStart
      {...parts}
      mayPropose={may(person, "propose")}
      fragmentCount={fragments.length}
      mayImport={may(person, "import elements")}
    />
  );
}

interface StartParts {
  readonly coming: readonly EngagementBody[];
  readonly waiting: readonly WaitingLine[];
  readonly pass: PassBody | null;
  readonly nowMs: number;
}

/** The nearest pass that offers a dwell: the next hours first, the whole week when they have none. */
async function nextPass(person: Parameters<typeof searchPasses>[0], nowMs: number): Promise<PassBody | null> {
  for (const hours of [3, 24, 168]) {
    const query = {
      from: new Date(nowMs).toISOString(),
      to: new Date(nowMs + hours * HOUR_MS).toISOString(),
    };
    const { passes } = await searchPasses(person, query, nowMs);
    const found = passes.find((p) => p.dwell !== null);
    if (found) return found;
  }
  return null;
}

function PlannerStart(
  props: StartParts & {
    readonly mayPropose: boolean;
    readonly mayImport: boolean;
    readonly fragmentCount: number;
  },
) {
  const { pass, nowMs, waiting, coming } = props;
  if (!pass) {
    return (
      <>
        <PageHeader
          title={
            props.fragmentCount === 0
              ? "No fragment is in the book yet"
              : "No pass of the coming week can be lased"
          }
          actions={props.mayImport ? <ButtonLink href="/import">Import element sets</ButtonLink> : null}
        >
          {props.fragmentCount === 0
            ? "Import element sets; their passes over the stations of the coming week are worked out at once."
            : "Newer element sets or answers from authorities may open some. The list of passes says what closes each."}
        </PageHeader>
        <BookParts coming={coming} waiting={waiting} nowMs={nowMs} />
      </>
    );
  }
  return (
    <>
      <PageHeader
        title={
          <>
            Your next pass worth lasing is <InTime atMs={Date.parse(pass.riseAt)} nowMs={nowMs} />
          </>
        }
      />
      <NextPass pass={pass} mayPropose={props.mayPropose} />
      <BookParts coming={coming} waiting={waiting} nowMs={nowMs} />
    </>
  );
}

function OperatorStart({ coming, waiting, nowMs }: StartParts) {
  const [first] = coming;
  return (
    <>
      <PageHeader
        title={
          first ? (
            <>
              The next engagement is <InTime atMs={Date.parse(first.from)} nowMs={nowMs} />
            </>
          ) : (
            "No engagement is booked"
          )
        }
        actions={first ? <ButtonLink href="/watch">Open the watch</ButtonLink> : null}
      >
        {first
          ? `E-${first.number}: ${first.fragmentName} over ${first.stationName}, ${first.state}.`
          : "Planners propose dwells; what is cleared appears here for two people to confirm."}
      </PageHeader>
      <BookParts coming={coming} waiting={waiting} nowMs={nowMs} />
    </>
  );
}

function BookParts({ coming, waiting, nowMs }: Omit<StartParts, "pass">) {
  return (
    <div className="mt-9 grid gap-8">
      <section aria-labelledby="waits">
        <h2 id="waits" className="mb-2 text-lg font-bold">
          What waits
        </h2>
        {waiting.length === 0 ? <p className="text-quiet">Nothing waits.</p> : null}
        <ul className="grid gap-1">
          {waiting.map((w) => (
            <li key={w.href + w.text}>
              <Link prefetch={false} href={w.href} className="act">
                {w.text}
              </Link>
            </li>
          ))}
        </ul>
      </section>
      {coming.length > 0 ? (
        <section aria-labelledby="coming">
          <h2 id="coming" className="mb-2 text-lg font-bold">
            Booked next
          </h2>
          <NextEngagements engagements={coming} nowMs={nowMs} />
        </section>
      ) : null}
    </div>
  );
}
