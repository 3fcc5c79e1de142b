import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { sendAgain } from "~/server/invitations/invite";

export const POST = endpoint(
  {
    action: "invitation.manage",
    summary: "Has an invitation mailed again with a new link.",
    responses: { 204: "empty" },
    refusals: ["state.conflict", "rate.exceeded"],
  },
  async ({ principal, scope }) => {
    await sendAgain(principal, named(scope, "invitation"));
    return noContent();
  },
);
