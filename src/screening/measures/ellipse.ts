/** The ellipse that a phasor vector traces, in rms terms: root of the sum of squares and semi-major axis with where it lies. */
export interface FieldEllipse {
  rms: number;
  major: number;
  /** Unit vector along the major axis; a zero vector where there is no field. */
  axis: readonly [number, number, number];
  /** Phase (rad) at which the field lies along `axis`. */
  phaseRad: number;
}

/**
 * Ellipse of the phasor at `groups[at..at+5]` (real x, y, z, imaginary x, y, z).
 * With B·B = P (complex, no conjugate), the squared semi-major axis is (|B|² + |P|)/2, reached at phase arg(P)/2.
 */
export function ellipseAt(groups: Float64Array, at: number): FieldEllipse {
  const [rx, ry, rz] = [groups[at] as number, groups[at + 1] as number, groups[at + 2] as number];
  const [ix, iy, iz] = [groups[at + 3] as number, groups[at + 4] as number, groups[at + 5] as number];
  const re2 = rx * rx + ry * ry + rz * rz;
  const im2 = ix * ix + iy * iy + iz * iz;
  const mixed = rx * ix + ry * iy + rz * iz;
  const phaseRad = Math.atan2(2 * mixed, re2 - im2) / 2;
  const cos = Math.cos(phaseRad);
  const sin = Math.sin(phaseRad);
  const [x, y, z] = [rx * cos + ix * sin, ry * cos + iy * sin, rz * cos + iz * sin];
  const major = Math.hypot(x, y, z);
  return {
    rms: Math.sqrt(re2 + im2),
    major,
    axis: major > 0 ? [x / major, y / major, z / major] : [0, 0, 0],
    phaseRad,
  };
}
