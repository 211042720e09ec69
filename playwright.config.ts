import { rmSync } from "node:fs";
import { createServer } from "node:net";
import { defineConfig } from "@playwright/test";

// The configuration is loaded again in every worker: port and folder are chosen once and handed on.
if (process.env.EQUIFORM_E2E_PORT === undefined) {
  process.env.EQUIFORM_E2E_PORT = String(await freePort());
  rmSync("data/e2e", { recursive: true, force: true });
}
const port = process.env.EQUIFORM_E2E_PORT;

export default defineConfig({
  testDir: "e2e",
  outputDir: "test-results",
  reporter: process.env.CI === undefined ? "list" : "line",
  forbidOnly: true,
  workers: 1,
  timeout: 60_000,
  expect: { timeout: 15_000 },
  use: {
    baseURL: `http://127.0.0.1:${port}`,
    launchOptions: {
      executablePath: process.env.EQUIFORM_CHROMIUM ?? "/usr/bin/chromium",
      args: [
        "--no-sandbox",
        "--disable-gpu",
        "--disable-dev-shm-usage",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
        "--no-first-run",
      ],
    },
  },
  webServer: {
    command: "node app/_server/start/start.mjs",
    url: `http://127.0.0.1:${port}/api/v1/health`,
    timeout: 600_000,
    gracefulShutdown: { signal: "SIGTERM", timeout: 10_000 },
    env: { PORT: port, EQUIFORM_DATA: "data/e2e", EQUIFORM_SEED: "e2e/seed", EQUIFORM_WORKERS: "1" },
    stdout: "pipe",
  },
});

/** A port that nothing listens on now. */
async function freePort(): Promise<number> {
  const server = createServer();
  await new Promise<void>((ready) => server.listen(0, "127.0.0.1", ready));
  const address = server.address();
  if (address === null || typeof address === "string") throw new Error("no port was given");
  await new Promise((closed) => server.close(closed));
  return address.port;
}
