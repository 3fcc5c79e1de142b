import type { APIContext, APIRoute } from "astro";
import { z } from "zod";
import { Refusal } from "~/domain/errors";
import type { Action, Member, Principal, permissions } from "~/domain/permissions";
import { authorise } from "../auth/guard";
import type { Scope } from "../auth/scope";
import { errorReport } from "../error-report";
import { log } from "../log";
import { parseBody } from "./body";
import type { EndpointDefinition } from "./endpoint-definition";
import { refused } from "./respond";

const jsonMaxBytes = 1_000_000;

type PrincipalFor<A extends Action> = (typeof permissions)[A]["allow"] extends "anyone" ? Principal : Member;

interface Definition<A extends Action, B extends z.ZodType, Q extends z.ZodType> extends EndpointDefinition {
  action: A;
  body?: B;
  query?: Q;
  /** Default 1 MB. */
  maxBytes?: number;
}

export interface Call<A extends Action, B, Q> {
  principal: PrincipalFor<A>;
  /** The objects that the path names, all of the principal's organisation and each the child of the one before. */
  scope: Scope;
  body: B;
  query: Q;
  request: Request;
  context: APIContext;
}

export type Endpoint = APIRoute & { definition: EndpointDefinition };

const nothing = z.undefined();

/**
 * A door of the API: authorises, parses, calls `handle`, and turns a refusal into its answer.
 * Everything that is not a `Refusal` is logged by its request id and answered 500 without its text.
 */
export function endpoint<
  A extends Action,
  B extends z.ZodType = typeof nothing,
  Q extends z.ZodType = typeof nothing,
>(
  definition: Definition<A, B, Q>,
  handle: (call: Call<A, z.output<B>, z.output<Q>>) => Promise<Response> | Response,
): Endpoint {
  const { action, body, query, maxBytes = jsonMaxBytes, form = false } = definition;
  const route: APIRoute = async (context) => {
    try {
      const { principal, scope } = await authorise(context, action);
      const parsedQuery = (query ?? nothing).safeParse(query && Object.fromEntries(context.url.searchParams));
      if (!parsedQuery.success)
        throw new Refusal("input.refused", "The address has a parameter that cannot be used.");
      const parsedBody = body && (await parseBody(context.request, body, { maxBytes, form }));
      return await handle({
        principal: principal as PrincipalFor<A>,
        scope,
        body: parsedBody as z.output<B>,
        query: parsedQuery.data as z.output<Q>,
        request: context.request,
        context,
      });
    } catch (error) {
      return refused(asRefusal(error, context));
    }
  };
  return Object.assign(route, { definition });
}

/** The refusal that stands for `error`; one that nobody foresaw is logged and loses its text. */
export function asRefusal(error: unknown, context: Pick<APIContext, "locals" | "routePattern">): Refusal {
  if (error instanceof Refusal) return error;
  const { requestId } = context.locals;
  log().error({ requestId, route: context.routePattern, ...errorReport(error) }, "unforeseen error");
  return new Refusal(
    "internal",
    `Something went wrong on our side and nothing was changed. Try again; if it happens again, report the number ${requestId}.`,
    { detail: { requestId } },
  );
}
