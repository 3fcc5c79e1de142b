import type { AstroCookies } from "astro";
import type { SignInProblem } from "~/domain/sign-in-problems";
import { db } from "../db/client";
import { findOrganisationBySlug } from "../db/queries/organisations";
import { findByIdentity } from "../db/queries/people";
import { deletePendingSignIn } from "../db/queries/sign-ins";
import { env } from "../env";
import { log } from "../log";
import { pendingCookieName, removeCookie } from "./cookies";
import { keepPending, pendingOf } from "./pending";
import { authorisationUrl, verifiedSubject } from "./provider";
import { describeFailure, signInProblemOf } from "./provider-failure";
import { limitRate } from "./rate-limit";
import { safeReturnTo } from "./return-to";
import { hashOf, newToken, sameSecret } from "./secrets";
import { type NextStep, type Proof, signIn } from "./sign-in";

interface Wanted {
  /** Short name; one that is not known is passed over, so that nobody learns which organisations there are. */
  organisation?: string | undefined;
  returnTo?: string | undefined;
  /** Token of the invitation that is to be accepted with the identity. */
  invitation?: string | undefined;
  /** Whether the person has to prove anew who they are. */
  fresh?: boolean | undefined;
}

/** Sends the browser to the provider with a state, a nonce and a code challenge that only this browser can come back with. */
export async function startSignIn(cookies: AstroCookies, wanted: Wanted): Promise<NextStep> {
  const secrets = { state: newToken(), nonce: newToken(), codeVerifier: newToken() };
  let url: URL;
  try {
    url = await authorisationUrl(secrets, wanted.fresh);
  } catch (error) {
    log().warn({ failure: describeFailure(error) }, "sign-in provider not reached");
    return { problem: "provider-unavailable" };
  }
  const organisation =
    wanted.organisation === undefined ? undefined : await findOrganisationBySlug(db(), wanted.organisation);
  await keepPending(db(), cookies, {
    ...secrets,
    organisationId: organisation?.id ?? null,
    returnTo: safeReturnTo(wanted.returnTo),
    subject: null,
    invitationLinkId: wanted.invitation === undefined ? null : hashOf(wanted.invitation),
    authenticatedAt: null,
    wantsFresh: wanted.fresh ?? false,
  });
  return { goTo: url.href };
}

export interface ProviderAnswer {
  code?: string | undefined;
  state?: string | undefined;
  /** RFC 9207. */
  iss?: string | undefined;
  error?: string | undefined;
}

/** Takes the browser back from the provider: verifies what it brings and signs it in, or has it choose an organisation. */
export async function finishSignIn(cookies: AstroCookies, answer: ProviderAnswer): Promise<NextStep> {
  const pending = await pendingOf(cookies);
  if (pending === undefined || pending.subject !== null) return { problem: "expired" };
  await limitRate("sign-in-return", pending.id);
  if (answer.state === undefined || !sameSecret(answer.state, pending.state)) return { problem: "expired" };
  // Used up before the provider is asked: an answer counts once, whatever comes of it.
  removeCookie(cookies, pendingCookieName());
  if (!(await deletePendingSignIn(db(), pending.id))) return { problem: "expired" };
  if (answer.iss !== undefined && answer.iss !== env().oidc.issuer) return { problem: "provider-refused" };
  if (answer.error !== undefined) {
    log().info({ failure: answer.error.slice(0, 64) }, "sign-in declined by the provider");
    return { problem: answer.error === "access_denied" ? "declined" : "provider-refused" };
  }
  if (answer.code === undefined) return { problem: "provider-refused" };

  let proven: Awaited<ReturnType<typeof verifiedSubject>>;
  try {
    proven = await verifiedSubject(answer.code, pending, pending.wantsFresh);
  } catch (error) {
    log().warn({ failure: describeFailure(error) }, "sign-in not confirmed by the provider");
    return { problem: signInProblemOf(error) };
  }
  if (pending.invitationLinkId !== null) {
    await keepPending(db(), cookies, { ...pending, ...proven });
    return { goTo: "/invitations/confirm" };
  }
  const people = (await findByIdentity(db(), env().oidc.issuer, proven.subject)).filter(
    (person) => pending.organisationId === null || person.organisationId === pending.organisationId,
  );
  const [person] = people;
  if (person === undefined) return { problem: "unknown-person" };
  if (people.length > 1) {
    await keepPending(db(), cookies, { ...pending, ...proven });
    return { goTo: "/sign-in/organisation" };
  }
  return goOn(pending.returnTo, await signIn(cookies, async () => proofOf(person, proven.authenticatedAt)));
}

/** The organisations among which a verified person has to choose; empty when nobody has to. */
export async function organisationChoices(cookies: AstroCookies): Promise<{ id: string; name: string }[]> {
  const pending = await pendingOf(cookies);
  if (pending?.subject == null) return [];
  const people = await findByIdentity(db(), env().oidc.issuer, pending.subject);
  return people.map((person) => ({ id: person.organisationId, name: person.organisationName }));
}

export async function chooseOrganisation(cookies: AstroCookies, organisationId: string): Promise<NextStep> {
  const pending = await pendingOf(cookies);
  if (pending?.subject == null) return { problem: "expired" };
  const people = await findByIdentity(db(), env().oidc.issuer, pending.subject);
  const person = people.find((one) => one.organisationId === organisationId);
  if (person === undefined) return { problem: "unknown-person" };
  removeCookie(cookies, pendingCookieName());
  const problem = await signIn(cookies, async (tx) =>
    (await deletePendingSignIn(tx, pending.id))
      ? proofOf(person, pending.authenticatedAt)
      : { problem: "expired" },
  );
  return goOn(pending.returnTo, problem);
}

const proofOf = (
  { userId, organisationId }: { userId: string; organisationId: string },
  authenticatedAt: Date | null,
): Proof => ({ userId, organisationId, by: "provider", authenticatedAt });

const goOn = (returnTo: string, problem: SignInProblem | null): NextStep =>
  problem === null ? { goTo: returnTo } : { problem };
