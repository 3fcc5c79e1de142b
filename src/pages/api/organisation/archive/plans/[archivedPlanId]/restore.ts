import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { restore } from "~/server/organisations/archive";

export const POST = endpoint(
  {
    action: "plan.restore",
    summary: "Brings an archived plan back.",
    responses: { 204: "empty" },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope }) => {
    await restore(principal, "plan", named(scope, "archivedPlan"));
    return noContent();
  },
);
