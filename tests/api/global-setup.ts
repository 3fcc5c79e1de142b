import type { TestProject } from "vitest/node";
import { isBuilt } from "../../scripts/services/app";
import { startTestServices } from "../support/test-services";

/** One MariaDB and one set of fakes for the run; each worker makes its own database. */
export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  if (!isBuilt()) throw new Error('The API tests run what "npm run build" makes: run it first.');
  const services = await startTestServices();
  const { ports, secrets, folder } = services;
  project.provide("services", { ports, secrets, folder });
  return services.stop;
}
