import { setTimeout as pause } from "node:timers/promises";
import { errorReport } from "../error-report";
import { log } from "../log";
import { openMailTransport } from "../mail/transport";
import { purgeByRetention } from "../retention/purge";
import { keepConcessions } from "../revisions/concessions";
import { deliverNext } from "./deliver";

const pollMs = 1_500;
const longestPauseMs = 60_000;
const purgeEveryMs = 60 * 60_000;

/**
 * Sends what waits in the outbox, one message after the other, until `signal` is aborted; the message in hand is
 * finished first. Any number of workers may run beside each other. An unreachable database is waited for.
 */
export async function runDeliveryWorker({ signal }: { signal: AbortSignal }): Promise<void> {
  const transport = openMailTransport();
  let pauseMs = pollMs;
  let purgeAtMs = 0;
  const isStopping = () => signal.aborted;
  try {
    while (!isStopping()) {
      try {
        if (Date.now() >= purgeAtMs) {
          await purgeByRetention();
          await keepConcessions();
          purgeAtMs = Date.now() + purgeEveryMs;
        }
        while (!isStopping() && (await deliverNext(transport)));
        pauseMs = pollMs;
      } catch (error) {
        log().error(errorReport(error), "the outbox could not be read; trying again");
        pauseMs = Math.min(pauseMs * 2, longestPauseMs);
      }
      await pause(pauseMs, undefined, { signal }).catch(() => undefined);
    }
  } finally {
    transport.close();
  }
}
