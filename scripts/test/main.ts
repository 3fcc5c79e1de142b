import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { steps } from "./steps";
import { sum, type Tally } from "./tally";

const reportFolder = mkdtempSync(join(tmpdir(), "stillneedle-reports-"));
const tallies: Tally[] = [];
const lines: string[] = [];
try {
  for (const { name, run } of steps(reportFolder)) {
    console.log(`\n── ${name}`);
    const startedAtMs = Date.now();
    const tally = await run().catch((error: unknown) => {
      console.log(error instanceof Error ? (error.stack ?? error.message) : String(error));
      return { passed: 0, failed: 1 };
    });
    tallies.push(tally);
    const seconds = ((Date.now() - startedAtMs) / 1000).toFixed(1);
    const line = `${name}: ${tally.passed} passed, ${tally.failed} failed (${seconds} s)`;
    lines.push(line);
    console.log(line);
  }
} finally {
  rmSync(reportFolder, { recursive: true, force: true });
}

const total = sum(tallies);
process.exitCode = total.failed > 0 || total.passed === 0 ? 1 : 0;
console.log(`\n── all\n${lines.join("\n")}`);
console.log(`${total.passed} passed, ${total.failed} failed`);
