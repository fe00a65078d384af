import { redirect } from "next/navigation";
import { homeFor } from "@/app/_components/nav-items";
import { OperatorStart } from "@/app/_components/start/operator-start";
import { PlannerStart } from "@/app/_components/start/planner-start";
import { waitingLines } from "@/app/_components/start/waiting";
import { requirePerson } from "@/app/_server/require-person";
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
    may(person, "confirm") ? null : nextPass(person, nowMs),
  ]);
  const coming = engagements.filter((e) => Date.parse(e.to) > nowMs).slice(0, 6);
  const waiting = waitingLines(engagements, fragments.filter((f) => f.awaitsNewElements).length);
  const parts = { coming, waiting, nowMs };
  return may(person, "confirm") ? (
    <OperatorStart {...parts} />
  ) : (
    <PlannerStart
      {...parts}
      pass={pass}
      mayPropose={may(person, "propose")}
      fragmentCount={fragments.length}
      mayImport={may(person, "import elements")}
    />
  );
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
