/** A Cartesian vector; the unit stands in the name of the variable that holds it. */
export interface Vec3 {
  readonly x: number;
  readonly y: number;
  readonly z: number;
}

/** Component-wise sum. */
export function add(a: Vec3, b: Vec3): Vec3 {
  return { x: a.x + b.x, y: a.y + b.y, z: a.z + b.z };
}

/** Component-wise difference a − b. */
export function subtract(a: Vec3, b: Vec3): Vec3 {
  return { x: a.x - b.x, y: a.y - b.y, z: a.z - b.z };
}

/** Vector times number. */
export function scale(a: Vec3, factor: number): Vec3 {
  return { x: a.x * factor, y: a.y * factor, z: a.z * factor };
}

/** Scalar product. */
export function dot(a: Vec3, b: Vec3): number {
  return a.x * b.x + a.y * b.y + a.z * b.z;
}

/** Vector product a × b. */
export function cross(a: Vec3, b: Vec3): Vec3 {
  return { x: a.y * b.z - a.z * b.y, y: a.z * b.x - a.x * b.z, z: a.x * b.y - a.y * b.x };
}

/** Euclidean length. */
export function norm(a: Vec3): number {
  return Math.hypot(a.x, a.y, a.z);
}

/** Unit vector; the zero vector gives NaN components, which callers must refuse. */
export function unit(a: Vec3): Vec3 {
  return scale(a, 1 / norm(a));
}

/**
 * Angle between two vectors in radians, by atan2 of cross and dot: arccos loses
 * all digits below some 2e-8 rad, and beam cones are judged at small angles.
 */
export function angleBetweenRad(a: Vec3, b: Vec3): number {
  return Math.atan2(norm(cross(a, b)), dot(a, b));
}
