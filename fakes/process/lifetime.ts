import type { Server } from "node:net";

/** Fakes answer on loopback only: they check no more than what a test or a demo needs. */
export function listenOnLoopback(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, "127.0.0.1", () => {
      server.removeListener("error", reject);
      resolve();
    });
  });
}

/** Tells the parent that the fake answers, and ends with it or on a signal. */
export function serveUntilStopped(close: () => Promise<void>): void {
  const stop = () => {
    void close().finally(() => process.exit(0));
  };
  process.once("SIGTERM", stop);
  process.once("SIGINT", stop);
  // A parent that was killed can't stop its fakes; its closed channel does.
  if (process.connected) process.once("disconnect", stop);
  process.send?.("ready");
}
