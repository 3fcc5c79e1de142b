/** An SMTP answer that refuses a recipient. */
export class Refusal extends Error {
  constructor(
    readonly responseCode: number,
    message: string,
  ) {
    super(message);
  }
}

/**
 * Recipients that a test can choose to be refused, by the local part before any "+":
 * `refuse` for good, `refuse-temporarily` each time, `refuse-once` the first time only (per whole address).
 */
export function createRefusals(): (address: string) => Refusal | undefined {
  const refusedOnce = new Set<string>();
  return (address) => {
    const kind = address.toLowerCase().split("@")[0]?.split("+")[0];
    if (kind === "refuse") return new Refusal(550, `No such mailbox: ${address}`);
    if (kind === "refuse-temporarily") return new Refusal(451, `Mailbox busy, try again later: ${address}`);
    if (kind === "refuse-once" && !refusedOnce.has(address)) {
      refusedOnce.add(address);
      return new Refusal(451, `Mailbox busy, try again later: ${address}`);
    }
    return undefined;
  };
}
