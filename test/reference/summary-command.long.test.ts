import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';
import { hardEnd } from './first-step.ts';
import { type Estimate, firstStep, Observables, PlainShower, type Settings } from './independent/index.ts';

// What a user sees, `grow` and then `summary --json`, against the independent shower (four combined standard errors)
// and quadrature (four binomial ones); and one event shown from a short and from a long run, checked by the
// stand-alone program.
const COMMAND = fileURLToPath(new URL('../../viewer/terminal/branchlight.mjs', import.meta.url));
const CHECKER = fileURLToPath(new URL('independent/check-show.mjs', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'branchlight-reference-'));
afterAll(() => rmSync(folder, { recursive: true }));

const EVENTS = 50_000;
const AT_Z = { energy: 91.1876, cutoff: 1, flavours: 5, quark: 1 } as const;
const SAMPLES: { name: string; options: string[]; settings: Settings }[] = [
  { name: 'a', options: [], settings: { ...AT_Z, order: 'kt', coupling: { kind: 'one-loop' } } },
  {
    name: 'virtuality',
    options: ['--order', 'virtuality'],
    settings: { ...AT_Z, order: 'virtuality', coupling: { kind: 'one-loop' } },
  },
  {
    name: 'fixed',
    options: ['--coupling', 'fixed:0.118'],
    settings: { ...AT_Z, order: 'kt', coupling: { kind: 'fixed', value: 0.118 } },
  },
  {
    name: 'two-loop',
    options: ['--coupling', 'two-loop'],
    settings: { ...AT_Z, order: 'kt', coupling: { kind: 'two-loop' } },
  },
  {
    name: 'virtuality-two-loop',
    options: ['--order', 'virtuality', '--coupling', 'two-loop'],
    settings: { ...AT_Z, order: 'virtuality', coupling: { kind: 'two-loop' } },
  },
];

function command(...words: string[]): string {
  return execFileSync(process.execPath, [COMMAND, ...words], {
    encoding: 'utf8',
    maxBuffer: 1 << 28,
    stdio: ['ignore', 'pipe', 'ignore'],
  });
}

// Every option is given once: an own value takes the place of the common one.
function grow(file: string, events: number, options: readonly string[]): void {
  const common: [string, string][] = [
    ['--process', 'ee'],
    ['--quark', 'd'],
    ['--energy', '91.1876'],
    ['--shower', 'dipole'],
    ['--order', 'kt'],
    ['--recoil', 'local'],
    ['--coupling', 'one-loop'],
    ['--cutoff', '1'],
    ['--masses', 'off'],
    ['--first-emission', 'kernel'],
    ['--seed', '1'],
  ];
  const words = common.filter(([name]) => !options.includes(name)).flat();
  command('grow', ...words, ...options, '--events', String(events), '--out', file);
}

function summaryOf(file: string): Map<string, Estimate> {
  const json = JSON.parse(command('summary', file, '--json')) as Record<string, unknown>;
  const out = new Map<string, Estimate>();
  for (const [key, value] of Object.entries(json)) {
    if (key.startsWith('durham.')) {
      for (const [yCut, estimate] of Object.entries(value as object)) out.set(`${key} ${yCut}`, estimate);
    } else if (key !== 'lnInverseX') out.set(key, value as Estimate);
  }
  const { edges, counts } = json.lnInverseX as { edges: number[]; counts: number[] };
  for (let bin = 0; bin < 8; bin++) {
    const inside = counts.filter((_, n) => edges[n] >= bin - 1e-9 && edges[n + 1] <= bin + 1 + 1e-9);
    const mean = inside.reduce((sum, count) => sum + count, 0) / EVENTS;
    // The histogram carries no errors; the independent sample's own, which is as large, stands in below.
    out.set(`lnInverseX ${bin}`, { mean, error: NaN, count: EVENTS });
  }
  return out;
}

describe('the commands grow and summary', () => {
  it.each(SAMPLES)('give the means of an independent shower: $name', ({ name, options, settings }) => {
    const file = join(folder, `${name}.shower`);
    grow(file, EVENTS, options);
    const summary = summaryOf(file);
    const plain = new Observables(settings.energy);
    const shower = new PlainShower(settings, 1001);
    for (let n = 0; n < EVENTS; n++) {
      const { partons, steps } = shower.event();
      plain.add(
        partons.map((parton) => parton.p),
        steps,
      );
    }
    let compared = 0;
    for (const [key, independent] of plain.estimates()) {
      const found = summary.get(key);
      if (key === 'lnInverseX 8') continue;
      if (!found) throw new Error(`summary has no ${key}`);
      if (found.mean * found.count + independent.mean * independent.count < 25) continue;
      const error = Math.hypot(
        Number.isNaN(found.error) ? independent.error : found.error,
        independent.error,
      );
      expect(Math.abs(found.mean - independent.mean) / error, key).toBeLessThan(4);
      compared++;
    }
    expect(compared).toBeGreaterThan(30);
    const p = firstStep(hardEnd(settings)).noBranching;
    const { mean, error, count } = summary.get('noBranching')!;
    expect(count).toBe(EVENTS);
    expect(Math.abs(mean - p)).toBeLessThan(4 * Math.sqrt((p * (1 - p)) / EVENTS));
    expect(Math.abs(error / Math.sqrt((p * (1 - p)) / EVENTS) - 1)).toBeLessThan(0.05);
    expect(summary.get('rejectedPerStep')!.mean).toBeGreaterThan(0);
  });

  it('show an event that holds all that it claims and is the same from a short run', () => {
    const [long, short] = ['a', 'short'].map((name) => join(folder, `${name}.shower`));
    grow(short, 18, []);
    const shown = command('show', long, '--event', '17', '--json');
    expect(command('show', short, '--event', '17', '--json')).toBe(shown);
    const report = JSON.parse(execFileSync(process.execPath, [CHECKER], { encoding: 'utf8', input: shown }));
    expect(report.faults).toEqual([]);
    const all = command('show', long, '--event', '0..2000', '--json');
    const reports = JSON.parse(
      execFileSync(process.execPath, [CHECKER], { encoding: 'utf8', input: all, maxBuffer: 1 << 28 }),
    );
    expect(reports.length).toBe(2001);
  });
});
