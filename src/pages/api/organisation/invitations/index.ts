import { invitedAnswer } from "~/domain/answers/people";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { invitationInput, invite } from "~/server/invitations/invite";

export const POST = endpoint(
  {
    action: "invitation.manage",
    summary: "Invites somebody by e-mail to become a member with these roles.",
    responses: { 201: invitedAnswer },
    refusals: ["rate.exceeded"],
    body: invitationInput,
  },
  async ({ principal, body }) => json(await invite(principal, body), 201),
);
