import { renamedAnswer } from "~/domain/answers/plans";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { renamePlan } from "~/server/plans/plan-documents";
import { planNameInput } from "~/server/plans/plans";

export const PATCH = endpoint(
  {
    action: "plan.edit",
    summary: "Renames a plan, and its document with it.",
    body: planNameInput,
    responses: { 200: renamedAnswer },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope, body }) => json(await renamePlan(principal, named(scope, "plan"), body.name)),
);
