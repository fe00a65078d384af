import type { PassStation } from "@/lib/physics/passes/find-passes";

const TEN_DEGREES = Math.PI / 18;

/** Four invented stations on four continents, all with an elevation limit of 10 degrees. */
export const STATIONS: readonly PassStation[] = [
  { latitudeDeg: 40.9, longitudeDeg: -83.9, altitudeM: 250 },
  { latitudeDeg: -35.3, longitudeDeg: 149, altitudeM: 770 },
  { latitudeDeg: -23, longitudeDeg: -67.4, altitudeM: 2450 },
  { latitudeDeg: 28.3, longitudeDeg: -16.5, altitudeM: 2390 },
].map((site) => ({ site, minElevationRad: TEN_DEGREES }));
