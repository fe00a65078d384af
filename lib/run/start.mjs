// npm start. Only version.mjs is loaded before the version is known to do.
import { nodeVersionProblem } from "./version.mjs";

const problem = nodeVersionProblem(process.versions.node);
if (problem) {
  console.error(problem);
  process.exitCode = 1;
} else {
  import("./product.mjs").then((product) => product.runProduct());
}
