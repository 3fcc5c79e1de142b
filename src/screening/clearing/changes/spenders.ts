import type { Circuit } from "~/domain/plan-document/circuit";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import { limitValue } from "~/domain/plan-document/sensor";
import { SensorJudging } from "../../judging";
import { screenSensor, type PreparedPlan } from "../../prepared-plan";

/** At most so many circuits are looked at for changes, those first that spend most. */
const MOST = 24;
/** Of a budget: who spends less has nothing worth giving back. */
const LEAST = 0.002;

/** Circuits that spend the budgets of sensors, by value or by the uncertainty of a stray current that nobody stated; the largest first. */
export function spendersAt(
  document: PlanDocument,
  prepared: PreparedPlan,
  targets: readonly number[],
): Circuit[] {
  const spent = new Map<string, number>();
  const note = (id: string, share: number) => spent.set(id, Math.max(spent.get(id) ?? 0, share));
  for (const index of targets) {
    for (const finding of screenSensor(prepared, index).result.findings) {
      if (finding.verdict === "within") continue;
      for (const { id, part } of finding.contributions) note(id, Math.abs(part) * finding.budgetUsed);
    }
    for (const [id, share] of strayShares(prepared, index)) note(id, share);
  }
  return document.circuits
    .filter(({ id }) => (spent.get(id) ?? 0) >= LEAST)
    .sort((a, b) => (spent.get(b.id) ?? 0) - (spent.get(a.id) ?? 0))
    .slice(0, MOST);
}

/** What two standard uncertainties of each unstated stray current come to against the tightest field limit. */
function strayShares({ plan, earth }: PreparedPlan, index: number): [string, number][] {
  const sensor = plan.document.sensors[index];
  if (!sensor) return [];
  const bounds = sensor.limits
    .filter(({ kind }) => kind !== "gradient" && kind !== "heading")
    .map(limitValue);
  const least = Math.min(...bounds);
  if (!Number.isFinite(least)) return [];
  return new SensorJudging(plan, sensor, earth)
    .straysFor(3)
    .map(({ item, norm }) => [plan.items[item]?.id ?? "", (2 * norm) / least]);
}
