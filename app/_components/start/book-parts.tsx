import Link from "next/link";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { NextEngagements } from "./next-engagements";
import type { WaitingLine } from "./waiting";

export interface BookPartsProps {
  readonly coming: readonly EngagementBody[];
  readonly waiting: readonly WaitingLine[];
  readonly nowMs: number;
}

/** What waits in the book, and what is booked next. */
export function BookParts({ coming, waiting, nowMs }: BookPartsProps) {
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
