import { createServer, type RequestListener, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { env as variables } from "node:process";
import { localEnvironment } from "../../scripts/services/local-environment";
import { inRepository } from "../../scripts/services/repository";
import { createRequestListener } from "../../src/server/entries/request-listener";
import { createTestDatabase, type TestDatabase } from "./database";
import { services } from "./services";
import { appOriginOf } from "./test-services";
import { Visitor } from "./visitor";

export interface TestApp {
  /** What the app believes its address to be; nobody listens there. */
  origin: string;
  /** Where it answers: for supertest, which takes the server. */
  server: Server;
  database: TestDatabase;
  /**
   * A browser without cookies, for which the app answers at its origin. Each has an address of its own, so that
   * limits per address do not add up over a test file; give one to share it.
   */
  visitor(address?: string): Visitor;
  close(): Promise<void>;
}

let visitors = 0;

/** Of the block for documentation (RFC 5737). */
const nextAddress = (): string => `203.0.113.${(visitors++ % 254) + 1}`;

/**
 * The handler as built, in this process, on a fresh database of this vitest worker. Call it once a test file,
 * before anything of `~/server` reads the environment: the same variables hold for both.
 */
export async function startTestApp(): Promise<TestApp> {
  const run = services();
  const origin = appOriginOf(run);
  const database = await createTestDatabase(run, variables["VITEST_POOL_ID"] ?? "1");
  const environment = localEnvironment(run.ports, run.secrets, {
    appOrigin: origin,
    databaseUrl: database.appUrl,
  });
  Object.assign(variables, environment, {
    TRUST_PROXY: "1",
    LOG_LEVEL: "error",
    ASTRO_NODE_AUTOSTART: "disabled",
  });

  const entry = new URL(`file://${inRepository("dist/server/entry.mjs")}`).href;
  const { handler } = (await import(/* @vite-ignore */ entry)) as { handler: RequestListener };
  const server = createServer(createRequestListener({ handler, appOrigin: origin, trustProxy: true }));
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const reachedAt = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  return {
    origin,
    server,
    database,
    visitor: (address = nextAddress()) => new Visitor(new Map([[origin, reachedAt]]), address),
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}
