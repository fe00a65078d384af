import { StateMark } from "@/app/_components/state-mark";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { ClosureBody } from "@/lib/contracts/passes";

const ORDER = { closed: 0, "not checked": 1, pending: 2 } as const;

/** Every closure as a sentence with its times and what would lift it. */
export function ClosureList({ closures }: { readonly closures: readonly ClosureBody[] }) {
  if (closures.length === 0)
    return <p>Nothing closes any part of this pass now, and nothing is waited for.</p>;
  const sorted = [...closures].sort(
    (a, b) => ORDER[a.verdict] - ORDER[b.verdict] || a.from.localeCompare(b.from),
  );
  return (
    <ul>
      {sorted.map((c) => (
        <li
          key={`${c.rule}-${c.verdict}-${c.from}-${c.cause}`}
          className="grid gap-x-4 gap-y-1 border-b border-line py-2.5 last:border-0 sm:grid-cols-[11.5rem_6.5rem_1fr]"
        >
          <span className="figures text-[0.8125rem] text-quiet">
            {utcTimeOfDay(Date.parse(c.from))} – {utcTimeOfDay(Date.parse(c.to))}
          </span>
          <span>
            <StateMark state={c.verdict} />
          </span>
          <span className="max-w-[70ch]">
            {c.cause}
            <span className="block text-[0.875rem] text-quiet" title={`from ${c.input}`}>
              Lifted by: {c.liftedBy}. <span className="sr-only">Source: {c.input}.</span>
            </span>
          </span>
        </li>
      ))}
    </ul>
  );
}
