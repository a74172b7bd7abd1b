import { fileURLToPath } from "node:url";
import { defineConfig } from "vitest/config";

const root = fileURLToPath(new URL(".", import.meta.url));
const alias = {
  "@": root.replace(/\/$/, ""),
  "server-only": fileURLToPath(new URL("tests/support/empty.ts", import.meta.url)),
};

export default defineConfig({
  resolve: { alias },
  test: {
    env: { TZ: "Pacific/Chatham" },
    projects: [
      {
        resolve: { alias },
        test: {
          name: "unit",
          environment: "node",
          include: ["tests/unit/**/*.test.ts", "tests/published/**/*.test.ts"],
        },
      },
      {
        resolve: { alias },
        test: { name: "components", environment: "jsdom", include: ["tests/unit/**/*.test.tsx"] },
      },
      {
        resolve: { alias },
        test: {
          name: "integration",
          environment: "node",
          include: ["tests/integration/**/*.test.ts"],
          pool: "forks",
          fileParallelism: false,
          globalSetup: ["tests/support/global-database.ts"],
          setupFiles: ["tests/support/own-database.ts"],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
    ],
  },
});
