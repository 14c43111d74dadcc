import { describe, expect, it } from 'vitest';
import { exp } from '../../../engine/math/index.ts';
import { EndPhaseSpace } from '../../../engine/probability/end-phase-space.ts';
import { Strength } from '../../../engine/probability/strength.ts';
import { MassiveDensity, MasslessDensity } from '../../../engine/probability/z-density.ts';
import {
  kernelGluon,
  kernelGluonToQuarks,
  kernelQuark,
  MassivePoint,
  scalarToGluons,
} from '../../../engine/qcd/index.ts';
import { uniforms } from '../measure/random-numbers.ts';
import { MASSES, settingsOf } from './families.ts';

const out = new Float64Array(3);
const fixed = new Strength(settingsOf({ coupling: { kind: 'fixed', value: 2 * Math.PI } }));

describe('the densities in z', () => {
  it.each([false, true])('of massless ends are the kernels of engine/qcd, virtuality %s', (virtuality) => {
    const random = uniforms(2);
    const density = new MasslessDensity(virtuality, fixed, scalarToGluons);
    for (let n = 0; n < 200; n++) {
      const [z, y, q2] = [random(), random(), 1e4];
      density.begin(virtuality ? y * q2 : z * (1 - z) * y * q2, q2);
      density.fill(out, Float64Array.of(z), Float64Array.of(1 - z), 1);
      const emission = (1 - y) * scalarToGluons.emission(z, y);
      const splitting = (1 - y) * scalarToGluons.splitting(z, y);
      expect(out[0] / (emission * kernelQuark(z, y))).toBeCloseTo(1, 11);
      expect(out[1] / (emission * kernelGluon(z, y))).toBeCloseTo(1, 11);
      expect(out[2] / (splitting * kernelGluonToQuarks(z, y))).toBeCloseTo(1, 11);
    }
  });

  it('of massive ends, and phase space, are those of the point that the shower uses', () => {
    const random = uniforms(3);
    let inside = 0;
    let negative = 0;
    for (let n = 0; n < 40_000; n++) {
      const [name, masses, channels] = MASSES[n % MASSES.length];
      const virtuality = random() < 0.5;
      const factors = random() < 0.5 ? 'unit' : 'published';
      const q2 = 20 * exp(6 * random());
      const t = q2 * exp(-8 * random());
      const z = random();
      const w = 1 - z;
      const point = new MassivePoint(virtuality, factors);
      point.q2 = q2;
      point.mij2 = masses.emitter ** 2;
      point.mk2 = masses.partner ** 2;
      point.mi2 = masses.i ** 2;
      point.mj2 = masses.j ** 2;
      const found = point.find(channels[0], t, z, w);
      // the largest cutoff that changes nothing
      const space = new EndPhaseSpace(virtuality, masses);
      const b = 0.5 * Math.log(z / w);
      const open = space.open(t, q2, 1e-12) && b > space.low && b < space.high;
      expect(open, `${name}, virtuality ${virtuality}, q2 ${q2}, t ${t}, z ${z}`).toBe(found);
      if (!found) continue;
      inside++;
      const density = new MassiveDensity(virtuality, factors, fixed, masses, channels);
      density.begin(t, q2);
      density.fill(out, Float64Array.of(z), Float64Array.of(w), 1);
      for (let c = 0; c < channels.length; c++) {
        point.find(channels[c], t, z, w);
        if (out[c] < 0) negative++;
        // the difference of the kernel's terms loses digits where they cancel
        const scale = 1e-9 * Math.max(point.rate, 1e-2);
        expect(Math.abs(Math.max(0, out[c]) - point.rate), `${name} ${channels[c]}`).toBeLessThan(scale);
      }
    }
    expect(inside).toBeGreaterThan(5000);
    expect(negative).toBeGreaterThan(100);
  });
});
