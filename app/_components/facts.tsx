import type { ReactNode } from "react";

export interface Fact {
  readonly label: string;
  readonly value: ReactNode;
  /** Where the value comes from, or what it means; small, under the label. */
  readonly note?: string | undefined;
  /** Numbers and times: monospaced. */
  readonly figure?: boolean;
}

/** Label and value in two columns: the settings of a record. */
export function Facts({ facts }: { readonly facts: readonly Fact[] }) {
  return (
    <dl className="grid grid-cols-[minmax(0,1fr)_auto] gap-x-6">
      {facts.map((fact) => (
        <div
          key={fact.label}
          className="col-span-2 grid grid-cols-subgrid items-baseline border-b border-line py-1.5 last:border-b-0"
        >
          <dt>
            {fact.label}
            {fact.note ? <span className="block text-[0.8125rem] text-quiet">{fact.note}</span> : null}
          </dt>
          <dd className={`text-right ${fact.figure ? "figures" : ""}`}>{fact.value}</dd>
        </div>
      ))}
    </dl>
  );
}
