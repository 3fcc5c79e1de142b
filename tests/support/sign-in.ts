import type { Visitor } from "./visitor";

/**
 * Signs a person in through the provider, as a browser would: to the app, on to the list of people, and back.
 * @returns the answer of the page that the app leads to
 */
export async function signIn(
  visitor: Visitor,
  appOrigin: string,
  subject: string,
  startPath = "/api/sign-in/start",
): Promise<{ url: URL; response: Response }> {
  const started = await visitor.visit(appOrigin + startPath);
  if (!started.url.pathname.startsWith("/people/")) {
    throw new Error(
      `Signing in did not lead to the list of people but to ${started.url} (${started.response.status}): ` +
        (await started.response.text()).slice(0, 500),
    );
  }
  return visitor.visit(started.url, { method: "POST", body: new URLSearchParams({ subject }) });
}
