import { db } from "../db/client";
import { listOrganisations } from "../db/queries/organisations";
import { verifyActivity } from "./verify";

/**
 * Verifies every organisation's log, or that of the one with this short name.
 * @returns a report by lines, and whether all is whole
 * @throws Error where there is no such organisation
 */
export async function verifyLogs(slug?: string, wantedHead?: string) {
  const all = await listOrganisations(db());
  const chosen = all.filter((one) => slug === undefined || one.slug === slug);
  if (slug !== undefined && chosen.length === 0)
    throw new Error(`There is no organisation by the short name "${slug}".`);
  const report: string[] = [];
  let isWhole = true;
  for (const { id, slug: name } of chosen) {
    const { lines, head, faults, wantedLine } = await verifyActivity(id, wantedHead);
    const count = `${String(lines)} ${lines === 1 ? "line" : "lines"}`;
    report.push(`${name}: ${faults.length === 0 ? "whole" : "NOT WHOLE"}, ${count}, head ${head}`);
    for (const fault of faults) report.push(`  ${fault}`);
    if (wantedHead !== undefined)
      report.push(
        wantedLine === null
          ? `  the head ${wantedHead} stands at no line: the log is not the one that it was taken from`
          : `  the head ${wantedHead} is that of line ${String(wantedLine)}`,
      );
    if (faults.length > 0 || (wantedHead !== undefined && wantedLine === null)) isWhole = false;
  }
  if (chosen.length === 0) report.push("There is no organisation yet.");
  return { isWhole, report };
}
