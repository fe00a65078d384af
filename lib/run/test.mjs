// npm test. Only version.mjs is loaded before the version is known to do.
import { nodeVersionProblem } from "./version.mjs";

const problem = nodeVersionProblem(process.versions.node);
if (problem) {
  console.error(problem);
  console.log("0 passed, 1 failed");
  process.exitCode = 1;
} else {
  import("./test-run.mjs").then((tests) => tests.runTests());
}
