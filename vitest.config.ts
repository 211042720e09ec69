import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

// EQUIFORM_LONG=1 (npm run test:long) takes full counts where tests otherwise take a seeded slice.
const long = process.env.EQUIFORM_LONG === "1";

export default defineConfig({
  resolve: {
    // Throws by design outside Next's bundler.
    alias: { "server-only": fileURLToPath(new URL("./tests/support/serverOnly.ts", import.meta.url)) },
  },
  test: {
    include: ["tests/**/*.test.ts", "tests/**/*.test.tsx"],
    testTimeout: long ? 1_800_000 : 60_000,
    hookTimeout: 300_000,
    maxWorkers: 2,
    // A test that is skipped or left focused would pass silently.
    allowOnly: false,
  },
});
