import { type StripFrame, xOf } from "./geometry";

export interface StripClosure {
  readonly fromMs: number;
  readonly toMs: number;
  readonly verdict: "closed" | "pending" | "not checked";
  /** Two or three words: "payload QS-88, 1.9°". */
  readonly label: string;
}

const HATCH = {
  closed: { angle: 55, opacity: 0.75, gap: 5 },
  "not checked": { angle: 0, opacity: 0.4, gap: 5 },
} as const;

/** The hatchings of one picture; ids are per picture, since a page shows many. */
export function HatchPatterns({ id }: { readonly id: string }) {
  return (
    <defs>
      {Object.entries(HATCH).map(([verdict, h]) => (
        <pattern
          key={verdict}
          id={`${id}-${verdict.replace(" ", "-")}`}
          width={h.gap}
          height={h.gap}
          patternUnits="userSpaceOnUse"
          patternTransform={`rotate(${h.angle + 90 * Number(verdict === "not checked")})`}
        >
          <line x1={0} y1={0} x2={0} y2={h.gap} stroke="var(--shut)" strokeWidth={2.2} opacity={h.opacity} />
        </pattern>
      ))}
    </defs>
  );
}

interface ClosureMarksProps {
  readonly frame: StripFrame;
  readonly closures: readonly StripClosure[];
  readonly hatchId: string;
  /** Names the closed stretches above the picture. */
  readonly written: boolean;
}

/** Closed and unchecked seconds as hatched gaps; pending ones, often the whole pass, as a dotted line on top. */
export function ClosureMarks({ frame, closures, hatchId, written }: ClosureMarksProps) {
  let labelEnd = Number.NEGATIVE_INFINITY;
  return closures.map((c) => {
    const key = `${c.fromMs}-${c.toMs}-${c.label}`;
    if (c.verdict === "pending") return <PendingMark key={key} frame={frame} closure={c} />;
    const x1 = xOf(frame, c.fromMs);
    // A crossing of a second would be a hair: it is drawn at least two pixels wide.
    const width = Math.max(2, xOf(frame, c.toMs) - x1);
    const half = c.label.length * 3.1;
    const place = Math.min(Math.max(x1 + width / 2, frame.left + half), frame.width - frame.right - half);
    // A label that would run into its neighbour is left to the list under the picture.
    const shown = written && c.verdict === "closed" && place - half > labelEnd + 6;
    if (shown) labelEnd = place + half;
    const gap = { x: x1, y: frame.topY - 2, width, height: frame.groundY - frame.topY + 2 };
    return (
      <g key={key}>
        <title>{`${c.verdict}: ${c.label}`}</title>
        {c.verdict === "closed" ? <rect {...gap} fill="var(--sheet)" /> : null}
        <rect {...gap} fill={`url(#${hatchId}-${c.verdict.replace(" ", "-")})`} />
        {shown ? (
          <text x={place} y={frame.topY - 13} textAnchor="middle" fontSize={12.5} fill="var(--quiet)">
            {c.label}
          </text>
        ) : null}
      </g>
    );
  });
}

function PendingMark(props: { readonly frame: StripFrame; readonly closure: StripClosure }) {
  const { frame, closure } = props;
  const x1 = xOf(frame, closure.fromMs);
  return (
    <line
      x1={x1 + 1}
      x2={Math.max(x1 + 2, xOf(frame, closure.toMs) - 1)}
      y1={frame.topY - 4}
      y2={frame.topY - 4}
      stroke="var(--quiet)"
      strokeWidth={2}
      strokeLinecap="round"
      strokeDasharray="0.1 5"
    >
      <title>{`pending: ${closure.label}`}</title>
    </line>
  );
}
