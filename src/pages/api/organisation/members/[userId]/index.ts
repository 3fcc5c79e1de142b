import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { removeMember } from "~/server/organisations/removal";

export const DELETE = endpoint(
  {
    action: "member.remove",
    summary: "Ends somebody's membership; their work stays under their name.",
    responses: { 204: "empty" },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope }) => {
    await removeMember(principal, named(scope, "person"));
    return noContent();
  },
);
