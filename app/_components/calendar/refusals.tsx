/** Why a dwell would be refused; said as soon as it is known. */
export function Refusals({
  refusals,
}: {
  readonly refusals: readonly { readonly path: string; readonly message: string }[];
}) {
  return (
    <div aria-live="polite">
      {refusals.length > 0 ? (
        <div className="border-l-4 border-dwell px-3 py-1">
          <p className="font-semibold">This dwell would be refused:</p>
          <ul className="list-disc pl-5">
            {refusals.map((r) => (
              <li key={`${r.path} ${r.message}`}>{r.message}</li>
            ))}
          </ul>
        </div>
      ) : null}
    </div>
  );
}
