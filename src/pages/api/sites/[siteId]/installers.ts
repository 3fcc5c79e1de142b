import { installersAnswer } from "~/domain/answers/people";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { changeInstallers, installersInput } from "~/server/organisations/assignments";

export const PUT = endpoint(
  {
    action: "site.assign-installers",
    summary: "Assigns exactly these installers to a site.",
    responses: { 200: installersAnswer },
    body: installersInput,
  },
  async ({ principal, scope, body }) =>
    json(await changeInstallers(principal, named(scope, "site"), body.userIds)),
);
