import { z } from "zod";
import { goOnTo, orSignInPage } from "~/server/auth/answers";
import { finishSignIn } from "~/server/auth/oidc";
import { endpoint } from "~/server/http/endpoint";

const answer = z.string().max(4096).optional();

export const GET = endpoint(
  {
    action: "session.start",
    summary: "Where the sign-in provider sends the browser back to.",
    query: z.object({ code: answer, state: answer, iss: answer, error: answer }),
    responses: { 303: "empty" },
  },
  ({ query, request, context }) =>
    orSignInPage(request, async () => goOnTo(await finishSignIn(context.cookies, query))),
);
