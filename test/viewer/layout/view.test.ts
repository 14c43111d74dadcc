import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  angleBetween,
  ballEvent,
  type Camera,
  clampCamera,
  coneOf,
  coneSilhouette,
  firstCamera,
  layStrands,
  orbit,
  pickPoint,
  projectionOf,
  projectPoints,
  radiusAt,
  ringPoints,
  rootScaleAt,
  scaleText,
  shells,
  stageOf,
  threeDigits,
  timeAtRadius,
  viewRotation,
  zoomAbout,
} from '../../../viewer/layout/index.ts';
import { anyEvent, denseEvent, directionOf, teraEvent } from './events.ts';

const cameras: fc.Arbitrary<Camera> = fc
  .record({
    azimuth: fc.double({ min: -10, max: 10, noNaN: true }),
    elevation: fc.double({ min: -2, max: 2, noNaN: true }),
    zoom: fc.double({ min: 0.1, max: 100, noNaN: true }),
    panX: fc.double({ min: -3, max: 3, noNaN: true }),
    panY: fc.double({ min: -3, max: 3, noNaN: true }),
  })
  .map(clampCamera);
const unitVectors = fc
  .tuple(fc.double({ min: -1, max: 1, noNaN: true }), fc.double({ min: 0, max: 6.28, noNaN: true }))
  .map(([z, phi]) => {
    const across = Math.sqrt(1 - z * z);
    return [across * Math.cos(phi), across * Math.sin(phi), z];
  });
const stage = stageOf(920, 830);
const project = (camera: Camera, point: readonly number[]): number[] => {
  const out = [0, 0, 0];
  projectPoints(out, projectionOf(camera, stage), point);
  return out;
};

describe('the camera', () => {
  it('turns without stretching: its rows are a right-handed set of unit vectors, beam upright', () => {
    fc.assert(
      fc.property(cameras, (camera) => {
        const r = new Float64Array(9);
        viewRotation(r, camera);
        const [x, y, z] = [r.slice(0, 3), r.slice(3, 6), r.slice(6, 9)];
        const product = (a: ArrayLike<number>, b: ArrayLike<number>): number =>
          a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
        for (const row of [x, y, z]) expect(product(row, row)).toBeCloseTo(1, 12);
        expect(product(x, y)).toBeCloseTo(0, 12);
        expect(x[0] * y[1] - x[1] * y[0]).toBeCloseTo(z[2], 12);
        expect(x[2]).toBe(0);
        expect(y[2]).toBeGreaterThan(0);
      }),
      { seed: 1 },
    );
  });

  it('keeps the point under the pointer where it is while it zooms', () => {
    fc.assert(
      fc.property(
        cameras,
        fc.nat(920),
        fc.nat(830),
        fc.double({ min: 0.5, max: 2, noNaN: true }),
        (camera, x, y, f) => {
          const zoomed = zoomAbout(camera, stage, x, y, f);
          fc.pre(
            Math.abs(zoomed.panX) < 0.5 + zoomed.zoom - 1e-9 &&
              Math.abs(zoomed.panY) < 0.5 + zoomed.zoom - 1e-9,
          );
          const before = projectionOf(camera, stage);
          const after = projectionOf(zoomed, stage);
          expect((x - before.x) / before.scale).toBeCloseTo((x - after.x) / after.scale, 9);
          expect((y - before.y) / before.scale).toBeCloseTo((y - after.y) / after.scale, 9);
        },
      ),
      { seed: 2 },
    );
  });

  it('takes the middle of the near side along with the pointer', () => {
    const camera: Camera = { azimuth: 1, elevation: 0, zoom: 2, panX: 0, panY: 0 };
    const r = new Float64Array(9);
    viewRotation(r, camera);
    const near = [...r.slice(6, 9)];
    const turned = orbit(camera, stage, 3, 0);
    const [x, y] = project(turned, near);
    const [x0, y0] = project(camera, near);
    expect(x - x0).toBeCloseTo(3, 3);
    expect(y - y0).toBeCloseTo(0, 6);
    expect(project(orbit(camera, stage, 0, 3), near)[1] - y0).toBeCloseTo(3, 3);
  });

  it('projects a shell as a circle: no point of the rim lies outside the radius of the stage', () => {
    fc.assert(
      fc.property(cameras, unitVectors, (camera, direction) => {
        const [x, y, depth] = project(camera, direction);
        const { x: cx, y: cy, scale } = projectionOf(camera, stage);
        const across = Math.hypot(x - cx, y - cy) / scale;
        expect(across * across + depth * depth).toBeCloseTo(1, 9);
      }),
      { seed: 3 },
    );
  });
});

