import { cautions, leftOutBesideCautions } from "~/domain/cautions";
import {
  formatBudget,
  formatCurrent,
  formatLength,
  formatLimit,
  formatQuantity,
  formatShare,
  quantityText,
} from "~/domain/format";
import { preliminaryMark } from "~/domain/notice";
import { oneLine } from "~/domain/one-line";
import type { PlanDocument } from "~/domain/plan-document/plan-document";
import type { Point } from "~/domain/plan-document/quantities";
import { countVerdicts, loadCaseName, type Position, positionsWorstFirst } from "~/domain/positions";
import type { ScreeningResult, Verdict } from "~/domain/screening-result";
import { drawnSourceCount, numberedSources, sourceFinder } from "~/domain/sources";
import { counted, fromSourcesDrawn, verdictSentence } from "~/domain/verdict-words";
import { type WaitingCircuit, waitingCircuits, waitingWords } from "~/domain/waiting-circuits";
import { waysToClear } from "~/domain/ways-to-clear";

export interface NoticeSource {
  site: { name: string; place: string; timeZone: string };
  plan: { name: string };
  screening: {
    screenedAt: Date;
    screenedByName: string | null;
    documentVersion: number;
    inputHash: string;
    engineVersion: string;
  };
  notice: { version: number; coveringText: string };
  plannerName: string;
  document: PlanDocument;
  result: ScreeningResult;
  /** Of the result page, on APP_ORIGIN. */
  resultUrl: string;
}

/** A limit that a position does not keep, in words. */
export interface FlaggedLimit {
  measured: string;
  verdict: string;
  rows: readonly (readonly [label: string, value: string])[];
  ways: readonly string[];
}

export interface FlaggedPosition {
  name: string;
  verdict: Verdict;
  verdictWords: string;
  place: string;
  limits: readonly FlaggedLimit[];
}

/** Everything that a screening notice says, for HTML and plain text to lay out. Each text is one line but the covering text. */
export interface NoticeContent {
  subject: string;
  mark: string;
  title: string;
  facts: readonly (readonly [label: string, value: string])[];
  coveringText: string;
  summary: string;
  flagged: readonly FlaggedPosition[];
  flaggedLeftOut: string | null;
  within: readonly string[];
  withinLeftOut: string | null;
  waiting: readonly string[];
  checks: readonly string[];
  leftOut: readonly string[];
  cautions: readonly string[];
  resultUrl: string;
  origin: readonly (readonly [label: string, value: string])[];
}

/** A message stays readable, and under the 100 kB from which mail programs cut it; the CSV and the page have all of them. */
const most = { flagged: 30, within: 40, waiting: 30, checks: 20, spenders: 5, subjectName: 60 };

export function noticeContent(source: NoticeSource): NoticeContent {
  const { site, plan, screening, notice, document, result, plannerName } = source;
  const positions = positionsWorstFirst(document, result);
  const flagged = positions.filter(({ verdict }) => verdict !== "within");
  const within = positions.filter(({ verdict }) => verdict === "within");
  const waiting = waitingCircuits(document);
  const nameOf = sourceNames(document);
  const counts = countWords(positions);
  return {
    subject: `${preliminaryMark}: screening of ${shortened(plan.name)}, ${shortened(site.name)}: ${counts}`,
    mark: preliminaryMark,
    title: `Screening of ${oneLine(plan.name)}`,
    facts: [
      ["Site", oneLine(site.place === "" ? site.name : `${site.name}, ${site.place}`)],
      ["Plan", `${oneLine(plan.name)}, working copy ${String(screening.documentVersion)}`],
      ["Screened", instantWords(screening.screenedAt, site.timeZone)],
      ["By", oneLine(screening.screenedByName ?? "somebody who has left")],
      ["Notice", `version ${String(notice.version)}, sent by ${oneLine(plannerName)}`],
    ],
    coveringText: notice.coveringText,
    summary: `${counted(positions.length, "position", "positions")}: ${counts}, ${fromSourcesDrawn(drawnSourceCount(document))}.`,
    flagged: flagged.slice(0, most.flagged).map((position) => flaggedPosition(position, source, nameOf)),
    flaggedLeftOut: moreWords(flagged.length - most.flagged, "flagged position", "flagged positions"),
    within: within.slice(0, most.within).map(withinWords),
    withinLeftOut: moreWords(within.length - most.within, "position", "positions"),
    waiting: [
      ...waiting.slice(0, most.waiting).map((each) => `${nameOf(each.circuit.id)}: ${waitingWords(each)}`),
      ...(waiting.length > most.waiting
        ? [`${counted(waiting.length - most.waiting, "more circuit", "more circuits")}; the page lists them`]
        : []),
    ],
    checks: checkWords(result, waiting, nameOf),
    leftOut: leftOutBesideCautions(result.leftOut).map(oneLine),
    cautions,
    resultUrl: source.resultUrl,
    origin: [
      ["Hash of the input", screening.inputHash],
      ["Engine", screening.engineVersion],
    ],
  };
}

