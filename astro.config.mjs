import { fileURLToPath } from "node:url";
import node from "@astrojs/node";
import react from "@astrojs/react";
import tailwindcss from "@tailwindcss/vite";
import { defineConfig, passthroughImageService } from "astro/config";

export default defineConfig({
  output: "server",
  adapter: node({ mode: "standalone" }),
  integrations: [react()],
  image: { service: passthroughImageService() },
  // Origins are compared with APP_ORIGIN in src/middleware.ts, for JSON and bodiless requests too,
  // which Astro's own check lets through.
  security: { checkOrigin: false },
  experimental: {
    csp: {
      directives: [
        "default-src 'none'",
        "img-src 'self' blob: data:",
        "font-src 'self'",
        "connect-src 'self'",
        "worker-src 'self' blob:",
        "manifest-src 'self'",
        "form-action 'self'",
        "base-uri 'none'",
        "frame-ancestors 'none'",
      ],
      scriptDirective: { resources: ["'self'", "'wasm-unsafe-eval'"] },
      styleDirective: { resources: ["'self'"] },
    },
  },
  devToolbar: { enabled: false },
  vite: {
    plugins: [tailwindcss()],
    // Workers are bundled apart from the pages and would not know the alias of tsconfig.json.
    resolve: { alias: { "~": fileURLToPath(new URL("./src", import.meta.url)) } },
    build: { assetsInlineLimit: 0 },
    worker: { format: "es" },
  },
});
