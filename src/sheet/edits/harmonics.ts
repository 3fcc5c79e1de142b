/**
 * The next odd order that is free, the third first: rectifiers make odd ones. Orders that three divides are left out
 * where nothing carries back what the three phases add up to.
 */
export function nextOrder(harmonics: readonly { order: number }[], withoutTriples: boolean): number {
  let order = 3;
  while ((withoutTriples && order % 3 === 0) || harmonics.some((harmonic) => harmonic.order === order))
    order += 2;
  return order;
}
