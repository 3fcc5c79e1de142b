import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { restore } from "~/server/organisations/archive";

export const POST = endpoint(
  {
    action: "site.restore",
    summary: "Brings an archived site back with its plans.",
    responses: { 204: "empty" },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope }) => {
    await restore(principal, "site", named(scope, "archivedSite"));
    return noContent();
  },
);
