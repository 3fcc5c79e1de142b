import { demoPeople } from "../seed/demo-people";
import { mailboxAddress } from "../services/local-environment";
import { ProcessFailure } from "../services/managed-process";
import { announce } from "./announce";
import { readSettings } from "./settings";
import { StartFailure } from "./start-failure";
import { startOnFakes } from "./start-on-fakes";
import { startOnRealServices } from "./start-on-real-services";
import type { Supervisor } from "./supervisor";

const report = (line: string): void => console.log(line);

/** Resolves on the first signal that asks for the end. */
const asked = new Promise<NodeJS.Signals>((resolve) => {
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const) process.on(signal, () => resolve(signal));
});

async function start(): Promise<Supervisor> {
  const settings = readSettings(process.env);
  if (settings.services === "real") {
    const supervisor = await startOnRealServices(process.env, report);
    announce({ appOrigin: settings.appOrigin }, report);
    return supervisor;
  }
  const { supervisor, ports } = await startOnFakes(settings, report);
  const { appOrigin, dataFolder } = settings;
  announce({ appOrigin, dataFolder, mailbox: mailboxAddress(ports), people: demoPeople }, report);
  return supervisor;
}

function explain(error: unknown): string {
  if (error instanceof StartFailure) return error.message;
  if (error instanceof ProcessFailure) {
    const lines = error.output.trim().split("\n").slice(-15).join("\n");
    return `${error.message}. It said:\n${lines}\nMend what it says and start again.`;
  }
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}

try {
  const starting = start();
  const first = await Promise.race([starting, asked]);
  if (typeof first === "string") report("Stopping as soon as what is starting can be stopped …");
  const supervisor = await starting;
  try {
    await Promise.race([asked, supervisor.died]);
    report("Stopping …");
  } finally {
    await supervisor.stop();
  }
  report("Stopped. The data is kept.");
  process.exit(0);
} catch (error) {
  console.error(`\nStillneedle did not start or had to stop.\n${explain(error)}`);
  process.exit(1);
}
