import { cautions } from "~/domain/cautions";

/** What the model leaves out, said with every result. The product's cautions are part of it. */
export const LEFT_OUT: readonly string[] = [
  "Only the sources drawn are in it.",
  "Steel (building frame, conduit, racks, reinforcement, passing vehicles, lifts) is not modelled; it can raise as well as lower the field.",
  "Currents induced in cable sheaths and metalwork are not modelled.",
  "A shielding factor is the user's own assertion and is applied as given.",
  ...cautions,
];

/** The standing list and, where one is asserted, every shielding factor with its owner. */
export function leftOut(document: {
  circuits: readonly { id: string; name: string; shieldingFactor: number }[];
  equipment: readonly { id: string; name: string; shieldingFactor: number }[];
}): string[] {
  const asserted = [...document.circuits, ...document.equipment]
    .filter(({ shieldingFactor }) => shieldingFactor !== 1)
    .map(
      ({ id, name, shieldingFactor }) =>
        `Shielding factor ${shieldingFactor} of "${name}" (${id}) is asserted by the user and was not checked.`,
    );
  return [...LEFT_OUT, ...asserted];
}
