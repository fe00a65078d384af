import type { ReactNode } from "react";

interface FigureProps {
  /** The number as text (see app/_format/figures): formatted, with a true minus. */
  readonly value: ReactNode;
  readonly unit?: string;
  /** What it is, in a few words under the figure. */
  readonly label: string;
  /** Where it comes from; shown on hover and read with the label. */
  readonly note?: string;
  readonly size?: "large" | "small";
}

/** One figure: the number large and monospaced, and under it what it is. Put several in a <Figures>. */
export function Figure({ value, unit, label, note, size = "large" }: FigureProps) {
  return (
    <div className="flex min-w-0 flex-col-reverse justify-end" title={note}>
      <dt className="text-[0.8125rem] text-quiet">
        {label}
        {note ? <span className="sr-only">, {note}</span> : null}
      </dt>
      <dd
        className={`figures font-semibold ${size === "large" ? "text-[1.375rem] leading-tight" : "text-base"}`}
      >
        {value}
        {unit ? (
          <span className="text-[0.72em] font-medium">{unit === "°" ? unit : `\u202f${unit}`}</span>
        ) : null}
      </dd>
    </div>
  );
}

/** A row of figures that wraps. */
export function Figures({ children, label }: { readonly children: ReactNode; readonly label?: string }) {
  return (
    <dl aria-label={label} className="flex flex-wrap gap-x-9 gap-y-4">
      {children}
    </dl>
  );
}
