import { createServer } from "node:net";

/** True when nothing listens on the loopback port. */
export function isPortFree(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once("error", () => resolve(false));
    probe.listen({ port, host: "127.0.0.1", exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/** The base of `count` neighbouring free loopback ports. */
export async function freePortBlock(count: number): Promise<number> {
  for (let attempt = 0; attempt < 200; attempt += 1) {
    // Below Linux's ephemeral range (32768), so that no outgoing connection takes one meanwhile.
    const base = 12_000 + Math.floor(Math.random() * 20_000);
    const ports = Array.from({ length: count }, (_, offset) => base + offset);
    const free = await Promise.all(ports.map(isPortFree));
    if (free.every(Boolean)) return base;
  }
  throw new Error(`No ${count} neighbouring free ports between 12000 and 32000 on 127.0.0.1.`);
}
