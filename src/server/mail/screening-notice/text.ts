import { wrapped } from "../plain-text";
import type { FlaggedPosition, NoticeContent } from "./content";

/** The notice as plain text of at most 76 columns, saying all that the HTML says. */
export function noticeText(content: NoticeContent): string {
  const { flagged, flaggedLeftOut, within, withinLeftOut } = content;
  const blocks = [
    content.mark,
    heading(content.title, "="),
    pairs(content.facts),
    content.coveringText,
    wrapped(content.summary),
    flagged.length > 0 && heading("Flagged positions, worst first", "-"),
    ...flagged.map(positionText),
    flaggedLeftOut !== null && wrapped(flaggedLeftOut),
    within.length > 0 && section("Within their budgets", list(within)),
    withinLeftOut !== null && wrapped(withinLeftOut),
    content.waiting.length > 0 && section("Circuits that wait", list(content.waiting)),
    content.checks.length > 0 && section("Self-checks", list(content.checks)),
    section("What is left out", list(content.leftOut)),
    section("Cautions", list(content.cautions)),
    section(
      "The result",
      `${wrapped("The page outranks this message; every position is in the attached CSV.")}\n${content.resultUrl}`,
    ),
    pairs(content.origin),
    content.mark,
  ];
  const text = blocks.filter((block) => block !== false && block !== "").join("\n\n");
  return `${text.replaceAll("\u00a0", " ")}\n`;
}

function positionText({ name, verdictWords, place, limits }: FlaggedPosition): string {
  const parts = limits.map(({ measured, verdict, rows, ways }) =>
    [
      wrapped(`${measured}: ${verdict}`, "  "),
      pairs(rows, "    "),
      ...(ways.length > 0 ? ["    What would clear it:", list(ways, "    ")] : []),
    ].join("\n"),
  );
  return [wrapped(`${name}: ${verdictWords}`), wrapped(place, "  "), ...parts].join("\n");
}

const heading = (text: string, rule: string): string => {
  const lines = wrapped(text);
  const width = Math.max(...lines.split("\n").map((line) => [...line].length));
  return `${lines}\n${rule.repeat(width)}`;
};

const section = (title: string, body: string): string => `${heading(title, "-")}\n${body}`;

const list = (items: readonly string[], indent = ""): string =>
  items.map((item) => wrapped(item, `${indent}- `, `${indent}  `)).join("\n");

function pairs(rows: readonly (readonly [string, string])[], indent = ""): string {
  const width = Math.max(...rows.map(([label]) => label.length)) + 2;
  return rows
    .map(([label, value]) => wrapped(value, indent + `${label}:`.padEnd(width), indent + " ".repeat(width)))
    .join("\n");
}
