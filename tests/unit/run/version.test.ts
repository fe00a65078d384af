import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { nodeVersionProblem } from "@/lib/run/version.mjs";

test.each(["20.19.0", "20.20.2", "21.0.0", "22.14.1", "v22.0.0"])("Node %s will do", (version) => {
  expect(nodeVersionProblem(version)).toBeNull();
});

test.each(["18.20.4", "20.18.9", "23.0.0", "24.1.0", "0.12.18", "nonsense"])(
  "Node %s will not",
  (version) => {
    expect(nodeVersionProblem(version)).toContain(version);
  },
);

test("the bounds are those of package.json", () => {
  const { engines } = JSON.parse(readFileSync("package.json", "utf8"));
  expect(engines.node).toBe(">=20.19 <23");
});
