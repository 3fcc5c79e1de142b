import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { noContent } from "~/server/http/respond";
import { removeContact } from "~/server/sites/contacts";

export const DELETE = endpoint(
  {
    action: "site.edit",
    summary: "Takes somebody off a site's people to notify.",
    responses: { 204: "empty" },
  },
  async ({ principal, scope }) => {
    await removeContact(principal, named(scope, "contact"));
    return noContent();
  },
);
