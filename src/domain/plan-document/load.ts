import type { Arrangement } from "./arrangement";
import type { Circuit, Route } from "./circuit";
import type { Equipment } from "./equipment";
import type { Sensor } from "./sensor";
import type { Point } from "./quantities";
import type { Supply } from "./supply";

/** Straight conductor segments and coils' turns of one screening. */
export const MAX_SEGMENTS = 200_000;
/** Harmonics of all supplies together. */
export const MAX_HARMONICS = 20_000;
/** Lines of field and contributions that a result may hold: limits times sources. */
export const MAX_RESULT_LINES = 2_000_000;

/** Chords of a twisted pair's conductor that are traced around a point: ten lays to either side, 48 chords a lay. */
const TRACED_CHORDS = 960;
const CHORDS_PER_LAY = 48;

interface Loading {
  routes: readonly Route[];
  circuits: readonly Circuit[];
  equipment: readonly Equipment[];
  sensors: readonly Sensor[];
}

interface Fault {
  path: (string | number)[];
  message: string;
}

/** What makes a valid document too heavy to screen, before anything of it is laid out. */
export function loadFaults(document: Loading): Fault[] {
  const segments = segmentCount(document);
  const harmonics = sum([...document.circuits, ...document.equipment], harmonicsOf);
  const sources = document.circuits.length + document.equipment.length + harmonics;
  const limits = sum(document.sensors, (sensor) => sensor.limits.length);
  return [
    ...tooMany(["circuits"], segments, MAX_SEGMENTS, "straight conductor segments and coils' turns"),
    ...tooMany(["circuits"], harmonics, MAX_HARMONICS, "harmonics"),
    ...tooMany(["sensors"], limits * sources, MAX_RESULT_LINES, "limits times sources"),
  ];
}

function tooMany(path: string[], count: number, most: number, what: string): Fault[] {
  if (count <= most) return [];
  return [
    { path, message: `${count} ${what}; at most ${most} are screened at once. Split the plan by area` },
  ];
}

const sum = <T>(entries: readonly T[], of: (entry: T) => number): number =>
  entries.reduce((total, entry) => total + of(entry), 0);

function harmonicsOf(entry: Circuit | Equipment): number {
  const supply: Supply | null = "supply" in entry ? entry.supply : null;
  return supply === null || supply.kind === "dc" ? 0 : supply.harmonics.length;
}

/**
 * Straight segments once arrangements, parallel sets and the joints at both ends are laid out, twisted pairs as they are traced,
 * and the turns of coils. Collinear legs count one by one.
 */
export function segmentCount({ routes, circuits, equipment }: Omit<Loading, "sensors">): number {
  const lines = new Map(routes.map(({ id, path }) => [id, path]));
  const laid = sum(circuits, ({ path, route, arrangement }) => {
    const line = path ?? (route && lines.get(route.id));
    return line ? conductorsOf(arrangement) * segmentsAlong(line, arrangement) : 0;
  });
  return laid + sum(equipment, (item) => (item.kind === "coil" ? item.turns : 1));
}

function segmentsAlong(line: readonly Point[], arrangement: Arrangement): number {
  const legs = line.length + 1;
  if (arrangement.kind !== "twisted-pair") return legs;
  const lays = lengthOf(line) / arrangement.layM;
  return legs + Math.min(TRACED_CHORDS, Math.ceil(lays * CHORDS_PER_LAY));
}

const lengthOf = (line: readonly Point[]): number =>
  sum(
    line.slice(1).map((to, index) => [line[index] ?? to, to] as const),
    ([from, to]) => Math.hypot(to[0] - from[0], to[1] - from[1], to[2] - from[2]),
  );

const CONDUCTORS: Record<Exclude<Arrangement["kind"], "custom">, number> = {
  single: 1,
  pair: 2,
  "twisted-pair": 2,
  flat: 3,
  trefoil: 3,
  quad: 4,
  "flat-n": 4,
};

function conductorsOf(arrangement: Arrangement): number {
  if (arrangement.kind === "custom") return arrangement.conductors.length;
  return CONDUCTORS[arrangement.kind] * (arrangement.parallel?.sets ?? 1);
}
