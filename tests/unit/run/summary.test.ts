import { expect, test } from "vitest";
import { addCounts, countReport, summaryLine } from "@/lib/run/test-summary.mjs";

const file = (status: string, ...results: string[]) => ({
  status,
  assertionResults: results.map((one) => ({ status: one })),
});
const report = (...testResults: unknown[]) => ({ testResults });

test("passed and failed tests are counted over all files", () => {
  const counted = countReport(
    report(file("passed", "passed", "passed"), file("failed", "passed", "failed")),
    1,
  );
  expect(counted).toEqual({ passed: 3, failed: 1 });
});

test.each(["skipped", "pending", "todo", "disabled"])("a %s test counts as failed", (status) => {
  expect(countReport(report(file("passed", "passed", status)), 0)).toEqual({ passed: 1, failed: 1 });
});

test("a file that could not be loaded counts as one failure", () => {
  expect(countReport(report(file("passed", "passed"), file("failed")), 1)).toEqual({ passed: 1, failed: 1 });
  expect(countReport(report(file("passed", "passed"), file("passed")), 0)).toEqual({ passed: 1, failed: 1 });
});

test("a file whose tests pass but which failed afterwards counts as one failure", () => {
  expect(countReport(report(file("failed", "passed", "passed")), 1)).toEqual({ passed: 2, failed: 1 });
});

test("a run that fails without a failed test, finds none or writes nothing is a failure", () => {
  expect(countReport(report(file("passed", "passed")), 1)).toEqual({ passed: 1, failed: 1 });
  expect(countReport(report(), 0)).toEqual({ passed: 0, failed: 1 });
  expect(countReport(null, 0)).toEqual({ passed: 0, failed: 1 });
});

test("the last line is the sum", () => {
  const sum = addCounts([
    { passed: 1, failed: 0 },
    { passed: 40, failed: 2 },
  ]);
  expect(summaryLine(sum)).toBe("41 passed, 2 failed");
  expect(summaryLine(addCounts([]))).toBe("0 passed, 0 failed");
});
