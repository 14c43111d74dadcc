import { describe, expect, it } from 'vitest';
import { aliveEntries, coloursAlive, entriesAtEnd, type History } from '../../../engine/history/index.ts';
import { growEvent, resolveSettings } from '../../../engine/index.ts';
import { dot } from '../../../engine/math/index.ts';
import { LiveDipoles } from '../../../engine/probability/live-dipoles.ts';
import { historyByHand } from '../history-by-hand.ts';

const massless = (): number => 0;

/** The dipoles as `tag: colour end, anticolour end`, in the order of the tags, from the replay. */
function replayed(history: History, step: number): string[] {
  const { tag, colourEnd, anticolourEnd } = coloursAlive(history, step);
  return Array.from(tag, (t, n) => `${t}: ${colourEnd[n]} ${anticolourEnd[n]}`);
}

function followed(dipoles: LiveDipoles, history: History): string[] {
  const tags = history.entries.colour;
  return Array.from({ length: dipoles.count }, (_, n) => {
    const [a, b] = [dipoles.colourRow[n], dipoles.anticolourRow[n]];
    expect(dipoles.ofTag(tags[a])).toBe(n);
    return `${tags[a]}: ${a} ${b}`;
  }).sort();
}

describe('the dipoles of an event', () => {
  it.each(['ee', 'scalar-gg'] as const)('are those of the replay after every step, %s', (process) => {
    for (const order of ['kt', 'virtuality'] as const)
      for (let stream = 0; stream < 40; stream++) {
        const history = growEvent(resolveSettings({ process, order, energy: 1000 }), stream);
        const dipoles = new LiveDipoles(massless);
        dipoles.begin(history);
        for (let step = -1; step < history.steps.length; step++) {
          if (step >= 0) dipoles.advance(step);
          expect(followed(dipoles, history)).toEqual(replayed(history, step));
          expect([...dipoles.rows.subarray(0, dipoles.rowCount)]).toEqual([...aliveEntries(history, step)]);
          expect(dipoles.broken).toBe(0);
        }
      }
  });

  it.each(['local', 'global'] as const)('have the 2 p.q of the momenta at the end, recoil %s', (recoil) => {
    for (let stream = 0; stream < 20; stream++) {
      const history = growEvent(resolveSettings({ energy: 300, recoil, quark: 1 }), stream);
      const dipoles = new LiveDipoles(massless);
      dipoles.begin(history);
      for (let step = 0; step < history.steps.length; step++) dipoles.advance(step);
      const { px, py, pz, e } = entriesAtEnd(history);
      const momentum = (row: number): Float64Array => Float64Array.of(px[row], py[row], pz[row], e[row]);
      for (let n = 0; n < dipoles.count; n++) {
        const exact = 2 * dot(momentum(dipoles.colourRow[n]), momentum(dipoles.anticolourRow[n]));
        expect(dipoles.q2[n] / exact).toBeCloseTo(1, 9);
      }
    }
  });

  it('have the 2 p.q that the step says: y, z and 1-z of what was there', () => {
    for (const recoil of ['local', 'global'] as const)
      for (let stream = 0; stream < 40; stream++) {
        const history = growEvent(resolveSettings({ energy: 300, recoil, quark: 1 }), stream);
        const { steps, entries } = history;
        const dipoles = new LiveDipoles(massless);
        dipoles.begin(history);
        for (let step = 0; step < steps.length; step++) {
          const emitter = steps.emitter[step];
          const colour = entries.colour[steps.j[step]] === entries.colour[emitter];
          const tag = colour || entries.anticolour[emitter] === 0 ? entries.colour : entries.anticolour;
          const before = dipoles.q2[dipoles.ofTag(tag[emitter])];
          const { y, z, kT } = { y: steps.y[step], z: steps.z[step], kT: steps.kT[step] };
          // kT^2 = z(1-z) y Q^2, whatever recoils; a splitting of a gluon does not say through which line
          if (history.channels[steps.channel[step]] !== 'g_qq')
            expect(kT ** 2 / (z * (1 - z) * y * before)).toBeCloseTo(1, 6);
          dipoles.advance(step);
        }
      }
  });

  it('are broken where a tag lacks an end, and whole again when it has one', () => {
    const p = { px: 0, py: 0, pz: 50, e: 50, madeBy: -1, line: 0 };
    const q = { ...p, pz: -50, line: 1 };
    const history = historyByHand(
      [
        { ...p, id: 1, colour: 501, anticolour: 0, endedBy: -1 },
        { ...q, id: -1, colour: 0, anticolour: 502, endedBy: 0 },
        { ...q, id: -1, colour: 0, anticolour: 501, endedBy: -1, madeBy: 0 },
      ],
      [{ t: 10 }],
    );
    const dipoles = new LiveDipoles(massless);
    dipoles.begin(history);
    expect(dipoles.broken).toBe(2);
    dipoles.advance(0);
    expect(dipoles.broken).toBe(0);
    expect(dipoles.q2[dipoles.ofTag(501)]).toBeCloseTo(10_000, 8);
    expect(dipoles.ofTag(502)).toBe(-1);
  });
});
