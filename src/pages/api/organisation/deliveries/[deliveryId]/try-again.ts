import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { tryAgainNow } from "~/server/deliveries/manage";

export const POST = endpoint(
  {
    action: "delivery.manage",
    summary: "Has a message sent at once that waits for its next attempt or has failed.",
    responses: { 204: "empty" },
    refusals: ["state.conflict"],
  },
  async ({ principal, scope }) => {
    await tryAgainNow(principal, named(scope, "delivery"));
    return noContent();
  },
);
