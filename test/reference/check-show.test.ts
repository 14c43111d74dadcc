import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import type { GrowSettings } from '../../engine/index.ts';
import { historyToJson, type JsonHistory, jsonText } from '../../formats/index.ts';
import { engineEvents } from './engine-sample.ts';

// The stand-alone program independent/check-show.mjs reads an event's JSON and recomputes everything claimed from the
// rows: four-momentum to 1e-10 of sqrt(s), t, y, z, azimuth, kT, opening angle and partner to 1e-6.
const PROGRAM = fileURLToPath(new URL('independent/check-show.mjs', import.meta.url));

interface Fault {
  readonly step: number;
  readonly what: string;
}
interface Report {
  readonly steps: number;
  readonly worst: Record<string, number>;
  readonly faults: readonly Fault[];
}

function check(text: string): { status: number | null; reports: Report[] } {
  const run = spawnSync(process.execPath, [PROGRAM], { input: text, encoding: 'utf8', maxBuffer: 1 << 28 });
  const parsed = run.stdout ? JSON.parse(run.stdout) : [];
  return { status: run.status, reports: Array.isArray(parsed) ? parsed : [parsed] };
}

const asText = (settings: Partial<GrowSettings>, count: number): string =>
  Array.from(engineEvents(settings, count), (history) => jsonText(historyToJson(history))).join('\n');

// An event with at least five steps, one of them g -> q qbar, as a plain object that may be spoilt.
function specimen(): JsonHistory {
  for (const history of engineEvents({ quark: 1, seed: 901 }, 400, 5)) {
    if (Array.from(history.steps.channel).some((code) => history.channels[code] === 'g_qq')) {
      return JSON.parse(jsonText(historyToJson(history))) as JsonHistory;
    }
  }
  throw new Error('no event with five steps and a quark pair among 400');
}

const SAMPLES: Partial<GrowSettings>[] = [
  { quark: 1 },
  { quark: 1, order: 'virtuality' },
  { quark: 1, coupling: { kind: 'fixed', value: 0.118 } },
  { quark: 1, coupling: { kind: 'two-loop' } },
  { energy: 1000 },
  { energy: 1e6, cutoff: 0.5, coupling: { kind: 'fixed', value: 0.118 } },
];

describe('the JSON of an event', () => {
  it.each(SAMPLES)('holds all that it claims, by a program of its own: %o', (settings) => {
    const count = settings.energy === 1e6 ? 20 : 60;
    const { status, reports } = check(asText(settings, count));
    for (const report of reports) expect(report.faults).toEqual([]);
    expect(status).toBe(0);
    expect(reports.length).toBe(count);
    expect(reports.reduce((sum, report) => sum + report.steps, 0)).toBeGreaterThan(count);
  });

  type Spoil = readonly [what: string, spoil: (history: JsonHistory) => void];
  const nudge =
    (table: 'entries' | 'steps', column: string, row: number, factor: number) => (h: JsonHistory) => {
      h[table][column][row] = (h[table][column][row] as number) * factor;
    };
  const SPOILT: Spoil[] = [
    ['momentum', (h) => nudge('entries', 'e', h.entries.e.length - 1, 1 + 1e-8)(h)],
    ['t', nudge('steps', 't', 2, 1 - 3e-6)],
    ['y', nudge('steps', 'y', 1, 1 + 3e-6)],
    ['z', nudge('steps', 'z', 1, 1 + 1e-5)],
    ['kT', nudge('steps', 'kT', 1, 1 + 3e-6)],
    ['azimuth', nudge('steps', 'azimuth', 1, 1 + 1e-4)],
    ['openingAngle', nudge('steps', 'openingAngle', 1, 1 + 3e-6)],
    [
      'recoiler is the partner',
      (h) => {
        h.steps.partner[1] = h.steps.emitter[1];
      },
    ],
    [
      'every colour tag has one colour and one anticolour end',
      (h) => {
        h.entries.colour[h.steps.i[0] as number] = 9999;
      },
    ],
  ];

  it('is found wrong in what is spoilt', () => {
    const whole = jsonText(specimen());
    const texts = SPOILT.map(([, spoil]) => {
      const history = JSON.parse(whole) as JsonHistory;
      spoil(history);
      return JSON.stringify(history);
    });
    const { status, reports } = check([whole, ...texts].join('\n'));
    expect(status).toBe(1);
    expect(reports[0].faults).toEqual([]);
    SPOILT.forEach(([what], n) => {
      expect(reports[n + 1].faults.map((fault) => fault.what)).toContain(what);
    });
  });

  it('is refused with 2 when it is not JSON', () => {
    expect(check('{"head":').status).toBe(2);
  });
});
