import { durationText, numberText } from "@/app/_format/figures";
import type { PassBody } from "@/lib/contracts/passes";
import type { StripClosure } from "./closure-marks";
import { PassStrip, type StripProps } from "./pass-strip";

/** The strip of a pass as the API gives it; the booked dwell stands in for the offered one. */
export function StripOfPass({ pass, size }: { readonly pass: PassBody; readonly size: StripProps["size"] }) {
  const span = pass.booked ?? pass.dwell;
  return (
    <PassStrip
      size={size}
      riseMs={Date.parse(pass.riseAt)}
      setMs={Date.parse(pass.setAt)}
      elevationDeg={pass.strip.elevationDeg}
      worthPerS={pass.strip.worthPerS}
      closures={stripClosures(pass)}
      dwell={span ? { fromMs: Date.parse(span.from), toMs: Date.parse(span.to) } : null}
      name={nameOf(pass)}
    />
  );
}

/**
 * The closures that a strip draws, in time order. Of a pass that is over, time itself is not drawn: it
 * would hatch the whole picture and hide what was planned.
 */
export function stripClosures(pass: Pick<PassBody, "closures" | "setAt">): StripClosure[] {
  return pass.closures
    .filter((c) => c.rule !== "time passed" || c.to < pass.setAt)
    .map((c) => ({
      fromMs: Date.parse(c.from),
      toMs: Date.parse(c.to),
      verdict: c.verdict,
      label: c.label,
    }))
    .sort((a, b) => a.fromMs - b.fromMs);
}

/** The picture in one sentence. */
function nameOf(pass: PassBody): string {
  const lengthS = (Date.parse(pass.setAt) - Date.parse(pass.riseAt)) / 1000;
  const closed = pass.closures.filter((c) => c.verdict === "closed").length;
  const span = pass.booked ?? pass.dwell;
  const dwell = span
    ? `dwell of ${durationText((Date.parse(span.to) - Date.parse(span.from)) / 1000)} from ${span.from.slice(11, 19)}Z`
    : "no dwell";
  return `${pass.fragmentName} over ${pass.stationName}: ${durationText(lengthS)}, up to ${numberText(pass.maxElevationDeg)}°, ${closed} ${closed === 1 ? "closure" : "closures"}, ${dwell}`;
}
