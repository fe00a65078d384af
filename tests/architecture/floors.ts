import { type Import, importsOf } from "./imports-of";
import type { SourceFile } from "./project-files";

/**
 * The house: rooms with their floor. An import may stay in its room or go to a
 * lower floor. Rooms of one floor don't import each other, with the exceptions
 * that are named. `lib/config.ts` may be read from every floor that isn't pure.
 */
export const FLOORS: Readonly<Record<string, number>> = {
  "lib/physics": 1,
  "lib/planning": 2,
  "lib/formats": 2,
  "lib/engagement": 3,
  "lib/notices": 3,
  "lib/contracts": 4,
  db: 4,
  "lib/services": 5,
  "lib/jobs": 6,
  app: 6,
};

/** Rooms that nature, plans and agreements live in: no clock, no environment, no machine. */
export const PURE = ["lib/physics", "lib/planning", "lib/engagement"];

/** Where everything may be imported: the demo, the tests, settings of tools. */
const OUTSIDE = ["seed", "tests"];

/** Rules of their own beside the floors: who may import what. */
const KEPT: readonly { target: RegExp; by: RegExp; words: string }[] = [
  {
    target: /^satellite\.js$/,
    by: /^(lib\/physics\/orbit\/|tests\/)/,
    words: "satellite.js stays in lib/physics/orbit",
  },
  {
    target: /^db(\/|$)/,
    by: /^(?!app\/|proxy\.ts)/,
    words: "no file in app imports db: go through a service",
  },
  { target: /^lib\/run(\/|$)/, by: /^(lib\/run\/|tests\/)/, words: "lib/run is for the start command alone" },
  {
    target: /^(seed|tests)(\/|$)/,
    by: /^(seed|tests)\//,
    words: "the product imports neither demo nor tests",
  },
  { target: /^app(\/|$)/, by: /^(app\/|tests\/|proxy\.ts)/, words: "only app imports app" },
];

/** What is wrong with the imports of these files: one sentence each. */
export function floorFaults(files: readonly SourceFile[]): string[] {
  return files.flatMap((file) =>
    importsOf(file).flatMap((one) => {
      const words = faultOf(file.path, one);
      return words === null ? [] : [`${file.path}:${one.line} imports ${one.specifier}: ${words}`];
    }),
  );
}

function faultOf(path: string, one: Import): string | null {
  const kept = KEPT.find(({ target, by }) => target.test(one.target) && !by.test(path));
  if (kept) return kept.words;
  if (path.startsWith("lib/run/"))
    return one.isPackage || one.target.startsWith("lib/run/") ? null : "lib/run stands alone";
  const from = roomOf(path);
  if (from === null || OUTSIDE.includes(from)) return null;
  if (one.isPackage) return PURE.includes(from) ? purePackageFault(one) : null;
  const to = roomOf(one.target);
  if (to === null) return `${one.target} is no room of the house`;
  if (to === "lib/config") return PURE.includes(from) ? `${from} is pure and reads no settings` : null;
  if (to === from) return null;
  const [height, below] = [FLOORS[from] ?? 6, FLOORS[to] ?? 6];
  if (below < height) return null;
  return below === height ? `${from} and ${to} are on one floor` : `${to} is above ${from}`;
}

/** Pure rooms import no package but satellite.js, which has its own rule. */
function purePackageFault(one: Import): string | null {
  return one.target === "satellite.js" ? null : "a pure room imports no package";
}

/** The room a path belongs to; files at the top belong to app when Next runs them. */
export function roomOf(path: string): string | null {
  if (/^lib\/config(\.ts)?$/.test(path)) return "lib/config";
  if (/^proxy(\.ts)?$/.test(path)) return "app";
  const room = /^(lib\/[^/]+|app|db|seed|tests)(\/|$)/.exec(path)?.[1] ?? null;
  return room !== null && (room in FLOORS || OUTSIDE.includes(room)) ? room : null;
}
