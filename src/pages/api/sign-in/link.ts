import { mailAcceptedAnswer } from "~/domain/answers/people";
import { z } from "zod";
import { isForPage, orSignInPage } from "~/server/auth/answers";
import { clientNetwork } from "~/server/auth/client-address";
import { limitRate } from "~/server/auth/rate-limit";
import { requestSignInMail } from "~/server/auth/sign-in-links";
import { endpoint } from "~/server/http/endpoint";
import { json, seeOther } from "~/server/http/respond";

export const POST = endpoint(
  {
    action: "session.start",
    summary: "Has a one-time sign-in link mailed; the answer does not tell whether the address is known.",
    body: z.object({ email: z.string().max(1000) }),
    form: true,
    responses: { 202: mailAcceptedAnswer, 303: "empty" },
    refusals: ["rate.exceeded"],
  },
  ({ body, request, context }) =>
    orSignInPage(request, async () => {
      await limitRate("sign-in", clientNetwork(context));
      await requestSignInMail(body.email);
      return isForPage(request) ? seeOther("/sign-in?sent=1") : json({ accepted: true }, 202);
    }),
);
