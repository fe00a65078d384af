import type { Vec3 } from "../vector";

/** How two objects stand to each other as seen from a station. */
export interface Separation {
  /** Angle between both directions, radians; exact also for the smallest angles. */
  separationRad: number;
  /** Rate of the angle's cosine, per second: smooth also where the angle goes through nothing. */
  cosineRate: number;
}

/** An empty separation to be filled again and again. */
export function blankSeparation(): Separation {
  return { separationRad: 0, cosineRate: 0 };
}

/**
 * Angle between two objects as seen from a station, and how it changes; all Earth-fixed, km and km/s (six
 * numbers each). By atan2 of the vector and the scalar product, since arccos loses small angles.
 */
export function separate(station: Vec3, a: Float64Array, b: Float64Array, out: Separation): void {
  const ax = (a[0] as number) - station.x;
  const ay = (a[1] as number) - station.y;
  const az = (a[2] as number) - station.z;
  const bx = (b[0] as number) - station.x;
  const by = (b[1] as number) - station.y;
  const bz = (b[2] as number) - station.z;
  const [avx, avy, avz] = [a[3] as number, a[4] as number, a[5] as number];
  const [bvx, bvy, bvz] = [b[3] as number, b[4] as number, b[5] as number];
  const cx = ay * bz - az * by;
  const cy = az * bx - ax * bz;
  const cz = ax * by - ay * bx;
  const dot = ax * bx + ay * by + az * bz;
  const a2 = ax * ax + ay * ay + az * az;
  const b2 = bx * bx + by * by + bz * bz;
  const product = Math.sqrt(a2 * b2);
  const dotRate = avx * bx + avy * by + avz * bz + ax * bvx + ay * bvy + az * bvz;
  const growth = (ax * avx + ay * avy + az * avz) / a2 + (bx * bvx + by * bvy + bz * bvz) / b2;
  out.separationRad = Math.atan2(Math.sqrt(cx * cx + cy * cy + cz * cz), dot);
  out.cosineRate = (dotRate - dot * growth) / product;
}
