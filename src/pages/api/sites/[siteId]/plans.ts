import { madeAnswer } from "~/domain/answers/common";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { createPlan, planNameInput } from "~/server/plans/plans";

export const POST = endpoint(
  {
    action: "plan.create",
    summary: "Adds an empty plan to a site.",
    body: planNameInput,
    responses: { 201: madeAnswer },
  },
  async ({ principal, scope, body }) =>
    json(await createPlan(principal, named(scope, "site"), body.name), 201),
);
