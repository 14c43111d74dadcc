import { describe, expect, it } from 'vitest';
import {
  createGrower,
  type GrowSettings,
  growEvent,
  type History,
  HistoryBatch,
  resolveSettings,
} from '../../../engine/index.ts';
import { exp } from '../../../engine/math/index.ts';
import {
  type DipoleEnds,
  GapJudge,
  type GapProbabilities,
  type StepConditionals,
} from '../../../engine/probability/index.ts';
import { competing } from './competing.ts';

const judge = new GapJudge();
const gapsOf = (history: History): GapProbabilities => {
  const found = judge.gapsOf(history);
  if (!found.assessable) throw new Error(found.reason);
  return found;
};
const conditionalsOf = (history: History): StepConditionals => {
  const found = judge.conditionalsOf(history);
  if (!found.assessable) throw new Error(found.reason);
  return found;
};
const grow = (some: Partial<GrowSettings>, stream: number): History =>
  growEvent(resolveSettings(some), stream);
const endsOf = (some: Partial<GrowSettings>): DipoleEnds => {
  const found = judge.endsOf(createGrower(resolveSettings(some)).sample);
  if (!found.assessable) throw new Error(found.reason);
  return found;
};
const CHANNELS = ['q_qg', 'g_gg', 'g_qq'];

const SETTINGS: Partial<GrowSettings>[] = [
  {},
  {
    order: 'virtuality',
    coupling: { kind: 'two-loop' },
    cmw: true,
    process: 'scalar-gg',
    firstEmission: 'matched',
    flavours: 3,
  },
  { masses: true, quark: 5, energy: 40 },
  { masses: true, order: 'virtuality', velocityFactors: 'published', process: 'scalar-bb', energy: 20 },
  { recoil: 'global', energy: 500, firstEmission: 'matched' },
];

describe.each(SETTINGS)('gaps of %j', (some) => {
  const { flavours } = resolveSettings(some);

  it('are the sum of what each end of the replayed rows adds', () => {
    const ends = endsOf(some);
    for (let stream = 0; stream < 8; stream++) {
      const history = grow(some, stream);
      const { steps, head } = history;
      const gaps = gapsOf(history);
      expect(gaps.delta.length).toBe(steps.length + 1);
      let from = head.hardScale;
      for (let gap = 0; gap <= steps.length; gap++) {
        const to = gap === steps.length ? head.tLow : steps.t[gap];
        const direct = [0, 0, 0];
        const toLow = [0, 0, 0];
        for (const end of competing(history, gap, flavours)) {
          direct[CHANNELS.indexOf(end.channel)] += ends.exponent(end, to, from);
          toLow[CHANNELS.indexOf(end.channel)] += ends.exponent(end, head.tLow, from);
        }
        for (let c = 0; c < 3; c++) {
          expect(Math.abs(gaps.channelExponent[3 * gap + c] - direct[c])).toBeLessThan(1e-6);
          expect(Math.abs(gaps.channelExponentToLow[3 * gap + c] - toLow[c])).toBeLessThan(1e-6);
        }
        expect(gaps.exponent[gap]).toBeCloseTo(direct[0] + direct[1] + direct[2], 6);
        expect(gaps.exponentToLow[gap]).toBeCloseTo(toLow[0] + toLow[1] + toLow[2], 6);
        expect(gaps.delta[gap]).toBe(exp(-gaps.exponent[gap]));
        expect(gaps.deltaToLow[gap]).toBe(exp(-gaps.exponentToLow[gap]));
        from = to;
      }
    }
  });

  it('come with conditional probabilities whose rates are those of the same ends', () => {
    const ends = endsOf(some);
    for (let stream = 0; stream < 8; stream++) {
      const history = grow(some, stream);
      const { steps, entries, channels } = history;
      const { fractionBelow, shareBelow, shareOwn, totalRate } = conditionalsOf(history);
      for (let step = 0; step < steps.length; step++) {
        const t = steps.t[step];
        const channel = channels[steps.channel[step]];
        let total = 0;
        const own: { rate: number; below: number }[] = [];
        for (const end of competing(history, step, flavours)) {
          const rate = ends.rate(end, t);
          total += rate;
          const mine =
            end.channel === channel &&
            end.emitter === entries.id[steps.emitter[step]] &&
            (end.flavour ?? 0) === (channel === 'g_qq' ? Math.abs(entries.id[steps.i[step]]) : 0);
          if (mine) own.push({ rate, below: ends.rateBelow(end, t, steps.z[step]) / rate });
        }
        expect(Math.abs(totalRate[step] / total - 1)).toBeLessThan(1e-4);
        // some end of this kind has just this share and this distribution of z
        const fits = own.some(
          ({ rate, below }) =>
            Math.abs(below - fractionBelow[step]) < 1e-6 &&
            [1, 2].some((times) => Math.abs((times * rate) / total - shareOwn[step]) < 1e-4),
        );
        expect(fits, `stream ${stream}, step ${step}`).toBe(true);
        expect(shareBelow[step]).toBeGreaterThanOrEqual(0);
        expect(shareBelow[step] + shareOwn[step]).toBeLessThan(1 + 1e-9);
      }
    }
  });
});

