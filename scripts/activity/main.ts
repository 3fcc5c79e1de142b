import { closeDatabase } from "~/server/db/client";
import { verifyLogs } from "~/server/activity/verify-logs";
import { readArguments } from "./arguments";

try {
  const { organisation, head } = readArguments(process.argv.slice(2));
  const { isWhole, report } = await verifyLogs(organisation, head);
  console.log(report.join("\n"));
  if (!isWhole) process.exitCode = 2;
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error));
  process.exitCode = 1;
} finally {
  await closeDatabase();
}
