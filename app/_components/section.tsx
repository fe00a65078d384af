import { type ReactNode, useId } from "react";

interface SectionProps {
  readonly title: string;
  /** A sentence under the title. */
  readonly intro?: ReactNode;
  /** Buttons at the right of the title. */
  readonly actions?: ReactNode;
  readonly children: ReactNode;
}

/** A sheet with a title: the usual part of a page. */
export function Section({ title, intro, actions, children }: SectionProps) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="sheet min-w-0 p-4 sm:p-5">
      <div className="mb-4 flex flex-wrap items-start justify-between gap-x-6 gap-y-2">
        <div>
          <h2 id={id} className="text-lg font-bold">
            {title}
          </h2>
          {intro ? <p className="mt-0.5 max-w-[65ch] text-quiet">{intro}</p> : null}
        </div>
        {actions}
      </div>
      {children}
    </section>
  );
}
