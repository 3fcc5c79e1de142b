import { contactAddedAnswer } from "~/domain/answers/sites";
import { named } from "~/server/auth/scope";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { addContact } from "~/server/sites/contacts";
import { contactInput } from "~/server/sites/site-input";

export const POST = endpoint(
  {
    action: "site.edit",
    summary: "Adds somebody to a site's people to notify.",
    body: contactInput,
    responses: { 201: contactAddedAnswer },
  },
  async ({ principal, scope, body }) => json(await addContact(principal, named(scope, "site"), body), 201),
);
