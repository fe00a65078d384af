import { FetchError } from "@/app/_client/fetch-json";

interface ErrorNoteProps {
  /** What was thrown, usually a FetchError with all reasons. Nothing is shown for null and undefined. */
  readonly error: unknown;
  /** What failed: "The dwell was not booked". */
  readonly title?: string;
  /** Paths whose reasons stand beside their fields: they are not said twice. */
  readonly shownElsewhere?: readonly string[];
}

/** A refusal or failure in words, with every reason; announced at once. */
export function ErrorNote({ error, title, shownElsewhere = [] }: ErrorNoteProps) {
  if (error === null || error === undefined) return null;
  const { message, details: all } = wordsOf(error);
  const details = all.filter((d) => !shownElsewhere.includes(d.path));
  const signedOut = error instanceof FetchError && error.status === 401;
  return (
    <div role="alert" className="max-w-[75ch] border-l-4 border-dwell bg-sheet px-3 py-2">
      <p className="font-semibold">{title ?? message}</p>
      {title ? <p>{message}</p> : null}
      {details.length > 0 ? (
        <ul className="mt-1 list-disc pl-5">
          {details.map((d) => (
            <li key={`${d.path} ${d.message}`}>{d.message}</li>
          ))}
        </ul>
      ) : null}
      {signedOut ? (
        // In a tab of its own: what was typed here stays.
        <a href="/sign-in" target="_blank" rel="noreferrer" className="act">
          Sign in again in a new tab, then repeat this
        </a>
      ) : null}
    </div>
  );
}

function wordsOf(error: unknown) {
  if (error instanceof FetchError) return { message: error.message, details: error.details };
  return { message: error instanceof Error ? error.message : String(error), details: [] };
}
