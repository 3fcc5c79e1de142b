import { readNumber } from "../read-number";

/** A value read from a cell, or in words why it could not be. */
export type Read<T> = { ok: true; value: T } | { ok: false; problem: string };

const good = <T>(value: T): Read<T> => ({ ok: true, value });
const bad = (problem: string): Read<never> => ({ ok: false, problem });

export interface Cores {
  /** Conductors that carry the load: 1, 2 or 3. */
  live: 1 | 2 | 3;
  neutral: boolean;
}

/** "3", "4C", "3+N", "3c + E", "1 x 3C": how many conductors there are to draw. A protective conductor does not count. */
export function readCores(text: string): Read<Cores | null> {
  if (text === "") return good(null);
  const tidy = text.toUpperCase().replace(/\s/g, "");
  const found = /^(?:1[X×])?(\d)(?:C|CORE|CORES|X\d+[.,]?\d*)?(\+N)?(\+(?:E|PE|G|CPC))?$/.exec(tidy);
  const count = Number(found?.[1]);
  const cores: Record<number, Cores> = {
    1: { live: 1, neutral: false },
    2: { live: 2, neutral: false },
    3: { live: 3, neutral: found?.[2] !== undefined },
    4: { live: 3, neutral: true },
    5: { live: 3, neutral: true },
  };
  const read = found === null ? undefined : cores[count];
  return read === undefined
    ? bad(`cores “${text}” can't be read; write 1, 2, 3, 4 or 5, or 3+N`)
    : good(read);
}

/** "95", "95 mm²", "3x95", "2,5": cross-section of one conductor in mm². */
export function readSizeMm2(text: string): Read<number | null> {
  if (text === "") return good(null);
  const tidy = text
    .replace(/mm\s*(²|2|\^2)?|sq\.?\s*mm|mm/gi, "")
    .replace(/^\s*\d+\s*(?:c\s*)?[x×]\s*/i, "")
    .trim();
  const sizeMm2 = readNumber(tidy);
  if (sizeMm2 === null) return bad(`size “${text}” is not a cross-section in mm²`);
  if (sizeMm2 < 0.5 || sizeMm2 > 2500) return bad(`size “${text}” is outside 0.5 to 2500 mm²`);
  return good(sizeMm2);
}

export interface Load {
  currentA: number;
  /** As written beside the figure; null where nothing says it. */
  kind: "dc" | "ac" | null;
}

/** "120", "120 A", "0,4 kA", "32 A DC": the current of the load. Empty and "?" are a load not known yet. */
export function readLoad(text: string): Read<Load | null> {
  if (/^(|\?|-|–|tbc|tbd|n\/a|unknown)$/i.test(text.trim())) return good(null);
  const found = /^\s*([+-]?[\d.,\s\u00a0\u202f']+?)\s*(mA|kA|A)?\s*(?:\(?\s*(DC|AC)\s*\)?)?\s*$/i.exec(text);
  const figure = found === null ? null : readNumber(found[1] as string);
  if (found === null || figure === null) {
    return bad(
      /k?(W|VA)\b/i.test(text)
        ? `load “${text}” is a power; enter the current in amperes`
        : `load “${text}” is not a current in amperes`,
    );
  }
  const factors: Record<string, number> = { ma: 1e-3, ka: 1e3, a: 1 };
  const currentA = figure * (factors[(found[2] ?? "A").toLowerCase()] as number);
  if (Math.abs(currentA) > 1e6) return bad(`load “${text}” is beyond 1 MA`);
  const kind = found[3]?.toLowerCase();
  return good({ currentA, kind: kind === "dc" || kind === "ac" ? kind : null });
}
