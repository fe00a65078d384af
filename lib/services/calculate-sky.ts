import type { NearObjectBody, PassSkyBody } from "@/lib/contracts/pass-surroundings";
import { DEG } from "@/lib/physics/constants";
import { makeSiteFrame, type SiteFrame } from "@/lib/physics/frames/earth";
import type { Elements, Site } from "@/lib/physics/orbit/elements";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { lightStretches } from "@/lib/physics/sky/light-stretches";
import { moonLitShare, moonPositionKm } from "@/lib/physics/sky/moon";
import { bodyOverSite, sunPositionKm } from "@/lib/physics/sky/sun";
import { darkness } from "@/lib/physics/sky/twilight";
import { isUsableSet } from "@/lib/planning/keep-out";
import { nearBeam } from "@/lib/planning/near-beam";
import { isoOf } from "./closure-body";
import { widestHalfAngle } from "./screen-pass";

/** Objects that come within this of the beam are shown. */
export const NEAR_DEG = 10;

/** Most of them that one picture takes. */
const MOST_NEAR = 12;

/** What the sky of a pass is worked out from: plain values, so that another process can do it. */
export interface SkyQuestion {
  readonly site: Site;
  readonly target: Elements;
  readonly riseMs: number;
  readonly culminateMs: number;
  readonly setMs: number;
  readonly minRangeKm: number;
  readonly screenedAt: string | null;
  readonly objects: readonly {
    readonly name: string;
    readonly class: string;
    readonly halfAngleDeg: number;
    /** null: it has no element set. */
    readonly elements: Elements | null;
  }[];
}

/** Sun, Moon, darkness, the light on the fragment and the protected objects near the beam. */
export function calculateSky(question: SkyQuestion): PassSkyBody {
  const { culminateMs: atMs, riseMs, setMs } = question;
  const frame = makeSiteFrame(question.site);
  const sun = bodyOverSite(frame, sunPositionKm(atMs), atMs);
  const moon = bodyOverSite(frame, moonPositionKm(atMs), atMs);
  const target = makeOrbit(question.target);
  const nothing = { near: [], nearCount: 0, unseen: question.objects.map(({ name }) => name) };
  return {
    at: isoOf(atMs),
    sun: { azimuthDeg: sun.azimuthRad / DEG, elevationDeg: sun.elevationRad / DEG },
    moon: {
      azimuthDeg: moon.azimuthRad / DEG,
      elevationDeg: moon.elevationRad / DEG,
      litShare: moonLitShare(atMs),
    },
    darkness: darkness(sun.elevationRad),
    sunlight: target.ok
      ? lightStretches(target.orbit, riseMs, setMs).map(({ fromMs, toMs, sunlight }) => {
          return { from: isoOf(Math.round(fromMs)), to: isoOf(Math.round(toMs)), sunlight };
        })
      : [],
    screenedAt: question.screenedAt,
    withinDeg: NEAR_DEG,
    ...(target.ok ? nearObjects(question, frame, target.orbit) : nothing),
  };
}

/** The protected objects near the beam, from the sets and with the angles of the screening. */
function nearObjects(
  question: SkyQuestion,
  frame: SiteFrame,
  target: Orbit,
): Pick<PassSkyBody, "near" | "nearCount" | "unseen"> {
  const { riseMs, setMs, minRangeKm } = question;
  const unseen: string[] = [];
  const others = question.objects.flatMap(({ name, class: kind, halfAngleDeg, elements }) => {
    const made = elements && makeOrbit(elements);
    if (
      !elements ||
      !made?.ok ||
      !isUsableSet(elements.epochMs, riseMs) ||
      !isUsableSet(elements.epochMs, setMs)
    ) {
      unseen.push(name);
      return [];
    }
    const { orbit } = made;
    const pass = { event: { riseMs, setMs, minRangeKm }, station: { frame } };
    const angle = widestHalfAngle(pass, target, { epochMs: elements.epochMs, halfAngleDeg, orbit });
    const withinRad = Math.max(NEAR_DEG * DEG, angle.totalRad);
    return [{ name, kind, angle, orbit, withinRad }];
  });
  const { near, failed } = nearBeam({ frame, target, others, fromMs: riseMs, toMs: setMs });
  for (const index of failed) unseen.push(others[index]?.name ?? "");
  const bodies = near.flatMap(({ index, ...stretch }): NearObjectBody[] => {
    const other = others[index];
    if (!other) return [];
    return [
      {
        name: other.name,
        class: other.kind,
        from: isoOf(Math.round(stretch.fromMs)),
        to: isoOf(Math.round(stretch.toMs)),
        minSeparationDeg: stretch.minSeparationDeg,
        minSeparationAt: isoOf(Math.round(stretch.minSeparationAtMs)),
        halfAngleDeg: other.angle.halfAngleRad / DEG,
        addedDeg: other.angle.addedRad / DEG,
        samples: stretch.samples.map(({ atMs, ...sample }) => ({ at: isoOf(Math.round(atMs)), ...sample })),
      },
    ];
  });
  const pressing = (body: NearObjectBody) => body.minSeparationDeg / (body.halfAngleDeg + body.addedDeg);
  bodies.sort((a, b) => pressing(a) - pressing(b));
  return { near: bodies.slice(0, MOST_NEAR), nearCount: bodies.length, unseen };
}
