import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type History, measureSteps } from '../../../engine/index.ts';
import {
  eventRows,
  momentumTable,
  rerunCommand,
  showerNotation,
  stepRows,
  valuesDiffer,
} from '../../../viewer/views/card/index.ts';
import { plainNotation } from '../../../viewer/views/type/index.ts';
import { sampleHistories } from './sample-file.ts';

const histories = sampleHistories(30).filter(({ steps }) => steps.length > 0);
const rowsOf = (history: History, step: number) => stepRows(history, measureSteps(history), step).flat();

describe('claimed beside measured', () => {
  test('marks no row of our own engine', () => {
    for (const history of histories) {
      for (let step = 0; step < history.steps.length; step++) {
        expect(rowsOf(history, step).filter(({ differs }) => differs)).toEqual([]);
      }
    }
  });

  test.each(['t', 'kT', 'z', 'y', 'azimuth', 'openingAngle'] as const)(
    'marks a %s that was falsified by 1e-5, and that row alone',
    (column) => {
      const [history] = histories;
      const falsified = history.steps[column].slice();
      falsified[0] *= 1 + 1e-5;
      const rows = rowsOf({ ...history, steps: { ...history.steps, [column]: falsified } }, 0);
      expect(rows.filter(({ differs }) => differs).map(({ key }) => key)).toEqual([
        column === 'z' ? 'zLightCone' : column,
      ]);
    },
  );

  test('holds nothing against a claim whose meaning is not ours', () => {
    const [history] = histories;
    const meaning = { ...history.head.meaning, z: 'own' as const };
    const rows = rowsOf({ ...history, head: { ...history.head, meaning } }, 0);
    const own = rows.find(({ key }) => key === 'z');
    expect(own?.claimed).toBe(history.steps.z[0]);
    expect(own?.measured).toBeNaN();
    expect(rows.find(({ key }) => key === 'zLightCone')?.claimed).toBeNaN();
  });

  test('turns the measured fraction round where the claim is of the emission', () => {
    const [history] = histories;
    const meaning = { ...history.head.meaning, z: 'emission light-cone' as const };
    const row = rowsOf({ ...history, head: { ...history.head, meaning } }, 0).find(
      ({ key }) => key === 'zLightCone',
    );
    expect(row?.measured).toBeCloseTo(1 - history.steps.z[0], 9);
  });

  test('gives every row a definition, and a unit where it has one', () => {
    for (const row of rowsOf(histories[0], 0)) expect(row.definition.length, row.key).toBeGreaterThan(10);
    const units = new Map(rowsOf(histories[0], 0).map(({ key, unit }) => [key, unit]));
    expect(units.get('t')).toBe('GeV^{2}');
    expect(units.get('partnerAngle')).toBe('rad');
    expect(units.get('formationTimeFm')).toBe('fm');
  });
});

describe('difference of two values', () => {
  test('is taken on the circle for angles about an axis', () => {
    expect(valuesDiffer(1e-9, 2 * Math.PI - 1e-9, 2 * Math.PI)).toBe(false);
    expect(valuesDiffer(0.1, 0.2, 2 * Math.PI)).toBe(true);
  });

  test('is relative, and missing values differ from nothing', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-200, max: 1e200, noNaN: true }), (value) => {
        expect(valuesDiffer(value, value * (1 + 1e-7))).toBe(false);
        expect(valuesDiffer(value, value * (1 + 1e-5))).toBe(true);
      }),
    );
    expect(valuesDiffer(NaN, 1)).toBe(false);
    expect(valuesDiffer(1, NaN)).toBe(false);
  });
});

describe('momenta of a step', () => {
  test('add up to the printed residual', () => {
    for (const history of histories) {
      const measures = measureSteps(history);
      for (let step = 0; step < history.steps.length; step++) {
        const { before, after, residual, largest } = momentumTable(history, measures, step);
        for (let component = 0; component < 4; component++) {
          const sum = (rows: typeof before) =>
            rows.reduce((total, { momentum }) => total + momentum[component], 0);
          expect(Math.abs(sum(after) - sum(before) - residual[component])).toBeLessThan(
            1e-12 * largest + 1e-12,
          );
        }
      }
    }
  });

  test('hand every colour tag on', () => {
    const [history] = histories;
    const { before, after } = momentumTable(history, measureSteps(history), 0);
    const tags = (rows: typeof before) =>
      new Set(rows.flatMap(({ colour, anticolour }) => [colour, anticolour]));
    expect([...tags(before)].every((tag) => tags(after).has(tag))).toBe(true);
  });

  test('are absent where a step names a row that the table lacks', () => {
    const [history] = histories;
    const j = history.steps.j.slice().fill(-1);
    const { after } = momentumTable({ ...history, steps: { ...history.steps, j } }, measureSteps(history), 0);
    expect(after[1]).toMatchObject({ entry: -1, id: 0 });
    expect(after[1].momentum.every(Number.isNaN)).toBe(true);
  });
});

describe('head of an event', () => {
  test('describes the shower in one line', () => {
    expect(plainNotation(showerNotation(histories[0]))).toBe(
      'kT ordered dipoles, local recoil, αs(MZ) = 0.118, cutoff 1 GeV',
    );
  });

  test('names every setting as the command line does', () => {
    const rows = eventRows(histories[0], 12).flat();
    for (const name of Object.keys(histories[0].head.shower))
      expect(rows.some((row) => row.name === name)).toBe(true);
    expect(rows.find(({ name }) => name === 'cutoff')?.value).toBe('1 GeV');
  });

  test('has the command that makes it again, of what differs from the defaults', () => {
    expect(rerunCommand(histories[0].head)).toBe(
      `branchlight grow --energy 1000 --quark d --seed 7 --events ${histories[0].head.stream! + 1} --out again.shower`,
    );
    const { head } = histories[0];
    expect(rerunCommand({ ...head, rerun: 'make event-7' })).toBe('make event-7');
    expect(rerunCommand({ ...head, producer: { name: 'another', version: '2' } })).toBeNull();
    expect(rerunCommand({ ...head, seed: null })).toBeNull();
  });
});
