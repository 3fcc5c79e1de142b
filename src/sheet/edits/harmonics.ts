/** The next odd order that is free, the third first: rectifiers make odd ones. */
export function nextOrder(harmonics: readonly { order: number }[]): number {
  let order = 3;
  while (harmonics.some((harmonic) => harmonic.order === order)) order += 2;
  return order;
}
