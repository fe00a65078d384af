import type { PassRow } from "@/db/queries/passes";
import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import type { DwellLimits } from "@/lib/planning/choose-dwell";
import type { Closure } from "@/lib/planning/closure";
import type { Aim, FragmentBody, PulsedLaser } from "@/lib/planning/laser";
import { measurePass } from "@/lib/planning/measure-pass";
import type { PassGeometry } from "@/lib/planning/pass-geometry";
import { planInputs, planPass } from "@/lib/planning/pass-plan";
import type { StoredPlan } from "@/lib/planning/stored-plan";
import { bodyOf, laserOf, limitsOf } from "./domain-rows";
import type { StationScene } from "./station-scene";

/** What every pass is planned for until planners can choose. */
export const AIM: Aim = "decay";

/** The laser, fragment and limits that a plan is made with. */
export interface Figures {
  readonly laser: PulsedLaser;
  readonly laserSettingId: string;
  readonly laserVersion: number;
  readonly body: FragmentBody;
  readonly limits: DwellLimits;
}

/** The figures of a pass, or the sentence that says which one the model doesn't cover. */
export function figuresOf(
  row: PassRow,
  scene: StationScene,
): { ok: true; figures: Figures } | { ok: false; reason: string } {
  if (!scene.laser) return { ok: false, reason: `${scene.station.name} has no active laser setting.` };
  const laser = laserOf(scene.laser);
  if (!laser.ok) return laser;
  const body = bodyOf(row);
  if (!body.ok) return body;
  const figures = {
    laser: laser.laser,
    laserSettingId: scene.laser.id,
    laserVersion: scene.laser.version,
    body: body.body,
    limits: limitsOf(scene.station),
  };
  return { ok: true, figures };
}

/** The stored geometry of a pass while it still rests on today's station, airspace and element set. */
export function storedGeometryOf(row: PassRow, scene: StationScene): PassGeometry | null {
  const { plan } = row;
  if (!plan || plan.elementSetId !== row.elementSetId) return null;
  const { geometry } = plan;
  if (geometry.stationVersion !== scene.station.version) return null;
  if (geometry.airspaceKey !== scene.airspaceKey) return null;
  return { ...geometry, ...timesOf(row) };
}

/** A pass of which nothing is measured: the rules read it as not checked, never as open. */
export function unmeasured(row: PassRow): PassGeometry {
  const nothing = { belowFloor: [], aboveCeiling: [], volumes: [] };
  return { ...timesOf(row), ...nothing, stationVersion: -1, airspaceKey: "not measured" };
}

/** Measures a pass anew; a pass that can't be measured stays unmeasured. */
export function measureRow(row: PassRow, scene: StationScene, orbit: Orbit | null): PassGeometry {
  if (!orbit) return unmeasured(row);
  const measured = measurePass({
    orbit,
    elementSetId: row.elementSetId,
    map: scene.map,
    limits: scene.facts,
    volumes: scene.placed,
    pass: timesOf(row),
  });
  return measured.ok ? measured.geometry : unmeasured(row);
}

function timesOf(row: PassRow) {
  return {
    elementSetId: row.elementSetId,
    riseMs: row.riseAt.getTime(),
    culminateMs: row.culminateAt.getTime(),
    setMs: row.setAt.getTime(),
    maxElevationDeg: row.maxElevationDeg,
  };
}

/** True when the stored plan was made with today's laser, fragment, limits and element set. */
export function planIsCurrent(row: PassRow, figures: Figures): boolean {
  const { plan } = row;
  return (
    plan !== null &&
    plan.elementSetId === row.elementSetId &&
    row.laserSettingId === figures.laserSettingId &&
    plan.inputs === planInputs(figures.laserVersion, figures.body, figures.limits, AIM)
  );
}

/** Plans a pass under the given closures. */
export function planRow(args: {
  readonly scene: StationScene;
  readonly figures: Figures;
  readonly orbit: Orbit;
  readonly geometry: PassGeometry;
  readonly closures: readonly Closure[];
}): StoredPlan {
  const { scene, figures, orbit, geometry, closures } = args;
  const { laser, laserVersion, body, limits } = figures;
  const { frame } = scene.map;
  return planPass({ orbit, frame, pass: geometry, laser, laserVersion, body, closures, limits, aim: AIM });
}

/** The orbit of an element set, or null when there is none or SGP4 refuses it. */
export function orbitOrNull(elements: Elements | undefined): Orbit | null {
  const made = elements ? makeOrbit(elements) : null;
  return made?.ok ? made.orbit : null;
}
