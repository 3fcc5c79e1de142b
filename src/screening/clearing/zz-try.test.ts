import { it } from "vitest";
import { demoPlan } from "../../../scripts/seed/demo-plan/demo-plan";
import { clearing } from "./clearing";
import { clearingSchema, type ClearingPart } from "~/domain/clearing";
import { screen } from "../screen";
import { parsePlanDocument } from "~/domain/plan-document/parse";
it("tries", { timeout: 300000 }, () => {
  const parsed = parsePlanDocument(
    demoPlan({ id: "x" }, { mode: "stated", horizontalT: 1.8e-5, verticalT: 4.6e-5, declinationDeg: 3.1 }),
  );
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  const result = screen(parsed.document);
  const time = (sensorIds: string[] | null, parts: ClearingPart[]) => {
    const t = performance.now();
    const out = clearing(parsed.document, { sensorIds, parts });
    clearingSchema.parse(JSON.parse(JSON.stringify(out)));
    process.stdout.write(`${sensorIds} ${parts} ${(performance.now() - t).toFixed(0)} ms\n`);
    for (const c of out.changes.slice(0, 8))
      process.stdout.write(
        `  ${c.gained.toFixed(3)} ${c.kind} ${c.words} ${c.sensors.map((s) => s.id + " " + s.before.reach.toFixed(2) + ">" + s.after.reach.toFixed(2) + s.after.verdict)} ${c.spoils}\n`,
      );
    if (out.distances)
      for (const c of out.distances.circuits)
        process.stdout.write(
          `  ${c.circuitId} ${c.entries.map((e) => e.limitId + ":" + e.distanceM?.toFixed(2))}\n`,
        );
  };
  time([], ["distances"]);
  for (const s of result.sensors) if (s.verdict !== "within") time([s.id], ["changes"]);
  time(null, ["changes"]);
});
