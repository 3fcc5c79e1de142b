import { madeAnswer } from "~/domain/answers/common";
import { endpoint } from "~/server/http/endpoint";
import { json } from "~/server/http/respond";
import { siteInput } from "~/server/sites/site-input";
import { createSite } from "~/server/sites/sites";

export const POST = endpoint(
  { action: "site.create", summary: "Adds a site.", body: siteInput, responses: { 201: madeAnswer } },
  async ({ principal, body }) => json(await createSite(principal, body), 201),
);
