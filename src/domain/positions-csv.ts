import { byteOrderMark, type CsvCell, csvText } from "./csv";
import { oneLine } from "./one-line";
import type { PlanDocument } from "./plan-document/plan-document";
import { loadCaseName, positionsWorstFirst } from "./positions";
import type { Finding, ScreeningResult } from "./screening-result";
import { numberedSources, sourceFinder } from "./sources";
import { microtesla } from "./units";

const heading = [
  "Position",
  "Verdict of the position",
  "Limit kind",
  "Verdict of the limit",
  "Value (µT, µT/m or °, see Unit)",
  "Expanded uncertainty U (see Unit)",
  "Limit (see Unit)",
  "Unit",
  "Budget used (%)",
  "Governing load case",
  "Largest spenders",
  "x (m)",
  "y (m)",
  "z (m)",
  "Position id",
  "Limit id",
] as const;

/** Units as people on site use them, the same in every line of a kind, so that a column can be sorted. */
const units: Record<Finding["unit"], { text: string; of: (value: number) => number }> = {
  T: { text: "µT", of: microtesla },
  "T/m": { text: "µT/m", of: microtesla },
  deg: { text: "°", of: (angleDeg) => angleDeg },
};

const spendersShown = 3;
const significantDigits = 6;
const rounded = (value: number): number => Number(value.toPrecision(significantDigits));

/** One line for each limit of each position, worst position first, with the byte order mark that spreadsheets want. */
export function positionsCsv(document: PlanDocument, result: ScreeningResult): string {
  const find = sourceFinder(numberedSources(document));
  const rows = positionsWorstFirst(document, result).flatMap(({ sensor, verdict, findings }) =>
    findings.map((finding): CsvCell[] => {
      const unit = units[finding.unit];
      const [x, y, z] = sensor.position;
      return [
        oneLine(sensor.name) || sensor.id,
        verdict,
        finding.measured.replaceAll("\u00a0", " "),
        finding.verdict,
        rounded(unit.of(finding.value)),
        rounded(unit.of(finding.expandedUncertainty)),
        rounded(unit.of(finding.limit)),
        unit.text,
        rounded(finding.budgetUsed * 100),
        loadCaseName(document.loadCases, finding.loadCaseId),
        spenders(finding, (id) => oneLine(find(id).name)),
        x,
        y,
        z,
        sensor.id,
        finding.limitId,
      ];
    }),
  );
  return byteOrderMark + csvText([heading, ...rows]);
}

function spenders({ contributions }: Finding, nameOf: (id: string) => string): string {
  return contributions
    .filter(({ part }) => part > 0)
    .sort((a, b) => b.part - a.part)
    .slice(0, spendersShown)
    .map(({ id, part }) => `${nameOf(id)} ${(part * 100).toFixed(1)} %`)
    .join("; ");
}

/** A file name for a plan's positions that every system takes. */
export function positionsCsvName(planName: string): string {
  const name = oneLine(planName).replace(/[/\\:*?"<>|]/g, "-");
  return `positions, ${[...name].slice(0, 80).join("").trim()}.csv`;
}
