import { CodeChallengeMethod, OAuth2Client } from "arctic";
import { createRemoteJWKSet, jwtVerify } from "jose";
import { z } from "zod";
import { freshSignInMs } from "~/domain/revision";
import { env } from "../env";
import { isFreshSignIn } from "./fresh-sign-in";
import { sameSecret } from "./secrets";
import { within } from "./within";

const answerWithinMs = 5000;
const discoveryLifetimeMs = 60 * 60_000;
const clockToleranceS = 30;

/** Signatures that a public key checks; `none` and shared-secret ones are no proof here. */
const algorithms = ["RS256", "PS256", "ES256", "ES384", "RS384", "RS512", "PS384", "PS512", "EdDSA"];

const endpointUrl = z.url({ protocol: /^https?$/ });
const metadataSchema = z.object({
  issuer: z.string(),
  authorization_endpoint: endpointUrl,
  token_endpoint: endpointUrl,
  jwks_uri: endpointUrl,
});

interface Provider {
  authorizationEndpoint: string;
  tokenEndpoint: string;
  keys: ReturnType<typeof createRemoteJWKSet>;
}

let discovered: { provider: Provider; until: number } | undefined;

/** What the provider says of itself (OpenID Connect Discovery 1.0, section 4), asked once an hour. */
async function discover(): Promise<Provider> {
  if (discovered !== undefined && Date.now() < discovered.until) return discovered.provider;
  const { issuer } = env().oidc;
  const response = await fetch(`${issuer.replace(/\/$/, "")}/.well-known/openid-configuration`, {
    signal: AbortSignal.timeout(answerWithinMs),
    headers: { Accept: "application/json" },
  });
  if (!response.ok) throw new Error(`Discovery was answered ${String(response.status)}.`);
  const metadata = metadataSchema.parse(await response.json());
  if (metadata.issuer !== issuer) throw new Error("Discovery was answered for another issuer.");
  const endpoints = [metadata.authorization_endpoint, metadata.token_endpoint, metadata.jwks_uri];
  if (issuer.startsWith("https:") && !endpoints.every((url) => url.startsWith("https:")))
    throw new Error("Discovery named an endpoint without https.");
  const provider = {
    authorizationEndpoint: metadata.authorization_endpoint,
    tokenEndpoint: metadata.token_endpoint,
    keys: createRemoteJWKSet(new URL(metadata.jwks_uri), { timeoutDuration: answerWithinMs }),
  };
  discovered = { provider, until: Date.now() + discoveryLifetimeMs };
  return provider;
}

function client(): OAuth2Client {
  const { appOrigin, oidc } = env();
  return new OAuth2Client(oidc.clientId, oidc.clientSecret, `${appOrigin}/api/sign-in/return`);
}

interface Secrets {
  state: string;
  nonce: string;
  codeVerifier: string;
}

/**
 * Where to send a browser that wants to sign in.
 * @param wantsFresh whether the person has to prove anew who they are, and the provider to say when they did
 *   (OpenID Connect Core 1.0, section 3.1.2.1)
 * @throws when the provider does not answer
 */
export async function authorisationUrl(
  { state, nonce, codeVerifier }: Secrets,
  wantsFresh = false,
): Promise<URL> {
  const { authorizationEndpoint } = await discover();
  // No more than who it is: names and addresses are kept here, by the organisation's admin.
  const url = client().createAuthorizationURLWithPKCE(
    authorizationEndpoint,
    state,
    CodeChallengeMethod.S256,
    codeVerifier,
    ["openid"],
  );
  url.searchParams.set("nonce", nonce);
  if (wantsFresh) {
    url.searchParams.set("prompt", "login");
    url.searchParams.set("max_age", String(freshSignInMs / 1000));
  }
  return url;
}

/** A clock that runs ahead of ours must not make a proof last longer. */
const provenAt = (authTimeS: number | undefined): Date | null =>
  authTimeS === undefined ? null : new Date(Math.min(authTimeS * 1000, Date.now()));

const claimsSchema = z.object({
  sub: z.string().min(1).max(255),
  nonce: z.string(),
  azp: z.string().optional(),
  auth_time: z.number().optional(),
});

/**
 * Exchanges the code and verifies the ID token (OpenID Connect Core 1.0, section 3.1.3.7).
 * @param wantsFresh whether a proof that is not of the last minutes, or has no time, is refused
 * @returns the subject, and when they proved who they are; null where the provider does not say
 * @throws whatever went wrong; `signInProblemOf` sorts it
 */
export async function verifiedSubject(
  code: string,
  { nonce, codeVerifier }: Pick<Secrets, "nonce" | "codeVerifier">,
  wantsFresh = false,
): Promise<{ subject: string; authenticatedAt: Date | null }> {
  const { tokenEndpoint, keys } = await discover();
  const tokens = await within(
    answerWithinMs,
    client().validateAuthorizationCode(tokenEndpoint, code, codeVerifier),
  );
  const { issuer, clientId } = env().oidc;
  const { payload } = await jwtVerify(tokens.idToken(), keys, {
    issuer,
    audience: clientId,
    algorithms,
    requiredClaims: ["sub", "nonce", "exp", "iat"],
    clockTolerance: clockToleranceS,
  });
  const claims = claimsSchema.parse(payload);
  if (!sameSecret(claims.nonce, nonce)) throw new Error("The ID token answers another sign-in.");
  const isForOthersToo = Array.isArray(payload.aud) && payload.aud.length > 1;
  if ((isForOthersToo || claims.azp !== undefined) && claims.azp !== clientId)
    throw new Error("The ID token was issued to another party.");
  const authenticatedAt = provenAt(claims.auth_time);
  if (wantsFresh && !isFreshSignIn(authenticatedAt, new Date()))
    throw new Error("The ID token does not say that the person signed in anew.");
  return { subject: claims.sub, authenticatedAt };
}
