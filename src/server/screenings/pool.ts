import { existsSync } from "node:fs";
import { resolve } from "node:path";
import { createScreeningPool, type ScreeningPool } from "~/workers/node";

/** Where the build leaves the worker, from the folder that the process runs in. */
const builtWorker = "dist/node/screening-worker.mjs";

let pool: ScreeningPool | undefined;

/** The process's screening workers, started on first use. @throws Error where the application has not been built */
export function screeningPool(): ScreeningPool {
  pool ??= createScreeningPool(workerFile());
  return pool;
}

function workerFile(): string {
  const file = resolve(builtWorker);
  if (!existsSync(file))
    throw new Error(
      `The screening worker ${file} is not there. Run "npm run build", and start the process in the project's folder.`,
    );
  return file;
}

/** Ends the workers; what they are at is given up. */
export async function closeScreeningPool(): Promise<void> {
  await pool?.close();
  pool = undefined;
}
