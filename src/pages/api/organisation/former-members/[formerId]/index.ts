import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { erasePerson } from "~/server/organisations/removal";

export const DELETE = endpoint(
  {
    action: "member.erase",
    summary: "Overwrites name and address of a former member for good.",
    responses: { 204: "empty" },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope }) => {
    await erasePerson(principal, named(scope, "formerMember"));
    return noContent();
  },
);
