import { defineConfig } from "vitest/config";

const root = new URL("../", import.meta.url).pathname;

export default defineConfig({
  root,
  cacheDir: "node_modules/.vite",
  resolve: { alias: { "@backstamp/backstamp": `${root}lib/mod.ts` } },
  test: { include: ["tests/**/*.test.ts"], testTimeout: 600_000, hookTimeout: 600_000 },
});
