import { describe, expect, it } from 'vitest';
import {
  growEvent,
  type History,
  HistoryBatch,
  RegrowError,
  resolveSettings,
  STEP_COLUMNS,
} from '../../../../engine/index.ts';
import { coherentBatch, coherentEvent, firstDifference, makeShower, SAMPLES, type Sample } from './events.ts';

function regrown(sample: Sample, original: History, keep: number, stream: number): History {
  const shower = makeShower(sample);
  const batch = new HistoryBatch(shower.sample);
  shower.regrow(batch, original, keep, stream, 0);
  return batch.view(0);
}

describe('regrowing one-to-two branchings', () => {
  it.each(SAMPLES)(
    'with its own numbers gives every event back bit for bit, from every step: %o',
    (sample) => {
      const shower = makeShower({ ...sample, seed: 4 });
      const batch = new HistoryBatch(shower.sample);
      for (let event = 0; event < 20; event++) {
        batch.clear();
        shower.grow(batch, event);
        const { length } = batch.steps;
        for (let keep = -1; keep < length; keep++) shower.regrow(batch, batch.view(0), keep, event, 0);
        for (let n = 1; n < batch.events.length; n++)
          expect(firstDifference(batch.view(n), batch.view(0))).toBe('');
      }
    },
  );

  it('gives events back that were begun again because their jets were too heavy', () => {
    const sample: Sample = {
      coherent: true,
      energy: 40,
      coupling: { kind: 'fixed', value: 0.4 },
      trials: true,
    };
    const shower = makeShower(sample);
    const batch = new HistoryBatch(shower.sample);
    let begunAgain = 0;
    for (let event = 0; event < 2000; event++) {
      batch.clear();
      shower.grow(batch, event);
      if (!batch.view(0).head.regrown) continue;
      begunAgain++;
      shower.regrow(batch, batch.view(0), Math.min(1, batch.steps.length - 1), event, 0);
      expect(firstDifference(batch.view(1), batch.view(0))).toBe('');
      expect(batch.view(1).trials).toEqual(batch.view(0).trials);
    }
    expect(begunAgain).toBeGreaterThan(2);
  });

  it('with other numbers keeps what was generated of the first steps and changes the rest', () => {
    for (const sample of SAMPLES) {
      const batch = coherentBatch(sample, 50);
      const original = [...Array(50).keys()].map((n) => batch.view(n)).find(({ steps }) => steps.length > 2)!;
      const other = regrown({ ...sample, seed: 99 }, original, 1, 3);
      for (const { name } of STEP_COLUMNS)
        expect(other.steps[name].subarray(0, 2), name).toEqual(original.steps[name].subarray(0, 2));
      expect(other.steps.t[2]).not.toBe(original.steps.t[2]);
      for (let step = 2; step < other.steps.length; step++)
        expect(other.steps.t[step]).toBeLessThanOrEqual(original.steps.t[1]);
    }
  });

  it('once more with the same other numbers gives the regrown event back', () => {
    for (const sample of SAMPLES) {
      if (!sample.coherent) continue;
      const originals = coherentBatch(sample, 12);
      const shower = makeShower({ ...sample, seed: 99 });
      const batch = new HistoryBatch(shower.sample);
      for (let n = 0; n < 12; n++) {
        const original = originals.view(n);
        if (original.steps.length < 2) continue;
        batch.clear();
        shower.regrow(batch, original, 0, 3, 0);
        const { length } = batch.steps;
        for (let keep = 0; keep < length; keep++) shower.regrow(batch, batch.view(0), keep, 3, 0);
        for (let k = 1; k < batch.events.length; k++)
          expect(firstDifference(batch.view(k), batch.view(0))).toBe('');
      }
    }
  });

  it('refuses what it cannot continue', () => {
    const sample: Sample = { coherent: true, energy: 500 };
    const original = coherentEvent(sample, 7);
    expect(() => regrown(sample, original, original.steps.length, 0)).toThrow(RegrowError);
    expect(() => regrown({ ...sample, energy: 400 }, original, 0, 0)).toThrow(/500 GeV/);
    expect(() => regrown({ ...sample, coherent: false }, original, 0, 0)).toThrow(/evolution in angle/);
    const dipole = growEvent(resolveSettings({ energy: 500, order: 'virtuality' }), 0);
    expect(() => regrown({ ...sample, coherent: false }, dipole, 0, 0)).toThrow(/final-final/);
    const changed = coherentEvent(sample, 7);
    changed.steps.kT[0] *= 1 + 1e-15;
    changed.steps.openingAngle[0] *= 1 + 1e-12;
    expect(() => regrown(sample, changed, 0, 7)).toThrow(/openingAngle of step 0/);
  });
});
