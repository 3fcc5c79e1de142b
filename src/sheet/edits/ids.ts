const letters = "abcdefghjkmnpqrstuvwxyz23456789";

/** An id that two people who add objects at once do not both make; `prefix` says what it is to whoever reads the JSON. */
export function newId(prefix: string): string {
  const bytes = crypto.getRandomValues(new Uint8Array(8));
  return `${prefix}-${Array.from(bytes, (byte) => letters.charAt(byte % letters.length)).join("")}`;
}

/** "Circuit 3": the stem with the lowest number that no other object bears. */
export function freeName(stem: string, taken: readonly { name: string }[]): string {
  const names = new Set(taken.map(({ name }) => name));
  let number = 1;
  while (names.has(`${stem} ${number}`)) number++;
  return `${stem} ${number}`;
}

/** The name of a copy: "Compass 3 (copy)", "Compass 3 (copy 2)". */
export function copyName(name: string, taken: readonly { name: string }[]): string {
  const names = new Set(taken.map((other) => other.name));
  const stem = name.replace(/ \(copy( \d+)?\)$/, "");
  let copy = `${stem} (copy)`;
  for (let number = 2; names.has(copy); number++) copy = `${stem} (copy ${number})`;
  return copy;
}
