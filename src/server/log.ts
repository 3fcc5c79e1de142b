import { pino, type Logger } from "pino";
import { env } from "./env";

let logger: Logger | undefined;

/** The process's log: JSON lines on standard error, without query strings, cookies, bodies or bound parameters. */
export function log(): Logger {
  logger ??= pino(
    { level: env().logLevel, base: null, timestamp: pino.stdTimeFunctions.isoTime },
    pino.destination(2),
  );
  return logger;
}
