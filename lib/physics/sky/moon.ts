import { DEG, EARTH_RADIUS_KM } from "../constants";
import { centuriesSinceJ2000 } from "../time";
import { angleBetweenRad, subtract, type Vec3 } from "../vector";
import { obliquityRad, sunPositionKm } from "./sun";

/** Amplitude (degrees), phase (degrees) and rate (degrees a century) of one term of a series. */
type Term = readonly [number, number, number];

// The short series of the Astronomical Almanac (Vallado, algorithm 31): 0.3° in longitude, 0.2° in latitude.
const LONGITUDE: readonly Term[] = [
  [6.29, 134.9, 477198.85],
  [-1.27, 259.2, -413335.38],
  [0.66, 235.7, 890534.23],
  [0.21, 269.9, 954397.7],
  [-0.19, 357.5, 35999.05],
  [-0.11, 186.6, 966404.05],
];
const LATITUDE: readonly Term[] = [
  [5.13, 93.3, 483202.03],
  [0.28, 228.2, 960400.87],
  [-0.28, 318.3, 6003.18],
  [-0.17, 217.6, -407332.2],
];
const PARALLAX: readonly Term[] = [
  [0.0518, 134.9, 477198.85],
  [0.0095, 259.2, -413335.38],
  [0.0078, 235.7, 890534.23],
  [0.0028, 269.9, 954397.7],
];

function sum(terms: readonly Term[], t: number, wave: (angleRad: number) => number): number {
  return terms.reduce(
    (total, [amplitude, phase, rate]) => total + amplitude * wave((phase + rate * t) * DEG),
    0,
  );
}

/** The Moon's position, km, on the mean equator and equinox of date; to some 0.3°. */
export function moonPositionKm(atMs: number): Vec3 {
  const t = centuriesSinceJ2000(atMs);
  const longitude = (218.32 + 481267.8813 * t + sum(LONGITUDE, t, Math.sin)) * DEG;
  const latitude = sum(LATITUDE, t, Math.sin) * DEG;
  const parallax = (0.9508 + sum(PARALLAX, t, Math.cos)) * DEG;
  const obliquity = obliquityRad(t);
  const r = EARTH_RADIUS_KM / Math.sin(parallax);
  const x = Math.cos(latitude) * Math.cos(longitude);
  const y = Math.cos(latitude) * Math.sin(longitude);
  const z = Math.sin(latitude);
  return {
    x: r * x,
    y: r * (Math.cos(obliquity) * y - Math.sin(obliquity) * z),
    z: r * (Math.sin(obliquity) * y + Math.cos(obliquity) * z),
  };
}

/** Share of the Moon's disc that is lit, 0 to 1 (Meeus, chapter 48: from the phase angle). */
export function moonLitShare(atMs: number): number {
  const moon = moonPositionKm(atMs);
  const toSun = subtract(sunPositionKm(atMs), moon);
  const toEarth = { x: -moon.x, y: -moon.y, z: -moon.z };
  return (1 + Math.cos(angleBetweenRad(toSun, toEarth))) / 2;
}
