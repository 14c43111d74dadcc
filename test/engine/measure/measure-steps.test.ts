import { describe, expect, it } from 'vitest';
import type { History } from '../../../engine/history/index.ts';
import {
  FLOAT_MEASURES,
  MEASURE_DEFINITIONS,
  measureSteps,
  StepMeasures,
} from '../../../engine/measure/index.ts';
import { historyByHand, role } from '../history-by-hand.ts';
import { branchInRestFrame, combine, product, type Vector } from './rest-frame-map.ts';

const row = (p: Vector, rest: Record<string, number>) => ({
  px: p[0],
  py: p[1],
  pz: p[2],
  e: p[3],
  m: 0,
  ...rest,
});

const quark: Vector = [0, 0, 50, 50];
const antiquark: Vector = [0, 0, -50, 50];
/** y, z, azimuth of three branchings in a row. */
const CLAIMS = [
  [0.1, 0.7, 1],
  [0.02, 0.2, 2],
  [0.3, 0.6, 3],
] as const;

/**
 * Three branchings: the quark emits a gluon (rows 2, 3; the antiquark recoils to 4), the gluon emits (5, 6; 7 recoils,
 * the antiquark still), the antiquark emits (8, 9; the gluon 6 recoils to 10).
 */
function threeSteps(head = {}): History {
  const [i1, j1, k1] = branchInRestFrame(quark, antiquark, ...CLAIMS[0]);
  const [i2, j2, k2] = branchInRestFrame(j1, k1, ...CLAIMS[1]);
  const [i3, j3, k3] = branchInRestFrame(k2, j2, ...CLAIMS[2]);
  const born = { emitter: role('emitter'), emission: role('emission'), recoiled: role('recoiled') };
  const rows = [
    row(quark, { id: 1, endedBy: 0, role: role('hard') }),
    row(antiquark, { id: -1, endedBy: 0, role: role('hard') }),
    row(i1, { id: 1, from: 0, madeBy: 0, role: born.emitter }),
    row(j1, { id: 21, from: 0, madeBy: 0, endedBy: 1, role: born.emission }),
    row(k1, { id: -1, from: 1, madeBy: 0, endedBy: 1, role: born.recoiled }),
    row(i2, { id: 21, from: 3, madeBy: 1, role: born.emitter }),
    row(j2, { id: 21, from: 3, madeBy: 1, endedBy: 2, role: born.emission }),
    row(k2, { id: -1, from: 4, madeBy: 1, endedBy: 2, role: born.recoiled }),
    row(i3, { id: -1, from: 7, madeBy: 2, role: born.emitter }),
    row(j3, { id: 21, from: 7, madeBy: 2, role: born.emission }),
    row(k3, { id: 21, from: 6, madeBy: 2, role: born.recoiled }),
  ];
  const steps = [
    { t: 400, emitter: 0, partner: 1, recoiler: 1, i: 2, j: 3, recoilerAfter: 4 },
    { t: 50, emitter: 3, partner: 4, recoiler: 4, i: 5, j: 6, recoilerAfter: 7 },
    { t: 9, emitter: 7, partner: 6, recoiler: 6, i: 8, j: 9, recoilerAfter: 10 },
  ].map((step) => ({ kind: 0, ...step }));
  return historyByHand(rows, steps, head);
}

const momentum = ({ entries: e }: History, at: number): Vector => [e.px[at], e.py[at], e.pz[at], e.e[at]];
const dot3 = (a: Vector, b: Vector) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const angle = (a: Vector, b: Vector) => Math.acos(dot3(a, b) / Math.sqrt(dot3(a, a) * dot3(b, b)));

const history = threeSteps();
const measures = measureSteps(history);
const stepRows = (step: number) => {
  const { emitter, partner, i, j, recoilerAfter } = history.steps;
  return [emitter, partner, i, j, recoilerAfter].map((column) => momentum(history, column[step]));
};

