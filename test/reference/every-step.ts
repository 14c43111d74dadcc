import { CHANNELS, coloursAlive, type History } from '../../engine/index.ts';
import { engineEvents, momentumOf } from './engine-sample.ts';
import {
  angle,
  couplingFor,
  type End,
  exponent,
  Generator,
  gluonKernel,
  halfRapidity,
  lowestT,
  pairKernel,
  quarkKernel,
  rate,
  type Settings,
  space,
  uniformPValue,
} from './independent/index.ts';

interface Competitor {
  readonly emitter: number;
  readonly partner: number;
  readonly channel: (typeof CHANNELS)[number];
  readonly end: End;
}

/** Every dipole end and channel that competes after `step`, in the order of dipoles. */
function competitors(history: History, step: number, settings: Settings, shared: End): Competitor[] {
  const { colourEnd, anticolourEnd } = coloursAlive(history, step);
  const out: Competitor[] = [];
  for (let dipole = 0; dipole < colourEnd.length; dipole++) {
    const [a, b] = [colourEnd[dipole], anticolourEnd[dipole]];
    const [p, q] = [momentumOf(history, a), momentumOf(history, b)];
    const q2 = 4 * p[3] * q[3] * Math.sin(angle(space(p), space(q)) / 2) ** 2;
    for (const [emitter, partner] of [
      [a, b],
      [b, a],
    ]) {
      const own = { ...shared, q2 };
      if (history.entries.id[emitter] !== 21) {
        out.push({ emitter, partner, channel: 'q_qg', end: own });
        continue;
      }
      out.push({ emitter, partner, channel: 'g_gg', end: { ...own, kernel: gluonKernel } });
      const pairs = (z: number): number => settings.flavours * pairKernel(z, 0);
      out.push({ emitter, partner, channel: 'g_qq', end: { ...own, kernel: pairs } });
    }
  }
  return out;
}

/** Kolmogorov-Smirnov p-values of the uniform numbers of physics.md section 9, by name and split. */
export type UniformityVerdict = ReadonlyMap<string, number>;

/**
 * Grow `events` with the engine and compute u_z, u_phi and u_channel of every step by quadrature, and u_t of the steps
 * of the first `timed` events (dear: two-dimensional integrals over every end).
 */
export function judgeEverySteps(
  settings: Settings,
  seed: number,
  events: number,
  timed: number,
): UniformityVerdict {
  const coupling = couplingFor(settings.coupling, settings.cutoff ** 2, settings.energy ** 2);
  const shared: End = {
    q2: 0,
    kernel: quarkKernel,
    coupling,
    order: settings.order,
    cut2: settings.cutoff ** 2,
  };
  const tLow = lowestT(shared);
  const random = new Generator(seed);
  const numbers = new Map<string, number[]>();
  const put = (name: string, u: number): void => {
    const list = numbers.get(name);
    if (list) list.push(u);
    else numbers.set(name, [u]);
  };
  let event = 0;
  for (const history of engineEvents({ ...settings, seed }, events)) {
    const { steps } = history;
    for (let s = 0; s < steps.length; s++) {
      const [t, z] = [steps.t[s], steps.z[s]];
      const channel = CHANNELS[steps.channel[s]];
      const all = competitors(history, s - 1, settings, shared);
      const rates = all.map(({ end }) => rate(end, t));
      const chosen = all.findIndex(
        (c) => c.emitter === steps.emitter[s] && c.partner === steps.partner[s] && c.channel === channel,
      );
      const total = rates.reduce((x, y) => x + y, 0);
      const below = rates.slice(0, chosen).reduce((x, y) => x + y, 0);
      const u = (below + random.uniform() * rates[chosen]) / total;
      put('u_channel', u);
      put(`u_channel step ${Math.min(s, 4)}`, u);
      const uz = rate(all[chosen].end, t, -Infinity, halfRapidity(z)) / rates[chosen];
      put(`u_z ${channel}`, uz);
      put(`u_z ${s === 0 ? 'first' : 'later'}`, uz);
      put(`u_phi ${channel}`, steps.azimuth[s] / (2 * Math.PI));
      if (event < timed) {
        const gap = (to: number): number =>
          Math.exp(-all.reduce((sum, c) => sum + exponent(c.end, to, steps.tStart[s]), 0));
        const none = gap(tLow);
        const ut = (gap(t) - none) / (1 - none);
        put('u_t', ut);
        put(`u_t ${s === 0 ? 'first' : 'later'}`, ut);
      }
    }
    event++;
  }
  return new Map([...numbers].map(([name, list]) => [name, uniformPValue(list)]));
}
