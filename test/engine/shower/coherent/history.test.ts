import { describe, expect, it } from 'vitest';
import {
  aliveEntries,
  colourFaults,
  coloursAlive,
  type History,
  KINDS,
  REASONS,
  ROLES,
} from '../../../../engine/index.ts';
import { coherentBatch, SAMPLES, type Sample } from './events.ts';

const EVENTS = 50;

/** Every event of every sample. */
function forEach(test: (history: History, sample: Sample) => void): void {
  for (const sample of SAMPLES) {
    const batch = coherentBatch(sample, EVENTS);
    for (let n = 0; n < EVENTS; n++) test(batch.view(n), sample);
  }
}

const fourOf = ({ entries: e }: History, row: number): number[] => [
  e.px[row],
  e.py[row],
  e.pz[row],
  e.e[row],
];

const massOf = (sample: Sample, id: number): number =>
  !sample.masses ? 0 : Math.abs(id) === 4 ? 1.5 : Math.abs(id) === 5 ? 4.8 : 0;

/** Largest relative deviation of b from a. */
const apart = (a: number, b: number): number => Math.abs(a - b) / Math.max(Math.abs(a), Math.abs(b), 1e-300);

describe('histories of one-to-two branchings', () => {
  it('have living rows that sum to the beams after every step, and daughters that sum to their mother', () => {
    let worst = 0;
    forEach((history) => {
      const { steps, head } = history;
      for (let step = -1; step < steps.length; step++) {
        const sum = [0, 0, 0, -head.sqrtS];
        for (const row of aliveEntries(history, step))
          fourOf(history, row).forEach((p, c) => {
            sum[c] += p;
          });
        worst = Math.max(worst, ...sum.map((p) => Math.abs(p) / head.sqrtS));
        if (step < 0) continue;
        const [a, b, c] = [steps.emitter[step], steps.i[step], steps.j[step]].map((row) =>
          fourOf(history, row),
        );
        a.forEach((p, n) => {
          worst = Math.max(worst, Math.abs(p - b[n] - c[n]) / head.sqrtS);
        });
      }
    });
    expect(worst).toBeLessThan(1e-14);
  });

  it('have every row on the shell of its m: the virtuality before a branching, the mass at the end', () => {
    forEach((history, sample) => {
      const { entries } = history;
      for (let row = 0; row < entries.length; row++) {
        if (ROLES[entries.role[row]] === 'resonance' || ROLES[entries.role[row]] === 'incoming') continue;
        const [x, y, z, e] = fourOf(history, row);
        const m = entries.m[row];
        expect(Math.abs(e * e - x * x - y * y - z * z - m * m)).toBeLessThan(4e-15 * e * e);
        const mass = massOf(sample, entries.id[row]);
        if (entries.endedBy[row] < 0) expect(m).toBe(mass);
        else if (ROLES[entries.role[row]] !== 'hard') expect(m).toBeGreaterThan(mass);
      }
    });
  });

  it('have a hard parton as born until step 0, and its reconstructed root from there on', () => {
    forEach((history) => {
      const { entries, steps } = history;
      const rows = (role: string): number[] =>
        [...entries.role.keys()].filter((row) => ROLES[entries.role[row]] === role);
      const hard = rows('hard');
      const roots = rows('reconstructed');
      expect(hard.length).toBe(2);
      expect(roots.length).toBe(steps.length > 0 ? 2 : 0);
      hard.forEach((row) => {
        expect(entries.endedBy[row]).toBe(steps.length > 0 ? 0 : -1);
      });
      roots.forEach((row, n) => {
        expect(entries.from[row]).toBe(hard[n]);
        expect(entries.madeBy[row]).toBe(0);
        for (const column of ['id', 'colour', 'anticolour', 'line'] as const)
          expect(entries[column][row]).toBe(entries[column][hard[n]]);
        // along the axis of its hard parton
        const [a, b] = [fourOf(history, row), fourOf(history, hard[n])];
        const cross = Math.hypot(
          a[0] * b[1] - a[1] * b[0],
          a[1] * b[2] - a[2] * b[1],
          a[2] * b[0] - a[0] * b[2],
        );
        expect(cross).toBeLessThan(1e-14 * a[3] * b[3]);
      });
      expect(entries.length).toBe(hard[1] + 1 + (steps.length > 0 ? 2 : 0) + 2 * steps.length);
    });
  });

  it('obey the ordering of their lines exactly: t <= z^2 t or (1-z)^2 t of previous, and fall in playback', () => {
    forEach((history, { coherent, energy }) => {
      const { entries, steps } = history;
      for (let step = 0; step < steps.length; step++) {
        expect(KINDS[steps.kind[step]]).toBe('one-to-two');
        expect(steps.t[step]).toBeLessThanOrEqual(steps.tStart[step]);
        expect(steps.t[step]).toBeGreaterThan(history.head.tLow * (1 - 1e-12));
        if (step > 0) expect(steps.t[step]).toBeLessThanOrEqual(steps.t[step - 1]);
        const previous = steps.previous[step];
        const emitter = steps.emitter[step];
        if (previous < 0) {
          expect(ROLES[entries.role[emitter]]).toBe('reconstructed');
          const m = entries.m[entries.from[emitter]];
          const s = energy! ** 2;
          // two equal masses: Q^2 (1 + velocity)/2
          const largest = coherent ? (s * (1 + Math.sqrt(1 - (4 * m * m) / s))) / 2 : s;
          expect(apart(steps.tStart[step], largest)).toBeLessThan(1e-14);
          continue;
        }
        expect(entries.madeBy[emitter]).toBe(previous);
        const z = steps.z[previous];
        const share = emitter === steps.i[previous] ? z : 1 - z;
        expect(steps.tStart[step]).toBe((coherent ? share * share : share) * steps.t[previous]);
      }
    });
  });

  it('claim the pT and opening angle that follow from t and z, at or above the cutoff', () => {
    forEach((history, sample) => {
      const { entries, steps, channels } = history;
      for (let step = 0; step < steps.length; step++) {
        const [t, z, kT] = [steps.t[step], steps.z[step], steps.kT[step]];
        const kappa = z * (1 - z);
        const mass = massOf(sample, entries.id[steps.emitter[step]]);
        const pair = massOf(sample, entries.id[steps.i[step]]);
        const lost = channels[steps.channel[step]] === 'g_qq' ? pair ** 2 : (1 - z) ** 2 * mass ** 2;
        const scale = sample.coherent ? kappa * t : t - mass ** 2;
        expect(Math.abs(kT * kT + lost - kappa * scale)).toBeLessThan(1e-12 * kappa * scale);
        expect(kT).toBeGreaterThanOrEqual(sample.cutoff ?? 1);
        // E sin(theta/2) = pT/(2 z (1-z)), E by the light-cone fractions of the steps before
        let energy = sample.energy! / 2;
        for (let s = step; steps.previous[s] >= 0; s = steps.previous[s]) {
          const before = steps.previous[s];
          energy *= steps.emitter[s] === steps.i[before] ? steps.z[before] : 1 - steps.z[before];
        }
        const sine = kT / (2 * kappa * energy);
        expect(apart(Math.sin(steps.openingAngle[step] / 2), sine)).toBeLessThan(1e-9);
      }
    });
  });

  it('without masses claim angles that fall along every line', () => {
    forEach((history, { coherent, masses }) => {
      if (!coherent || masses) return;
      const { steps } = history;
      for (let step = 0; step < steps.length; step++)
        if (steps.previous[step] >= 0)
          expect(steps.openingAngle[step]).toBeLessThan(steps.openingAngle[steps.previous[step]]);
    });
  });

  it('reconstruct q^2 = pT^2/(z(1-z)) + q_b^2/z + q_c^2/(1-z), light-cone fractions and azimuths', () => {
    forEach((history, { coherent }) => {
      const { entries, steps } = history;
      for (let step = 0; step < steps.length; step++) {
        const [a, i, j] = [steps.emitter[step], steps.i[step], steps.j[step]];
        const z = steps.z[step];
        const q2 = (row: number): number => entries.m[row] ** 2;
        const built = q2(i) / z + q2(j) / (1 - z);
        const generated = steps.kT[step] ** 2 / (z * (1 - z));
        if (coherent) expect(apart(q2(a), generated + built)).toBeLessThan(1e-12);
        else {
          expect(apart(q2(a), steps.t[step])).toBeLessThan(1e-14);
          // the daughters' virtualities leave a transverse momentum below the generated one
          expect(built).toBeLessThanOrEqual(q2(a) * (1 + 1e-12));
        }
        // the jet's axis is that of the hard parton of its first line
        let root = a;
        while (ROLES[entries.role[root]] !== 'hard') root = entries.from[root];
        const p = fourOf(history, root);
        const size = Math.hypot(p[0], p[1], p[2]);
        const axis = p.slice(0, 3).map((x) => x / size);
        const along = (q: number[]): number => q[0] * axis[0] + q[1] * axis[1] + q[2] * axis[2];
        const [qa, qi] = [fourOf(history, a), fourOf(history, i)];
        const plus = (q: number[]): number => q[3] + along(q);
        expect(Math.abs(plus(qi) - z * plus(qa))).toBeLessThan(1e-13 * history.head.sqrtS);

        const pT2 = coherent ? steps.kT[step] ** 2 : z * (1 - z) * (q2(a) - built);
        const least = Math.min(...axis.map(Math.abs));
        const r = [2, 1, 0].find((c) => Math.abs(axis[c]) === least)!;
        const n1 = axis.map((x, c) => (c === r ? 1 : 0) - axis[r] * x);
        const norm = Math.hypot(...n1);
        const n2 = [0, 1, 2].map(
          (c) => (axis[(c + 1) % 3] * n1[(c + 2) % 3] - axis[(c + 2) % 3] * n1[(c + 1) % 3]) / norm,
        );
        const kick = (n: number[]): number =>
          [0, 1, 2].reduce((sum, c) => sum + n[c] * (qi[c] - z * qa[c]), 0);
        const [x, y] = [kick(n1) / norm, kick(n2)];
        // n1 and n2 are transverse, so the kick of i is its own transverse momentum less its share of the mother's
        expect(Math.abs(x - Math.sqrt(Math.max(0, pT2)) * Math.cos(steps.azimuth[step]))).toBeLessThan(
          1e-6 + 1e-12 * history.head.sqrtS,
        );
        expect(Math.abs(y - Math.sqrt(Math.max(0, pT2)) * Math.sin(steps.azimuth[step]))).toBeLessThan(
          1e-6 + 1e-12 * history.head.sqrtS,
        );
      }
    });
  });

  it('have colour lines that close after every step, and a partner at the other end of one of the emitter’s', () => {
    forEach((history) => {
      const { entries, steps } = history;
      for (let step = 0; step < steps.length; step++) {
        expect(colourFaults(history, step)).toEqual([]);
        const [emitter, partner] = [steps.emitter[step], steps.partner[step]];
        // a reconstructed root that branches in step 0 is never alive
        const lines = coloursAlive(history, step - 1);
        const standIn = (row: number): number =>
          step === 0 && ROLES[entries.role[row]] === 'reconstructed' ? entries.from[row] : row;
        const joined = [...lines.tag.keys()].some(
          (n) =>
            (lines.colourEnd[n] === standIn(emitter) && lines.anticolourEnd[n] === standIn(partner)) ||
            (lines.anticolourEnd[n] === standIn(emitter) && lines.colourEnd[n] === standIn(partner)),
        );
        expect(joined).toBe(true);
      }
    });
  });

  it('put half of the gluons that a gluon emits on either of its colour lines', () => {
    const batch = coherentBatch({ coherent: true, process: 'scalar-gg', energy: 500 }, 1000);
    let [onColour, all] = [0, 0];
    for (let n = 0; n < 1000; n++) {
      const { entries, steps } = batch.view(n);
      for (let step = 0; step < steps.length; step++) {
        if (steps.channel[step] !== 1) continue;
        all++;
        if (entries.colour[steps.j[step]] === entries.colour[steps.emitter[step]]) onColour++;
      }
    }
    // four standard deviations: probability 6e-5
    expect(Math.abs(onColour - all / 2)).toBeLessThan(2 * Math.sqrt(all));
  });

  it('number lines and generations by who emitted whom', () => {
    forEach(({ entries, steps }) => {
      for (let step = 0; step < steps.length; step++) {
        const [a, i, j] = [steps.emitter[step], steps.i[step], steps.j[step]];
        expect([entries.from[i], entries.from[j]]).toEqual([a, a]);
        expect([entries.madeBy[i], entries.madeBy[j], entries.endedBy[a]]).toEqual([step, step, step]);
        expect(entries.line[i]).toBe(entries.line[a]);
        expect(entries.line[j]).toBe(2 + step);
        const line = entries.line[a];
        expect(steps.generation[step]).toBe(line < 2 ? 0 : 1 + steps.generation[line - 2]);
      }
    });
  });
});

