import { WGS72_J2, WGS72_MU_KM3_PER_S2, WGS72_RADIUS_KM } from "@/lib/physics/constants";
import type { Vec3 } from "@/lib/physics/vector";

const J2_FACTOR = 1.5 * WGS72_J2 * WGS72_RADIUS_KM * WGS72_RADIUS_KM;

/**
 * Acceleration in km/s² by the Earth's mass and its flattening (J2), at a position in km whose z axis is
 * the Earth's. With the constants that the element sets are made with.
 */
export function gravityKmPerS2(x: number, y: number, z: number): Vec3 {
  const r2 = x * x + y * y + z * z;
  const pull = -WGS72_MU_KM3_PER_S2 / (r2 * Math.sqrt(r2));
  const flattening = J2_FACTOR / r2;
  const z2 = (5 * z * z) / r2;
  const level = pull * (1 + flattening * (1 - z2));
  return { x: x * level, y: y * level, z: z * pull * (1 + flattening * (3 - z2)) };
}
