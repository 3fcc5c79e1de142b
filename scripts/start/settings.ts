import { resolve } from "node:path";
import { portCount } from "../services/local-environment";
import { repositoryFolder } from "../services/repository";
import { StartFailure } from "./start-failure";

export type Variables = Readonly<Record<string, string | undefined>>;

export type Settings =
  | { services: "fakes"; basePort: number; appOrigin: string; dataFolder: string }
  | { services: "real"; basePort: number; appOrigin: string };

/** One of these set means real services; then all of them are needed. */
const serviceVariables = [
  "DATABASE_URL",
  "S3_ENDPOINT",
  "S3_BUCKET",
  "S3_ACCESS_KEY_ID",
  "S3_SECRET_ACCESS_KEY",
  "SMTP_URL",
  "OIDC_ISSUER",
  "OIDC_CLIENT_ID",
  "OIDC_CLIENT_SECRET",
] as const;
const neededWithThem = ["APP_ORIGIN", "MAIL_FROM"] as const;

const loopbackHosts = new Set(["127.0.0.1", "localhost", "[::1]"]);

/** Real services or fakes, never some of each. @throws StartFailure */
export function readSettings(variables: Variables): Settings {
  const basePort = readPort(variables["PORT"]);
  const set = serviceVariables.filter((name) => variables[name]);
  if (set.length > 0) {
    const missing = [...serviceVariables, ...neededWithThem].filter((name) => !variables[name]);
    if (missing.length > 0) {
      throw new StartFailure(
        "mixed-services",
        `Real services and fakes do not mix: ${set.join(", ")} is set, but ${missing.join(", ")} is not. ` +
          "Set all of them, or none to use the fakes.",
      );
    }
    if (variables["LOCAL_FAKES"]) {
      throw new StartFailure("mixed-services", "LOCAL_FAKES is set beside real services. Unset it.");
    }
    return { services: "real", basePort, appOrigin: variables["APP_ORIGIN"] ?? "" };
  }
  const appOrigin = variables["APP_ORIGIN"] ?? `http://127.0.0.1:${basePort}`;
  checkLoopback(appOrigin, variables["HOST"]);
  return {
    services: "fakes",
    basePort,
    appOrigin,
    dataFolder: resolve(repositoryFolder, variables["DATA_DIR"] ?? "data"),
  };
}

function readPort(text = "4810"): number {
  const port = Number(text);
  if (Number.isInteger(port) && port >= 1024 && port + portCount <= 65_536) return port;
  throw new StartFailure(
    "settings",
    `PORT is "${text}": give a whole number from 1024 to ${65_536 - portCount}.`,
  );
}

/** The fakes let anybody sign in as anybody, so nothing of it may be reached from elsewhere. */
function checkLoopback(appOrigin: string, host: string | undefined): void {
  const hostname = URL.canParse(appOrigin) ? new URL(appOrigin).hostname : "";
  if (!loopbackHosts.has(hostname)) {
    throw new StartFailure(
      "not-loopback",
      `APP_ORIGIN is "${appOrigin}", but the fakes let anybody in and work on a loopback address only. ` +
        "Unset it, or set the real services as well.",
    );
  }
  if (host !== undefined && !loopbackHosts.has(host)) {
    throw new StartFailure(
      "not-loopback",
      `HOST is "${host}", but with the fakes the app listens on 127.0.0.1 only. Unset it, or set the real services.`,
    );
  }
}
