import { DrizzleQueryError } from "drizzle-orm";
import { closeDatabase } from "~/server/db/client";
import { env } from "~/server/env";
import { foundOrganisation } from "~/server/organisations/found";
import { readArguments } from "./arguments";

try {
  const { name, admin } = readArguments(process.argv.slice(2), env().oidc.issuer);
  await foundOrganisation(name, admin);
  const way =
    admin.identity === undefined ? "by a link sent to" : "through the sign-in provider; mail goes to";
  console.log(`Created ${name}. ${admin.name} is its admin and signs in ${way} ${admin.email}.`);
  console.log(`Sign in at ${env().appOrigin}/sign-in`);
} catch (error) {
  console.error(plainly(error));
  process.exitCode = 1;
} finally {
  await closeDatabase();
}

/** A failed query's own message repeats what was typed in; its cause says what is the matter. */
function plainly(error: unknown): string {
  if (error instanceof DrizzleQueryError)
    return `The database did not take it: ${error.cause?.message ?? "no reason given"}`;
  return error instanceof Error ? error.message : String(error);
}
