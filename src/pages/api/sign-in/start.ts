import { z } from "zod";
import { goOnTo, orSignInPage } from "~/server/auth/answers";
import { clientNetwork } from "~/server/auth/client-address";
import { startSignIn } from "~/server/auth/oidc";
import { limitRate } from "~/server/auth/rate-limit";
import { endpoint } from "~/server/http/endpoint";

export const GET = endpoint(
  {
    action: "session.start",
    summary: "Sends the browser to the sign-in provider.",
    query: z.object({
      returnTo: z.string().optional(),
      organisation: z.string().max(64).optional(),
      invitation: z.string().max(1000).optional(),
      /** Whether the person has to prove anew who they are. */
      fresh: z.literal("1").optional(),
    }),
    responses: { 303: "empty" },
    refusals: ["rate.exceeded"],
  },
  ({ query, request, context }) =>
    orSignInPage(request, async () => {
      await limitRate("sign-in", clientNetwork(context));
      return goOnTo(await startSignIn(context.cookies, { ...query, fresh: query.fresh === "1" }));
    }),
);
