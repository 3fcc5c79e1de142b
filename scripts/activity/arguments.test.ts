import { expect, it } from "vitest";
import { readArguments } from "./arguments";

const head = "0123456789abcdef0123456789abcdef";

it("reads which log and which head", () => {
  expect(readArguments(["verify"])).toEqual({});
  expect(
    readArguments(["verify", "--organisation", "farnwick", "--head", "0123 4567 89AB CDEF 0123456789abcdef"]),
  ).toEqual({ organisation: "farnwick", head });
});

it.each([
  [[], '"" is no command'],
  [["mend"], '"mend" is no command'],
  [["verify", "--head", head], "--head needs --organisation"],
  [["verify", "--organisation", "farnwick", "--head", "0123"], "--head is no hash"],
  [["verify", "--colour"], "--colour"],
])("refuses %j with what is wrong and the usage", (words, fault) => {
  expect(() => readArguments(words)).toThrow(fault);
  expect(() => readArguments(words)).toThrow("npm run activity -- verify");
});
