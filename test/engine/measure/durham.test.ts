import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { durham, jetCount } from '../../../engine/measure/index.ts';
import { equalPartons, packed, SYMMETRIC_EVENTS, WORKED_EVENTS } from './worked-events.ts';

/** The definition taken literally: all pairs anew after every merging, angles from the arccosine. */
function durhamFromScratch(momenta: Float64Array, sqrtS: number): number[] {
  let jets = Array.from({ length: momenta.length / 4 }, (_, k) => [...momenta.subarray(4 * k, 4 * k + 4)]);
  const transitions: number[] = [];
  while (jets.length > 1) {
    let best = { y: Infinity, a: 0, b: 0 };
    for (let a = 0; a < jets.length; a++)
      for (let b = 0; b < a; b++) {
        const [p, q] = [jets[a], jets[b]];
        const dot = p[0] * q[0] + p[1] * q[1] + p[2] * q[2];
        const cosine = dot / (Math.hypot(p[0], p[1], p[2]) * Math.hypot(q[0], q[1], q[2]));
        const y = (2 * Math.min(p[3], q[3]) ** 2 * (1 - cosine)) / sqrtS ** 2;
        if (y < best.y) best = { y, a, b };
      }
    transitions.unshift(best.y);
    const merged = jets[best.a].map((c, n) => c + jets[best.b][n]);
    jets = jets.filter((_, k) => k !== best.a && k !== best.b).concat([merged]);
  }
  return transitions;
}

describe('Durham clustering', () => {
  it.each(WORKED_EVENTS)('gives the transitions of the worked event $name to 1e-14', (event) => {
    const found = durham(packed(event.partons), event.sqrtS);
    expect(found.length).toBe(event.durham.length);
    event.durham.forEach((y, n) => {
      expect(Math.abs(found[n] - y)).toBeLessThan(1e-14);
    });
  });

  it.each(SYMMETRIC_EVENTS)('gives the first distance of a $name in closed form', (event) => {
    const found = durham(equalPartons(event.directions), 1);
    expect(Math.abs(found[found.length - 1] - event.firstY)).toBeLessThan(1e-15);
  });

  it('of two partons of half the energy each is (1 - cos)/2', () => {
    const found = durham(
      packed([
        [1, 1, 0, 0],
        [1, Math.cos(0.3), Math.sin(0.3), 0],
      ]),
      2,
    );
    expect(Math.abs(found[0] - Math.sin(0.15) ** 2)).toBeLessThan(1e-15);
  });

  it('keeps the digits of a pair 1e-6 apart', () => {
    const found = durham(
      packed([
        [1, 1, 0, 0],
        [1, Math.cos(1e-6), Math.sin(1e-6), 0],
      ]),
      2,
    );
    expect(Math.abs(found[0] / Math.sin(5e-7) ** 2 - 1)).toBeLessThan(1e-9);
  });

  it('agrees with clustering all pairs anew for up to 40 partons', () => {
    const unit = fc.integer({ min: -100000, max: 100000 });
    const partons = fc.array(fc.tuple(unit, unit, unit, fc.integer({ min: 1, max: 200 })), {
      minLength: 2,
      maxLength: 40,
    });
    fc.assert(
      fc.property(partons, (list) => {
        const momenta = packed(
          list.map(([x, y, z, n]) => {
            const p = [x / n, y / n, (z + 0.5) / n];
            return [Math.hypot(p[0], p[1], p[2]), ...p];
          }),
        );
        const slow = durhamFromScratch(momenta, 1e5);
        const fast = durham(momenta, 1e5);
        const scale = Math.max(...slow);
        slow.forEach((y, n) => {
          expect(Math.abs(fast[n] - y)).toBeLessThan(1e-12 * scale);
        });
      }),
      { seed: 6, numRuns: 200 },
    );
  });

  it('counts the jets at a resolution, at a transition itself the larger number', () => {
    const [event] = WORKED_EVENTS;
    const transitions = durham(packed(event.partons), event.sqrtS);
    expect(jetCount(transitions, 1)).toBe(1);
    expect(jetCount(transitions, 0.3)).toBe(2);
    expect(jetCount(transitions, 0.1)).toBe(3);
    expect(jetCount(transitions, 0.001)).toBe(4);
    expect(jetCount(transitions, transitions[1])).toBe(3);
  });

  it('has no transition for fewer than two partons', () => {
    expect(durham(new Float64Array(0), 91).length).toBe(0);
    expect(durham(packed([[3, 1, 2, 2]]), 91).length).toBe(0);
    expect(jetCount(new Float64Array(0), 0.1)).toBe(1);
  });
});
