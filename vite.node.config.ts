import { fileURLToPath } from "node:url";
import { defineConfig } from "vite";

const entry = (path: string) => fileURLToPath(new URL(path, import.meta.url));

/** Bundles the Node entries that run beside Astro's output; nothing runs TypeScript in production. */
export default defineConfig({
  resolve: { alias: { "~": entry("./src") } },
  build: {
    ssr: true,
    target: "node20",
    outDir: "dist/node",
    emptyOutDir: true,
    sourcemap: true,
    rollupOptions: {
      input: {
        server: entry("./src/server/entries/server.ts"),
        "delivery-worker": entry("./src/server/entries/delivery-worker.ts"),
        migrate: entry("./src/server/entries/migrate.ts"),
        activity: entry("./scripts/activity/main.ts"),
        organisation: entry("./scripts/organisation/main.ts"),
        screen: entry("./src/screening/command.ts"),
        "screening-worker": entry("./src/workers/screening-worker.ts"),
      },
      output: { entryFileNames: "[name].mjs", chunkFileNames: "chunks/[name]-[hash].mjs" },
    },
  },
});
