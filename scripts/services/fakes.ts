import { mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { baseEnvironment, fakeClientId, fakeS3, signInReturnPath } from "./local-environment";
import type { LocalPorts, LocalSecrets } from "./local-environment";
import { ManagedProcess } from "./managed-process";
import { inRepository, repositoryFolder } from "./repository";

export interface FakePerson {
  subject: string;
  name: string;
  email: string;
  remark: string;
}

export interface FakesOptions {
  ports: Pick<LocalPorts, "s3" | "smtp" | "mailbox" | "signIn">;
  secrets: LocalSecrets;
  /** Each fake keeps its files in a folder of this one. */
  dataFolder: string;
  logFolder: string;
  people: readonly FakePerson[];
  /** Origins of the apps that may send people to sign in. */
  appOrigins: readonly string[];
}

/** Starts the S3, mail and sign-in fakes; when one does not start, none stays. */
export async function startFakes(options: FakesOptions): Promise<ManagedProcess[]> {
  const { ports, secrets, dataFolder, appOrigins } = options;
  const signInFolder = join(dataFolder, "sign-in");
  mkdirSync(signInFolder, { recursive: true, mode: 0o700 });
  const peopleFile = join(signInFolder, "people.json");
  writeFileSync(peopleFile, JSON.stringify(options.people), { mode: 0o600 });

  const starting = [
    startFake(options, "s3", "the S3 fake", {
      args: { port: ports.s3, data: join(dataFolder, "s3"), bucket: fakeS3.bucket, region: fakeS3.region },
      env: { S3_ACCESS_KEY_ID: fakeS3.accessKeyId, S3_SECRET_ACCESS_KEY: secrets.s3SecretAccessKey },
    }),
    startFake(options, "mail", "the mail fake", {
      args: { "smtp-port": ports.smtp, "web-port": ports.mailbox, data: join(dataFolder, "mail") },
      env: {},
    }),
    startFake(options, "sign-in", "the sign-in fake", {
      args: {
        port: ports.signIn,
        data: signInFolder,
        people: peopleFile,
        "client-id": fakeClientId,
        "redirect-uris": appOrigins.map((origin) => origin + signInReturnPath).join(" "),
        "post-logout-redirect-uris": appOrigins.map((origin) => `${origin}/`).join(" "),
      },
      env: { OIDC_CLIENT_SECRET: secrets.oidcClientSecret },
    }),
  ];
  const settled = await Promise.allSettled(starting);
  const started = settled.flatMap((one) => (one.status === "fulfilled" ? [one.value] : []));
  const failed = settled.find((one) => one.status === "rejected");
  if (!failed) return started;
  await Promise.all(started.map((one) => one.stop()));
  throw failed.reason;
}

function startFake(
  { logFolder }: FakesOptions,
  folder: string,
  name: string,
  { args, env }: { args: Record<string, string | number>; env: Record<string, string> },
): Promise<ManagedProcess> {
  return ManagedProcess.start({
    name,
    command: process.execPath,
    args: [
      "--import",
      "tsx",
      inRepository(`fakes/${folder}/main.ts`),
      ...Object.entries(args).flatMap(([option, value]) => [`--${option}`, String(value)]),
    ],
    cwd: repositoryFolder,
    env: { ...baseEnvironment(), ...env },
    logFile: join(logFolder, `${folder}.log`),
    readyWhen: "message",
  });
}
