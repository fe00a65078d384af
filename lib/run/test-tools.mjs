import { existsSync } from "node:fs";
import { installPackages } from "./packages.mjs";

const verificationFile = "/usr/lib/python3/dist-packages/sgp4/SGP4-VER.TLE";

/** Makes sure of what only the tests need from Debian: a browser, and the published verification file of SGP4. */
export async function ensureTestTools() {
  if (!existsSync("/usr/bin/chromium")) await installPackages(["chromium"], "the browser tests");
  if (!existsSync(verificationFile)) {
    await installPackages(["python3-sgp4"], "the tests against the published verification file");
  }
}
