import { oneLine } from "~/domain/one-line";
import { escapeHtml, mailDocument, paragraphs } from "./html";
import { wrapped } from "./plain-text";

export interface RevisionMail {
  /** Without line breaks once composed. */
  subject: string;
  greeting: string;
  /** What happened, sentence by sentence. */
  sentences: readonly string[];
  /** What a person wrote, under a heading. */
  quoted?: { heading: string; text: string };
  /** Facts in pairs: what it is, what it says. */
  facts?: readonly (readonly [string, string])[];
  url: string;
  /** What the button says. */
  open: string;
}

const style = {
  paragraph: "margin:0 0 12px;",
  heading: "margin:20px 0 6px;font-size:16px;line-height:22px;font-weight:600;",
  quote: "margin:0 0 12px;padding:0 0 0 12px;border-left:3px solid #7a8783;",
  label: "padding:3px 12px 3px 0;vertical-align:top;color:#43525a;font-weight:400;text-align:left;",
  value: "padding:3px 0;vertical-align:top;overflow-wrap:anywhere;",
  button:
    "display:inline-block;padding:12px 18px;background-color:#1e6f66;color:#ffffff;font-weight:600;text-decoration:none;",
  small: "margin:0 0 12px;font-size:14px;line-height:20px;color:#43525a;word-break:break-all;",
} as const;

const caution = "The page outranks this message.";

/** A message about a revision, the plain text as complete as the HTML. */
export function revisionMail(mail: RevisionMail): { subject: string; text: string; html: string } {
  const { greeting, sentences, quoted, facts = [], url, open } = mail;
  const subject = oneLine(mail.subject);
  const text = [
    greeting,
    ...sentences.map((sentence) => wrapped(sentence)),
    facts.map(([label, value]) => wrapped(`${label}: ${value}`, "", "  ")).join("\n"),
    quoted === undefined ? "" : `${quoted.heading}\n${quotedText(quoted.text)}`,
    `${open}:\n${url}`,
    caution,
  ];
  const html = [
    `<p style="${style.paragraph}">${escapeHtml(greeting)}</p>`,
    ...sentences.map((sentence) => `<p style="${style.paragraph}">${escapeHtml(sentence)}</p>`),
    facts.length > 0
      ? `<table cellpadding="0" cellspacing="0" border="0" style="margin:0 0 12px;">${facts.map(factRow).join("")}</table>`
      : "",
    quoted === undefined
      ? ""
      : `<h2 style="${style.heading}">${escapeHtml(quoted.heading)}</h2><div style="${style.quote}">${paragraphs(quoted.text, style.paragraph)}</div>`,
    `<p style="${style.paragraph}"><a href="${escapeHtml(url)}" style="${style.button}">${escapeHtml(open)}</a></p>`,
    `<p style="${style.small}">${escapeHtml(url)}</p>`,
    `<p style="${style.paragraph}">${escapeHtml(caution)}</p>`,
  ];
  return {
    subject,
    text: `${text.filter((part) => part !== "").join("\n\n")}\n`,
    html: mailDocument(subject, html.filter((part) => part !== "").join("\n")),
  };
}

const quotedText = (text: string): string =>
  text
    .split("\n")
    .map((line) => wrapped(line, "  ", "  "))
    .join("\n");

const factRow = ([label, value]: readonly [string, string]): string =>
  `<tr><th scope="row" style="${style.label}">${escapeHtml(label)}</th><td style="${style.value}">${escapeHtml(value)}</td></tr>`;
