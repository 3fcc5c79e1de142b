import { existsSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { build } from "../services/build";
import { chromiumBrowser, ensureInstalled, mariaDbServer } from "../services/debian-packages";
import { inRepository, repositoryFolder } from "../services/repository";
import { runCommand } from "../services/run-command";
import { allowedSkips } from "./allowed-skips";
import { tallyReport, type Tally } from "./tally";

export interface Step {
  name: string;
  run(): Promise<Tally>;
}

const print = (line: string): void => console.log(line);
const passed: Tally = { passed: 1, failed: 0 };
const failed: Tally = { passed: 0, failed: 1 };

/** What must be there; counted only when it is missing and can't be had. */
const installation: Step = {
  name: "what the tests need",
  async run() {
    const tally: Tally = { passed: 0, failed: 0 };
    for (const need of [mariaDbServer, chromiumBrowser]) {
      try {
        await ensureInstalled(need, { report: print });
      } catch (error) {
        print(error instanceof Error ? error.message : String(error));
        tally.failed += 1;
      }
    }
    return tally;
  },
};

const check = (name: string, script: string): Step => ({
  name,
  async run() {
    const { status, stdout, stderr } = await runCommand("npm", ["run", "--silent", script], {
      cwd: repositoryFolder,
      env: { ...process.env, ASTRO_TELEMETRY_DISABLED: "1" },
    });
    if (status === 0) return passed;
    print(`${stdout}${stderr}`.trim());
    return failed;
  },
});

const production: Step = {
  name: "build",
  async run() {
    const { status, stdout, stderr } = await build();
    if (status === 0) return passed;
    print(`${stdout}${stderr}`.trim());
    return failed;
  },
};

const project = (name: string, reportFolder: string): Step => ({
  name: `${name} tests`,
  async run() {
    const reportFile = join(reportFolder, `${name}.json`);
    const reporters = ["--reporter=default", "--reporter=json", `--outputFile.json=${reportFile}`];
    const { status } = await runCommand(
      process.execPath,
      [inRepository("node_modules/vitest/vitest.mjs"), "run", "--project", name, ...reporters],
      { cwd: repositoryFolder, echo: true, env: { ...process.env, NODE_ENV: "test" } },
    );
    const report: unknown = existsSync(reportFile) ? JSON.parse(readFileSync(reportFile, "utf8")) : undefined;
    return tallyReport(report, status, allowedSkips, print);
  },
});

/** In this order, each run whatever became of the ones before it. */
export const steps = (reportFolder: string): Step[] => [
  installation,
  check("types", "check:types"),
  check("lint", "check:lint"),
  check("format", "check:format"),
  check("import rule", "check:imports"),
  production,
  ...["unit", "reference", "api", "faults", "e2e"].map((name) => project(name, reportFolder)),
];
