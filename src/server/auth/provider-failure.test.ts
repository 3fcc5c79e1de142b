import { ArcticFetchError, OAuth2RequestError, UnexpectedResponseError } from "arctic";
import { errors } from "jose";
import { expect, it } from "vitest";
import { describeFailure, signInProblemOf } from "./provider-failure";

it.each([
  new ArcticFetchError(new TypeError("fetch failed")),
  new UnexpectedResponseError(502),
  new errors.JWKSTimeout(),
  new errors.JOSEError("Expected 200 OK from the JSON Web Key Set HTTP response"),
  new TypeError("fetch failed"),
  new DOMException("", "TimeoutError"),
])("calls %s an outage", (error) => {
  expect(signInProblemOf(error)).toBe("provider-unavailable");
});

it.each([
  new OAuth2RequestError("invalid_grant", "secret text", null, null),
  new errors.JWSSignatureVerificationFailed(),
  new errors.JWTExpired("expired", {}),
  new errors.JWTClaimValidationFailed("wrong", {}),
  new errors.JWKSNoMatchingKey(),
  new errors.JOSEAlgNotAllowed(),
  new TypeError("of our own making"),
  "not an error",
])("calls %s a refusal", (error) => {
  expect(signInProblemOf(error)).toBe("provider-refused");
});

it("names a failure without what the provider wrote", () => {
  expect(describeFailure(new OAuth2RequestError("invalid_grant", "secret text", null, null))).toBe(
    "OAuth2RequestError invalid_grant",
  );
});
