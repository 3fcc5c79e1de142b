import { expect, it } from "vitest";
import { hashOf, newToken, sameSecret } from "./secrets";

it("makes tokens of 256 bits, none like another", () => {
  const tokens = Array.from({ length: 1000 }, newToken);
  expect(new Set(tokens).size).toBe(1000);
  for (const token of tokens) expect(Buffer.from(token, "base64url")).toHaveLength(32);
});

it("hashes with SHA-256 (FIPS 180-2, appendix B.1: the message abc)", () => {
  expect(hashOf("abc")).toBe("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
});

it("tells secrets apart, of whatever length", () => {
  expect(sameSecret("one", "one")).toBe(true);
  expect(sameSecret("one", "two")).toBe(false);
  expect(sameSecret("one", "one more")).toBe(false);
});
