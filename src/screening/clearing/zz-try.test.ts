import { it } from "vitest";
import { demoPlan } from "../../../scripts/seed/demo-plan/demo-plan";
import { preparePlan } from "../prepared-plan";
import { runSteps } from "../steps";
import { clearPositionsOf } from "./clear-positions";
import { screen } from "../screen";
import { parsePlanDocument } from "~/domain/plan-document/parse";
it("tries", { timeout: 300000 }, () => {
  const parsed = parsePlanDocument(demoPlan({ id: "x" }, { mode: "stated", horizontalT: 1.8e-5, verticalT: 4.6e-5, declinationDeg: 3.1 }));
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.faults));
  let t = performance.now();
  const result = screen(parsed.document);
  process.stdout.write(`screen ${performance.now() - t}\n`);
  const prepared = preparePlan(parsed.document);
  result.sensors.forEach((s, i) => {
    if (s.verdict === "within") return;
    t = performance.now();
    const out = runSteps(clearPositionsOf(parsed.document, prepared, i), {});
    process.stdout.write(`${s.id} ${s.verdict} ${s.findings.map((f) => f.uncertaintyMethod + " " + f.budgetUsed.toFixed(2)+ " " + ((f.value+f.expandedUncertainty)/f.limit).toFixed(2))} ${(performance.now() - t).toFixed(0)} ms ${JSON.stringify(out)}\n`);
  });
});