describe('the first view', () => {
  it('is the same each time, and less crowded than the mean of random views', () => {
    for (const stream of [1, 4, 9]) {
      const strands = layStrands(teraEvent(stream));
      const chosen = firstCamera(strands);
      expect(firstCamera(strands)).toEqual(chosen);
      const crowding = (camera: Camera): number => {
        const points = [...strands.stepRadius].map((radius, step) =>
          project(
            camera,
            [...strands.stepDirection.slice(3 * step, 3 * step + 3)].map((u) => u * radius),
          ),
        );
        let sum = 0;
        for (const [k, a] of points.entries()) {
          for (const b of points.slice(0, k)) {
            const d = Math.hypot(a[0] - b[0], a[1] - b[1]) / (0.05 * stage.radius);
            sum += 1 / (1 + d * d);
          }
        }
        return sum;
      };
      const random = fc
        .sample(cameras, { numRuns: 60, seed: 4 })
        .map((camera) => ({ ...camera, zoom: 1, panX: 0, panY: 0 }));
      const mean = random.reduce((sum, camera) => sum + crowding(camera), 0) / random.length;
      expect(crowding(chosen)).toBeLessThan(mean);
    }
  });

  it('shows a selected cap about 50 degrees from the eye', () => {
    const strands = layStrands(teraEvent(9));
    const direction = strands.stepDirection.slice(9, 12);
    const r = new Float64Array(9);
    viewRotation(r, firstCamera(strands, direction));
    expect(Math.abs(angleBetween(r, 6, direction, 0) - (50 * Math.PI) / 180)).toBeLessThan(0.2);
  });

  it('is found for 300 branchings in well under a second', () => {
    const strands = layStrands(denseEvent());
    const begun = performance.now();
    firstCamera(strands);
    expect(performance.now() - begun).toBeLessThan(1000);
  });
});

describe('picking', () => {
  it('finds the nearest point in reach, as looking at all of them does', () => {
    const points = fc.array(fc.tuple(fc.integer({ min: 0, max: 100 }), fc.integer({ min: 0, max: 100 })), {
      maxLength: 40,
    });
    fc.assert(
      fc.property(points, fc.nat(100), fc.nat(100), (places, x, y) => {
        // Far enough apart that depth does not decide.
        const apart = places.filter(([a, b], k) =>
          places.slice(0, k).every(([c, d]) => Math.hypot(a - c, b - d) > 2.9),
        );
        const flat = Float64Array.from(apart.flatMap(([a, b]) => [a, b, 0]));
        const distances = apart.map(([a, b]) => Math.hypot(a - x, b - y));
        const picked = pickPoint(flat, apart.length, x, y, 10);
        const least = Math.min(...distances);
        if (!(least <= 10)) expect(picked).toBe(-1);
        else expect(distances[picked]).toBeLessThan(least + 1);
      }),
      { seed: 6, numRuns: 300 },
    );
  });

  it('takes the nearer to the eye of two that lie on each other', () => {
    expect(pickPoint([5, 5, -0.3, 5.2, 5, 0.4], 2, 5, 5, 10)).toBe(1);
    expect(pickPoint([5, 5, 0.3, 5.2, 5, -0.4], 2, 5, 5, 10)).toBe(0);
    expect(pickPoint([], 0, 5, 5, 10)).toBe(-1);
  });
});

