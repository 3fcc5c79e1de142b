/** Directions looked at around a circuit, and by how much each distance is larger than the one before. */
const DIRECTIONS = 24;
const STEP_RAD = (2 * Math.PI) / DIRECTIONS;
const GROWTH = 1.3;
const REFINEMENTS = 14;
/** Relative width at which a distance counts as found. */
const FINE = 1e-7;
const MOST_STEPS = 40;

type Share = (angleRad: number, radiusM: number) => number;

interface Around {
  /** Where the first distance lies, and beyond which nothing is looked at, metres. */
  fromM: number;
  reachM: number;
}

/**
 * The greatest distance, over all directions, beyond which `shareAt` stays at most 1: 0 where it is nowhere above, null where it
 * still is at `reachM`. Directions are looked at every 15° and narrowed down around the worst.
 */
export function worstDistance(shareAt: Share, { fromM, reachM }: Around): number | null {
  const radii = radiiOf(fromM, reachM);
  const angles = Array.from({ length: DIRECTIONS }, (_, i) => i * STEP_RAD);
  const lasts = angles.map((angleRad) => radii.findLastIndex((radiusM) => shareAt(angleRad, radiusM) > 1));
  const last = Math.max(...lasts);
  if (last < 0) return 0;
  if (last === radii.length - 1) return null;
  const distanceAt = (angleRad: number): number => {
    // Between directions the distance moves by no more than a step or two of the scale.
    for (let at = Math.min(last + 1, radii.length - 2); at >= Math.max(0, last - 2); at--) {
      const [innerM, outerM] = [radii[at] as number, radii[at + 1] as number];
      if (shareAt(angleRad, innerM) > 1) return crossing((r) => shareAt(angleRad, r), innerM, outerM);
    }
    return 0;
  };
  const candidates = angles.filter((_, i) => lasts[i] === last);
  const distances = candidates.map((angleRad) => ({ angleRad, distanceM: distanceAt(angleRad) }));
  const worst = distances.reduce((most, next) => (next.distanceM > most.distanceM ? next : most));
  return refined(distanceAt, worst.angleRad, worst.distanceM);
}

function radiiOf(fromM: number, reachM: number): number[] {
  const count = Math.ceil(Math.log(reachM / fromM) / Math.log(GROWTH));
  return [...Array.from({ length: count }, (_, i) => fromM * GROWTH ** i), reachM];
}

/** Where the share falls to 1 between a distance above and one at or below it: the secant on logarithms, as fields fall by powers. */
function crossing(shareAt: (radiusM: number) => number, overM: number, keptM: number): number {
  let [left, right] = [Math.log(overM), Math.log(keptM)];
  let [above, below] = [Math.log(shareAt(overM)), Math.log(shareAt(keptM))];
  for (let step = 0; step < MOST_STEPS && right - left > FINE; step++) {
    const secant = left + ((right - left) * above) / (above - below);
    // Every third step halves, so that a bent curve narrows from both sides.
    const at = Number.isFinite(secant) && step % 3 !== 2 ? secant : (left + right) / 2;
    const value = Math.log(shareAt(Math.exp(at)));
    if (Math.abs(value) < FINE) return Math.exp(at);
    if (value > 0) [left, above] = [at, value];
    else [right, below] = [at, value];
  }
  return Math.exp(right);
}

/** Ternary search for the greatest distance one step to either side. */
function refined(distanceAt: (angleRad: number) => number, angleRad: number, distanceM: number): number {
  let [left, right] = [angleRad - STEP_RAD, angleRad + STEP_RAD];
  let most = distanceM;
  for (let i = 0; i < REFINEMENTS; i++) {
    const one = left + (right - left) / 3;
    const other = right - (right - left) / 3;
    const [atOne, atOther] = [distanceAt(one), distanceAt(other)];
    most = Math.max(most, atOne, atOther);
    if (atOne < atOther) left = one;
    else right = other;
  }
  return most;
}
