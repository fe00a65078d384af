import { feature } from "topojson-client";
import type { GeometryCollection, Topology } from "topojson-specification";
import landTopology from "world-atlas/land-110m.json";

/**
 * The coastline of Natural Earth (public domain) at 1 : 110 million, as GeoJSON. Imported on the server
 * only: pages get finished paths, never this file.
 */
export function coastline(): ReturnType<typeof feature> {
  // The JSON module's own type has plain strings where the format has fixed words.
  const topology = landTopology as unknown as Topology<{ land: GeometryCollection }>;
  land ??= feature(topology, topology.objects.land);
  return land;
}

let land: ReturnType<typeof feature> | undefined;
