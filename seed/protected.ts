import { type InventedOrbit, meanMotionAtHeight } from "./orbits";
import { randomFrom } from "./random";

/** An invented object that no beam may come near. */
export interface InventedProtected {
  readonly orbit: InventedOrbit;
  readonly class: "crewed" | "payload" | "optical payload" | "own";
}

const FIRST_NUMBER = 270_000_101;

/** A shell of invented satellites: how many, how high, how tilted, what class. */
interface Shell {
  readonly prefix: string;
  readonly class: InventedProtected["class"];
  readonly count: number;
  readonly heightKm: readonly [number, number];
  readonly inclinationDeg: readonly [number, number];
}

const SHELLS: readonly Shell[] = [
  { prefix: "QS", class: "payload", count: 120, heightKm: [540, 560], inclinationDeg: [52.8, 53.2] },
  { prefix: "HB", class: "payload", count: 60, heightKm: [1180, 1210], inclinationDeg: [87.7, 88.1] },
  { prefix: "MR", class: "payload", count: 16, heightKm: [20_150, 20_250], inclinationDeg: [54.8, 55.6] },
  { prefix: "VE", class: "optical payload", count: 70, heightKm: [480, 640], inclinationDeg: [97.2, 98.1] },
  { prefix: "OC", class: "optical payload", count: 24, heightKm: [700, 790], inclinationDeg: [98.2, 98.7] },
  { prefix: "DW", class: "own", count: 4, heightKm: [600, 620], inclinationDeg: [97.6, 97.9] },
];

/** A free-flying crewed vehicle, and a station with two vehicles docked to it. */
const CREWED: readonly {
  name: string;
  heightKm: number;
  inclinationDeg: number;
  raanDeg: number;
  anomalyDeg: number;
}[] = [
  { name: "Lantern Station", heightKm: 412, inclinationDeg: 51.1, raanDeg: 210, anomalyDeg: 40 },
  {
    name: "Lantern Station, docked crew vehicle 1",
    heightKm: 412,
    inclinationDeg: 51.1,
    raanDeg: 210,
    anomalyDeg: 40,
  },
  {
    name: "Lantern Station, docked cargo vehicle 2",
    heightKm: 412,
    inclinationDeg: 51.1,
    raanDeg: 210,
    anomalyDeg: 40,
  },
  {
    name: "Farol visiting vehicle, free-flying",
    heightKm: 388,
    inclinationDeg: 51.1,
    raanDeg: 213,
    anomalyDeg: 61,
  },
  { name: "Heron outpost", heightKm: 384, inclinationDeg: 42.0, raanDeg: 35, anomalyDeg: 300 },
];

/** About three hundred invented protected objects of all classes. */
export function inventProtected(): InventedProtected[] {
  const random = randomFrom("protected objects of the demo");
  const made: InventedProtected[] = CREWED.map((c, i) => ({
    class: "crewed",
    orbit: {
      catalogNumber: FIRST_NUMBER + i,
      name: c.name,
      meanMotionRevPerDay: meanMotionAtHeight(c.heightKm),
      eccentricity: 0.0006,
      inclinationDeg: c.inclinationDeg,
      raanDeg: c.raanDeg,
      argPericenterDeg: 80,
      meanAnomalyDeg: c.anomalyDeg,
      bstar: 1e-4,
    },
  }));
  for (const shell of SHELLS) {
    for (let i = 0; i < shell.count; i++) {
      made.push({
        class: shell.class,
        orbit: {
          catalogNumber: FIRST_NUMBER + made.length,
          name: `${shell.prefix}-${String(i + 1).padStart(2, "0")}`,
          meanMotionRevPerDay: meanMotionAtHeight(random.between(...shell.heightKm)),
          eccentricity: random.between(0.0002, 0.0018),
          inclinationDeg: random.between(...shell.inclinationDeg),
          raanDeg: random.between(0, 360),
          argPericenterDeg: random.between(0, 360),
          meanAnomalyDeg: random.between(0, 360),
          bstar: 5e-5,
        },
      });
    }
  }
  return made;
}
