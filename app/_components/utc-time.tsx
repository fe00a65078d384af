import { instantMs, utcShort, utcText, utcTimeOfDay, zoneTime } from "@/app/_format/utc";

interface UtcTimeProps {
  /** Unix milliseconds or ISO 8601 with Z. */
  readonly at: number | string;
  /** An IANA zone whose wall clock is shown beside, small. */
  readonly zone?: string;
  /** full: date and time; short: day, month and time; time: time of day. */
  readonly show?: "full" | "short" | "time";
}

const FORMATS = { full: utcText, short: utcShort, time: utcTimeOfDay };

/** An instant in UTC. The same on server and client: it never asks the browser for its zone. */
export function UtcTime({ at, zone, show = "full" }: UtcTimeProps) {
  const ms = instantMs(at);
  const local = zone ? zoneTime(ms, zone) : null;
  return (
    <span>
      <time
        className="whitespace-nowrap"
        dateTime={Number.isFinite(ms) ? new Date(ms).toISOString() : undefined}
        title={utcText(ms)}
      >
        {FORMATS[show](ms)}
      </time>
      {local ? (
        <>
          {" "}
          <span className="inline-block text-[0.8125rem] font-normal text-quiet">{`${local} ${zone}`}</span>
        </>
      ) : null}
    </span>
  );
}
