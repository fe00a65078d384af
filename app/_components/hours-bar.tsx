import { useId } from "react";

const DAY_MIN = 1440;

interface HoursBarProps {
  /** Minutes of the UTC day, [from, to); from > to runs over midnight. */
  readonly hours: readonly { readonly fromMin: number; readonly toMin: number }[];
  /** Where the day stands now, for a mark. */
  readonly nowMs: number;
}

/** A day in UTC as a bar: open stretches solid, the rest hatched, a mark at now. The words stand beside it. */
export function HoursBar({ hours, nowMs }: HoursBarProps) {
  const hatch = useId();
  const nowMin = (nowMs % 86_400_000) / 60_000;
  return (
    <svg
      viewBox="0 0 288 30"
      className="block h-auto w-full max-w-96"
      role="img"
      aria-label={hoursText(hours)}
    >
      <defs>
        <pattern id={hatch} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(55)">
          <line x1="0" y1="0" x2="0" y2="6" stroke="var(--shut)" strokeWidth="2.4" />
        </pattern>
      </defs>
      <rect x="0.5" y="3.5" width="287" height="11" fill={`url(#${hatch})`} stroke="var(--line)" />
      {hours.flatMap(pieces).map(({ fromMin, toMin }) => (
        <rect
          key={fromMin}
          x={fromMin / 5}
          y="3.5"
          width={(toMin - fromMin) / 5}
          height="11"
          fill="var(--worth)"
        />
      ))}
      <line x1={nowMin / 5} x2={nowMin / 5} y1="0" y2="18" stroke="var(--ink)" strokeWidth="2" />
      {[0, 6, 12, 18, 24].map((hour) => (
        <text
          key={hour}
          x={hour * 12}
          y="28"
          textAnchor={hour === 0 ? "start" : hour === 24 ? "end" : "middle"}
          className="figures fill-quiet text-[10px]"
        >
          {String(hour).padStart(2, "0")}
        </text>
      ))}
    </svg>
  );
}

/** The hours in words: `18:00 to 05:30Z`. */
export function hoursText(hours: HoursBarProps["hours"]): string {
  if (hours.length === 0) return "never open";
  if (hours.some(({ fromMin, toMin }) => fromMin === 0 && toMin === DAY_MIN)) return "open all day";
  return hours.map(({ fromMin, toMin }) => `${clock(fromMin)} to ${clock(toMin)}Z`).join(", ");
}

/** A stretch over midnight is drawn in two. */
function pieces({ fromMin, toMin }: { fromMin: number; toMin: number }) {
  if (fromMin <= toMin) return [{ fromMin, toMin }];
  return [
    { fromMin, toMin: DAY_MIN },
    { fromMin: 0, toMin },
  ];
}

function clock(minutes: number): string {
  return `${String(Math.floor(minutes / 60)).padStart(2, "0")}:${String(minutes % 60).padStart(2, "0")}`;
}
