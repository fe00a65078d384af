/** One layer of the exponential atmosphere: base altitude km, density there kg/m³, scale height km. */
type Layer = readonly [baseKm: number, densityKgPerM3: number, scaleHeightKm: number];

/** Exponential atmosphere (Vallado, Fundamentals of Astrodynamics and Applications, table 8-4), from 100 km up. */
const LAYERS: readonly Layer[] = [
  [100, 5.297e-7, 5.877],
  [110, 9.661e-8, 7.263],
  [120, 2.438e-8, 9.473],
  [130, 8.484e-9, 12.636],
  [140, 3.845e-9, 16.149],
  [150, 2.07e-9, 22.523],
  [180, 5.464e-10, 29.74],
  [200, 2.789e-10, 37.105],
  [250, 7.248e-11, 45.546],
  [300, 2.418e-11, 53.628],
  [350, 9.518e-12, 53.298],
  [400, 3.725e-12, 58.515],
  [450, 1.585e-12, 60.828],
  [500, 6.967e-13, 63.822],
  [600, 1.454e-13, 71.835],
  [700, 3.614e-14, 88.667],
  [800, 1.17e-14, 124.64],
  [900, 5.245e-15, 181.05],
  [1000, 3.019e-15, 268.0],
];

/** The layer of an altitude; below the table its lowest one goes on. */
function layerAt(altitudeKm: number): Layer {
  let found: Layer = [100, 5.297e-7, 5.877];
  for (const layer of LAYERS) {
    if (layer[0] > altitudeKm) break;
    found = layer;
  }
  return found;
}

/** Density in kg/m³ at an altitude in km: a mean over the solar cycle, off by up to tenfold at its ends. */
export function densityKgPerM3(altitudeKm: number): number {
  const [base, density, scale] = layerAt(altitudeKm);
  return density * Math.exp((base - altitudeKm) / scale);
}

/** Scale height in km of the layer that holds an altitude in km. */
export function scaleHeightKm(altitudeKm: number): number {
  return layerAt(altitudeKm)[2];
}
