import { createServer, type RequestListener } from "node:http";
import { env as variables } from "node:process";
import { closeDatabase } from "../db/client";
import { env } from "../env";
import { log } from "../log";
import { closeStorage } from "../storage/client";
import { drain } from "./drain";
import { reportReady, stopOnSignal } from "./graceful-shutdown";
import { createRequestListener } from "./request-listener";

const graceMs = 10_000;

const { appOrigin, host, port, trustProxy } = env();

// Astro's own server drops requests on SIGTERM and starts by being imported; only its handler is wanted.
variables["ASTRO_NODE_AUTOSTART"] = "disabled";
// As built this file is dist/node/server.mjs.
const astroEntry = new URL("../server/entry.mjs", import.meta.url).href;
const { handler } = (await import(/* @vite-ignore */ astroEntry)) as { handler: RequestListener };

const server = createServer(createRequestListener({ handler, appOrigin, trustProxy }));

server.on("error", (error) => {
  log().fatal({ error: error.message }, `cannot listen on ${host}:${port}`);
  process.exit(1);
});
server.listen(port, host, () => {
  log().info({ host, port, appOrigin }, "listening");
  reportReady();
});

stopOnSignal(async () => {
  log().info("stopping: no new requests");
  await drain(server, graceMs);
  await closeDatabase();
  closeStorage();
  log().info("stopped");
});