describe('shells', () => {
  it('stand where the root of t has the value that they are labelled with', () => {
    fc.assert(
      fc.property(anyEvent, fc.double({ min: 0.02, max: 0.4, noNaN: true }), (history, gap) => {
        const { scale } = layStrands(history);
        const found = shells(scale, gap);
        for (const [k, { value, radius }] of found.entries()) {
          expect(radius).toBeCloseTo(radiusAt(scale, Math.log(history.head.hardScale / (value * value))), 10);
          expect(rootScaleAt(scale, timeAtRadius(scale, radius)) / value).toBeCloseTo(1, 10);
          expect(['1', '2', '3', '5']).toContain(String(value).replace(/[0.]/g, ''));
          if (k > 0) expect(radius - found[k - 1].radius).toBeGreaterThanOrEqual(gap);
        }
      }),
      { seed: 7, numRuns: 60 },
    );
  });

  it('and scales print as a physicist writes them', () => {
    expect([500, 0.5, 30_000, 1].map(scaleText)).toEqual(['500', '0.5', '30000', '1']);
    expect([1.2, 0.47, 1234, 12, 0.00012, 5e6, Number.NaN].map(threeDigits)).toEqual([
      '1.20',
      '0.470',
      '1230',
      '12.0',
      '1.20·10^{−4}',
      '5.00·10^{6}',
      '—',
    ]);
  });
});

describe('the cone of a step', () => {
  it('passes its rings through what one sees: the softer daughter and the partner', () => {
    for (const stream of [2, 3, 9]) {
      const event = ballEvent(teraEvent(stream));
      const { steps, entries } = event.history;
      for (let step = 0; step < steps.length; step++) {
        const cone = coneOf(event.history, event.strands, step, 1);
        const [i, j] = [steps.i[step], steps.j[step]];
        const softer = entries.e[i] < entries.e[j] ? i : j;
        for (const ring of cone.rings) {
          const through = { opening: softer, partner: steps.partner[step], birth: -1 }[ring.kind];
          if (through < 0) continue;
          const angle = angleBetween(ring.axis, 0, directionOf(event.history, through), 0);
          expect(angle).toBeCloseTo(ring.angle, 12);
        }
        const birth = cone.rings.find(({ kind }) => kind === 'birth')!;
        expect(birth.angle).toBe(1);
        expect(angleBetween(birth.axis, 0, directionOf(event.history, steps.emitter[step]), 0)).toBeLessThan(
          1e-12,
        );
      }
    }
  });

  it('has no birth ring for a parton of the hard process', () => {
    const event = ballEvent(teraEvent(2));
    const kinds = coneOf(event.history, event.strands, 0, Math.PI).rings.map(({ kind }) => kind);
    expect(kinds).toEqual(['opening', 'partner']);
  });

  it('draws rings as circles of constant angle, and silhouettes that the eye grazes', () => {
    fc.assert(
      fc.property(
        unitVectors,
        unitVectors,
        fc.double({ min: 0.01, max: 1.5, noNaN: true }),
        (axis, eye, angle) => {
          const ring = ringPoints(axis, angle, 24);
          for (let k = 0; k < ring.length; k += 3)
            expect(angleBetween(ring, k, axis, 0)).toBeCloseTo(angle, 9);
          expect([...ring.slice(0, 3)]).toEqual([...ring.slice(-3)]);
          const touching = coneSilhouette(axis, angle, eye);
          const between = angleBetween(axis, 0, eye, 0);
          if (!touching) {
            expect(Math.min(between, Math.PI - between)).toBeLessThan(angle + 1e-6);
            return;
          }
          for (const at of [0, 3]) {
            const p = touching.subarray(at, at + 3);
            expect(angleBetween(p, 0, axis, 0)).toBeCloseTo(angle, 6);
            // The cone's normal there, axis - cos(angle) p, is at right angles to the eye.
            const facing = [0, 1, 2].reduce((sum, k) => sum + (axis[k] - Math.cos(angle) * p[k]) * eye[k], 0);
            expect(facing).toBeCloseTo(0, 6);
          }
        },
      ),
      { seed: 8 },
    );
  });
});
