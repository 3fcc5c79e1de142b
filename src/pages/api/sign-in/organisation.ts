import { z } from "zod";
import { goOnTo } from "~/server/auth/answers";
import { chooseOrganisation } from "~/server/auth/oidc";
import { endpoint } from "~/server/http/endpoint";

export const POST = endpoint(
  {
    action: "session.start",
    summary: "Signs somebody of several organisations in to the one that they choose.",
    body: z.object({ organisationId: z.string() }),
    form: true,
    responses: { 303: "empty" },
  },
  async ({ body, context }) => goOnTo(await chooseOrganisation(context.cookies, body.organisationId)),
);
