export type StartFailureKind =
  | "already-running"
  | "busy-port"
  | "build"
  | "half-made-data"
  | "migration"
  | "mixed-services"
  | "newer-database"
  | "no-right-to-install"
  | "not-loopback"
  | "process-died"
  | "seed"
  | "settings";

/** A start that ended for a reason we know; the message says what to do. */
export class StartFailure extends Error {
  constructor(
    readonly kind: StartFailureKind,
    message: string,
  ) {
    super(message);
  }
}
