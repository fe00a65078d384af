import { UtcTime } from "@/app/_components/utc-time";
import { utcShort } from "@/app/_format/utc";
import type { NoticeBody } from "@/lib/contracts/engagements";
import { deliveryWords, isWaiting } from "./notice-words";

/** Notices of one engagement with delivery, opening and answer; the ones in force first. */
export function NoticeList({ notices }: { readonly notices: readonly NoticeBody[] }) {
  if (notices.length === 0) return <p className="text-quiet">Nobody had to be asked.</p>;
  const inForce = notices.filter((n) => !n.superseded);
  const replaced = notices.filter((n) => n.superseded);
  return (
    <>
      <ul>
        {inForce.map((n) => (
          <NoticeItem key={n.id} notice={n} />
        ))}
      </ul>
      {replaced.length > 0 ? (
        <details className="mt-3">
          <summary className="min-h-8 text-quiet">
            {replaced.length} {replaced.length === 1 ? "earlier notice" : "earlier notices"}, replaced
          </summary>
          <ul>
            {replaced.map((n) => (
              <NoticeItem key={n.id} notice={n} />
            ))}
          </ul>
        </details>
      ) : null}
    </>
  );
}

function NoticeItem({ notice }: { readonly notice: NoticeBody }) {
  return (
    <li className="grid gap-x-6 gap-y-1 border-b border-line py-3 last:border-0 lg:grid-cols-[minmax(0,1fr)_minmax(0,1.4fr)]">
      <div>
        <p className="font-semibold">{notice.authorityName}</p>
        <p className="text-[0.875rem] text-quiet">
          {notice.kind} to {notice.toEmail}: {deliveryWords(notice)}
          {notice.openedAt ? `, opened ${utcShort(notice.openedAt)}` : ""}
        </p>
      </div>
      <NoticeAnswer notice={notice} />
    </li>
  );
}

/** The answer in force, or until when one is awaited. */
export function NoticeAnswer({ notice }: { readonly notice: NoticeBody }) {
  const { answer } = notice;
  if (answer) {
    return (
      <div>
        <p>
          <strong className="inline-block first-letter:uppercase">{answer.outcome}</strong>,{" "}
          {answer.answeredBy}, {answer.via === "link" ? "by link" : "at the desk"},{" "}
          <UtcTime at={answer.answeredAt} show="short" />
        </p>
        {answer.conditions ? <p>Conditions: {answer.conditions}</p> : null}
        {answer.reasons ? <p>Reasons: {answer.reasons}</p> : null}
      </div>
    );
  }
  if (!isWaiting(notice)) return <p className="text-quiet">Asks for no answer.</p>;
  return (
    <p>
      No answer yet
      {notice.answerBy ? (
        <>
          ; awaited until <UtcTime at={notice.answerBy} show="short" />
        </>
      ) : null}
      .
    </p>
  );
}
