/**
 * The field of packed straight segments, two points a lane pair (AssemblyScript; compiled by scripts/build-kernel.ts).
 *
 * The formula, the inside of conductors and the order of every operation are those of addSegmentField in
 * ../segment.ts, so each lane gives the same bits. Points and segments are laid out by packed-chunk.ts:
 *
 * - points: x, y, z (m) a point; an even number of them.
 * - runs (i32): for each set the number of its runs, then for each run the number of its segments. A run is a chain of
 *   segments each of which starts where the one before ends, so that the distance to a shared vertex is found once.
 * - rows: for each run its first vertex x, y, z (m), then ROW bytes a segment: its end x, y, z and ℓ = end − start
 *   (m), R²ℓ² (m⁴), μ₀/4π times the share of the set's current (T·m/A), R² (m²).
 */

const ROW: usize = 72;
const INSIDE_LIMIT: usize = 48;
const WEIGHT: usize = 56;
const RADIUS_SQUARED: usize = 64;

@inline
function splat(at: usize): v128 {
  return v128.load_splat<f64>(at);
}

@inline
function dot(ax: v128, ay: v128, az: v128, bx: v128, by: v128, bz: v128): v128 {
  return f64x2.add(f64x2.add(f64x2.mul(ax, bx), f64x2.mul(ay, by)), f64x2.mul(az, bz));
}

/** insideInverse of ../segment.ts; `alongA` = a·ℓ and `alongB` = b·ℓ, `sum` = |a||b| + |a·b|. */
function insideInverse(
  row: usize,
  c2: v128,
  product: v128,
  inner: v128,
  sum: v128,
  a2: v128,
  b2: v128,
  alongA: v128,
  alongB: v128,
): v128 {
  const zero = f64x2.splat(0);
  const limit = splat(row + INSIDE_LIMIT);
  const pastStart = f64x2.lt(alongA, zero);
  const pastEnd = f64x2.gt(alongB, zero);
  const obtuse = f64x2.lt(inner, zero);
  const signedSum = f64x2.add(product, inner);
  const overhang2 = v128.bitselect(a2, b2, pastStart);
  const share = f64x2.min(f64x2.splat(1), f64x2.div(overhang2, splat(row + RADIUS_SQUARED)));
  const past = f64x2.div(share, signedSum);
  const beside = f64x2.div(
    v128.bitselect(sum, c2, obtuse),
    v128.bitselect(limit, f64x2.mul(limit, signedSum), obtuse),
  );
  return v128.bitselect(past, beside, v128.or(pastStart, pastEnd));
}

/**
 * The field at `pairs` pairs of points.
 *
 * With `currents` = 0: for 1 A in each set, x, y, z (T) of point p of the block in set k at `out` + k·`setStride` + 24p.
 * Otherwise `currents` holds re, im (A) a set, and re x, im x, re y, im y, re z, im z (T) of point p, summed over the sets
 * in order, are added to what stands at `out` + 48p.
 */
