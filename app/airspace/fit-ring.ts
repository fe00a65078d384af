/** [longitudeDeg, latitudeDeg]. */
type Place = readonly [number, number];

export interface FittedRing {
  readonly ring: readonly Place[];
  readonly points: readonly Place[];
  readonly scaleKm: number;
  readonly scalePx: number;
}

const KM_PER_DEG = 111.2; // a degree of a great circle of 6371 km
const MARGIN_PX = 24;

/**
 * Places a ring and some points in a square of `size` pixels, north up, with a
 * round length for the scale. Longitudes are shrunk by the cosine of the middle
 * latitude and counted from the ring's first, so that a ring over the
 * antimeridian stays in one piece. For pictures of some hundred kilometres.
 */
export function fitRing(ring: readonly Place[], points: readonly Place[], size: number): FittedRing {
  const [lon0, lat0] = ring[0] ?? [0, 0];
  const shrink = Math.cos((lat0 * Math.PI) / 180);
  const flat = ([lon, lat]: Place): Place => [
    (((((lon - lon0 + 180) % 360) + 360) % 360) - 180) * shrink * KM_PER_DEG,
    (lat - lat0) * KM_PER_DEG,
  ];
  const all = [...ring, ...points].map(flat);
  const xs = all.map(([x]) => x);
  const ys = all.map(([, y]) => y);
  const [left, right, bottom, top] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const pxPerKm = (size - 2 * MARGIN_PX) / Math.max(right - left, top - bottom, 1);
  const onPage = (place: Place): Place => {
    const [x, y] = flat(place);
    return [
      round(size / 2 + (x - (left + right) / 2) * pxPerKm),
      round(size / 2 - (y - (bottom + top) / 2) * pxPerKm),
    ];
  };
  const scaleKm = roundLength(size / 3 / pxPerKm);
  return { ring: ring.map(onPage), points: points.map(onPage), scaleKm, scalePx: round(scaleKm * pxPerKm) };
}

/** The largest of 1, 2, 5, 10, … that is not longer. */
function roundLength(km: number): number {
  const power = 10 ** Math.floor(Math.log10(km));
  return ([5, 2].find((step) => step * power <= km) ?? 1) * power;
}

/** One decimal, so that server and browser write the same digits. */
function round(px: number): number {
  return Math.round(px * 10) / 10;
}
