import { existsSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { NAV_ITEMS } from "@/app/_components/nav-items";
import { floorFaults } from "./floors";
import { barrelFaults, environmentFaults, impurityFaults, lengthFaults } from "./habits";
import { projectFiles } from "./project-files";

const files = projectFiles();

describe("the house", () => {
  it("is looked at as a whole", () => {
    const paths = files.map(({ path }) => path);
    for (const known of [
      "proxy.ts",
      "lib/config.ts",
      "lib/run/start.mjs",
      "app/layout.tsx",
      "db/client.ts",
    ]) {
      expect(paths).toContain(known);
    }
    expect(paths.length).toBeGreaterThan(150);
  });

  it("has arrows that only go down", () => {
    expect(floorFaults(files)).toEqual([]);
  });

  it("reads the environment in one place", () => {
    expect(environmentFaults(files)).toEqual([]);
  });

  it("keeps clock, chance and machine out of physics, planning and engagement", () => {
    expect(impurityFaults(files)).toEqual([]);
  });

  it("has no barrels", () => {
    expect(barrelFaults(files)).toEqual([]);
  });

  it("has no file of more than 250 lines", () => {
    expect(lengthFaults(files)).toEqual([]);
  });

  it("has a page behind every link of the navigation", () => {
    const missing = NAV_ITEMS.filter(
      ({ href }) => !existsSync(new URL(`../../app${href}/page.tsx`, import.meta.url)),
    );
    expect(missing.map(({ href }) => href)).toEqual([]);
  });
});

describe("the test of the house", () => {
  const imports = (path: string, text: string) => floorFaults([{ path, text }]);

  it.each([
    ["lib/physics/a.ts", 'import { b } from "@/lib/planning/b";', "above"],
    ["lib/physics/a.ts", 'import { b } from "../planning/b";', "above"],
    ["lib/physics/a.ts", 'import type { B } from "@/db/schema/b";', "above"],
    ["lib/physics/a.ts", 'import { readFileSync } from "node:fs";', "no package"],
    ["lib/physics/passes/a.ts", 'import { sgp4 } from "satellite.js";', "lib/physics/orbit"],
    ["lib/planning/a.ts", 'export { b } from "@/lib/formats/b";', "one floor"],
    ["lib/planning/a.ts", 'import { config } from "@/lib/config";', "no settings"],
    ["lib/engagement/a.ts", 'import { z } from "zod";', "no package"],
    ["lib/contracts/a.ts", 'import { pool } from "@/db/client";', "one floor"],
    ["db/queries/a.ts", 'const s = await import("@/lib/services/s");', "above"],
    ["lib/services/a.ts", 'type T = import("@/app/_server/handle").HandlerContext;', "only app"],
    ["lib/services/a.ts", 'const r = require("../jobs/task");', "above"],
    ["app/x/page.tsx", 'import { pool } from "../../db/client";', "no file in app"],
    ["proxy.ts", 'import { pool } from "@/db/client";', "no file in app"],
    ["lib/jobs/a.ts", 'import { b } from "@/app/b";', "only app"],
    ["lib/services/a.ts", 'import { w } from "@/tests/database/world";', "neither demo"],
    ["lib/run/a.mjs", 'import { config } from "../config.ts";', "alone"],
    ["app/a.ts", 'import "@/lib/run/words.mjs";', "start command"],
    ["lib/services/a.ts", 'import { x } from "@/lib/elsewhere/x";', "no room"],
  ])("catches %s: %s", (path, text, words) => {
    expect(imports(path, text)).toHaveLength(1);
    expect(imports(path, text)[0]).toContain(words);
  });

  it.each([
    ["lib/physics/orbit/a.ts", 'import { sgp4 } from "satellite.js"; import { b } from "../vector";'],
    ["lib/planning/a.ts", 'import { b } from "@/lib/physics/b";'],
    [
      "lib/services/a.ts",
      'import { z } from "zod"; import { c } from "@/lib/config"; import { d } from "@/db/client";',
    ],
    ["app/a.tsx", 'import { s } from "@/lib/services/s"; import { c } from "./c";'],
    ["seed/a.ts", 'import { d } from "@/db/client";'],
  ])("lets %s import %s", (path, text) => {
    expect(imports(path, text)).toEqual([]);
  });

  it.each([
    "const now = Date.now();",
    "const now = new Date();",
    "const now = Date();",
    "const luck = Math.random();",
    "const home = process.env.HOME;",
    "setTimeout(work, 5);",
    "const t = performance.now();",
    "await fetch(address);",
  ])("catches in pure code: %s", (text) => {
    expect(impurityFaults([{ path: "lib/planning/a.ts", text }])).not.toEqual([]);
    expect(impurityFaults([{ path: "lib/services/a.ts", text }])).toEqual([]);
  });

  it("lets pure code make a date of a number, and name its own things", () => {
    const text =
      "const d = new Date(atMs); const x = { process: 1 }; x.process; Date.UTC(2031, 3, 6); const window = 5; window + 1;";
    expect(impurityFaults([{ path: "lib/physics/a.ts", text }])).toEqual([]);
  });

  it.each(["process.env.X", "process['env'].X", "const { env } = process;"])("catches %s", (text) => {
    expect(environmentFaults([{ path: "lib/services/a.ts", text }])).toHaveLength(1);
    expect(environmentFaults([{ path: "lib/config.ts", text }])).toEqual([]);
  });

  it("catches barrels and long files", () => {
    expect(
      barrelFaults([{ path: "lib/a.ts", text: 'export { b } from "./b";\nexport { c } from "./c";' }]),
    ).toHaveLength(1);
    expect(
      barrelFaults([{ path: "lib/a.ts", text: 'export * from "./b";\nexport const c = 1;' }]),
    ).toHaveLength(1);
    expect(barrelFaults([{ path: "lib/x/index.ts", text: "export const c = 1;" }])).toHaveLength(1);
    expect(
      barrelFaults([{ path: "lib/a.ts", text: 'export { b } from "./b";\nexport const c = 1;' }]),
    ).toEqual([]);
    expect(lengthFaults([{ path: "lib/a.ts", text: "x\n".repeat(251) }])).toHaveLength(1);
    expect(lengthFaults([{ path: "lib/a.ts", text: "x\n".repeat(250) }])).toEqual([]);
  });
});
