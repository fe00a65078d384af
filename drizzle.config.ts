import { defineConfig } from "drizzle-kit";

// Only `generate` is used. `push` does not know exclusion constraints and would drop them.
export default defineConfig({ dialect: "postgresql", schema: "./db/schema/*.ts", out: "./drizzle" });
