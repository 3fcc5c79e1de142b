import { expect, it } from "vitest";
import { keptSince, retentionInWords } from "./retention";

it("says how long in words", () => {
  expect(retentionInWords("sessions")).toBe("at once");
  expect(retentionInWords("attempts")).toBe("2 hours");
  expect(retentionInWords("signInLinks")).toBe("1 day");
  expect(retentionInWords("screenings")).toBe("90 days");
  expect(retentionInWords("activity")).toBeNull();
});

it("counts back from now", () => {
  const now = new Date("2026-03-08T00:00:00Z");
  expect(keptSince("signInMails", now)).toEqual(new Date("2026-03-01T00:00:00Z"));
  expect(keptSince("sessions", now)).toEqual(now);
});
