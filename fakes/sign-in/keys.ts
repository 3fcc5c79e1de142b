import { generateKeyPairSync, randomBytes } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import type { JWK } from "oidc-provider";

export interface ProviderKeys {
  jwks: { keys: JWK[] };
  cookieKeys: string[];
}

/** The provider's keys, made once and kept, so that what it signed stays valid over a restart. */
export function providerKeys(folder: string): ProviderKeys {
  const file = join(folder, "keys.json");
  if (existsSync(file)) return JSON.parse(readFileSync(file, "utf8")) as ProviderKeys;
  const { privateKey } = generateKeyPairSync("rsa", { modulusLength: 2048 });
  const signing = {
    ...privateKey.export({ format: "jwk" }),
    use: "sig",
    alg: "RS256",
    kid: "local-1",
  } as JWK;
  const keys = { jwks: { keys: [signing] }, cookieKeys: [randomBytes(32).toString("base64url")] };
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  writeFileSync(file, JSON.stringify(keys), { mode: 0o600 });
  return keys;
}
