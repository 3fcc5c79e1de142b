import { join } from "node:path";
import type { TestProject } from "vitest/node";
import { isBuilt, seedDemo, startDeliveryWorker, startServer } from "../../scripts/services/app";
import { localEnvironment } from "../../scripts/services/local-environment";
import type { ManagedProcess } from "../../scripts/services/managed-process";
import { createTestDatabase } from "../support/database";
import { appOriginOf, startTestServices } from "../support/test-services";

/** The whole app as in production, on the demo's data, for every browser test of the run. */
export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  if (!isBuilt()) throw new Error('The browser tests run what "npm run build" makes: run it first.');
  const services = await startTestServices();
  const started: ManagedProcess[] = [];
  const stop = async () => {
    for (const one of started.reverse()) await one.stop();
    await services.stop();
  };
  try {
    const { ports, secrets, folder } = services;
    const database = await createTestDatabase(services, "e2e");
    const environment = localEnvironment(ports, secrets, {
      appOrigin: appOriginOf(services),
      databaseUrl: database.appUrl,
    });
    const seeded = await seedDemo(environment);
    if (seeded.status !== 0)
      throw new Error(`The demo could not be seeded:\n${seeded.stdout}${seeded.stderr}`);
    const logFolder = join(folder, "logs");
    started.push(await startServer(environment, logFolder));
    started.push(await startDeliveryWorker(environment, logFolder));
    project.provide("services", { ports, secrets, folder });
    return stop;
  } catch (error) {
    await stop();
    throw error;
  }
}
