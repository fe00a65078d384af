import type { ReactNode } from "react";

interface EmptyStateProps {
  /** What is not here: "No passes in these three days". */
  readonly title: string;
  /** Why, and what would bring something. */
  readonly children?: ReactNode;
  /** A link or button that leads on. */
  readonly action?: ReactNode;
}

/** What a list says when it has nothing to show. */
export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="sheet max-w-3xl border-dashed px-5 py-8">
      <p className="text-base font-semibold">{title}</p>
      {children ? <div className="mt-1 max-w-[60ch] text-quiet">{children}</div> : null}
      {action ? <div className="mt-4">{action}</div> : null}
    </div>
  );
}
