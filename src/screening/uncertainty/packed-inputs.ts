import type { InputVector } from "./input-vectors";

/** Sparse inputs in flat arrays, for thousands of draws: one row per input and group that it moves. */
export class PackedInputs {
  private readonly inputOfRow: Int32Array;
  private readonly startOfRow: Int32Array;
  private readonly values: Float64Array;

  constructor(
    inputs: readonly InputVector[],
    private readonly stride: 6 | 18,
  ) {
    const rows = inputs.flatMap(({ groups }, input) => groups.map((group) => ({ input, group })));
    this.inputOfRow = Int32Array.from(rows, ({ input }) => input);
    this.startOfRow = Int32Array.from(rows, ({ group }) => stride * group);
    this.values = new Float64Array(stride * rows.length);
    let at = 0;
    for (const { values } of inputs) {
      this.values.set(values, at);
      at += values.length;
    }
  }

  /** Adds every input's change times its draw to the groups. */
  addTo(groups: Float64Array, draws: Float64Array): void {
    const { inputOfRow, startOfRow, values, stride } = this;
    for (let row = 0; row < inputOfRow.length; row++) {
      const x = draws[inputOfRow[row] as number] as number;
      const to = startOfRow[row] as number;
      for (let i = 0; i < stride; i++) {
        groups[to + i] = (groups[to + i] as number) + x * (values[stride * row + i] as number);
      }
    }
  }
}
