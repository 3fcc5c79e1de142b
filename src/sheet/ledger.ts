import type { PlanDocument } from "~/domain/plan-document/plan-document";
import {
  VERDICTS,
  type Finding,
  type ScreeningResult,
  type SensorResult,
  type Verdict,
} from "~/domain/screening-result";

/** Value plus uncertainty as a share of the limit: what orders findings of one verdict. */
const reach = ({ budgetUsed, expandedUncertainty, limit }: Finding): number =>
  budgetUsed + expandedUncertainty / limit;

const rank = (verdict: Verdict): number => VERDICTS.indexOf(verdict);

/** The finding that governs a sensor: worst verdict first, then the greatest value with its uncertainty. */
export function governing(sensor: SensorResult): Finding | null {
  let worst: Finding | null = null;
  for (const finding of sensor.findings) {
    const worse =
      worst === null ||
      rank(finding.verdict) > rank(worst.verdict) ||
      (finding.verdict === worst.verdict && reach(finding) > reach(worst));
    if (worse) worst = finding;
  }
  return worst;
}

export interface Entry {
  sensorId: string;
  name: string;
  verdict: Verdict;
  finding: Finding;
}

/** Every sensor of the result, worst first; sensors that are not in the document any more are left out. */
export function entriesOf(document: PlanDocument, result: ScreeningResult): Entry[] {
  const names = new Map(document.sensors.map(({ id, name }) => [id, name]));
  return result.sensors
    .flatMap((sensor): Entry[] => {
      const name = names.get(sensor.id);
      const finding = governing(sensor);
      return name === undefined || finding === null
        ? []
        : [{ sensorId: sensor.id, name, verdict: sensor.verdict, finding }];
    })
    .sort((a, b) => rank(b.verdict) - rank(a.verdict) || reach(b.finding) - reach(a.finding));
}

/** How many sources the figures come from: circuits that are traced and loaded, and equipment. */
export const sourcesDrawn = ({ circuits, equipment }: PlanDocument): number =>
  circuits.filter(({ path, route, supply }) => supply !== null && (path !== null || route !== null)).length +
  equipment.length;

/** The number of each circuit and piece of equipment on the drawing and in the ledger. */
export const sourceKeys = ({
  circuits,
  equipment,
}: PlanDocument): Map<string, { key: string; name: string }> =>
  new Map([...circuits, ...equipment].map(({ id, name }, index) => [id, { key: String(index + 1), name }]));
