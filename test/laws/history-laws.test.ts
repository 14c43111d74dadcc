import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type History, stepAtTime } from '../../engine/index.ts';
import { falseClaims } from './claims.ts';
import { brokenColourChains, openColourLines, wrongColourFlow, wrongColours } from './colour.ts';
import { breachesOfEvolution, breachesOfTrials } from './evolution.ts';
import { FAULTS, type FaultName, withFault } from './faults.ts';
import { offShellRows, unbalancedMoments, unbalancedSteps } from './momentum.ts';
import { history } from './random-settings.ts';
import { brokenRows, wrongClock, wrongGenerations, wrongReplay } from './tables.ts';

const SHARES = [-0.1, 0, 0.1, 0.25, 0.4, 0.5, 0.6, 0.75, 0.9, 1, 1.1];

interface Law {
  readonly claim: string;
  readonly breaches: (history: History) => string[];
  /** Faults that the law must catch. */
  readonly catches: readonly FaultName[];
}

const LAWS: readonly Law[] = [
  {
    claim: 'every step conserves four-momentum to the rounding of its rows',
    breaches: unbalancedSteps,
    catches: [
      'a momentum shifted by 1e-12 of sqrt(s)',
      'an energy shifted by 1e-12 of sqrt(s)',
      'a missing number',
    ],
  },
  {
    claim: 'the partons at any moment sum to the beams',
    breaches: unbalancedMoments,
    catches: ['a momentum shifted by 1e-12 of sqrt(s)', 'a row that never ends', 'a row that ends too early'],
  },
  {
    claim: 'every row is on its mass shell',
    breaches: offShellRows,
    catches: ['an energy shifted by 1e-12 of sqrt(s)', 'a mass of its own', 'a missing number'],
  },
  {
    claim: 'every colour tag joins one colour end to one anticolour end at any moment',
    breaches: openColourLines,
    catches: ['a colour tag of its own', 'a row that never ends', 'a row that ends too early'],
  },
  {
    claim: 'quarks, antiquarks and gluons carry the tags of their kind',
    breaches: wrongColours,
    catches: ['a gluon without anticolour', 'a gluon connected to itself', 'an antiquark for a quark'],
  },
  {
    claim: 'the colour lines pass every parton once, from quark to antiquark or in a ring',
    breaches: brokenColourChains,
    catches: ['a gluon connected to itself', 'a colour tag of its own'],
  },
  {
    claim: 'an emitted gluon sits between emitter and partner, a pair takes over both tags',
    breaches: wrongColourFlow,
    catches: ['tags of i and j exchanged', 'a partner that is not connected', 'an antiquark for a quark'],
  },
  {
    claim: 'rows begin, end and follow one another as the steps say',
    breaches: brokenRows,
    catches: [
      'a row that never ends',
      'a row that ends too early',
      'a row that comes from another',
      'a row made by another step',
      'an emission on the line of its emitter',
      'a recoiler on another line',
      'roles of i and j exchanged',
    ],
  },
  {
    claim: 'the generation counts the emissions between a line and the hard process',
    breaches: wrongGenerations,
    catches: ['a generation too many'],
  },
  {
    claim: 'replay is what the steps make one after the other, and ends in the recorded final state',
    breaches: wrongReplay,
    catches: ['a row that never ends', 'a row that ends too early', 'a row made by another step'],
  },
  {
    claim: 'the clock finds the step that has last happened',
    breaches: (event) => wrongClock(event, SHARES),
    catches: [],
  },
  {
    claim: 't falls from gap to gap down to the cutoff, f/g is at most 1',
    breaches: breachesOfEvolution,
    catches: ['steps in the wrong order', 'a step below the cutoff', 'a ratio above 1', 'a t above its gap'],
  },
  {
    claim: 'rejected trials lie in their gap, among living partons, and are counted',
    breaches: breachesOfTrials,
    catches: [
      'a trial uncounted',
      'a trial above its gap',
      'a trial of a row that is gone',
      'a trial above 1',
    ],
  },
  {
    claim: 'y, z, azimuth, kT, opening angle and t follow from the rows to 1e-6',
    breaches: (event) => falseClaims(event, 1e-6),
    catches: [
      'a y off by 1e-5',
      'a z off by 1e-5',
      'an azimuth off by 1e-5',
      'a kT off by 1e-5',
      'an opening angle off by 1e-5',
      'a t above its gap',
      'a pair turned about its axis',
    ],
  },
];

const events = fc.sample(history, { seed: 20, numRuns: 200 });
const setting = ({ head }: History) => ({ ...head.shower, seed: head.seed, stream: head.stream });

describe('the events of random settings', () => {
  it('are of every kind that there is, from empty to long', () => {
    const seen = (name: string) => new Set(events.map(({ head }) => String(head.shower[name]).split(':')[0]));
    expect(seen('order').size).toBe(2);
    expect(seen('coupling').size).toBe(3);
    expect(seen('process').size).toBe(3);
    for (const name of ['cmw', 'masses', 'velocity-factors', 'first-emission'])
      expect(seen(name).size).toBe(2);
    expect(seen('flavours').size).toBe(6);
    expect(seen('quark').size).toBeGreaterThan(4);
    expect(events.filter(({ trials }) => trials === null).length).toBeGreaterThan(50);
    expect(events.filter(({ trials }) => trials !== null).length).toBeGreaterThan(50);
    expect(events.some(({ steps }) => steps.length === 0)).toBe(true);
    expect(Math.max(...events.map(({ steps }) => steps.length))).toBeGreaterThan(40);
    expect(events.reduce((sum, { steps }) => sum + steps.length, 0)).toBeGreaterThan(1000);
  });
});

describe.each(LAWS)('law: $claim', ({ breaches, catches }) => {
  it('holds', () => {
    for (const event of events)
      expect({ ...setting(event), breaches: breaches(event) }).toEqual({ ...setting(event), breaches: [] });
  });

  it.each(catches)('catches %s', (fault) => {
    const faulty = events.map((event) => withFault(event, FAULTS[fault])).filter((event) => event !== null);
    expect(faulty.length).toBeGreaterThan(10);
    const missed = faulty.filter((event) => breaches(event).length === 0);
    expect(missed.map(setting)).toEqual([]);
  });
});

describe('the law of the clock', () => {
  const longer = events.filter(({ steps }) => steps.length > 3);

  it('catches a clock that is a step late, or that leaves out a step at its own time', () => {
    const late = (event: History, time: number) => stepAtTime(event, time) - 1;
    const strict = (event: History, time: number) => stepAtTime(event, time * (1 - 2 ** -53));
    for (const clock of [late, strict])
      for (const event of longer) expect(wrongClock(event, SHARES, clock)).not.toEqual([]);
  });
});
