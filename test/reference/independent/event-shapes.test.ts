import { describe, expect, it } from 'vitest';
import {
  durhamTransitions,
  type Four,
  Generator,
  jetCount,
  space,
  thrustByPlanes,
  thrustBySubsets,
} from './index.ts';

// references.md section 13, written (E, px, py, pz) there.
const turn = (rows: number[][]): Four[] => rows.map(([e, x, y, z]) => [x, y, z, e] as Four);
const A = turn([
  [7, 2, 3, 6],
  [3, -1, 2, -2],
  [9, -4, -8, 1],
  [7, 3, 3, -5],
]);
const B = turn([
  [15, 2, 10, 11],
  [11, -6, -2, 9],
  [7, 6, 3, -2],
  [9, -1, -4, -8],
  [13, -1, -7, -10],
]);
const C = turn([
  [21, 4, 8, 19],
  [15, 10, 2, 11],
  [3, 2, 1, -2],
  [11, -6, 9, -2],
  [25, -9, -12, -20],
  [11, -1, -8, -6],
]);

function closeTo(found: number[], wanted: number[]): void {
  expect(found.length).toBe(wanted.length);
  found.forEach((value, n) => {
    expect(value).toBeCloseTo(wanted[n], 12);
  });
}

describe('the independent event shapes', () => {
  it('give the Durham transitions of the worked events', () => {
    closeTo(durhamTransitions(A, 26), [0.479289940828402, 0.198904320265467, 0.00903123005037993]);
    closeTo(durhamTransitions(B, 55), [0.64, 0.077127033792086, 0.0262258953168044, 0.000596155643629802]);
    closeTo(
      durhamTransitions(C, 86),
      [0.822606814494321, 0.0373650496158457, 0.00965773004712972, 0.00382059456450955, 0.00210924824229313],
    );
    expect(jetCount(durhamTransitions(C, 86), 0.003)).toBe(5);
    expect(jetCount(durhamTransitions(C, 86), 0.9)).toBe(1);
  });

  it('give the thrust of the worked events', () => {
    expect(thrustByPlanes(A.map(space))).toBeCloseTo(0.704295932586679, 12);
    expect(thrustByPlanes(B.map(space))).toBeCloseTo(0.807739453914132, 12);
    expect(thrustByPlanes(C.map(space))).toBeCloseTo(0.817653807192462, 12);
  });

  it('give the same thrust by planes as by every sign choice', () => {
    const random = new Generator(3);
    for (let n = 0; n < 200; n++) {
      const momenta = Array.from(
        { length: 2 + (n % 8) },
        () => [random.uniform() - 0.5, random.uniform() - 0.5, random.uniform() - 0.5] as const,
      );
      expect(thrustByPlanes(momenta)).toBeCloseTo(thrustBySubsets(momenta), 13);
    }
  });
});
