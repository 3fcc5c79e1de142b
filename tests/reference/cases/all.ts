import type { ReferenceCase } from "../reference-case";
import { CABLES } from "./cables";
import { COILS } from "./coils";
import { EARTH } from "./earth";
import { LONG_WIRES } from "./long-wires";
import { SEGMENTS } from "./segments";

export const REFERENCE_CASES: ReferenceCase[] = [...LONG_WIRES, ...SEGMENTS, ...CABLES, ...COILS, ...EARTH];
