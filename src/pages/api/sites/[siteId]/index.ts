import { siteAnswer } from "~/domain/answers/sites";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { siteChangeInput } from "~/server/sites/site-input";
import { changeSite } from "~/server/sites/sites";

export const PATCH = endpoint(
  {
    action: "site.edit",
    summary: "Changes a site; what is left out stays.",
    body: siteChangeInput,
    responses: { 200: siteAnswer },
  },
  async ({ principal, scope, body }) => json(await changeSite(principal, named(scope, "site"), body)),
);
