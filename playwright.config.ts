import { defineConfig, devices } from "@playwright/test";

/** `npm test` starts the desk itself and says where; without that, Playwright starts one of its own. */
const given = process.env.KEEPSTEP_E2E_URL;
const port = "3977";
const report = process.env.KEEPSTEP_E2E_REPORT;

export default defineConfig({
  testDir: "tests/e2e",
  workers: 1,
  timeout: 180_000,
  expect: { timeout: 20_000 },
  forbidOnly: true,
  reporter: [["list"], ...(report ? [["json", { outputFile: report }] as const] : [])],
  use: {
    baseURL: given ?? `http://127.0.0.1:${port}`,
    locale: "en-GB",
    timezoneId: "Pacific/Chatham",
    screenshot: "only-on-failure",
    launchOptions: {
      executablePath: process.env.CHROMIUM_PATH ?? "/usr/bin/chromium",
      args: [
        "--no-sandbox",
        "--disable-gpu",
        "--disable-quic",
        "--no-first-run",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
        "--disable-dev-shm-usage",
      ],
    },
  },
  projects: [
    { name: "desk", use: { viewport: { width: 1400, height: 900 } } },
    {
      name: "phone",
      // The map and its keys are for a desk; a phone has the floor as a list.
      testIgnore: "**/keyboard.spec.ts",
      use: {
        viewport: { width: 390, height: 844 },
        hasTouch: true,
        isMobile: true,
        userAgent: devices["Pixel 7"].userAgent,
      },
    },
  ],
  ...(given
    ? {}
    : {
        webServer: {
          command: "node scripts/serve-e2e.mjs",
          env: { PORT: port },
          url: `http://127.0.0.1:${port}/api/v1/health`,
          reuseExistingServer: !process.env.CI,
          timeout: 300_000,
          stdout: "pipe",
          stderr: "pipe",
          gracefulShutdown: { signal: "SIGTERM", timeout: 20_000 },
        },
      }),
});
