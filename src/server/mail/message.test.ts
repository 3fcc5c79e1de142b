import { describe, expect, it } from "vitest";
import { headerText, mailboxHeader } from "./message";

describe("headers", () => {
  it("take names in any script, with quotes and commas", () => {
    for (const name of ['Søren "Sunny" Ødegård, site lead', "梅田 花子", "O'Neill; <night shift>"])
      expect(mailboxHeader({ name, email: "team@site.example" }, "To")).toEqual({
        name,
        address: "team@site.example",
      });
  });

  it("refuse whatever would begin another header, address or SMTP command", () => {
    for (const text of ["a\r\nBcc: b@site.example", "a\nb", "a\rb", "a\u0000b", "a\u2028b", "a\u202eb"]) {
      expect(() => headerText(text, "Subject")).toThrow("Subject");
      expect(() => mailboxHeader({ name: text, email: "team@site.example" }, "To")).toThrow("To");
    }
    for (const email of [
      "a@site.example, b@site.example",
      "a@site.example> NOTIFY=NEVER",
      "<a@site.example>",
      "a b@site.example",
      "a@b@site.example",
      "site.example",
      "a@site.example\r\nDATA",
    ])
      expect(() => mailboxHeader({ name: "A", email }, "To")).toThrow("To");
  });
});
