import { randomBytes } from "node:crypto";
import type { APIContext, MiddlewareNext } from "astro";
import { defineMiddleware } from "astro:middleware";
import { Refusal } from "~/domain/errors";
import { authorise } from "~/server/auth/guard";
import { principalOf } from "~/server/auth/session";
import { env } from "~/server/env";
import { asRefusal } from "~/server/http/endpoint";
import { pageAction } from "~/server/http/page-actions";
import { refused, securityHeaders, seeOther } from "~/server/http/respond";
import { log } from "~/server/log";

const safeMethods = new Set(["GET", "HEAD", "OPTIONS"]);

/** Browsers send Origin with every unsafe request, JSON and bodiless ones too; what does not match is not ours. */
function checkOrigin(request: Request): void {
  if (safeMethods.has(request.method) || request.headers.get("origin") === env().appOrigin) return;
  throw new Refusal(
    "request.foreign-origin",
    "This request did not come from a page of this application. Open the application and try again.",
  );
}

/** Astro marks what an endpoint itself has answered 404; without the mark it found no endpoint or no such method. */
async function answerOfEndpoint(next: MiddlewareNext): Promise<Response> {
  const response = await next();
  const isPage = response.headers.get("content-type")?.startsWith("text/html") === true;
  if (response.status !== 404 || (!isPage && response.headers.has("X-Astro-Reroute"))) return response;
  await response.body?.cancel();
  throw new Refusal("not-found", "There is no such endpoint, or it does not take this method.");
}

/** Astro gives the page /500 the status 500 whatever the page itself says. */
async function errorPage(context: APIContext, status: number): Promise<Response> {
  const page = await context.rewrite(status === 404 ? "/404" : "/500");
  const headers = new Headers(page.headers);
  headers.set("Cache-Control", "no-store");
  return new Response(page.body, { status, headers });
}

export const onRequest = defineMiddleware(async (context, next) => {
  const startedAtMs = performance.now();
  const { locals, request, url, routePattern } = context;
  // A rewrite to an error page comes through here again with the same locals; it has been judged already, and judging
  // it once more would refuse the error page for the same reason.
  if (locals.refusal !== undefined) return next();
  locals.requestId ??= randomBytes(6).toString("hex");
  locals.principal = { kind: "anonymous" };
  locals.sessionId = null;
  locals.authenticatedAt = null;
  locals.scope = {};
  const isApi = url.pathname.startsWith("/api/");

  const answer = async (): Promise<Response> => {
    try {
      checkOrigin(request);
      Object.assign(locals, await principalOf(context.cookies));
      if (isApi) return await answerOfEndpoint(next);
      const action = pageAction(routePattern);
      if (action === undefined) throw new Error(`No permission is stated for the page ${routePattern}.`);
      await authorise(context, action);
      const page = await next();
      if (!page.headers.has("Cache-Control")) page.headers.set("Cache-Control", "no-store");
      return page;
    } catch (error) {
      const refusal = asRefusal(error, context);
      if (isApi) return refused(refusal);
      if (refusal.code === "sign-in.required" && request.method === "GET")
        return seeOther(`/sign-in?returnTo=${encodeURIComponent(url.pathname)}`);
      locals.refusal = refusal;
      return await errorPage(context, refusal.status);
    }
  };

  const response = await answer();
  for (const [name, value] of Object.entries(securityHeaders)) response.headers.set(name, value);
  if (env().appOrigin.startsWith("https:"))
    response.headers.set("Strict-Transport-Security", "max-age=31536000; includeSubDomains");
  response.headers.set("X-Request-Id", locals.requestId);
  log().info(
    {
      requestId: locals.requestId,
      method: request.method,
      route: routePattern,
      status: response.status,
      ms: Math.round(performance.now() - startedAtMs),
    },
    "request",
  );
  return response;
});
