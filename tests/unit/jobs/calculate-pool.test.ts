import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { calculateElsewhere } from "@/lib/services/calculate-pool";

/** Identifiers of the calculation processes that this process started, as the kernel tells. */
function childIds(): number[] {
  return readdirSync("/proc/self/task")
    .flatMap((thread) => readFileSync(`/proc/self/task/${thread}/children`, "utf8").split(" "))
    .map(Number)
    .filter((id) => id > 0 && readFileSync(`/proc/${id}/cmdline`, "utf8").includes("calculate-main"));
}

/** No element set: the reader goes through all of it, which takes a while. */
const LONG_TEXT = "1 nothing\n".repeat(60_000);

describe("calculateElsewhere", () => {
  it("gives what the function gives, in another process", async () => {
    const result = await calculateElsewhere("read-element-sets", "1 nothing");
    expect(result.accepted).toEqual([]);
    expect(result.rejected).toHaveLength(1);
    expect(childIds().length).toBeGreaterThan(0);
  });

  it("fails the question of a process that is killed, and answers the next one", async () => {
    const lost = calculateElsewhere("read-element-sets", LONG_TEXT);
    const failure = expect(lost).rejects.toThrow(/ended unexpectedly/);
    for (const id of childIds()) process.kill(id, "SIGKILL");
    await failure;
    const next = await calculateElsewhere("read-element-sets", "1 nothing");
    expect(next.rejected).toHaveLength(1);
  });

  it("turns callers away when too many wait, and answers all the others", async () => {
    const asked = Array.from({ length: 40 }, () => {
      try {
        return calculateElsewhere("read-element-sets", "1 nothing");
      } catch (error) {
        return error;
      }
    });
    const turnedAway = asked.filter((one) => !(one instanceof Promise));
    const answers = await Promise.all(asked.filter((one) => one instanceof Promise));
    expect(turnedAway.length).toBeGreaterThan(0);
    expect(turnedAway[0]).toMatchObject({ status: 429 });
    expect(answers).toHaveLength(40 - turnedAway.length);
    expect(answers.length).toBeGreaterThanOrEqual(20);
  });
});
