import { z } from "zod";
import { orSignInPage } from "~/server/auth/answers";
import { clientNetwork } from "~/server/auth/client-address";
import { limitRate } from "~/server/auth/rate-limit";
import { endpoint } from "~/server/http/endpoint";
import { acceptByLink } from "~/server/invitations/accept";
import { afterAccepting } from "~/server/invitations/answers";

export const POST = endpoint(
  {
    action: "invitation.accept",
    summary: "Accepts an invitation by its mailed link: makes the member and signs them in.",
    responses: { 303: "empty" },
    refusals: ["rate.exceeded"],
    body: z.object({ token: z.string().max(1000) }),
    form: true,
  },
  ({ principal, body, request, context }) =>
    orSignInPage(request, async () => {
      await limitRate("sign-in", clientNetwork(context));
      return afterAccepting(await acceptByLink(context.cookies, principal, body.token));
    }),
);
