import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { safeReturnTo } from "./return-to";

describe("safeReturnTo", () => {
  it.each(["/desk", "/plans/0f8c?view=table", "/sites/new", "/", "/plans/a%20b", "/sign-inside"])(
    "goes on to the own page %s",
    (path) => {
      expect(safeReturnTo(path)).toBe(path);
    },
  );

  it.each([
    undefined,
    null,
    "",
    "desk",
    "https://elsewhere.example/",
    "//elsewhere.example",
    "///elsewhere.example",
    "/\\elsewhere.example",
    "\\/elsewhere.example",
    "/\t/elsewhere.example",
    "/\n/elsewhere.example",
    "/.//elsewhere.example",
    "/..//elsewhere.example",
    "/desk/../../\\elsewhere.example",
    "/%2e//elsewhere.example",
    "/desk\r\nSet-Cookie: a=b",
    " /desk",
    "javascript:alert(1)",
    "data:text/html,x",
    "http:desk",
    "/desk\u0000",
    "/ｄｅｓｋ",
    "/api/sign-out",
    "/./api/sign-out",
    "/sign-in",
    "/sign-in?problem=expired",
    "/sign-in/link?token=x",
    `/${"a".repeat(600)}`,
  ])("leads from %j to the Desk", (wanted) => {
    expect(safeReturnTo(wanted)).toBe("/desk");
  });

  it("never leaves the origin, whatever it is given", () => {
    const nasty = fc.array(
      fc.constantFrom(
        "/",
        "\\",
        ".",
        "..",
        "%2f",
        "%5c",
        "@",
        ":",
        "?",
        "#",
        "a",
        "x.example",
        "\t",
        "\n",
        "https:",
      ),
      { maxLength: 8 },
    );
    fc.assert(
      fc.property(nasty, (parts) => {
        const url = new URL(safeReturnTo(parts.join("")), "https://own.example");
        expect(url.origin).toBe("https://own.example");
      }),
      { numRuns: 5000 },
    );
  });
});
