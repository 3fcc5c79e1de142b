import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { startFakes } from "../../scripts/services/fakes";
import { generateSecrets, localPorts, portCount } from "../../scripts/services/local-environment";
import type { LocalPorts, LocalSecrets } from "../../scripts/services/local-environment";
import { startMariaDb } from "../../scripts/services/mariadb";
import { freePortBlock } from "../../scripts/services/ports";
import { testPeople } from "./people";

/** What a test run's workers need to know of its services; plain data. */
export interface TestServices {
  ports: LocalPorts;
  secrets: LocalSecrets;
  folder: string;
}

declare module "vitest" {
  export interface ProvidedContext {
    services: TestServices;
  }
}

export interface RunningServices extends TestServices {
  stop(): Promise<void>;
}

/** One MariaDB and one set of fakes on free ports, in a temporary folder that goes when they stop. */
export async function startTestServices(): Promise<RunningServices> {
  const folder = mkdtempSync(join(tmpdir(), "stillneedle-test-"));
  const ports = localPorts(await freePortBlock(portCount));
  const secrets = generateSecrets();
  const mariaDb = await startMariaDb({
    dataFolder: join(folder, "mariadb"),
    port: ports.mariaDb,
    passwords: { root: secrets.rootPassword, owner: secrets.ownerPassword, app: secrets.appPassword },
    databasePattern: "stillneedle\\_test%",
    logFile: join(folder, "logs", "mariadb.log"),
  });
  try {
    const fakes = await startFakes({
      ports,
      secrets,
      dataFolder: folder,
      logFolder: join(folder, "logs"),
      people: testPeople,
      appOrigins: [`http://127.0.0.1:${ports.app}`],
    });
    const stop = async () => {
      await Promise.all(fakes.map((fake) => fake.stop()));
      await mariaDb.stop();
      rmSync(folder, { recursive: true, force: true });
    };
    return { ports, secrets, folder, stop };
  } catch (error) {
    await mariaDb.stop();
    throw error;
  }
}

export const appOriginOf = ({ ports }: TestServices): string => `http://127.0.0.1:${ports.app}`;

export function databaseUrls({ ports, secrets }: TestServices, name: string): { owner: string; app: string } {
  const address = `127.0.0.1:${ports.mariaDb}/${name}`;
  return {
    owner: `mysql://stillneedle_owner:${secrets.ownerPassword}@${address}`,
    app: `mysql://stillneedle_app:${secrets.appPassword}@${address}`,
  };
}
