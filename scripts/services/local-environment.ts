import { randomBytes } from "node:crypto";

export interface LocalPorts {
  app: number;
  signIn: number;
  mailbox: number;
  s3: number;
  smtp: number;
  mariaDb: number;
}

export interface LocalSecrets {
  rootPassword: string;
  ownerPassword: string;
  appPassword: string;
  s3SecretAccessKey: string;
  oidcClientSecret: string;
}

export const portCount = 6;

/** The app's port and the five after it. */
export const localPorts = (base: number): LocalPorts => ({
  app: base,
  signIn: base + 1,
  mailbox: base + 2,
  s3: base + 3,
  smtp: base + 4,
  mariaDb: base + 5,
});

export function generateSecrets(): LocalSecrets {
  // Hexadecimal: they stand in addresses and in SQL.
  const secret = () => randomBytes(24).toString("hex");
  return {
    rootPassword: secret(),
    ownerPassword: secret(),
    appPassword: secret(),
    s3SecretAccessKey: secret(),
    oidcClientSecret: secret(),
  };
}

export const fakeS3 = { region: "local", bucket: "stillneedle", accessKeyId: "stillneedle" };
export const fakeClientId = "stillneedle";
export const signInReturnPath = "/api/sign-in/return";
export const issuerOf = (ports: LocalPorts): string => `http://127.0.0.1:${ports.signIn}`;
export const mailboxAddress = (ports: LocalPorts): string => `http://127.0.0.1:${ports.mailbox}`;

/** The app's variables when it runs against MariaDB and the fakes of this machine. */
export function localEnvironment(
  ports: LocalPorts,
  secrets: LocalSecrets,
  more: { appOrigin: string; databaseUrl: string },
): Record<string, string> {
  return {
    LOCAL_FAKES: "1",
    APP_ORIGIN: more.appOrigin,
    HOST: "127.0.0.1",
    PORT: String(ports.app),
    DATABASE_URL: more.databaseUrl,
    S3_ENDPOINT: `http://127.0.0.1:${ports.s3}`,
    S3_REGION: fakeS3.region,
    S3_BUCKET: fakeS3.bucket,
    S3_ACCESS_KEY_ID: fakeS3.accessKeyId,
    S3_SECRET_ACCESS_KEY: secrets.s3SecretAccessKey,
    SMTP_URL: `smtp://127.0.0.1:${ports.smtp}?ignoreTLS=true`,
    MAIL_FROM: "Stillneedle <notices@stillneedle.example>",
    OIDC_ISSUER: issuerOf(ports),
    OIDC_CLIENT_ID: fakeClientId,
    OIDC_CLIENT_SECRET: secrets.oidcClientSecret,
  };
}

/** What a child of ours gets of this process's own variables: none of another installation's settings. */
export function baseEnvironment(): NodeJS.ProcessEnv {
  const kept = ["PATH", "HOME", "LANG", "TZ", "TMPDIR", "LOG_LEVEL"];
  return {
    NODE_ENV: "production",
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: "true",
    ...Object.fromEntries(kept.flatMap((name) => (process.env[name] ? [[name, process.env[name]]] : []))),
  };
}
