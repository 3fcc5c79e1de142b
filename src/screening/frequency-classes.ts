/** Frequencies of different sources closer than this are one frequency whose relative phase is unknown. */
const SAME_FREQUENCY = 1.005;

/** One field group: everything phase-locked (one source) at one frequency; group 0 is all DC together. */
export interface FieldGroup {
  source: string;
  frequencyHz: number;
  /** Index into `FrequencyTable.classesHz`. */
  classIndex: number;
}

export interface FrequencyTable {
  /** Lowest frequency of each class, ascending; class 0 is DC (0 Hz). */
  classesHz: number[];
  groups: FieldGroup[];
}

export function classOf(classesHz: readonly number[], frequencyHz: number): number {
  if (frequencyHz === 0) return 0;
  const found = classesHz.findIndex((lowest, index) => index > 0 && inClass(lowest, frequencyHz));
  if (found < 0) throw new RangeError(`no frequency class holds ${frequencyHz} Hz`);
  return found;
}

/** Classes of all frequencies that occur, DC first whether it occurs or not. */
export function frequencyClasses(frequenciesHz: Iterable<number>): number[] {
  const ascending = [...new Set(frequenciesHz)].filter((frequency) => frequency > 0).sort((a, b) => a - b);
  const classesHz = [0];
  for (const frequencyHz of ascending) {
    const lowest = classesHz[classesHz.length - 1] ?? 0;
    if (lowest === 0 || !inClass(lowest, frequencyHz)) classesHz.push(frequencyHz);
  }
  return classesHz;
}

/** Collects groups in the order in which they are asked for. */
export class GroupTable {
  readonly groups: FieldGroup[] = [{ source: "", frequencyHz: 0, classIndex: 0 }];
  private readonly known = new Map<string, number>();

  constructor(private readonly classesHz: readonly number[]) {}

  indexOf(source: string, frequencyHz: number): number {
    if (frequencyHz === 0) return 0;
    const classIndex = classOf(this.classesHz, frequencyHz);
    const key = `${classIndex} ${source}`;
    const existing = this.known.get(key);
    if (existing !== undefined) return existing;
    this.groups.push({ source, frequencyHz, classIndex });
    this.known.set(key, this.groups.length - 1);
    return this.groups.length - 1;
  }
}

function inClass(lowestHz: number, frequencyHz: number): boolean {
  return frequencyHz >= lowestHz && frequencyHz <= lowestHz * SAME_FREQUENCY;
}
