export type MigrationFailureKind = "newer" | "older" | "changed" | "locked" | "rights" | "unreachable";

/** Exit statuses of the migrate command; anything else that goes wrong is 1. */
export const exitStatusOf: Readonly<Record<MigrationFailureKind, number>> = {
  newer: 4,
  older: 9,
  changed: 5,
  locked: 6,
  rights: 7,
  unreachable: 8,
};

export class MigrationFailure extends Error {
  constructor(
    readonly kind: MigrationFailureKind,
    message: string,
  ) {
    super(message);
  }
}
