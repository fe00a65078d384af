import type { NearObjectBody, PassSkyBody } from "@/lib/contracts/pass-surroundings";
import { skyPath, skyPlace } from "./place";

/** Sun, Moon and the ways of near objects, to be laid into the sky chart. */
export function SkyOverlay({ sky }: { readonly sky: PassSkyBody }) {
  return (
    <>
      {sky.near.map((object) => (
        <NearWay key={`${object.name}-${object.from}`} object={object} />
      ))}
      {sky.sun.elevationDeg > 0 ? <Sun {...sky.sun} /> : null}
      {sky.moon.elevationDeg > 0 ? <Moon {...sky.moon} /> : null}
    </>
  );
}

/** Dotted, with an arrowhead's worth of a dot where the object leaves. */
function NearWay({ object }: { readonly object: NearObjectBody }) {
  const above = object.samples.filter((s) => s.elevationDeg >= 0);
  const last = above.at(-1);
  const nearest = above.find((s) => s.at === object.minSeparationAt);
  if (!last) return null;
  const end = skyPlace(last.azimuthDeg, last.elevationDeg);
  const mark = nearest ? skyPlace(nearest.azimuthDeg, nearest.elevationDeg) : end;
  return (
    <g>
      <path d={skyPath(above)} fill="none" stroke="var(--accent)" strokeWidth={1.4} strokeDasharray="1.5 2.5">
        <title>{`${object.name}, ${object.class}`}</title>
      </path>
      <circle cx={end.x} cy={end.y} r={2} fill="var(--accent)" />
      <circle cx={mark.x} cy={mark.y} r={4} fill="none" stroke="var(--accent)" />
      <Label {...mark} word={object.name} />
    </g>
  );
}

function Sun({ azimuthDeg, elevationDeg }: PassSkyBody["sun"]) {
  const { x, y } = skyPlace(azimuthDeg, elevationDeg);
  return (
    <g>
      <circle cx={x} cy={y} r={5} fill="var(--worth)" stroke="var(--ink)" strokeWidth={0.8} />
      {[0, 45, 90, 135, 180, 225, 270, 315].map((deg) => (
        <path
          key={deg}
          d="M0-6.5V-10"
          transform={`translate(${x} ${y}) rotate(${deg})`}
          stroke="var(--ink)"
          strokeWidth={1}
        />
      ))}
      <Label x={x} y={y - 8} word="Sun" />
    </g>
  );
}

function Moon({ azimuthDeg, elevationDeg }: PassSkyBody["moon"]) {
  const { x, y } = skyPlace(azimuthDeg, elevationDeg);
  return (
    <g>
      <circle cx={x} cy={y} r={6} fill="var(--sheet)" stroke="var(--ink)" strokeWidth={1} />
      <path d={`M${x} ${y - 6}a6 6 0 0 1 0 12a8 8 0 0 0 0-12`} fill="var(--ink)" />
      <Label x={x} y={y - 6} word="Moon" />
    </g>
  );
}

function Label({ x, y, word }: { readonly x: number; readonly y: number; readonly word: string }) {
  const toLeft = x > 230;
  return (
    <text
      x={x + (toLeft ? -7 : 7)}
      y={y + 11}
      textAnchor={toLeft ? "end" : "start"}
      fontSize={10}
      fill="var(--accent)"
      stroke="var(--sheet)"
      strokeWidth={2.5}
      paintOrder="stroke"
    >
      {word}
    </text>
  );
}
