import { existsSync } from "node:fs";
import { join } from "node:path";
import { baseEnvironment } from "./local-environment";
import { ManagedProcess } from "./managed-process";
import { inRepository, repositoryFolder } from "./repository";
import { runCommand, type CommandResult } from "./run-command";

/** The app's processes, as `npm run build` made them. */
export const nodeEntry = (name: string): string => inRepository(`dist/node/${name}.mjs`);

export const isBuilt = (): boolean =>
  existsSync(inRepository("dist/server/entry.mjs")) && existsSync(nodeEntry("server"));

const startEntry = (
  name: string,
  entry: string,
  environment: Record<string, string>,
  logFolder: string | undefined,
): Promise<ManagedProcess> =>
  ManagedProcess.start({
    name,
    command: process.execPath,
    args: ["--enable-source-maps", nodeEntry(entry)],
    cwd: repositoryFolder,
    env: { ...baseEnvironment(), ...environment },
    ...(logFolder ? { logFile: join(logFolder, `${entry}.log`) } : {}),
    readyWhen: "message",
  });

/** Without a log folder the process's log is shown here. */
export const startServer = (
  environment: Record<string, string>,
  logFolder?: string,
): Promise<ManagedProcess> => startEntry("the app's server", "server", environment, logFolder);

export const startDeliveryWorker = (
  environment: Record<string, string>,
  logFolder?: string,
): Promise<ManagedProcess> => startEntry("the delivery worker", "delivery-worker", environment, logFolder);

export const migrateDatabase = (
  environment: Record<string, string>,
  ownerUrl: string,
): Promise<CommandResult> =>
  runCommand(process.execPath, [nodeEntry("migrate")], {
    cwd: repositoryFolder,
    env: { ...baseEnvironment(), ...environment, MIGRATION_DATABASE_URL: ownerUrl },
  });

/** Whether the database is of this version, asked as the application's user; nothing is changed. */
export const checkDatabase = (environment: Record<string, string>): Promise<CommandResult> =>
  runCommand(process.execPath, [nodeEntry("migrate"), "--check"], {
    cwd: repositoryFolder,
    env: { ...baseEnvironment(), ...environment },
  });

export const seedDemo = (environment: Record<string, string>): Promise<CommandResult> =>
  runCommand(process.execPath, ["--import", "tsx", inRepository("scripts/seed/main.ts")], {
    cwd: repositoryFolder,
    env: { ...baseEnvironment(), ...environment },
  });
