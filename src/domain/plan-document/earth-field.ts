import * as z from "zod";
import { finite } from "./quantities";

const stated = z.strictObject({
  mode: z.literal("stated"),
  horizontalT: z.number().positive().max(1),
  verticalT: z.number().min(-1).max(1),
  declinationDeg: z.number().min(-180).max(180),
});

const model = z.strictObject({
  mode: z.literal("model"),
  latitudeDeg: z.number().min(-90).max(90),
  longitudeDeg: z.number().min(-180).max(360),
  altitudeM: finite.min(-10_000).max(850_000),
  date: z.iso.date(),
});

/** The Earth's field at the site: by the World Magnetic Model of the date, or stated from a survey (`verticalT` positive down). */
export const earthField = z.discriminatedUnion("mode", [model, stated]);

export type EarthField = z.output<typeof earthField>;
