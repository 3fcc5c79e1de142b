import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { giveUp } from "~/server/deliveries/manage";

export const POST = endpoint(
  {
    action: "delivery.manage",
    summary: "Stops further attempts at a message.",
    responses: { 204: "empty" },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope }) => {
    await giveUp(principal, named(scope, "delivery"));
    return noContent();
  },
);
