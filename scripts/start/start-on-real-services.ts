import { checkDatabase, nodeEntry, startDeliveryWorker, startServer } from "../services/app";
import { ensureBuild } from "./ensure-build";
import type { Variables } from "./settings";
import { StartFailure } from "./start-failure";
import { Supervisor } from "./supervisor";

const newerStatus = 4;

/** The app alone, against the services that the environment names: nothing is seeded, nothing migrated. */
export async function startOnRealServices(
  variables: Variables,
  report: (line: string) => void,
): Promise<Supervisor> {
  const environment = Object.fromEntries(
    Object.entries(variables).flatMap(([name, value]) => (value === undefined ? [] : [[name, value]])),
  );
  await ensureBuild(report);
  const { status, stderr } = await checkDatabase(environment);
  if (status !== 0) {
    throw new StartFailure(status === newerStatus ? "newer-database" : "migration", stderr.trim());
  }
  const supervisor = new Supervisor();
  try {
    supervisor.watch(await startServer(environment), nodeEntry("server"));
    supervisor.watch(await startDeliveryWorker(environment), nodeEntry("delivery-worker"));
    return supervisor;
  } catch (error) {
    await supervisor.stop();
    throw error;
  }
}
