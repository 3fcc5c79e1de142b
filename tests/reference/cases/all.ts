import type { ReferenceCase } from "../reference-case";
import { CABLES } from "./cables";
import { COILS } from "./coils";
import { EARTH } from "./earth";
import { LONG_WIRES } from "./long-wires";
import { POWER_LINES } from "./power-lines";
import { SEGMENTS } from "./segments";
import { SOLENOIDS } from "./solenoids";

export const REFERENCE_CASES: ReferenceCase[] = [
  ...LONG_WIRES,
  ...SEGMENTS,
  ...CABLES,
  ...POWER_LINES,
  ...COILS,
  ...SOLENOIDS,
  ...EARTH,
];
