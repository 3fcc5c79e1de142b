import { describe, expect, it } from "vitest";
import { readArguments } from "./arguments";

const issuer = "https://login.example";
const enough = [
  "create",
  "--name",
  "Farnwick Signals",
  "--admin-name",
  "Ada Quist",
  "--admin-email",
  "ada@farnwick.example",
];

describe("the organisation command's arguments", () => {
  it("make an admin who signs in by e-mail", () => {
    expect(readArguments(enough, issuer)).toEqual({
      name: "Farnwick Signals",
      admin: { name: "Ada Quist", email: "ada@farnwick.example" },
    });
  });

  it("make an admin whom the provider knows, the service's own unless another is named", () => {
    expect(readArguments([...enough, "--subject", "ada"], issuer).admin.identity).toEqual({
      issuer,
      subject: "ada",
    });
    const other = ["--subject", "ada", "--issuer", "https://other.example"];
    expect(readArguments([...enough, ...other], issuer).admin.identity?.issuer).toBe("https://other.example");
  });

  it.each([
    [[], '"" is no command'],
    [["remove"], '"remove" is no command'],
    [enough.slice(0, 5), "--admin-email is missing."],
    [[...enough.slice(0, 6), "nobody"], "--admin-email is not an e-mail address."],
    [[...enough, "--issuer", issuer], "--issuer needs --subject."],
    [[...enough, "--colour", "red"], "--colour"],
  ])("are refused as %j with what is wrong and the usage", (words, fault) => {
    expect(() => readArguments(words, issuer)).toThrow(fault);
    expect(() => readArguments(words, issuer)).toThrow("npm run organisation -- create");
  });
});
