import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { afterAll, describe, expect, it } from "vitest";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { emptyPlanDocument, type PlanDocumentInput } from "~/domain/plan-document/plan-document";
import { screen } from "~/screening/screen";

const folder = mkdtempSync(join(tmpdir(), "screen-"));
afterAll(() => rmSync(folder, { recursive: true }));
const script = fileURLToPath(new URL("../../scripts/screen.mjs", import.meta.url));

function run(content: string) {
  const file = join(folder, "plan.json");
  writeFileSync(file, content);
  const { status, stdout, stderr } = spawnSync(process.execPath, [script, file], {
    encoding: "utf8",
    cwd: folder,
  });
  return { status, stdout, stderr };
}

const plan = (limitT: number): PlanDocumentInput => ({
  ...emptyPlanDocument("Command"),
  circuits: [
    {
      id: "c1",
      name: "String",
      path: [
        [0, 0, 0],
        [9, 0, 0],
      ],
      arrangement: { kind: "pair", spacingM: 0.03 },
      conductorRadiusM: 0.006,
      supply: { kind: "dc", currentA: 120 },
    },
  ],
  sensors: [{ id: "s1", name: "Probe", position: [4, 1, 0], limits: [{ kind: "static", limitT }] }],
});

describe("the screen command", () => {
  it("prints the engine's result and nothing else, 0 when all are within and 3 otherwise", () => {
    const within = run(JSON.stringify(plan(1e-5)));
    expect(within.stderr).toBe("");
    expect(within.status).toBe(0);
    const parsed = parsePlanDocument(plan(1e-5));
    if (!parsed.ok) throw new Error("the plan is valid");
    expect(JSON.parse(within.stdout)).toEqual(JSON.parse(JSON.stringify(screen(parsed.document))));
    expect(run(JSON.stringify(plan(1e-8))).status).toBe(3);
  }, 60_000);

  it("lists each fault of a refused document with its path and says nothing on standard output", () => {
    const broken = { ...plan(0), colour: "red" };
    const refused = run(JSON.stringify(broken));
    expect(refused.status).toBe(2);
    expect(refused.stdout).toBe("");
    expect(refused.stderr).toMatch(/^sensors\[0\]\.limits\[0\]\.limitT: .+$/m);
    expect(refused.stderr).toMatch(/^colour: .+$/m);
    expect(refused.stderr).not.toMatch(/^\s+at /m);
    expect(run("{").status).toBe(2);
  }, 60_000);

  it("exits with 1 where there is no such file", () => {
    const { status, stderr } = spawnSync(process.execPath, [script, join(folder, "none.json")], {
      encoding: "utf8",
    });
    expect(status).toBe(1);
    expect(stderr).toMatch(/none\.json/);
  }, 60_000);
});
