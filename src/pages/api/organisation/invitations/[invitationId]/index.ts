import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { withdraw } from "~/server/invitations/invite";

export const DELETE = endpoint(
  {
    action: "invitation.manage",
    summary: "Withdraws an invitation: its links are useless from then on.",
    responses: { 204: "empty" },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope }) => {
    await withdraw(principal, named(scope, "invitation"));
    return noContent();
  },
);
