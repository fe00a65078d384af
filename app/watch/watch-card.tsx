import { Button, ButtonLink } from "@/app/_components/button";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { countdownText } from "./countdown";

interface WatchCardProps {
  readonly engagement: EngagementBody;
  readonly nowMs: number;
  readonly mayScrub: boolean;
  readonly onScrub: (engagement: EngagementBody) => void;
}

/** One engagement at the watch: how long until its dwell, its state, and what to do. */
export function WatchCard({ engagement: e, nowMs, mayScrub, onScrub }: WatchCardProps) {
  const [fromMs, toMs] = [Date.parse(e.from), Date.parse(e.to)];
  return (
    <li className="sheet grid gap-x-8 gap-y-3 p-4 sm:grid-cols-[14rem_minmax(0,1fr)_auto] sm:items-center">
      <div>
        <p className="figures text-[1.625rem] leading-tight font-semibold" role="timer">
          {countdownText(fromMs - nowMs)}
        </p>
        <p className="text-[0.8125rem] text-quiet">{phaseWords(fromMs, toMs, nowMs)}</p>
      </div>
      <div className="min-w-0">
        <p className="flex flex-wrap items-center gap-x-3 gap-y-1">
          <b>E-{e.number}</b>
          <StateMark state={e.state} />
          <span>
            {e.fragmentName} over {e.stationName}
          </span>
        </p>
        <p className="mt-1">
          <UtcTime at={e.from} />{" "}
          <span className="text-quiet">for {durationText((toMs - fromMs) / 1000)}</span>
        </p>
        <p className="text-[0.875rem] text-quiet">{NEXT[e.state]}</p>
        {e.overdue ? <p className="text-dwell">Its firing record is overdue.</p> : null}
      </div>
      <div className="flex flex-wrap gap-3">
        <ButtonLink
          href={`/engagements/${e.id}`}
          look={e.state === "proposed" ? "plain" : "solid"}
          className="min-h-12 grow sm:grow-0"
        >
          {e.state === "cleared" ? "Confirm" : e.state === "confirmed" && nowMs >= fromMs ? "Record" : "Open"}{" "}
          E-{e.number}
        </ButtonLink>
        {mayScrub ? (
          <Button look="grave" className="min-h-12" onClick={() => onScrub(e)}>
            Scrub <span className="sr-only">E-{e.number}</span>
          </Button>
        ) : null}
      </div>
    </li>
  );
}

function phaseWords(fromMs: number, toMs: number, nowMs: number): string {
  if (nowMs < fromMs) return "until the dwell begins";
  if (nowMs < toMs) return "the dwell is under way";
  return "since the dwell began; it is over";
}

const NEXT: Record<EngagementBody["state"], string> = {
  proposed: "Waits for answers.",
  cleared: "Waits for two names.",
  confirmed: "Confirmed by two people.",
  fired: "Recorded.",
  scrubbed: "Will not be fired.",
  lapsed: "Will not be fired.",
};
