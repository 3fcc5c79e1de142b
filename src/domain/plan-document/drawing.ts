import * as z from "zod";
import { coordinateM, finite, identifier, lengthM, name, planPoint, point } from "./quantities";

const text = z.string().max(2000);
const list = <T extends z.ZodType>(entry: T) => z.array(entry).max(5000).optional();

const sheet = z.strictObject({
  drawingId: z.string().max(200),
  widthPx: z.number().positive(),
  heightPx: z.number().positive(),
  /** The image pixel that lies at plan (0, 0); pixels count right and down from the upper left corner. */
  originPx: z.tuple([finite, finite]),
  metresPerPixel: z.number().positive(),
  /** Counter-clockwise turn of the image about the origin, degrees. */
  rotationDeg: finite,
});

/** A line of the cable schedule that a circuit was made from, as it was read. */
const scheduleLine = z.strictObject({
  circuitId: identifier,
  tag: text,
  from: text,
  to: text,
  cores: text,
  size: text,
  load: text,
});

/** What only the drawing needs. It has no influence on any figure and is no part of the document's hash. */
export const drawing = z.strictObject({
  sheet: sheet.optional(),
  scale: z.strictObject({ a: planPoint, b: planPoint, knownLengthM: lengthM }).optional(),
  gridM: lengthM.optional(),
  levels: list(z.strictObject({ id: identifier, name, heightM: coordinateM })),
  /** Points on site that people measure from. */
  marks: list(z.strictObject({ id: identifier, name, position: point })),
  datum: z.strictObject({ name, position: point, description: text.optional() }).optional(),
  zones: list(z.strictObject({ id: identifier, name, outline: z.array(planPoint).min(3).max(1000) })),
  /** Clamp-meter loops: closed polygons in space. */
  loops: list(z.strictObject({ id: identifier, name, polygon: z.array(point).min(3).max(1000) })),
  sectionLines: list(z.strictObject({ id: identifier, name, a: planPoint, b: planPoint })),
  schedule: list(scheduleLine),
  notes: list(z.strictObject({ id: identifier, at: planPoint, text })),
  groups: list(z.strictObject({ id: identifier, name, memberIds: z.array(identifier).max(5000) })),
});

export type Drawing = z.output<typeof drawing>;
export type DrawingInput = z.input<typeof drawing>;
