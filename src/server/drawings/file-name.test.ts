import { expect, it } from "vitest";
import { uploadedFileName } from "./file-name";

it.each([
  ["Grundri%C3%9F%20EG.png", "Grundriß EG.png"],
  ["C%3A%5Cplans%5CLevel%201.png", "Level 1.png"],
  ["..%2F..%2Fetc%2Fpasswd", "passwd"],
  ["a%0D%0ASet-Cookie%3A%20b.png", "aSet-Cookie: b.png"],
  ["gnp.%E2%80%AEtrap.png", "gnp.trap.png"],
  ["100%.png", "100%.png"],
  ["%2F", "drawing"],
  [null, "drawing"],
])("reads %j as %j", (header, name) => {
  expect(uploadedFileName(header)).toBe(name);
});

it("keeps what the database's column holds", () => {
  expect([...uploadedFileName("𝄞".repeat(300))]).toHaveLength(255);
});
