import { expect, it } from "vitest";
import { slugOf } from "./organisations";

it.each([
  ["Quillhaven Instruments", "quillhaven-instruments"],
  ["  Ærø & Søn — Måleteknik ", "r-s-n-maleteknik"],
  ["Bührer GmbH & Co. KG", "buhrer-gmbh-co-kg"],
  ["計測", ""],
])("shortens %j to %j", (name, slug) => {
  expect(slugOf(name)).toBe(slug);
});
