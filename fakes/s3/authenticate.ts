import { timingSafeEqual } from "node:crypto";
import type { IncomingHttpHeaders } from "node:http";
import { canonicalRequest, hmac, scopeText, signingKey, stringToSign, type Scope } from "./canonical-request";
import { S3Error } from "./errors";

export interface Credentials {
  accessKeyId: string;
  secretAccessKey: string;
  region: string;
}

export interface SignedRequest {
  method: string;
  rawPath: string;
  query: URLSearchParams;
  headers: IncomingHttpHeaders;
}

/** What the body's own signatures go on from. */
export interface Authentication {
  payloadHash: string;
  signature: string;
  key: Buffer;
  timestamp: string;
  scope: Scope;
}

interface Claim {
  accessKeyId: string;
  scope: Scope;
  timestamp: string;
  signedHeaders: string[];
  signature: string;
  payloadHash: string;
  /** Seconds that a presigned address lives. */
  expiresS?: number;
}

const maximumSkewMs = 15 * 60_000;
const maximumExpiryS = 7 * 24 * 3600;

/** @throws S3Error as S3 answers an unsigned, stale, foreign or tampered request */
export function authenticate(request: SignedRequest, credentials: Credentials, now: Date): Authentication {
  const claim = request.query.has("X-Amz-Algorithm") ? claimOfQuery(request) : claimOfHeader(request);
  if (claim.accessKeyId !== credentials.accessKeyId) {
    throw new S3Error(
      "InvalidAccessKeyId",
      "The AWS Access Key Id you provided does not exist in our records.",
    );
  }
  if (claim.scope.region !== credentials.region) {
    throw new S3Error(
      "AuthorizationHeaderMalformed",
      `The authorization header is malformed; the region '${claim.scope.region}' is wrong; expecting '${credentials.region}'`,
      { Region: credentials.region },
    );
  }
  checkTime(claim, now);
  checkSignedHeaders(claim, request.headers);

  const canonical = canonicalRequest({ ...request, ...claim });
  const text = stringToSign(claim.timestamp, claim.scope, canonical);
  const key = signingKey(credentials.secretAccessKey, claim.scope);
  if (!sameSignature(hmac(key, text).toString("hex"), claim.signature)) {
    throw new S3Error(
      "SignatureDoesNotMatch",
      "The request signature we calculated does not match the signature you provided. Check your key and signing method.",
      { StringToSign: text, CanonicalRequest: canonical },
    );
  }
  const { payloadHash, signature, timestamp, scope } = claim;
  return { payloadHash, signature, key, timestamp, scope };
}

export const sameSignature = (expected: string, given: string): boolean =>
  expected.length === given.length && timingSafeEqual(Buffer.from(expected), Buffer.from(given));

function claimOfHeader({ headers }: SignedRequest): Claim {
  const header = headers.authorization;
  if (!header) throw new S3Error("AccessDenied", "Access Denied");
  const match =
    /^AWS4-HMAC-SHA256 Credential=([^,\s]+),\s*SignedHeaders=([^,\s]+),\s*Signature=([0-9a-f]{64})$/.exec(
      header,
    );
  const [, credential = "", signedHeaders = "", signature = ""] = match ?? [];
  if (!match) throw new S3Error("AuthorizationHeaderMalformed", "The authorization header is malformed.");
  const payloadHash = headers["x-amz-content-sha256"];
  if (typeof payloadHash !== "string") {
    throw new S3Error("InvalidRequest", "Missing required header for this request: x-amz-content-sha256");
  }
  const timestamp = String(headers["x-amz-date"] ?? "");
  return {
    ...parseCredential(credential, "AuthorizationHeaderMalformed"),
    timestamp,
    signedHeaders: signedHeaders.split(";"),
    signature,
    payloadHash,
  };
}

function claimOfQuery({ query }: SignedRequest): Claim {
  const need = (name: string): string => {
    const value = query.get(name);
    if (value) return value;
    throw new S3Error("AuthorizationQueryParametersError", `Query-string authentication requires ${name}.`);
  };
  if (need("X-Amz-Algorithm") !== "AWS4-HMAC-SHA256") {
    throw new S3Error(
      "AuthorizationQueryParametersError",
      'X-Amz-Algorithm only supports "AWS4-HMAC-SHA256"',
    );
  }
  const expiresS = Number(need("X-Amz-Expires"));
  if (!Number.isInteger(expiresS) || expiresS < 0 || expiresS > maximumExpiryS) {
    throw new S3Error(
      "AuthorizationQueryParametersError",
      "X-Amz-Expires must be less than a week (in seconds); that is, the given X-Amz-Expires must be less than 604800 seconds",
    );
  }
  return {
    ...parseCredential(need("X-Amz-Credential"), "AuthorizationQueryParametersError"),
    timestamp: need("X-Amz-Date"),
    signedHeaders: need("X-Amz-SignedHeaders").split(";"),
    signature: need("X-Amz-Signature"),
    payloadHash: query.get("X-Amz-Content-Sha256") ?? "UNSIGNED-PAYLOAD",
    expiresS,
  };
}

function parseCredential(
  credential: string,
  code: "AuthorizationHeaderMalformed" | "AuthorizationQueryParametersError",
): { accessKeyId: string; scope: Scope } {
  const parts = credential.split("/");
  const [accessKeyId = "", date = "", region = ""] = parts;
  if (parts.length !== 5 || credential !== `${accessKeyId}/${scopeText({ date, region })}`) {
    throw new S3Error(
      code,
      "The Credential is malformed; expecting <access key>/<date>/<region>/s3/aws4_request.",
    );
  }
  return { accessKeyId, scope: { date, region } };
}

function checkTime({ timestamp, scope, expiresS }: Claim, now: Date): void {
  const match = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/.exec(timestamp);
  if (!match) {
    throw new S3Error("AccessDenied", "AWS authentication requires a valid Date or x-amz-date header");
  }
  const [, year, month, day, hour, minute, second] = match;
  const signedAtMs = Date.parse(`${year}-${month}-${day}T${hour}:${minute}:${second}Z`);
  if (!timestamp.startsWith(scope.date)) {
    throw new S3Error("SignatureDoesNotMatch", "The date of the credential is not the date of the request.");
  }
  if (expiresS !== undefined) {
    if (now.getTime() > signedAtMs + expiresS * 1000)
      throw new S3Error("AccessDenied", "Request has expired");
    if (now.getTime() < signedAtMs - maximumSkewMs)
      throw new S3Error("AccessDenied", "Request is not yet valid");
  } else if (Math.abs(now.getTime() - signedAtMs) > maximumSkewMs) {
    throw new S3Error(
      "RequestTimeTooSkewed",
      "The difference between the request time and the current time is too large.",
    );
  }
}

/** The host and every x-amz- header must be part of what is signed. */
function checkSignedHeaders({ signedHeaders }: Claim, headers: IncomingHttpHeaders): void {
  const unsigned = Object.keys(headers).filter(
    (name) => (name === "host" || name.startsWith("x-amz-")) && !signedHeaders.includes(name),
  );
  if (unsigned.length > 0) {
    throw new S3Error("AccessDenied", "There were headers present in the request which were not signed", {
      HeadersNotSigned: unsigned.join(", "),
    });
  }
}