describe('the judge', () => {
  const history = ((): History => {
    for (let stream = 0; ; stream++) {
      const found = grow({}, stream);
      if (found.steps.length >= 4) return found;
    }
  })();

  it('gives the same numbers whatever it judged before', () => {
    const alone = new GapJudge().gapsOf(history);
    for (let stream = 0; stream < 20; stream++)
      judge.gapsOf(grow({ order: 'virtuality', energy: 300 }, stream));
    expect(judge.gapsOf(history)).toEqual(alone);
  });

  it('gives the same numbers alone and as one of a batch', () => {
    const grower = createGrower(resolveSettings({}));
    const batch = new HistoryBatch(grower.sample);
    for (let stream = 0; stream < 5; stream++) grower.grow(batch, stream);
    for (let stream = 0; stream < 5; stream++) {
      expect(judge.gapsOf(batch.view(stream))).toEqual(judge.gapsOf(grow({}, stream)));
      expect(judge.conditionalsOf(batch.view(stream))).toEqual(judge.conditionalsOf(grow({}, stream)));
    }
  });

  it('leaves out the last gap of an event that broke off, and no other', () => {
    const { delta } = gapsOf({ ...history, head: { ...history.head, status: 'aborted' } });
    const whole = gapsOf(history).delta;
    const last = history.steps.length;
    expect(delta[last]).toBeNaN();
    expect([...delta.subarray(0, last)]).toEqual([...whole.subarray(0, last)]);
  });

  it('leaves out gaps that it cannot know, and goes on after them', () => {
    const whole = gapsOf(history);
    const t = history.steps.t.slice();
    t[1] = 2 * t[0];
    const risen = gapsOf({ ...history, steps: { ...history.steps, length: history.steps.length, t } });
    expect(risen.delta[0]).toBe(whole.delta[0]);
    expect(risen.delta[1]).toBeNaN();
    expect(risen.channelExponent[3]).toBeNaN();
    expect(risen.delta[2]).toBeGreaterThan(0);
    expect(risen.delta[3]).toBe(whole.delta[3]);
    t[1] = NaN;
    const unknown = gapsOf({ ...history, steps: { ...history.steps, length: history.steps.length, t } });
    expect([1, 2].map((gap) => unknown.delta[gap])).toEqual([NaN, NaN]);
    expect(unknown.delta[3]).toBe(whole.delta[3]);

    const px = history.entries.px.slice();
    px[history.steps.j[0]] = NaN;
    const torn = { ...history, entries: { ...history.entries, length: history.entries.length, px } };
    expect(gapsOf(torn).delta[0]).toBe(whole.delta[0]);
    expect(gapsOf(torn).delta[1]).toBeNaN();
    const colour = history.entries.colour.slice();
    colour[history.steps.j[0]] += 1000;
    const cut = { ...history, entries: { ...history.entries, length: history.entries.length, colour } };
    expect(gapsOf(cut).delta[1]).toBeNaN();
    expect(conditionalsOf(cut).shareOwn[1]).toBeNaN();
  });

  it('leaves out gaps of partons that its kernels are not made for', () => {
    const id = history.entries.id.slice();
    const m = history.entries.m.slice();
    const entries = { ...history.entries, length: history.entries.length, id, m };
    id[history.steps.i[0]] = 6;
    expect(gapsOf({ ...history, entries }).delta[1]).toBeNaN();
    id.set(history.entries.id);
    m[history.steps.i[0]] = 0.3;
    expect(gapsOf({ ...history, entries }).delta[0]).toBeGreaterThan(0);
    expect(gapsOf({ ...history, entries }).delta[1]).toBeNaN();
    expect(judge.gapsOf({ ...history, head: { ...history.head, tLow: 2 } })).toMatchObject({
      assessable: false,
    });
  });

  it('knows no step whose dipole is not among those of the rows', () => {
    const partner = history.steps.partner.slice();
    partner[1] = partner[0];
    const lost = { ...history, steps: { ...history.steps, length: history.steps.length, partner } };
    const { shareOwn, fractionBelow } = conditionalsOf(lost);
    expect(shareOwn[1]).toBeNaN();
    expect(fractionBelow[1]).toBeNaN();
    expect(shareOwn[2]).toBeGreaterThan(0);
  });

  it('takes z of the emission where the head says so, and none where the head does not say', () => {
    const z = history.steps.z.map((x) => 1 - x);
    const turned: History = {
      ...history,
      head: { ...history.head, meaning: { ...history.head.meaning, z: 'emission light-cone' } },
      steps: { ...history.steps, length: history.steps.length, z },
    };
    const expected = conditionalsOf(history).fractionBelow;
    conditionalsOf(turned).fractionBelow.forEach((u, step) => {
      expect(u).toBeCloseTo(expected[step], 9);
    });
    const own: History = {
      ...history,
      head: { ...history.head, meaning: { ...history.head.meaning, z: 'own' } },
    };
    expect(conditionalsOf(own).fractionBelow.every(Number.isNaN)).toBe(true);
    expect(conditionalsOf(own).shareOwn[0]).toBeGreaterThan(0);
  });

  it('says what it misses', () => {
    const lacks = (table: 'entries' | 'steps', name: string): History => ({
      ...history,
      head: {
        ...history.head,
        columns: {
          ...history.head.columns,
          [table]: history.head.columns[table].filter((column) => column !== name),
        },
        shower: { ...history.head.shower },
      },
    });
    expect(judge.gapsOf(lacks('entries', 'colour'))).toEqual({
      assessable: false,
      reason: 'column colour of the entries is absent',
    });
    expect(judge.gapsOf(lacks('steps', 't'))).toMatchObject({ assessable: false });
    expect(judge.gapsOf(lacks('steps', 'z'))).toMatchObject({ assessable: true });
    expect(judge.conditionalsOf(lacks('steps', 'z'))).toEqual({
      assessable: false,
      reason: 'column z of the steps is absent',
    });
  });
});
