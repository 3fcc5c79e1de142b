import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { archive, archiveInput } from "~/server/organisations/archive";

export const POST = endpoint(
  {
    action: "site.archive",
    summary: "Puts a site with its plans out of sight; the body repeats its name.",
    responses: { 204: "empty" },
    refusals: ["state.conflict"],
    body: archiveInput,
  },
  async ({ principal, scope, body }) => {
    await archive(principal, "site", named(scope, "site"), body.name);
    return noContent();
  },
);
