import { sitesAnswer } from "~/domain/answers/people";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { changeSitesOf, sitesInput } from "~/server/organisations/assignments";

export const PUT = endpoint(
  {
    action: "member.assign-sites",
    summary: "Lets a member see exactly these sites, as far as their roles do not show them all.",
    responses: { 200: sitesAnswer },
    body: sitesInput,
  },
  async ({ principal, scope, body }) =>
    json(await changeSitesOf(principal, named(scope, "person"), body.siteIds)),
);
