/**
 * Calls `stop` once on the first SIGTERM or SIGINT, or when a parent with a message channel is gone, then ends
 * the process: with status 0, or 1 when stopping failed.
 */
export function stopOnSignal(stop: () => Promise<void>): void {
  let stopping = false;
  const begin = () => {
    if (stopping) return;
    stopping = true;
    stop().then(
      () => process.exit(0),
      (error: unknown) => {
        console.error(error);
        process.exit(1);
      },
    );
  };
  process.on("SIGTERM", begin);
  process.on("SIGINT", begin);
  if (process.connected) process.on("disconnect", begin);
}

/** Tells a parent with a message channel that this process does its work. */
export function reportReady(): void {
  if (process.connected) process.send?.("ready");
}
