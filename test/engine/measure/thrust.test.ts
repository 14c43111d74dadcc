import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { thrust } from '../../../engine/measure/index.ts';
import { equalPartons, packed, SYMMETRIC_EVENTS, WORKED_EVENTS } from './worked-events.ts';

/** The longest sum over all patterns of signs, the slow way. */
function thrustOfAllPartitions(momenta: Float64Array): number {
  const n = momenta.length / 4;
  let longest = 0;
  let total = 0;
  for (let k = 0; k < n; k++) total += Math.hypot(momenta[4 * k], momenta[4 * k + 1], momenta[4 * k + 2]);
  for (let pattern = 0; pattern < 2 ** (n - 1); pattern++) {
    const sum = [0, 0, 0];
    for (let k = 0; k < n; k++)
      for (let c = 0; c < 3; c++) sum[c] += (pattern >> k) & 1 ? -momenta[4 * k + c] : momenta[4 * k + c];
    longest = Math.max(longest, Math.hypot(sum[0], sum[1], sum[2]));
  }
  return longest / total;
}

/** Sum |p.n| / Sum |p|. */
function projection(momenta: Float64Array, axis: ArrayLike<number>): number {
  let along = 0;
  let total = 0;
  for (let at = 0; at < momenta.length; at += 4) {
    along += Math.abs(momenta[at] * axis[0] + momenta[at + 1] * axis[1] + momenta[at + 2] * axis[2]);
    total += Math.hypot(momenta[at], momenta[at + 1], momenta[at + 2]);
  }
  return along / total;
}

const unit = fc.integer({ min: -1000, max: 1000 });
/** Momenta on a coarse grid, so that collinear, coplanar and tied ones are common. */
const events = (from: number, to: number) =>
  fc
    .array(fc.tuple(unit, unit, unit, fc.integer({ min: 1, max: 60 })), { minLength: from, maxLength: to })
    .map((list) =>
      packed(
        list.map(([x, y, z, n]) => {
          // a third of them rounded to a few directions
          const step = n % 3 === 0 ? 500 : 1;
          const p = [x, y, z].map((c) => (Math.round(c / step) * step) / n);
          return [Math.hypot(p[0], p[1], p[2]), ...p];
        }),
      ),
    )
    .filter((momenta) => momenta.some((value) => value !== 0));

describe('thrust', () => {
  it.each(WORKED_EVENTS)('is that of the worked event $name to 1e-14', (event) => {
    const found = thrust(packed(event.partons));
    expect(Math.abs(found.value - event.thrust)).toBeLessThan(1e-14);
    if (event.axis === null) return;
    const cosine = event.axis.reduce((sum, c, n) => sum + c * found.axis[n], 0);
    expect(Math.abs(Math.abs(cosine) - 1)).toBeLessThan(1e-14);
  });

  it.each(SYMMETRIC_EVENTS)('of a $name is the closed form, ties and collinear momenta included', (event) => {
    expect(Math.abs(thrust(equalPartons(event.directions)).value - event.thrust)).toBeLessThan(1e-15);
  });

  it('of three massless partons is the largest energy fraction', () => {
    const x = [0.9, 0.7, 0.4];
    const angle = (a: number, b: number, c: number) => Math.acos((c * c - a * a - b * b) / (2 * a * b));
    const second = angle(x[0], x[1], x[2]);
    const third = -angle(x[0], x[2], x[1]);
    const momenta = packed([
      [x[0], x[0], 0, 0],
      [x[1], x[1] * Math.cos(second), x[1] * Math.sin(second), 0],
      [x[2], x[2] * Math.cos(third), x[2] * Math.sin(third), 0],
    ]);
    expect(Math.abs(thrust(momenta).value - 0.9)).toBeLessThan(1e-14);
  });

  it('is the best of all partitions, below and above the number of momenta at which the method changes', () => {
    fc.assert(
      fc.property(events(1, 15), (momenta) => {
        expect(Math.abs(thrust(momenta).value - thrustOfAllPartitions(momenta))).toBeLessThan(1e-14);
      }),
      { seed: 3, numRuns: 300 },
    );
  });

  it('is reached along its axis and beaten along no other direction, for many momenta', () => {
    fc.assert(
      fc.property(
        events(16, 60),
        fc.array(fc.tuple(unit, unit, unit), { minLength: 20, maxLength: 20 }),
        (momenta, tries) => {
          const found = thrust(momenta);
          expect(Math.abs(projection(momenta, found.axis) - found.value)).toBeLessThan(1e-13);
          for (const direction of tries) {
            const length = Math.hypot(...direction) || 1;
            // from any direction uphill: the axis of each partition is at least as good as the direction that made it
            let axis = direction.map((c) => c / length);
            for (let climb = 0; climb < 20; climb++) {
              const sum = [0, 0, 0];
              for (let at = 0; at < momenta.length; at += 4) {
                const along = axis.reduce((s, c, n) => s + c * momenta[at + n], 0);
                for (let c = 0; c < 3; c++) sum[c] += along < 0 ? -momenta[at + c] : momenta[at + c];
              }
              const size = Math.hypot(sum[0], sum[1], sum[2]);
              axis = sum.map((c) => c / size);
            }
            expect(projection(momenta, axis)).toBeLessThanOrEqual(found.value + 1e-13);
          }
        },
      ),
      { seed: 4, numRuns: 60 },
    );
  });

  it('does not depend on the order of the momenta', () => {
    fc.assert(
      fc.property(events(12, 30), (momenta) => {
        const reversed = Float64Array.from(
          { length: momenta.length },
          (_, at) => momenta[momenta.length - 4 - (at & ~3) + (at & 3)],
        );
        expect(Math.abs(thrust(reversed).value - thrust(momenta).value)).toBeLessThan(1e-14);
      }),
      { seed: 5, numRuns: 100 },
    );
  });

  it('is NaN without momenta, 1 for one', () => {
    expect(thrust(new Float64Array(0)).value).toBeNaN();
    expect(thrust(packed([[0, 0, 0, 0]])).value).toBeNaN();
    expect(thrust(packed([[3, 1, 2, 2]])).value).toBe(1);
  });
});
