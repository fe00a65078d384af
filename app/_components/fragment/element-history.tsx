import { UtcTime } from "@/app/_components/utc-time";
import type { ElementSetLineBody } from "@/lib/contracts/fragments";

/** Element sets of an object, newest first, each with its own text. */
export function ElementHistory({ sets }: { readonly sets: readonly ElementSetLineBody[] }) {
  if (sets.length === 0) return <p>No element set has been imported.</p>;
  return (
    <ol>
      {sets.map((set) => (
        <li key={set.id} className="border-b border-line last:border-0">
          <details>
            <summary className="flex min-h-11 cursor-pointer flex-wrap items-center gap-x-4 gap-y-1 py-1.5">
              <span className="figures">
                epoch <UtcTime at={set.epochAt} />
              </span>
              <span className="text-[0.875rem] text-quiet">
                {set.format}, from {set.source}, imported <UtcTime at={set.importedAt} show="short" />
              </span>
            </summary>
            <pre className="figures mb-3 overflow-x-auto border border-line p-3 text-[0.75rem]">
              {set.raw}
            </pre>
          </details>
        </li>
      ))}
    </ol>
  );
}
