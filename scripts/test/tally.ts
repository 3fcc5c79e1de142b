import { z } from "zod";

export interface Tally {
  passed: number;
  failed: number;
}

/** What is read of vitest's JSON report. */
const reportSchema = z.object({
  testResults: z.array(
    z.object({
      name: z.string(),
      status: z.string(),
      message: z.string().optional(),
      assertionResults: z.array(z.object({ fullName: z.string(), status: z.string() })),
    }),
  ),
});

export const sum = (tallies: readonly Tally[]): Tally => ({
  passed: tallies.reduce((total, { passed }) => total + passed, 0),
  failed: tallies.reduce((total, { failed }) => total + failed, 0),
});

/**
 * Counts a vitest run. A skipped test has not been passed, so it counts as failed unless its name is allowed;
 * so does a file that could not be loaded, and a run that failed outside its tests or said nothing.
 */
export function tallyReport(
  report: unknown,
  exitStatus: number,
  allowedSkips: Readonly<Record<string, string>>,
  complain: (line: string) => void,
): Tally {
  const parsed = reportSchema.safeParse(report);
  const files = parsed.success ? parsed.data.testResults : [];
  const tally = sum(files.map((file) => tallyFile(file, allowedSkips, complain)));
  if (tally.failed > 0) return tally;
  if (tally.passed === 0) {
    complain("no test ran");
    return { passed: 0, failed: 1 };
  }
  if (exitStatus !== 0) {
    complain(`vitest ended with status ${exitStatus} although no test failed`);
    return { ...tally, failed: 1 };
  }
  return tally;
}

type FileReport = z.output<typeof reportSchema>["testResults"][number];

function tallyFile(
  { name, status, message, assertionResults }: FileReport,
  allowedSkips: Readonly<Record<string, string>>,
  complain: (line: string) => void,
): Tally {
  const tally: Tally = { passed: 0, failed: 0 };
  for (const { fullName, status: result } of assertionResults) {
    if (result === "passed") tally.passed += 1;
    else if (result === "failed") tally.failed += 1;
    else if (allowedSkips[fullName] === undefined) {
      complain(`skipped without a reason in scripts/test/allowed-skips.ts: ${fullName}`);
      tally.failed += 1;
    }
  }
  if (status === "failed" && tally.failed === 0) {
    complain(`${name} could not be run: ${message ?? ""}`);
    tally.failed += 1;
  }
  return tally;
}