describe('measured steps', () => {
  it('give back what the branchings were made with', () => {
    CLAIMS.forEach(([y, z, azimuth], step) => {
      const [emitter, partner] = stepRows(step);
      const q2 = 2 * product(emitter, partner);
      expect(measures.y[step]).toBeCloseTo(y, 12);
      expect(measures.zLightCone[step]).toBeCloseTo(z, 12);
      expect(measures.azimuth[step]).toBeCloseTo(azimuth, 11);
      expect(measures.kT[step]).toBeCloseTo(Math.sqrt(z * (1 - z) * y * q2), 11);
      expect(measures.t[step]).toBeCloseTo(z * (1 - z) * y * q2, 10);
    });
  });

  it('mean by t what the head says: y Q^2 in virtuality ordering, nothing where the author has a t of their own', () => {
    const { meaning } = history.head;
    const inVirtuality = measureSteps(threeSteps({ meaning: { ...meaning, t: 'virtuality^2' } }));
    CLAIMS.forEach(([y], step) => {
      const [emitter, partner] = stepRows(step);
      expect(inVirtuality.t[step]).toBeCloseTo(y * 2 * product(emitter, partner), 9);
    });
    expect(measureSteps(threeSteps({ meaning: { ...meaning, t: 'own' } })).t[0]).toBeNaN();
    expect(measureSteps(threeSteps({ meaning: { ...meaning, tUnit: null } })).t[0]).toBeNaN();
  });

  it('hold the opening angle against the angle at which the emitter was born, which a recoil is not', () => {
    for (let step = 0; step < 3; step++) {
      const [emitter, partner, i, j] = stepRows(step);
      expect(measures.openingAngle[step]).toBeCloseTo(angle(i, j), 12);
      expect(measures.partnerAngle[step]).toBeCloseTo(angle(emitter, partner), 7);
    }
    expect(measures.birthAngle[0]).toBe(Math.PI);
    expect(measures.birthAngle[1]).toBe(measures.openingAngle[0]);
    // the antiquark has recoiled twice and never branched
    expect(measures.birthAngle[2]).toBe(Math.PI);
    for (let step = 0; step < 3; step++) {
      const { openingAngle, birthAngle, partnerAngle, coherenceBirth, coherencePartner, coherence } =
        measures;
      expect(coherenceBirth[step]).toBe(openingAngle[step] / birthAngle[step]);
      expect(coherencePartner[step]).toBe(openingAngle[step] / partnerAngle[step]);
      expect(coherence[step]).toBe(openingAngle[step] / Math.min(birthAngle[step], partnerAngle[step]));
    }
  });

  it('give the pair: energy fraction, virtuality, formation time, Lund coordinates', () => {
    for (let step = 0; step < 3; step++) {
      const [, , i, j] = stepRows(step);
      const theta = angle(i, j);
      const mass2 = 2 * product(i, j);
      const kT = Math.min(i[3], j[3]) * Math.sin(theta);
      expect(measures.zEnergy[step]).toBeCloseTo(i[3] / (i[3] + j[3]), 14);
      expect(measures.virtuality[step]).toBeCloseTo(Math.sqrt(mass2), 10);
      expect(measures.formationTime[step]).toBeCloseTo((i[3] + j[3]) / mass2, 12);
      expect(measures.formationTimeFm[step]).toBeCloseTo((0.1973269804 * (i[3] + j[3])) / mass2, 12);
      expect(measures.eta[step]).toBeCloseTo(-Math.log(Math.tan(theta / 2)), 11);
      expect(measures.kTSofter[step]).toBeCloseTo(kT, 11);
      expect(measures.lnKT[step]).toBeCloseTo(Math.log(kT), 11);
      expect(measures.evolutionTime[step]).toBeCloseTo(Math.log(2500 / history.steps.t[step]), 13);
    }
  });

  it('keep the digits of the Lund coordinates of a pair that is nearly parallel or nearly opposite', () => {
    for (const theta of [1e-7, 1e-3, Math.PI - 1e-3, Math.PI - 1e-7]) {
      const i: Vector = [0, 0, 30, 30];
      const j: Vector = [20 * Math.sin(theta), 0, 20 * Math.cos(theta), 20];
      const rows = [row(quark, { role: role('hard') }), row(i, { madeBy: 0 }), row(j, { madeBy: 0 })];
      const found = measureSteps(historyByHand(rows, [{ t: 1, emitter: 0, i: 1, j: 2 }]));
      // the sine of pi - 1e-7 as JavaScript knows it is good to 1e-9 of itself
      expect(Math.abs(found.eta[0] / -Math.log(Math.tan(theta / 2)) - 1)).toBeLessThan(1e-10);
      expect(Math.abs(found.openingAngle[0] / theta - 1)).toBeLessThan(1e-10);
    }
  });

  it('name the softer daughter, its rapidity, and the leaf on which the emitter lives', () => {
    const { e } = history.entries;
    for (let step = 0; step < 3; step++) {
      const [emitter, partner, i, j] = stepRows(step);
      const softerIsI = i[3] < j[3];
      expect(measures.softer[step]).toBe(softerIsI ? history.steps.i[step] : history.steps.j[step]);
      const p = softerIsI ? i : j;
      const rapidity = Math.log(product(p, partner) / product(p, emitter)) / 2;
      expect(measures.rapidity[step]).toBeCloseTo(rapidity, 10);
    }
    // the first gluon is softer than the quark and so opens the secondary leaf; z = 0.2 makes i the softer of step 1
    expect(e[3]).toBeLessThan(e[2]);
    expect(measures.softer[1]).toBe(5);
    expect([...measures.lundLeaf]).toEqual([0, 1, 0]);
  });

  it('follow the harder daughter on its leaf and the softer one onto the next, through recoils', () => {
    const { entries, steps } = history;
    // let step 2 be taken by the recoiled row of the harder daughter of step 1: 6, as 7 recoiled from it
    const columns = { ...entries, from: entries.from.slice(), madeBy: entries.madeBy.slice() };
    columns.from[7] = 6;
    const harder = measureSteps({ ...history, entries: columns });
    expect(harder.birthAngle[2]).toBe(measures.openingAngle[1]);
    expect(harder.lundLeaf[2]).toBe(1);
    columns.from[7] = 5;
    expect(measureSteps({ ...history, entries: columns, steps }).lundLeaf[2]).toBe(2);
  });

  it('give what emitter and recoiler suffered', () => {
    for (let step = 0; step < 3; step++) {
      const [emitter, partner, i, , k] = stepRows(step);
      expect(measures.emitterTurn[step]).toBeCloseTo(angle(emitter, i), 7);
      expect(measures.emitterEnergyLost[step]).toBeCloseTo(1 - i[3] / emitter[3], 13);
      expect(measures.emitterKick[step]).toBeCloseTo(Math.sqrt(dot3(i, i)) * Math.sin(angle(emitter, i)), 7);
      // the local map takes the share y from the partner and keeps its direction
      expect(measures.partnerEnergyLost[step]).toBeCloseTo(CLAIMS[step][0], 13);
      expect(measures.partnerTurn[step]).toBeLessThan(1e-15);
      expect(measures.partnerKick[step]).toBeLessThan(1e-14);
      expect(k[3]).toBeLessThan(partner[3]);
    }
  });

  it('balance four-momentum, and say by how much and in which component where a row is changed', () => {
    expect(Math.max(...measures.residual.map(Math.abs))).toBeLessThan(1e-13);
    const faulty = threeSteps();
    faulty.entries.py[6] += 1e-6;
    faulty.entries.e[10] -= 1e-6;
    const { residual } = measureSteps(faulty);
    expect(residual[4 + 1]).toBeCloseTo(1e-6, 12);
    expect(residual[8 + 3]).toBeCloseTo(-1e-6, 12);
    expect(residual[0 + 1]).toBeCloseTo(0, 12);
  });

  it('count a third daughter in the balance', () => {
    const { entries } = history;
    const [, j1] = [2, 3].map((at) => momentum(history, at));
    const half = combine([0.5, j1]);
    const rows = [0, 1, 2, 3, 4].map((at) => ({
      ...row(momentum(history, at), {
        from: entries.from[at],
        madeBy: entries.madeBy[at],
        role: entries.role[at],
      }),
    }));
    Object.assign(rows[3], { px: half[0], py: half[1], pz: half[2], e: half[3] });
    rows.push({ ...rows[3] });
    const steps = [{ t: 400, emitter: 0, partner: 1, recoiler: 1, i: 2, j: 3, recoilerAfter: 4 }];
    expect(Math.max(...measureSteps(historyByHand(rows, steps)).residual.map(Math.abs))).toBeLessThan(1e-13);
  });

  it('give a hard parton the angle to its colour partner where the hard process is not at rest', () => {
    const boosted: Vector = [30, 0, 50, Math.hypot(30, 50)];
    const rows = [
      row(boosted, { id: 1, colour: 501, role: role('hard') }),
      row(antiquark, { id: -1, anticolour: 501, role: role('hard') }),
    ];
    const found = measureSteps(historyByHand(rows, [{ t: 1, emitter: 0, partner: 1, i: 0, j: 1 }]));
    expect(found.birthAngle[0]).toBeCloseTo(angle(boosted, antiquark), 12);
  });

  it('use memory again without a trace of the event before', () => {
    const out = new StepMeasures(50);
    for (const name of FLOAT_MEASURES) out[name].fill(7);
    out.residual.fill(7);
    out.lundLeaf.fill(7);
    const again = measureSteps(history, out);
    expect(again).toBe(out);
    expect(again.length).toBe(3);
    for (const name of FLOAT_MEASURES) expect([...again[name].subarray(0, 3)]).toEqual([...measures[name]]);
    expect([...again.residual.subarray(0, 12)]).toEqual([...measures.residual]);
    expect([...again.lundLeaf.subarray(0, 3)]).toEqual([...measures.lundLeaf]);
    expect(measureSteps(history, new StepMeasures(2)).capacity).toBe(3);
  });

  it('are missing, and nothing throws, where rows are missing or impossible', () => {
    for (const [emitter, i, partner] of [
      [-1, 2, 1],
      [0, 99, 1],
      [0, 2, -1],
      [2 ** 30, -7, 5],
    ]) {
      const bad = threeSteps();
      Object.assign(bad.steps.emitter, { 0: emitter });
      Object.assign(bad.steps.i, { 0: i });
      Object.assign(bad.steps.partner, { 0: partner });
      bad.entries.from.fill(5);
      bad.entries.madeBy.fill(1000);
      bad.entries.px[5] = NaN;
      const found = measureSteps(bad);
      expect(found.azimuth[0]).toBeNaN();
      expect(found.birthAngle[2]).toBeNaN();
      expect(found.lundLeaf[2]).toBe(-1);
    }
  });

  it('leave the birth unknown where the author did not record how rows came to be', () => {
    const columns = { ...history.head.columns, entries: ['id', 'px', 'py', 'pz', 'e', 'm'] };
    const found = measureSteps(threeSteps({ columns }));
    expect(found.birthAngle[0]).toBeNaN();
    expect(found.coherenceBirth[0]).toBeNaN();
    expect(found.lundLeaf[0]).toBe(-1);
    // the partner angle is still there to hold against
    expect(found.coherence[0]).toBe(measures.coherencePartner[0]);
  });

  it('do without the mass column: the invariants keep six digits at everyday angles', () => {
    const bare = threeSteps();
    bare.entries.m.fill(NaN);
    const found = measureSteps(bare);
    CLAIMS.forEach(([y, z], step) => {
      expect(Math.abs(found.y[step] / y - 1)).toBeLessThan(1e-6);
      expect(Math.abs(found.zLightCone[step] / z - 1)).toBeLessThan(1e-6);
    });
  });
});

describe('definitions', () => {
  it('name every measured quantity once', () => {
    const keys = MEASURE_DEFINITIONS.map(({ key }) => key);
    const measured = Object.keys(measures).filter((key) => key !== 'length' && key !== 'capacity');
    expect([...keys].sort()).toEqual(measured.sort());
    for (const { symbol, definition } of MEASURE_DEFINITIONS) {
      expect(symbol.every(({ text }) => text.length > 0)).toBe(true);
      expect(definition.endsWith('.')).toBe(true);
    }
  });
});