function flaggedPosition(
  { sensor, verdict, findings }: Position,
  { document, result }: NoticeSource,
  nameOf: (id: string) => string,
): FlaggedPosition {
  return {
    name: sensorName(sensor),
    verdict,
    verdictWords: verdictSentence[verdict],
    place: placeWords(sensor.position),
    limits: findings
      .filter((finding) => finding.verdict !== "within")
      .map((finding) => {
        const loadCase = loadCaseName(document.loadCases, finding.loadCaseId);
        return {
          measured: oneLine(finding.measured),
          verdict: verdictSentence[finding.verdict],
          rows: [
            ["Value", quantityText(formatQuantity(finding.value, finding.unit, finding.expandedUncertainty))],
            ["Limit", formatLimit(finding.limit, finding.unit)],
            ["Budget used", formatBudget(finding.budgetUsed)],
            ...(loadCase === null ? [] : ([["Load case", oneLine(loadCase)]] as const)),
            ["Spent by", spenderWords(finding.contributions, nameOf)],
          ],
          ways: waysToClear({ document, result, sensor, finding }).map(oneLine),
        };
      }),
  };
}

function spenderWords(
  contributions: readonly { id: string; part: number }[],
  nameOf: (id: string) => string,
): string {
  const parts = contributions
    .filter(({ part }) => part !== 0)
    .sort((a, b) => Math.abs(b.part) - Math.abs(a.part));
  if (parts.length === 0) return "no source drawn";
  const named = parts
    .slice(0, most.spenders)
    .map(({ id, part }) => `${nameOf(id)} ${formatShare(part)}${part < 0 ? " (relieves)" : ""}`);
  const more = parts.length - named.length;
  return [...named, ...(more > 0 ? [counted(more, "more", "more")] : [])].join("; ");
}

function withinWords({ sensor, governing }: Position): string {
  const used = governing === undefined ? "" : `, ${formatBudget(governing.budgetUsed)} of its budget used`;
  return `${sensorName(sensor)}${used}`;
}

/** Where currents do not come back, then the engine's warnings but for the circuits that wait, which stand in a list of their own. */
function checkWords(
  { checks }: ScreeningResult,
  waiting: readonly WaitingCircuit[],
  nameOf: (id: string) => string,
): string[] {
  const ends = checks.openEnds.map(
    ({ at, currentA, circuitIds }) =>
      `${formatCurrent(currentA)} leave at ${placeWords(at)} and no way back is drawn (${circuitIds.map(nameOf).join(", ")}).`,
  );
  const warnings = checks.warnings
    .filter(
      (line) => !waiting.some(({ circuit }) => line.startsWith(`Circuit "${circuit.name}" (${circuit.id}) `)),
    )
    .map(oneLine);
  const lines = [...ends, ...warnings];
  const more = lines.length - most.checks;
  return more > 0 ? [...lines.slice(0, most.checks), `${String(more)} more; the page lists them`] : lines;
}

function sourceNames(document: PlanDocument): (id: string) => string {
  const find = sourceFinder(numberedSources(document));
  return (id) => oneLine(find(id).name);
}

const sensorName = ({ id, name }: { id: string; name: string }): string => oneLine(name) || oneLine(id);

const placeWords = ([x, y, z]: Point): string =>
  `x ${formatLength(x)}, y ${formatLength(y)}, height ${formatLength(z)}`;

function countWords(positions: readonly Position[]): string {
  if (positions.length === 0) return "nothing to judge";
  const { over, undecided, within } = countVerdicts(positions.map(({ verdict }) => verdict));
  return [
    ...(over > 0 ? [`${String(over)} over`] : []),
    ...(undecided > 0 ? [`${String(undecided)} undecided`] : []),
    ...(within > 0 ? [`${String(within)} within`] : []),
  ].join(", ");
}

const moreWords = (count: number, one: string, many: string): string | null =>
  count > 0 ? `${counted(count, `more ${one}`, `more ${many}`)}; the CSV and the page list them.` : null;

/** Cut between characters, not inside one. */
function shortened(text: string): string {
  const characters = [...oneLine(text)];
  return characters.length <= most.subjectName
    ? characters.join("")
    : `${characters.slice(0, most.subjectName - 1).join("")}…`;
}

const instantWords = (at: Date, timeZone: string): string =>
  `${new Intl.DateTimeFormat("en-GB", { dateStyle: "long", timeStyle: "short", timeZone }).format(at)} (${timeZone})`;
