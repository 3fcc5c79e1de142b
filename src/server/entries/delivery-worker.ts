import { closeDatabase } from "../db/client";
import { runDeliveryWorker } from "../deliveries/worker";
import { log } from "../log";
import { reportReady, stopOnSignal } from "./graceful-shutdown";

const ending = new AbortController();
const work = runDeliveryWorker({ signal: ending.signal });

stopOnSignal(async () => {
  log().info("delivery worker stopping: the message in hand is finished first");
  ending.abort();
  await work;
  await closeDatabase();
});

log().info("delivery worker started");
reportReady();
await work;
