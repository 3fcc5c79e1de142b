import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { offsetPath, sectionFrames, type SectionFrames } from "./section-frames";
import { cross, distance, dot, subtract, unit, type Vector } from "./vector";

function frames(path: Vector[]): SectionFrames {
  const framed = sectionFrames(path);
  if (!framed.ok) throw new Error(framed.message);
  return framed.frames;
}

function offset(path: Vector[], p: number, q: number): Vector[] {
  const line = offsetPath(frames(path), p, q);
  if (!line.ok) throw new Error(line.message);
  return line.points;
}

const close = (a: Vector, b: Vector) => expect(distance(a, b)).toBeLessThan(1e-12);

describe("sectionFrames", () => {
  it("puts u to the right and v up on a level leg, u along +x on a vertical one", () => {
    const [level] = frames([
      [0, 0, 0],
      [5, 0, 0],
    ]).legs;
    close(level?.u ?? [0, 0, 0], [0, -1, 0]);
    close(level?.v ?? [0, 0, 0], [0, 0, 1]);
    const [riser] = frames([
      [0, 0, 0],
      [0, 0, 3],
    ]).legs;
    close(riser?.u ?? [0, 0, 0], [1, 0, 0]);
    const [nearly] = frames([
      [0, 0, 0],
      [0.01, 0, 3],
    ]).legs;
    expect(dot(nearly?.u ?? [0, 0, 0], [1, 0, 0])).toBeGreaterThan(0.999);
  });

  it("merges collinear legs and drops segments of zero length", () => {
    const { legs, zeroSegments } = frames([
      [0, 0, 0],
      [1, 0, 0],
      [1, 0, 0],
      [3, 0, 0],
      [3, 2, 0],
    ]);
    expect(legs.map((leg) => leg.lengthM)).toEqual([3, 2]);
    expect(zeroSegments).toBe(1);
  });

  it("refuses a turn of 180° and a path without extent", () => {
    expect(
      sectionFrames([
        [0, 0, 0],
        [1, 0, 0],
        [0.5, 0, 0],
      ]),
    ).toMatchObject({ ok: false });
    expect(
      sectionFrames([
        [1, 1, 1],
        [1, 1, 1],
      ]),
    ).toMatchObject({ ok: false });
  });

  it("does not twist about the path: frames stay orthonormal and turn in the plane of each bend", () => {
    const coordinate = fc.double({ min: -10, max: 10, noNaN: true });
    const path = fc.array(fc.tuple(coordinate, coordinate, coordinate), { minLength: 3, maxLength: 8 });
    fc.assert(
      fc.property(path, (points) => {
        const framed = sectionFrames(points);
        fc.pre(framed.ok);
        framed.frames.legs.forEach((leg, index) => {
          expect(dot(leg.u, leg.t)).toBeCloseTo(0, 10);
          expect(distance(cross(leg.u, leg.t), leg.v)).toBeLessThan(1e-10);
          const next = framed.frames.legs[index + 1];
          if (!next || Math.abs(dot(leg.t, next.t)) > 0.999999) return;
          const axis = unit(cross(leg.t, next.t));
          expect(dot(leg.u, axis)).toBeCloseTo(dot(next.u, axis), 6);
        });
      }),
    );
  });
});

describe("offsetPath", () => {
  it("meets in the bisector plane of a right-angled bend", () => {
    // Right of +x is −y; after the left turn to +y, right is +x.
    const line = offset(
      [
        [0, 0, 0],
        [4, 0, 0],
        [4, 3, 0],
      ],
      0.1,
      0.2,
    );
    [
      [0, -0.1, 0.2],
      [4.1, -0.1, 0.2],
      [4.1, 3, 0.2],
    ].forEach((expected, index) => close(line[index] ?? [9, 9, 9], expected as unknown as Vector));
  });

  it("keeps conductors parallel to the path up a riser", () => {
    const path: Vector[] = [
      [0, 0, 0],
      [4, 0, 0],
      [4, 0, 3],
      [4, 2, 3],
    ];
    const line = offset(path, 0.05, -0.02);
    line.slice(1).forEach((to, index) => {
      const from = line[index] ?? to;
      const leg = frames(path).legs[index];
      close(unit(subtract(to, from)), leg?.t ?? [0, 0, 0]);
    });
  });

  it("bevels above 120° and says so", () => {
    const sharp: Vector[] = [
      [0, 0, 0],
      [4, 0, 0],
      [1, 1, 0],
    ];
    expect(frames(sharp).bevelled).toEqual([true]);
    expect(offset(sharp, 0.1, 0)).toHaveLength(4);
    expect(
      frames([
        [0, 0, 0],
        [4, 0, 0],
        [3, 2, 0],
      ]).bevelled,
    ).toEqual([false]);
  });

  it("refuses a leg that its mitres would reverse", () => {
    const jog = frames([
      [0, 0, 0],
      [4, 0, 0],
      [4, 0.1, 0],
      [0, 0.1, 0],
    ]);
    expect(offsetPath(jog, -0.2, 0)).toMatchObject({ ok: false });
    expect(offsetPath(jog, 0.2, 0)).toMatchObject({ ok: true });
  });
});
