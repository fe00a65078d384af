/** Keeps the place of rows that are being read, so that nothing jumps when they come. */
export function ListSkeleton() {
  return (
    <div aria-hidden="true" className="sheet">
      {Array.from({ length: 8 }, (_, i) => i).map((i) => (
        <div key={i} className="flex h-16 items-center border-b border-line px-4 last:border-0">
          <svg viewBox="0 0 180 42" width={180} height={42} role="presentation">
            <path d="M2 32 Q90 -18 178 32" fill="none" stroke="var(--line)" strokeWidth={1.6} />
            <path d="M2 32 H178" stroke="var(--line)" />
          </svg>
        </div>
      ))}
    </div>
  );
}
