import { describe, expect, it } from "vitest";
import { awkwardPlan, awkwardResult, busbarName, parsed } from "../../../../tests/fixtures/judged-plan";
import { noticeContent, type NoticeSource } from "./content";
import { noticeHtml } from "./html";
import { noticeText } from "./text";

const source: NoticeSource = {
  site: { name: "Quayside store", place: "Harbour Road 4", timeZone: "Europe/Berlin" },
  plan: { name: awkwardPlan.name },
  screening: {
    screenedAt: new Date("2026-12-01T11:20:00Z"),
    screenedByName: "Ilka Thorsen",
    documentVersion: 7,
    inputHash: awkwardResult.inputHash,
    engineVersion: "0.1.0",
  },
  notice: { version: 2, coveringText: "Please keep dock 3 free.\n<b>Until Friday</b> & no longer." },
  plannerName: "Ilka Thorsen",
  document: parsed(awkwardPlan),
  result: awkwardResult,
  resultUrl: "https://plans.example/plans/p/screenings/s",
};
const content = noticeContent(source);
const html = noticeHtml(content);
const text = noticeText(content);
/** What a person reads of the HTML. */
const read = html
  .replace(/<(style|title)[^>]*>.*?<\/\1>/gs, "")
  .replace(/<[^>]+>/g, " ")
  .replace(/&#(\d+);/g, (_, code: string) => String.fromCharCode(Number(code)));
const flat = (words: string) => words.replace(/[\s\u00a0]+/g, " ");

describe("a screening notice", () => {
  it("says in both forms what is over and undecided, by how much, who spends it and what would clear it", () => {
    for (const form of [flat(read), flat(text)]) {
      expect(form).toContain("Kompass, Dock 3: over its budget");
      expect(form).toContain("x 4.00 m, y 3.00 m, height 1.10 m");
      expect(form).toMatch(/Value:? 1\.42 ± 0\.11 µT/);
      expect(form).toMatch(/Limit:? 1 µT/);
      expect(form).toMatch(/Budget used:? 142 %/);
      expect(form).toMatch(/Load case:? Peak/);
      expect(form).toContain(`${busbarName} 100.0 %`);
      // (1 µT − 0.11 µT) / 1.42 µT = 62.6 %; 1 − (1 − 1/1.42) = 70.4 %.
      expect(form).toContain("taken down together to 62 % of what is stated");
      expect(form).toContain("at least to 71 % of what is stated");
      // 1 µT − 0.94 µT
      expect(form).toContain("if its uncertainty were at most 60.0 nT");
      expect(form).toContain("Bench 7, 4.0 % of its budget used");
      expect(form).toContain("Riser 2: not traced yet, its current is not known");
      expect(form).not.toContain("no verdict is better than undecided");
      expect(form).toContain("120 A leave at x 12.00 m, y 0.00 m, height 2.80 m and no way back is drawn (");
      expect(form).toContain("Readings taken on site outrank this result.");
      expect(form).toContain("Steel is not modelled.");
      expect(form).toContain("1 December 2026 at 12:20 (Europe/Berlin)");
      expect(form).toContain(awkwardResult.inputHash);
      expect(form).toContain("3 positions: 1 over, 1 undecided, 1 within, from the one source drawn.");
      expect(form.split("PRELIMINARY, NOT FOR MOUNTING")).toHaveLength(3);
    }
  });

  it("keeps names and covering text from becoming markup, lines or headers", () => {
    expect(html).not.toContain("<b>");
    expect(html).not.toContain(busbarName);
    expect(read).toContain("<b>Until Friday</b>");
    expect(text).toContain("=SUM(A1) Bcc: all@quillhaven.example");
    expect(content.subject).toMatch(/^[^\r\n]{20,300}$/);
    expect(content.subject).toContain("Prüfhalle, “2. OG”, Quayside store: 1 over, 1 undecided, 1 within");
  });

  it("links to the application and fetches nothing", () => {
    expect(html.match(/(?:href|src)="[^"]*"/g)).toEqual([`href="${source.resultUrl}"`]);
    expect(html).not.toMatch(/url\(|<img|<link|<script|<style/);
    expect(text.match(/https?:\S+/g)).toEqual([source.resultUrl]);
  });

  it("keeps plain text within 76 columns but for what cannot be broken", () => {
    const tooLong = text.split("\n").filter((line) => [...line].length > 76);
    expect(tooLong.every((line) => !line.trim().includes(" ") || line.includes("sha256:"))).toBe(true);
  });

  it("stays short however many positions are flagged", () => {
    const sensor = source.document.sensors[0];
    const judged = awkwardResult.sensors[0];
    if (sensor === undefined || judged === undefined) throw new Error("The fixture has no sensor.");
    const ids = Array.from({ length: 300 }, (_, index) => `s${String(index)}`);
    const many = noticeContent({
      ...source,
      document: { ...source.document, sensors: ids.map((id) => ({ ...sensor, id })) },
      result: { ...awkwardResult, sensors: ids.map((id) => ({ ...judged, id })) },
    });
    expect(many.flagged).toHaveLength(30);
    expect(noticeText(many)).toContain("270 more flagged positions; the CSV and the page list them.");
    expect(Buffer.byteLength(noticeHtml(many))).toBeLessThan(100_000);
  });
});
