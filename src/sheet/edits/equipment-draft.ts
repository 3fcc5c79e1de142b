import type { Equipment, EquipmentKind } from "~/domain/plan-document/equipment";
import type { SingleSupply } from "~/domain/plan-document/supply";
import type { Point3 } from "../geometry";
import { readNumber } from "../read-number";
import type { StepInput } from "../steps/step";
import { equipmentKinds, equipmentTitles } from "./equipment";
import { newId } from "./ids";
import { tidyPoint } from "./paths";

/** A piece of equipment as it is typed before it stands on the plan; figures that no rule gives begin empty. */
export interface EquipmentDraft {
  kind: EquipmentKind;
  texts: Readonly<Record<string, string>>;
  /** Inputs whose text is refused, once somebody has tried to place it. */
  problems: Readonly<Record<string, string>>;
}

interface Figure {
  id: string;
  label: string;
  unit?: string;
  begin: string;
  accepts: (value: number) => boolean;
  wanted: string;
}

const above = (most: number) => (value: number) => value > 0 && value <= most;
const turnsFigure: Figure = {
  id: "turns",
  label: "Turns",
  begin: "",
  accepts: (value) => Number.isInteger(value) && value >= 1 && value <= 10_000,
  wanted: "Type a whole number of turns, 1 to 10000.",
};
const currentFigure: Figure = {
  id: "current",
  label: "Current",
  unit: "A",
  begin: "",
  accepts: (value) => Math.abs(value) <= 1e6,
  wanted: "Type the current in each turn in amperes, such as 16.",
};
const radius = (id: string, label: string, begin: string): Figure => ({
  id,
  label,
  unit: "m",
  begin,
  accepts: above(100),
  wanted: "Type metres above 0, such as 0.3.",
});

const figures: Record<EquipmentKind, readonly Figure[]> = {
  coil: [turnsFigure, radius("radius", "Radius", "0.3"), currentFigure],
  toroid: [
    turnsFigure,
    radius("radius", "Mean radius", "0.1"),
    radius("minor", "Minor radius", "0.03"),
    currentFigure,
  ],
  dipole: [
    {
      id: "distance",
      label: "Read at",
      unit: "m",
      begin: "",
      accepts: above(1000),
      wanted: "Type how far from its middle the field was read, in metres.",
    },
    {
      id: "field",
      label: "Field read",
      unit: "µT",
      begin: "",
      accepts: (value) => value >= 0 && value <= 1e8,
      wanted: "Type the field read there in microtesla.",
    },
    {
      id: "frequency",
      label: "Frequency, 0 for DC",
      unit: "Hz",
      begin: "0",
      accepts: (value) => value >= 0 && value <= 1e9,
      wanted: "Type hertz; 0 stands for DC.",
    },
  ],
};

const supplyChoices = [
  { value: "dc", label: "DC" },
  { value: "ac1", label: "AC, one phase" },
];

export const beginDraft = (kind: EquipmentKind): EquipmentDraft => ({
  kind,
  texts: Object.fromEntries([
    ["supply", "dc"],
    ...figures[kind].map(({ id, begin }): [string, string] => [id, begin]),
  ]),
  problems: {},
});

/** Another kind begins anew, with what was typed kept where both have it. */
export function typeDraft(draft: EquipmentDraft, inputId: string, text: string): EquipmentDraft {
  if (inputId === "kind") {
    const kind = equipmentKinds.find((other) => other === text) ?? draft.kind;
    const begun = beginDraft(kind);
    const kept = Object.entries(draft.texts).filter(([id, value]) => id in begun.texts && value !== "");
    return { ...begun, texts: { ...begun.texts, ...Object.fromEntries(kept) } };
  }
  const problems = Object.fromEntries(Object.entries(draft.problems).filter(([id]) => id !== inputId));
  return { ...draft, texts: { ...draft.texts, [inputId]: text }, problems };
}

export function draftInputs({ kind, texts, problems }: EquipmentDraft): StepInput[] {
  const problemOf = (id: string) => (problems[id] === undefined ? {} : { problem: problems[id] });
  return [
    {
      id: "kind",
      label: "Kind",
      value: kind,
      choices: equipmentKinds.map((value) => ({ value, label: equipmentTitles[value] })),
    },
    ...figures[kind].map(({ id, label, unit }) => ({
      id,
      label,
      value: texts[id] ?? "",
      ...(unit !== undefined && { unit }),
      ...problemOf(id),
    })),
    ...(kind === "dipole"
      ? []
      : [{ id: "supply", label: "Supply", value: texts["supply"] ?? "dc", choices: supplyChoices }]),
  ];
}

type Read = { ok: true; item: Equipment } | { ok: false; draft: EquipmentDraft };

/** The equipment that the draft says, named and placed; or the draft with what is wrong at which input. */
export function readDraft(draft: EquipmentDraft, name: string, centre: Point3): Read {
  const values: Record<string, number> = {};
  const problems: Record<string, string> = {};
  for (const { id, accepts, wanted } of figures[draft.kind]) {
    const value = readNumber(draft.texts[id] ?? "");
    if (value === null || !accepts(value)) problems[id] = wanted;
    else values[id] = value;
  }
  const figure = (id: string): number => values[id] ?? 0;
  const alternating = draft.texts["supply"] === "ac1";
  if (alternating && figure("current") < 0) problems["current"] = "An rms current has no sign.";
  if (draft.kind === "toroid" && figure("minor") >= figure("radius") && figure("radius") > 0)
    problems["minor"] = "Below the mean radius.";
  if (Object.keys(problems).length > 0) return { ok: false, draft: { ...draft, problems } };

  const currentA = figure("current");
  const supply: SingleSupply = alternating
    ? { kind: "ac1", currentA, frequencyHz: 50, phaseDeg: 0, harmonics: [] }
    : { kind: "dc", currentA };
  const common = {
    id: newId("e"),
    name,
    source: null,
    centre: tidyPoint(centre),
    tolerancePercent: 0,
    shieldingFactor: 1,
  };
  const wound = { ...common, turns: figure("turns"), axis: [0, 0, 1] as [number, number, number], supply };
  if (draft.kind === "coil")
    return { ok: true, item: { ...wound, kind: "coil", radiusM: figure("radius"), lengthM: 0 } };
  if (draft.kind === "toroid") {
    const ring = { meanRadiusM: figure("radius"), minorRadiusM: figure("minor"), compensated: false };
    return { ok: true, item: { ...wound, kind: "toroid", ...ring } };
  }
  const reading = { distanceM: figure("distance"), fieldT: Number((figure("field") / 1e6).toPrecision(12)) };
  return {
    ok: true,
    item: { ...common, kind: "dipole", reading, frequencyHz: figure("frequency"), direction: null },
  };
}
