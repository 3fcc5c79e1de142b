import { existsSync, mkdirSync, readFileSync, readdirSync, renameSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { z } from "zod";
import { generateSecrets } from "../services/local-environment";
import { StartFailure } from "./start-failure";

const secret = z.string().min(32);
const installationSchema = z.object({
  /** Part of every identity's issuer, so it stays when PORT changes. */
  signInPort: z.number().int(),
  /** False until the first start went all the way: what is in the database before can be thrown away. */
  ready: z.boolean(),
  secrets: z.object({
    rootPassword: secret,
    ownerPassword: secret,
    appPassword: secret,
    s3SecretAccessKey: secret,
    oidcClientSecret: secret,
  }),
});

/** What `npm start` keeps in its data folder beside the data. */
export type Installation = z.output<typeof installationSchema>;

const fileIn = (dataFolder: string): string => join(dataFolder, "installation.json");
export const mariaDbFolderIn = (dataFolder: string): string => join(dataFolder, "mariadb");

/**
 * Opens the data folder, or makes a new one. @throws StartFailure half-made-data for a folder that holds
 * something but not all that belongs together
 */
export function openInstallation(dataFolder: string, signInPort: number): Installation {
  mkdirSync(dataFolder, { recursive: true, mode: 0o700 });
  if (!existsSync(fileIn(dataFolder))) {
    const strange = readdirSync(dataFolder).filter((name) => name !== "run" && name !== "logs");
    if (strange.length > 0)
      throw halfMade(dataFolder, `it holds ${strange.join(", ")} but no installation.json`);
    const installation = { signInPort, ready: false, secrets: generateSecrets() };
    saveInstallation(dataFolder, installation);
    return installation;
  }
  const installation = readInstallation(dataFolder);
  const database = mariaDbFolderIn(dataFolder);
  if (!existsSync(database)) {
    if (installation.ready) throw halfMade(dataFolder, "its database (the folder mariadb) is gone");
  } else if (!["mysql", "ibdata1"].every((name) => existsSync(join(database, name)))) {
    throw halfMade(dataFolder, "its database (the folder mariadb) is not whole");
  }
  return installation;
}

function readInstallation(dataFolder: string): Installation {
  try {
    return installationSchema.parse(JSON.parse(readFileSync(fileIn(dataFolder), "utf8")));
  } catch {
    throw halfMade(dataFolder, "its installation.json can't be read");
  }
}

export function saveInstallation(dataFolder: string, installation: Installation): void {
  const draft = `${fileIn(dataFolder)}.draft`;
  writeFileSync(draft, `${JSON.stringify(installation, null, 2)}\n`, { mode: 0o600 });
  renameSync(draft, fileIn(dataFolder));
}

const halfMade = (dataFolder: string, what: string): StartFailure =>
  new StartFailure(
    "half-made-data",
    `The data folder ${dataFolder} is half made: ${what}. Put back what is missing, or move the folder away ` +
      `("mv ${dataFolder} ${dataFolder}.old") and start again with a new one. Nothing in it was changed.`,
  );