describe('rejected trials of one-to-two branchings', () => {
  it('belong to the step in which their line branches next, fall in t, and add up', () => {
    const seen = [new Set<number>(), new Set<number>()];
    for (const sample of SAMPLES) {
      const batch = coherentBatch({ ...sample, trials: true }, 60);
      const reasons = seen[sample.coherent ? 1 : 0];
      for (let n = 0; n < 60; n++) {
        const { entries, steps, trials, head } = batch.view(n);
        const counts = new Int32Array(steps.length + 1);
        const last = new Map<number, number>();
        for (let k = 0; k < trials!.length; k++) {
          const [before, emitter, t] = [trials!.before[k], trials!.emitter[k], trials!.t[k]];
          counts[before]++;
          reasons.add(trials!.reason[k]);
          expect(entries.endedBy[emitter]).toBe(before < steps.length ? before : -1);
          expect(t).toBeLessThan((last.get(emitter) ?? head.hardScale) * (1 + 1e-12));
          expect(t).toBeGreaterThan(head.tLow * (1 - 1e-12));
          if (before < steps.length) {
            expect(steps.emitter[before]).toBe(emitter);
            expect(t).toBeGreaterThan(steps.t[before] * (1 - 1e-12));
            expect(t).toBeLessThan(steps.tStart[before] * (1 + 1e-12));
          }
          if (k > 0) expect(before).toBeGreaterThanOrEqual(trials!.before[k - 1]);
          expect(trials!.ratio[k] <= 1 || Number.isNaN(trials!.ratio[k])).toBe(true);
          last.set(emitter, t);
        }
        expect(counts.subarray(0, steps.length)).toEqual(steps.rejected);
      }
    }
    // phase space (a pair that does not fit) and angular veto belong to the incoherent cascade
    const words = seen.map((codes) => [...codes].map((code) => REASONS[code]).sort());
    expect(words[1]).toEqual(['coupling', 'cutoff', 'kernel']);
    expect(words[0]).toEqual(['angular veto', 'coupling', 'cutoff', 'kernel', 'phase space']);
  });
});
