import type { ReactNode } from "react";
import {
  SKY_CENTRE as CENTRE,
  skyPath as pathOf,
  skyPlace as placeOf,
  SKY_RADIUS as RADIUS,
  SKY_SIZE as SIZE,
} from "@/app/_components/sky/place";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { PassSheetBody, SampleBody } from "@/lib/contracts/passes";
import type { Span } from "./dwell-time";

const within = (samples: readonly SampleBody[], span: Span): SampleBody[] =>
  samples.filter((s) => Date.parse(s.at) >= span.fromMs && Date.parse(s.at) <= span.toMs);

interface SkyChartProps {
  readonly sheet: PassSheetBody;
  readonly dwell: Span | null;
  /** What else stands in the sky, placed by skyPlace; under the pass. */
  readonly overlay?: ReactNode;
}

/** The pass over the station's sky, with the dwell and the stretches that protected objects close. */
export function SkyChart({ sheet, dwell, overlay }: SkyChartProps) {
  const { samples, station } = sheet;
  const first = samples[0];
  const last = samples.at(-1);
  if (!first || !last) return <p className="text-quiet">No track: the model refused this pass.</p>;
  const highest = samples.reduce((a, b) => (b.elevationDeg > a.elevationDeg ? b : a));
  return (
    <figure>
      <svg
        viewBox={`0 0 ${SIZE} ${SIZE}`}
        role="img"
        aria-label={nameOf(sheet)}
        className="h-auto w-full max-w-96"
      >
        <Grid floorDeg={station.minElevationDeg} ceilingDeg={station.maxElevationDeg} />
        {overlay}
        <path d={pathOf(samples)} fill="none" stroke="var(--ink)" strokeWidth={1.8} strokeLinejoin="round" />
        {sheet.crossings.map((c) => (
          <path
            key={`${c.name}-${c.from}`}
            d={pathOf(within(samples, { fromMs: Date.parse(c.from), toMs: Date.parse(c.to) }))}
            fill="none"
            stroke="var(--shut)"
            strokeWidth={7}
            strokeDasharray="2 2.5"
          >
            <title>{`${c.name}, ${c.minSeparationDeg.toFixed(1)}° from the beam`}</title>
          </path>
        ))}
        {dwell ? (
          <path d={pathOf(within(samples, dwell))} fill="none" stroke="var(--dwell)" strokeWidth={5} />
        ) : null}
        <Mark at={first} word={`rise ${utcTimeOfDay(Date.parse(sheet.riseAt))}`} />
        <Mark at={highest} word={`${Math.round(sheet.maxElevationDeg)}°`} />
        <Mark at={last} word={`set ${utcTimeOfDay(Date.parse(sheet.setAt))}`} />
      </svg>
      <figcaption className="text-[0.8125rem] text-quiet">
        The station's sky from below the zenith, north up, east right. Thick: the dwell. Broken: where a
        protected object closes the beam. Dotted: protected objects near the beam, ringed where nearest.
        Dashed circles: elevation floor {station.minElevationDeg}° and ceiling {station.maxElevationDeg}°.
        {station.horizonMask.length > 0 ? " Filled from the rim: behind the horizon mask." : ""}
      </figcaption>
    </figure>
  );
}

function Grid({ floorDeg, ceilingDeg }: { readonly floorDeg: number; readonly ceilingDeg: number }) {
  const ring = (elevationDeg: number): number => (RADIUS * (90 - elevationDeg)) / 90;
  return (
    <>
      {[0, 30, 60].map((deg) => (
        <circle key={deg} cx={CENTRE} cy={CENTRE} r={ring(deg)} fill="none" stroke="var(--line)" />
      ))}
      {[floorDeg, ceilingDeg].map((deg) => (
        <circle
          key={`limit-${deg}`}
          cx={CENTRE}
          cy={CENTRE}
          r={ring(deg)}
          fill="none"
          stroke="var(--shut)"
          strokeDasharray="3 4"
        />
      ))}
      {(["N", "E", "S", "W"] as const).map((word, i) => {
        const p = placeOf(i * 90, -9);
        return (
          <text key={word} x={p.x} y={p.y + 4} textAnchor="middle" fontSize={13} fill="var(--quiet)">
            {word}
          </text>
        );
      })}
    </>
  );
}

function Mark({ at, word }: { readonly at: SampleBody; readonly word: string }) {
  const p = placeOf(at.azimuthDeg, at.elevationDeg);
  const toLeft = p.x > SIZE - 90;
  return (
    <g>
      <circle cx={p.x} cy={p.y} r={3.4} fill="var(--ink)" />
      <text
        x={p.x + (toLeft ? -7 : 7)}
        y={p.y - 6}
        textAnchor={toLeft ? "end" : "start"}
        fontSize={11}
        fill="var(--ink)"
        stroke="var(--sheet)"
        strokeWidth={3}
        paintOrder="stroke"
        className="font-mono"
      >
        {word}
      </text>
    </g>
  );
}

function nameOf(sheet: PassSheetBody): string {
  const at = (deg: number): string => `${Math.round(deg)}°`;
  return `Sky over ${sheet.stationName}: ${sheet.fragmentName} rises at azimuth ${at(sheet.riseAzimuthDeg)}, culminates at ${at(sheet.culminationAzimuthDeg)}, ${at(sheet.maxElevationDeg)} high, sets at ${at(sheet.setAzimuthDeg)}; ${sheet.crossings.length} crossings by protected objects`;
}
