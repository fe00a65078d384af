import type { ReactNode } from "react";

interface PageHeaderProps {
  readonly title: ReactNode;
  /** A few quiet words beside the title. */
  readonly aside?: ReactNode;
  /** One or two sentences: what this page is for. */
  readonly children?: ReactNode;
  /** Buttons or links at the right. */
  readonly actions?: ReactNode;
}

/** The head of a page: its only h1. */
export function PageHeader({ title, aside, children, actions }: PageHeaderProps) {
  return (
    <header className="mb-5 flex flex-wrap items-start justify-between gap-x-8 gap-y-3">
      <div className="min-w-0">
        <h1 className="text-2xl leading-tight font-bold">
          {title} {aside ? <span className="text-[0.9375rem] font-normal text-quiet">{aside}</span> : null}
        </h1>
        {children ? <div className="mt-1 max-w-[75ch] text-quiet">{children}</div> : null}
      </div>
      {actions ? <div className="flex flex-wrap gap-2.5">{actions}</div> : null}
    </header>
  );
}
