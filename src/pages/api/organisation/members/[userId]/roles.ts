import { rolesAnswer } from "~/domain/answers/people";
import { named } from "~/server/auth/scope";
import { giveSessionCookie } from "~/server/auth/session";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { changeRoles, rolesInput } from "~/server/organisations/roles";

export const PUT = endpoint(
  {
    action: "member.change-roles",
    summary: "Gives a member exactly these roles and ends their sessions.",
    body: rolesInput,
    responses: { 200: rolesAnswer },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope, body, context }) => {
    const { locals, cookies } = context;
    const changed = await changeRoles(principal, locals.sessionId, named(scope, "person"), body.roles);
    if (changed.sessionToken !== null) giveSessionCookie(cookies, changed.sessionToken);
    return json({ roles: changed.roles });
  },
);
