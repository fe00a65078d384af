import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import { lookAngles, temeToEcef } from "@/lib/physics/frames/earth";
import type { DwellLimits } from "@/lib/planning/choose-dwell";
import type { Closure } from "@/lib/planning/closure";
import { effectOfDwell } from "@/lib/planning/effect";
import { planInputs, planPass } from "@/lib/planning/pass-plan";
import { BODY, LASER, LIMITS, MAP, measured, ORBIT, PASSES } from "../../property/closures/sky";

const pass = PASSES[0];
if (!pass) throw new Error("the invented orbit gives no pass");
const GEOMETRY = measured(pass, LIMITS, []);
const LIMITS_OF_DWELL: DwellLimits = {
  acquisitionS: 30,
  guardS: 2,
  minDwellS: 10,
  maxDwellS: 60,
  maxPulses: null,
  maxEnergyJ: null,
  maxHeatingS: null,
};

function plan(amend: Partial<Parameters<typeof planPass>[0]> = {}) {
  return planPass({
    orbit: ORBIT,
    frame: MAP.frame,
    pass: GEOMETRY,
    laser: LASER,
    laserVersion: 1,
    body: BODY,
    closures: [],
    limits: LIMITS_OF_DWELL,
    aim: "decay",
    ...amend,
  });
}

function closed(fromMs: number, toMs: number): Closure {
  const rest = { cause: "test", label: "test", input: "test", liftedBy: "nothing", overridable: false };
  return { rule: "airspace", verdict: "closed", fromMs, toMs, ...rest };
}

describe("planning a pass", () => {
  it("draws the pass from rise to set", () => {
    const { strip } = plan();
    expect(strip.elevationDeg).toHaveLength(32);
    expect(strip.worthPerS).toHaveLength(32);
    for (const [i, elevationDeg] of strip.elevationDeg.entries()) {
      const atMs = GEOMETRY.riseMs + ((GEOMETRY.setMs - GEOMETRY.riseMs) * i) / 31;
      const found = ORBIT.stateAt(atMs);
      if (!found.ok) throw new Error(found.reason);
      const truth = lookAngles(MAP.frame, temeToEcef(found.state, atMs)).elevationRad / DEG;
      // Points lie on the 2 s samples of the worth curve.
      expect(Math.abs(elevationDeg - truth)).toBeLessThan(0.6);
    }
  });

  it("keeps acquisition, guard and length, and says what the dwell does", () => {
    const { dwell } = plan();
    if (!dwell) throw new Error("nothing was planned");
    expect(dwell.fromMs).toBeGreaterThanOrEqual(GEOMETRY.riseMs + 30_000);
    expect(dwell.toMs).toBeLessThanOrEqual(GEOMETRY.setMs - 2000);
    expect(dwell.toMs - dwell.fromMs).toBeLessThanOrEqual(60_000);
    const { fromMs, toMs } = dwell;
    const worked = effectOfDwell({ orbit: ORBIT, frame: MAP.frame, laser: LASER, body: BODY, fromMs, toMs });
    if (!worked.ok) throw new Error(worked.reason);
    const { effect } = worked;
    const dropM = (effect.semiMajorAxisBeforeKm - effect.semiMajorAxisAfterKm.p50) * 1000;
    expect(dwell.semiMajorAxisDropM).toBeGreaterThan(0);
    expect(dwell.semiMajorAxisDropM / dropM).toBeCloseTo(1, 3);
    const [least, most] = dwell.semiMajorAxisDropBandM;
    expect(least).toBeCloseTo((effect.semiMajorAxisBeforeKm - effect.semiMajorAxisAfterKm.p90) * 1000, 0);
    expect(most).toBeGreaterThan(dwell.semiMajorAxisDropM);
    expect(least).toBeLessThan(dwell.semiMajorAxisDropM);
  });

  it("moves the dwell out of closed time and gains less there", () => {
    const free = plan().dwell;
    if (!free) throw new Error("nothing was planned");
    const shut = closed(free.fromMs - 5000, free.toMs + 5000);
    const moved = plan({ closures: [shut] }).dwell;
    if (moved) {
      expect(moved.toMs <= shut.fromMs - 2000 || moved.fromMs >= shut.toMs + 2000).toBe(true);
      expect(moved.gain).toBeLessThan(free.gain);
    }
    expect(plan({ closures: [closed(GEOMETRY.riseMs, GEOMETRY.setMs)] }).dwell).toBeNull();
  });

  it("leaves a pending stretch in", () => {
    const waiting: Closure = { ...closed(GEOMETRY.riseMs, GEOMETRY.setMs), verdict: "pending" };
    expect(plan({ closures: [waiting] }).dwell).toEqual(plan().dwell);
  });

  it("stops before the fragment may melt, and refuses where that leaves no dwell", () => {
    const light = plan({ body: { ...BODY, massKg: 0.05 } });
    const onset = (fromMs: number, toMs: number) => {
      const body = { ...BODY, massKg: 0.05 };
      const worked = effectOfDwell({ orbit: ORBIT, frame: MAP.frame, laser: LASER, body, fromMs, toMs });
      return worked.ok ? worked.effect.meltOnsetS : null;
    };
    if (light.dwell) expect(onset(light.dwell.fromMs, light.dwell.toMs)).toBeNull();
    else expect(light.refusal).toContain("melting point");
    const tiny = plan({ body: { ...BODY, massKg: 0.002 } });
    expect(tiny.dwell).toBeNull();
    expect(tiny.refusal).toMatch(/^The fragment may reach its melting point after \d+\.\d s of lasing/);
  });

  it("says why when the model doesn't cover the fragment", () => {
    const refused = plan({ body: { ...BODY, massKg: -1 } });
    expect(refused).toMatchObject({ dwell: null, strip: { elevationDeg: [], worthPerS: [] } });
    expect(refused.refusal).toContain("massKg");
  });

  it("is out of date as soon as any figure behind it changes", () => {
    const first = planInputs(1, BODY, LIMITS_OF_DWELL, "decay");
    expect(planInputs(1, { ...BODY }, { ...LIMITS_OF_DWELL }, "decay")).toBe(first);
    const others = [
      planInputs(2, BODY, LIMITS_OF_DWELL, "decay"),
      planInputs(1, { ...BODY, massKg: 0.9 }, LIMITS_OF_DWELL, "decay"),
      planInputs(1, { ...BODY, spinRateHz: 1 }, LIMITS_OF_DWELL, "decay"),
      planInputs(1, BODY, { ...LIMITS_OF_DWELL, guardS: 3 }, "decay"),
      planInputs(1, BODY, { ...LIMITS_OF_DWELL, maxPulses: 5 }, "decay"),
      planInputs(1, BODY, LIMITS_OF_DWELL, "perigee"),
    ];
    expect(new Set([first, ...others]).size).toBe(7);
  });
});
