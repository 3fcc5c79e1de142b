import type { Arrangement, Carrier, PhaseOrder } from "~/domain/plan-document/arrangement";
import { radians } from "~/domain/units";

/** A conductor's place in the section: offsets along u and v (m), the current it carries and its share of it. */
export interface Slot {
  p: number;
  q: number;
  carrier: Carrier;
  share: number;
}

const ROOT_3 = Math.sqrt(3);

/** The conductors of an arrangement, parallel sets and the turn of the section included; a twisted pair as at the start of its lay. */
export function slotsOf(arrangement: Arrangement): Slot[] {
  const turn = (slot: Slot): Slot => rolled(slot, radians(arrangement.rollDeg));
  if (arrangement.kind === "custom") {
    return arrangement.conductors.map(({ offsetM: [p, q], of, fraction }) =>
      turn({ p, q, carrier: of, share: fraction }),
    );
  }
  const one = baseSlots(arrangement);
  return parallelSets(arrangement).flatMap(({ shiftM, order, share }) =>
    one.map((slot) =>
      turn({ p: slot.p + shiftM, q: slot.q, carrier: reordered(slot.carrier, order), share }),
    ),
  );
}

/** The same arrangement with its spacing (custom: all offsets) times a factor. */
export function spaced(arrangement: Arrangement, factor: number): Arrangement {
  if (arrangement.kind === "single") return arrangement;
  if (arrangement.kind !== "custom") return { ...arrangement, spacingM: arrangement.spacingM * factor };
  const conductors = arrangement.conductors.map(({ offsetM: [p, q], ...rest }) => ({
    ...rest,
    offsetM: [p * factor, q * factor] as [number, number],
  }));
  return { ...arrangement, conductors };
}

/** Place along u before the turn (m), phase order and share of the current of each parallel set. */
export function parallelSets(
  arrangement: Exclude<Arrangement, { kind: "custom" }>,
): { shiftM: number; order: PhaseOrder; share: number }[] {
  const { parallel } = arrangement;
  if (!parallel) return [{ shiftM: 0, order: "abc", share: 1 }];
  return Array.from({ length: parallel.sets }, (_, index) => ({
    shiftM: (index - (parallel.sets - 1) / 2) * parallel.pitchM,
    order: ("phaseOrders" in parallel ? parallel.phaseOrders?.[index] : undefined) ?? "abc",
    share: 1 / parallel.sets,
  }));
}

/** Turns a place in the section about the centre line, from u towards v. */
export function rolled<T extends { p: number; q: number }>(place: T, rollRad: number): T {
  const cos = Math.cos(rollRad);
  const sin = Math.sin(rollRad);
  return { ...place, p: place.p * cos - place.q * sin, q: place.p * sin + place.q * cos };
}

function baseSlots(arrangement: Exclude<Arrangement, { kind: "custom" }>): Slot[] {
  const at = (carrier: Carrier, p: number, q: number): Slot => ({ p, q, carrier, share: 1 });
  if (arrangement.kind === "single") return [at("go", 0, 0)];
  const d = arrangement.spacingM;
  switch (arrangement.kind) {
    case "pair":
    case "twisted-pair":
      return [at("go", -d / 2, 0), at("return", d / 2, 0)];
    case "flat":
      return [at("a", -d, 0), at("b", 0, 0), at("c", d, 0)];
    case "trefoil": {
      const base = -d / (2 * ROOT_3);
      return [at("a", -d / 2, base), at("b", d / 2, base), at("c", 0, d / ROOT_3)];
    }
    case "quad":
      return [at("a", -d / 2, d / 2), at("b", d / 2, d / 2), at("c", d / 2, -d / 2), at("n", -d / 2, -d / 2)];
    case "flat-n":
      return [at("a", -1.5 * d, 0), at("b", -d / 2, 0), at("c", d / 2, 0), at("n", 1.5 * d, 0)];
  }
}

/** "bca" puts b in a's slot: slot a, b, c carries the first, second, third letter. */
function reordered(carrier: Carrier, order: PhaseOrder): Carrier {
  const slot = "abc".indexOf(carrier);
  return slot < 0 ? carrier : (order[slot] as Carrier);
}
