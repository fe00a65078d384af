import { WGS72_J2, WGS72_MU_KM3_PER_S2, WGS72_RADIUS_KM } from "@/lib/physics/constants";
import type { OrbitState } from "@/lib/physics/orbit/propagate";
import type { Vec3 } from "@/lib/physics/vector";
import type { Equinoctial } from "./equinoctial";

/** Third zonal harmonic of WGS-72 (Vallado et al. 2006, AIAA 2006-6753, table 2). */
const WGS72_J3 = -2.53881e-6;

/** Mean elements in the plane's own terms; lengths in Earth radii. */
interface PlaneElements {
  readonly a: number;
  /** e·cos ω and e·sin ω, the latter with the long-period part of J3. */
  readonly ex: number;
  readonly ey: number;
  readonly raan: number;
  readonly inclination: number;
  /** Mean argument of latitude M + ω, with its long-period part. */
  readonly latitude: number;
}

/**
 * The state that belongs to mean elements: the J2 short-period and J3 long-period terms of the theory
 * behind the published element sets (Hoots and Roehrich 1980, Spacetrack Report No. 3, section 6), in km
 * and km/s. So a mean element here means exactly what it means in an element set.
 */
export function stateFromMean(mean: Equinoctial): OrbitState {
  return withShortPeriod(withLongPeriod(mean));
}

function withLongPeriod(mean: Equinoctial): PlaneElements {
  const raan = Math.atan2(mean.p, mean.q);
  const tangent = Math.hypot(mean.p, mean.q);
  const inclination = 2 * Math.atan(tangent);
  const [sinI, cosI] = [Math.sin(inclination), Math.cos(inclination)];
  const [s, c] = [Math.sin(raan), Math.cos(raan)];
  const ex = mean.k * c + mean.h * s;
  const ey = mean.h * c - mean.k * s;
  const a = mean.semiMajorAxisKm / WGS72_RADIUS_KM;
  const perSemiLatus = 1 / (a * (1 - ex * ex - ey * ey));
  const j3 = (WGS72_J3 / WGS72_J2) * sinI * perSemiLatus;
  return {
    a,
    ex,
    ey: ey - 0.5 * j3,
    raan,
    inclination,
    latitude: mean.meanLongitudeRad - raan - (0.25 * j3 * (3 + 5 * cosI) * ex) / (1 + cosI),
  };
}

/** Kepler's equation in terms that stay regular at e = 0, by Newton's method. */
function eccentricLatitude(m: PlaneElements): number {
  let u = m.latitude;
  for (let i = 0; i < 30; i++) {
    const [s, c] = [Math.sin(u), Math.cos(u)];
    const miss = m.latitude - u + m.ex * s - m.ey * c;
    const step = miss / (1 - m.ex * c - m.ey * s);
    u += Math.max(-0.95, Math.min(0.95, step));
    if (Math.abs(step) < 1e-13) break;
  }
  return u;
}

function withShortPeriod(m: PlaneElements): OrbitState {
  const u0 = eccentricLatitude(m);
  const [sinE, cosE] = [Math.sin(u0), Math.cos(u0)];
  const eCos = m.ex * cosE + m.ey * sinE;
  const eSin = m.ex * sinE - m.ey * cosE;
  const e2 = m.ex * m.ex + m.ey * m.ey;
  const semiLatus = m.a * (1 - e2);
  const radius = m.a * (1 - eCos);
  const beta = Math.sqrt(1 - e2);
  const turn = eSin / (1 + beta);
  const sinU = (m.a / radius) * (sinE - m.ey - m.ex * turn);
  const cosU = (m.a / radius) * (cosE - m.ex + m.ey * turn);
  const [sin2U, cos2U] = [2 * sinU * cosU, 1 - 2 * sinU * sinU];
  const cosI = Math.cos(m.inclination);
  const j1 = (0.5 * WGS72_J2) / semiLatus;
  const j2 = j1 / semiLatus;
  const polar = 3 * cosI * cosI - 1;
  const equatorial = 1 - cosI * cosI;
  const meanMotion = m.a ** -1.5;
  const place = {
    radius: radius * (1 - 1.5 * j2 * beta * polar) + 0.5 * j1 * equatorial * cos2U,
    latitude: Math.atan2(sinU, cosU) - 0.25 * j2 * (7 * cosI * cosI - 1) * sin2U,
    raan: m.raan + 1.5 * j2 * cosI * sin2U,
    inclination: m.inclination + 1.5 * j2 * cosI * Math.sin(m.inclination) * cos2U,
    radialSpeed: (Math.sqrt(m.a) * eSin) / radius - meanMotion * j1 * equatorial * sin2U,
    transverseSpeed: Math.sqrt(semiLatus) / radius + meanMotion * j1 * (equatorial * cos2U + 1.5 * polar),
  };
  return inSpace(place);
}

/** From place and speed in the turned plane (Earth radii, and Earth radii per natural time unit) to space. */
function inSpace(at: {
  readonly radius: number;
  readonly latitude: number;
  readonly raan: number;
  readonly inclination: number;
  readonly radialSpeed: number;
  readonly transverseSpeed: number;
}): OrbitState {
  const [sinU, cosU] = [Math.sin(at.latitude), Math.cos(at.latitude)];
  const [sinN, cosN] = [Math.sin(at.raan), Math.cos(at.raan)];
  const [sinI, cosI] = [Math.sin(at.inclination), Math.cos(at.inclination)];
  const outward: Vec3 = {
    x: -sinN * cosI * sinU + cosN * cosU,
    y: cosN * cosI * sinU + sinN * cosU,
    z: sinI * sinU,
  };
  const forward: Vec3 = {
    x: -sinN * cosI * cosU - cosN * sinU,
    y: cosN * cosI * cosU - sinN * sinU,
    z: sinI * cosU,
  };
  const speedUnit = Math.sqrt(WGS72_MU_KM3_PER_S2 / WGS72_RADIUS_KM);
  const km = at.radius * WGS72_RADIUS_KM;
  const [vr, vt] = [at.radialSpeed * speedUnit, at.transverseSpeed * speedUnit];
  return {
    rKm: { x: outward.x * km, y: outward.y * km, z: outward.z * km },
    vKmPerS: {
      x: outward.x * vr + forward.x * vt,
      y: outward.y * vr + forward.y * vt,
      z: outward.z * vr + forward.z * vt,
    },
  };
}
