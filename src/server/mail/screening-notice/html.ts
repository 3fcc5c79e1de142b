import type { Verdict } from "~/domain/screening-result";
import { escapeHtml, mailDocument, paragraphs } from "../html";
import type { FlaggedLimit, FlaggedPosition, NoticeContent } from "./content";

const style = {
  mark: "margin:0 0 16px;padding:10px 12px;border:2px solid #17242b;background-color:#ffffff;color:#17242b;font-weight:700;text-align:center;",
  title: "margin:0 0 12px;font-size:24px;line-height:30px;font-weight:600;",
  heading:
    "margin:28px 0 8px;padding-top:12px;border-top:1px solid #c9d0cb;font-size:18px;line-height:24px;font-weight:600;",
  paragraph: "margin:0 0 12px;",
  summary: "margin:16px 0 0;font-weight:600;",
  table: "width:100%;border-collapse:collapse;margin:0 0 8px;",
  label:
    "padding:3px 12px 3px 0;vertical-align:top;color:#43525a;font-weight:400;text-align:left;width:110px;",
  value: "padding:3px 0;vertical-align:top;overflow-wrap:anywhere;word-break:break-word;",
  positionName: "margin:0;font-size:17px;line-height:24px;font-weight:600;",
  place: "margin:0 0 8px;color:#43525a;",
  limit: "margin:10px 0 4px;font-weight:600;",
  list: "margin:0 0 12px;padding:0 0 0 20px;",
  item: "margin:0 0 4px;",
  button:
    "display:inline-block;padding:12px 18px;background-color:#1e6f66;color:#ffffff;font-weight:600;text-decoration:none;",
  small:
    "margin:0 0 12px;font-size:14px;line-height:20px;color:#43525a;overflow-wrap:anywhere;word-break:break-all;",
} as const;

/** Words say the verdict; the bar beside them only makes it quicker to find. */
const verdictBar: Record<Verdict, string> = {
  over: "6px solid #17242b",
  undecided: "6px double #17242b",
  within: "6px solid #c9d0cb",
};

/** The notice as HTML: tables, styles in the tags, no images, nothing fetched. */
export function noticeHtml(content: NoticeContent): string {
  const { flagged, flaggedLeftOut, within, withinLeftOut } = content;
  const mark = `<p style="${style.mark}">${escapeHtml(content.mark)}</p>`;
  return mailDocument(
    content.subject,
    [
      mark,
      `<h1 style="${style.title}">${escapeHtml(content.title)}</h1>`,
      pairs(content.facts),
      paragraphs(content.coveringText, style.paragraph),
      `<p style="${style.summary}">${escapeHtml(content.summary)}</p>`,
      flagged.length > 0 ? heading("Flagged positions, worst first") : "",
      ...flagged.map(positionHtml),
      note(flaggedLeftOut),
      section("Within their budgets", within),
      note(withinLeftOut),
      section("Circuits that wait", content.waiting),
      section("Self-checks", content.checks),
      section("What is left out", content.leftOut),
      section("Cautions", content.cautions),
      heading("The result"),
      `<p style="${style.paragraph}">The page outranks this message; every position is in the attached CSV.</p>`,
      `<p style="${style.paragraph}"><a href="${escapeHtml(content.resultUrl)}" style="${style.button}">Open the result</a></p>`,
      `<p style="${style.small}">${escapeHtml(content.resultUrl)}</p>`,
      pairs(content.origin),
      mark,
    ].join("\n"),
  );
}

const positionHtml = ({ name, verdict, verdictWords, place, limits }: FlaggedPosition): string =>
  `<table role="presentation" cellpadding="0" cellspacing="0" border="0" style="${style.table}margin-bottom:20px;">
<tr><td style="padding:2px 0 2px 12px;border-left:${verdictBar[verdict]};">
<h3 style="${style.positionName}">${escapeHtml(name)}: ${escapeHtml(verdictWords)}</h3>
<p style="${style.place}">${escapeHtml(place)}</p>
${limits.map(limitHtml).join("\n")}
</td></tr>
</table>`;

const limitHtml = ({ measured, verdict, rows, ways }: FlaggedLimit): string =>
  [
    `<p style="${style.limit}">${escapeHtml(measured)}: ${escapeHtml(verdict)}</p>`,
    pairs(rows),
    ways.length > 0 ? `<p style="margin:0 0 4px;">What would clear it:</p>${list(ways)}` : "",
  ].join("\n");

const heading = (text: string): string => `<h2 style="${style.heading}">${escapeHtml(text)}</h2>`;

const section = (title: string, items: readonly string[]): string =>
  items.length === 0 ? "" : heading(title) + list(items);

const list = (items: readonly string[]): string =>
  `<ul style="${style.list}">${items.map((item) => `<li style="${style.item}">${escapeHtml(item)}</li>`).join("")}</ul>`;

const note = (text: string | null): string =>
  text === null ? "" : `<p style="${style.paragraph}">${escapeHtml(text)}</p>`;

const pairs = (rows: readonly (readonly [string, string])[]): string =>
  `<table cellpadding="0" cellspacing="0" border="0" style="${style.table}">${rows
    .map(
      ([label, value]) =>
        `<tr><th scope="row" style="${style.label}">${escapeHtml(label)}</th><td style="${style.value}">${escapeHtml(value)}</td></tr>`,
    )
    .join("")}</table>`;
