import { execFile, spawnSync } from "node:child_process";
import { readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { promisify } from "node:util";
import { describe, expect, it } from "vitest";
import * as z from "zod";
import { parsePlanDocument } from "~/domain/plan-document/parse";
import { screen } from "~/screening/screen";

const folder = new URL("scipy/", import.meta.url);
const script = fileURLToPath(new URL("integrate.py", folder));

/** What the script writes: by plan, sensor and limit, the governing value with its parts where they are defined. */
const figures = z.strictObject({
  madeBy: z.string(),
  versions: z.strictObject({ python: z.string(), numpy: z.string(), scipy: z.string() }),
  plans: z.record(
    z.string(),
    z.record(
      z.string(),
      z.record(
        z.string(),
        z.strictObject({
          value: z.number(),
          loadCaseId: z.string().nullable(),
          parts: z.record(z.string(), z.number()).optional(),
        }),
      ),
    ),
  ),
});
type Figures = z.output<typeof figures>;

const kept = figures.parse(JSON.parse(readFileSync(new URL("figures.json", folder), "utf8")));
const names = readdirSync(new URL("plans/", folder)).map((file) => file.replace(/\.json$/, ""));

/** A helix is 48 chords a lay here and a curve there; all else is held to the quadrature's own digits. */
const relativeOf = (name: string) => (name === "twisted-pair" ? 3e-3 : 1e-11);

function screened(name: string) {
  const parsed = parsePlanDocument(
    JSON.parse(readFileSync(new URL(`plans/${name}.json`, folder), "utf8")) as unknown,
  );
  if (!parsed.ok) throw new Error(`${name}: ${JSON.stringify(parsed.faults)}`);
  return screen(parsed.document);
}

describe("the engine against numerical integration (scipy/integrate.py)", () => {
  it("is held to every plan beside the script", () => {
    expect(Object.keys(kept.plans).sort()).toEqual(names.sort());
  });

  it.each(names)("agrees in every value and part of %s", (name) => {
    for (const sensor of screened(name).sensors) {
      for (const finding of sensor.findings) {
        const called = `${name}, ${sensor.id}, ${finding.limitId}`;
        const figure = kept.plans[name]?.[sensor.id]?.[finding.limitId];
        if (!figure) throw new Error(`${called}: no figure`);
        const error = Math.abs(finding.value - figure.value);
        expect(error, called).toBeLessThanOrEqual(relativeOf(name) * figure.value);
        expect(finding.loadCaseId, called).toBe(figure.loadCaseId);
        for (const [id, part] of Object.entries(figure.parts ?? {})) {
          const found = finding.contributions.find((entry) => entry.id === id)?.part ?? 0;
          expect(Math.abs(found - part), `${called}, ${id}`).toBeLessThanOrEqual(10 * relativeOf(name));
        }
      }
    }
  });
});

// Debian's own interpreter, with python3-scipy. Where it is not there, nothing is registered, so that a run counts only
// what it did; the figures above are held to in any case.
const python = "/usr/bin/python3";
const hasScipy = spawnSync(python, ["-c", "import scipy"]).status === 0;

if (hasScipy) {
  describe("scipy/integrate.py", () => {
    it("gives the figures that are kept", async () => {
      const { stdout, stderr } = await promisify(execFile)(python, [script], { maxBuffer: 1e8 });
      expect(stderr).toBe("");
      const made = figures.parse(JSON.parse(stdout));
      const pairs = flat(made);
      expect(pairs.map(([key]) => key)).toEqual(flat(kept).map(([key]) => key));
      flat(kept).forEach(([key, value], index) => {
        const error = Math.abs((pairs[index]?.[1] ?? NaN) - value);
        expect(error, key).toBeLessThanOrEqual(1e-9 * Math.abs(value) + 1e-24);
      });
    }, 300_000);
  });
}

function flat({ plans }: Figures): [string, number][] {
  return Object.entries(plans).flatMap(([plan, sensors]) =>
    Object.entries(sensors).flatMap(([sensor, limits]) =>
      Object.entries(limits).flatMap(([limit, { value, loadCaseId, parts = {} }]) => [
        [`${plan} ${sensor} ${limit} ${loadCaseId}`, value] as [string, number],
        ...Object.entries(parts).map(
          ([id, part]) => [`${plan} ${sensor} ${limit} ${id}`, part] as [string, number],
        ),
      ]),
    ),
  );
}
