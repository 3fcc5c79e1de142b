import { z } from "zod";
import { orSignInPage } from "~/server/auth/answers";
import { clientNetwork } from "~/server/auth/client-address";
import { limitRate } from "~/server/auth/rate-limit";
import { endpoint } from "~/server/http/endpoint";
import { acceptByProvider } from "~/server/invitations/accept";
import { afterAccepting } from "~/server/invitations/answers";

export const POST = endpoint(
  {
    action: "invitation.accept",
    summary: "Accepts an invitation as the person whom the sign-in provider has just vouched for.",
    responses: { 303: "empty" },
    refusals: ["rate.exceeded"],
    body: z.object({}),
    form: true,
  },
  ({ principal, request, context }) =>
    orSignInPage(request, async () => {
      await limitRate("sign-in", clientNetwork(context));
      return afterAccepting(await acceptByProvider(context.cookies, principal));
    }),
);
