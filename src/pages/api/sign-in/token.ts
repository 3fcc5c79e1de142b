import { z } from "zod";
import { goOnTo, orSignInPage } from "~/server/auth/answers";
import { clientNetwork } from "~/server/auth/client-address";
import { limitRate } from "~/server/auth/rate-limit";
import { signInByLink } from "~/server/auth/sign-in-links";
import { endpoint } from "~/server/http/endpoint";

export const POST = endpoint(
  {
    action: "session.start",
    summary: "Uses up a mailed sign-in link.",
    body: z.object({ token: z.string().max(1000), returnTo: z.string().optional() }),
    form: true,
    responses: { 303: "empty" },
    refusals: ["rate.exceeded"],
  },
  ({ body, request, context }) =>
    orSignInPage(request, async () => {
      await limitRate("sign-in", clientNetwork(context));
      return goOnTo(await signInByLink(context.cookies, body.token, body.returnTo));
    }),
);
