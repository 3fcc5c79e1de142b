import type { APIContext } from "astro";
import { Refusal } from "~/domain/errors";
import { type Action, mayAct, permissions, type Principal } from "~/domain/permissions";
import { resolveScope, type Scope } from "./scope";

/**
 * Lets the caller through to `action` on what the path names. Whether the object exists is found out before whether the
 * role suffices, so that another organisation's objects answer 404 to every role.
 * @throws Refusal sign-in.required, not-found, permission.denied
 */
export async function authorise(
  context: Pick<APIContext, "locals" | "params">,
  action: Action,
): Promise<{ principal: Principal; scope: Scope }> {
  const { principal } = context.locals;
  if (permissions[action].allow === "anyone") return { principal, scope: {} };
  if (principal.kind !== "member")
    throw new Refusal(
      "sign-in.required",
      "Your session has ended or you have not signed in. Sign in and try again.",
    );
  const scope = await resolveScope(principal, context.params);
  if (!mayAct(principal, action))
    throw new Refusal(
      "permission.denied",
      "Your roles do not allow this. Ask an admin of your organisation which role you need.",
    );
  context.locals.scope = scope;
  return { principal, scope };
}
