import { dirname } from "node:path";
import { fileURLToPath } from "node:url";

/** @type {import("next").NextConfig} */
export default {
  // Developers may build beside a running server: NEXT_DIST_DIR names another folder.
  distDir: process.env.NEXT_DIST_DIR ?? ".next",
  poweredByHeader: false,
  // `npm test` runs the type check over everything; a build must not fail on the type of a test.
  typescript: { ignoreBuildErrors: true },
  reactStrictMode: true,
  // A parent folder's lock file must not move the root.
  turbopack: { root: dirname(fileURLToPath(import.meta.url)) },
  serverExternalPackages: ["pg", "graphile-worker", "nodemailer", "satellite.js", "rate-limiter-flexible"],
  allowedDevOrigins: ["127.0.0.1"],
  // forbidden() gives the refused page its status 403.
  experimental: { authInterrupts: true },
};