export function fill(
  points: usize,
  pairs: i32,
  runs: usize,
  sets: i32,
  rows: usize,
  currents: usize,
  out: usize,
  setStride: usize,
): void {
  const zero = f64x2.splat(0);
  const one = f64x2.splat(1);
  for (let pair = 0; pair < pairs; pair++, points += 48) {
    const p0 = v128.load(points);
    const p1 = v128.load(points, 16);
    const p2 = v128.load(points, 32);
    const x = v128.shuffle<f64>(p0, p1, 0, 3);
    const y = v128.shuffle<f64>(p0, p2, 1, 2);
    const z = v128.shuffle<f64>(p1, p2, 0, 3);
    let row = rows;
    let run = runs;
    let current = currents;
    let influence = out + <usize>pair * 48;
    let reX = zero, imX = zero, reY = zero, imY = zero, reZ = zero, imZ = zero;
    if (currents) {
      const at = out + <usize>pair * 96;
      const s0 = v128.load(at), s1 = v128.load(at, 16), s2 = v128.load(at, 32);
      const t0 = v128.load(at, 48), t1 = v128.load(at, 64), t2 = v128.load(at, 80);
      reX = v128.shuffle<f64>(s0, t0, 0, 2);
      imX = v128.shuffle<f64>(s0, t0, 1, 3);
      reY = v128.shuffle<f64>(s1, t1, 0, 2);
      imY = v128.shuffle<f64>(s1, t1, 1, 3);
      reZ = v128.shuffle<f64>(s2, t2, 0, 2);
      imZ = v128.shuffle<f64>(s2, t2, 1, 3);
    }
    for (let set = 0; set < sets; set++) {
      let gx = zero, gy = zero, gz = zero;
      let runsLeft = load<i32>(run);
      run += 4;
      for (; runsLeft > 0; runsLeft--) {
        const segments = <usize>load<i32>(run);
        run += 4;
        let ax = f64x2.sub(x, splat(row));
        let ay = f64x2.sub(y, splat(row + 8));
        let az = f64x2.sub(z, splat(row + 16));
        let a2 = dot(ax, ay, az, ax, ay, az);
        let lengthA = f64x2.sqrt(a2);
        row += 24;
        for (const end = row + segments * ROW; row < end; row += ROW) {
          const bx = f64x2.sub(x, splat(row));
          const by = f64x2.sub(y, splat(row + 8));
          const bz = f64x2.sub(z, splat(row + 16));
          const lx = splat(row + 24);
          const ly = splat(row + 32);
          const lz = splat(row + 40);
          const b2 = dot(bx, by, bz, bx, by, bz);
          const lengthB = f64x2.sqrt(b2);
          const nearStart = f64x2.le(a2, b2);
          const sx = v128.bitselect(ax, bx, nearStart);
          const sy = v128.bitselect(ay, by, nearStart);
          const sz = v128.bitselect(az, bz, nearStart);
          const cx = f64x2.sub(f64x2.mul(ly, sz), f64x2.mul(lz, sy));
          const cy = f64x2.sub(f64x2.mul(lz, sx), f64x2.mul(lx, sz));
          const cz = f64x2.sub(f64x2.mul(lx, sy), f64x2.mul(ly, sx));
          const c2 = dot(cx, cy, cz, cx, cy, cz);
          const inner = dot(ax, ay, az, bx, by, bz);
          const obtuse = f64x2.lt(inner, zero);
          const product = f64x2.mul(lengthA, lengthB);
          // |a||b| − a·b where a·b < 0, |a||b| + a·b elsewhere.
          const sum = f64x2.add(product, f64x2.abs(inner));
          const outside = f64x2.div(v128.bitselect(sum, one, obtuse), v128.bitselect(c2, sum, obtuse));
          const weighted = f64x2.mul(splat(row + WEIGHT), f64x2.add(lengthA, lengthB));
          const limit = splat(row + INSIDE_LIMIT);
          let k = f64x2.div(f64x2.mul(weighted, outside), product);
          if (v128.any_true(f64x2.le(c2, limit))) {
            const alongA = dot(ax, ay, az, lx, ly, lz);
            const alongB = dot(bx, by, bz, lx, ly, lz);
            const inside = insideInverse(row, c2, product, inner, sum, a2, b2, alongA, alongB);
            const inverse = v128.bitselect(inside, outside, f64x2.lt(c2, limit));
            k = f64x2.div(f64x2.mul(weighted, inverse), product);
            // No field, rather than 0 · ∞, on end points and on segments without length or thickness.
            k = v128.and(k, f64x2.eq(f64x2.sub(k, k), zero));
          }
          gx = f64x2.add(gx, f64x2.mul(k, cx));
          gy = f64x2.add(gy, f64x2.mul(k, cy));
          gz = f64x2.add(gz, f64x2.mul(k, cz));
          ax = bx;
          ay = by;
          az = bz;
          a2 = b2;
          lengthA = lengthB;
        }
      }
      if (currents) {
        const re = splat(current);
        const im = splat(current + 8);
        current += 16;
        reX = f64x2.add(reX, f64x2.mul(re, gx));
        imX = f64x2.add(imX, f64x2.mul(im, gx));
        reY = f64x2.add(reY, f64x2.mul(re, gy));
        imY = f64x2.add(imY, f64x2.mul(im, gy));
        reZ = f64x2.add(reZ, f64x2.mul(re, gz));
        imZ = f64x2.add(imZ, f64x2.mul(im, gz));
      } else {
        v128.store(influence, v128.shuffle<f64>(gx, gy, 0, 2));
        v128.store(influence, v128.shuffle<f64>(gz, gx, 0, 3), 16);
        v128.store(influence, v128.shuffle<f64>(gy, gz, 1, 3), 32);
        influence += setStride;
      }
    }
    if (currents) {
      const at = out + <usize>pair * 96;
      v128.store(at, v128.shuffle<f64>(reX, imX, 0, 2));
      v128.store(at, v128.shuffle<f64>(reY, imY, 0, 2), 16);
      v128.store(at, v128.shuffle<f64>(reZ, imZ, 0, 2), 32);
      v128.store(at, v128.shuffle<f64>(reX, imX, 1, 3), 48);
      v128.store(at, v128.shuffle<f64>(reY, imY, 1, 3), 64);
      v128.store(at, v128.shuffle<f64>(reZ, imZ, 1, 3), 80);
    }
  }
}
