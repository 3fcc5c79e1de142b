import { ArcticFetchError, OAuth2RequestError, UnexpectedResponseError } from "arctic";
import { errors } from "jose";
import type { SignInProblem } from "~/domain/sign-in-problems";

/** Whether the provider could not be reached or said no; whatever is not known to be an outage is a no. */
export function signInProblemOf(error: unknown): SignInProblem {
  const isOutage =
    error instanceof ArcticFetchError ||
    error instanceof UnexpectedResponseError ||
    error instanceof errors.JWKSTimeout ||
    // jose's own class for a key set that was answered with an error.
    (error instanceof errors.JOSEError && error.code === errors.JOSEError.code) ||
    // fetch: unreachable, and too slow.
    (error instanceof TypeError && error.message === "fetch failed") ||
    (error instanceof DOMException && error.name === "TimeoutError");
  return isOutage ? "provider-unavailable" : "provider-refused";
}

/** What may be logged of it: codes and classes, never a token, a code or a claim. */
export function describeFailure(error: unknown): string {
  if (error instanceof OAuth2RequestError) return `${error.constructor.name} ${error.code}`;
  if (error instanceof errors.JOSEError) return error.code;
  return error instanceof Error ? error.constructor.name : typeof error;
}
