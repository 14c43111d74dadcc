import { CA, CF, type Coupling, couplingFor, integrate, M_BOTTOM, M_CHARM, TR } from './independent/index.ts';
import { integratePieces } from './independent/quadrature/rules.ts';

/** What a parton line's rate depends on. */
export interface Line {
  /** 21 or the PDG number of a quark. */
  readonly id: number;
  readonly coupling: Coupling;
  readonly cutoff: number;
  readonly flavours: number;
  readonly masses: boolean;
}

/** A line under these settings; its coupling serves scales from pTmin to `energy`. */
export function makeLine(
  id: number,
  energy: number,
  settings: Pick<Line, 'cutoff' | 'flavours' | 'masses'> & { coupling: Parameters<typeof couplingFor>[0] },
): Line {
  const { cutoff, flavours, masses } = settings;
  const coupling = couplingFor(settings.coupling, cutoff ** 2, energy ** 2);
  return { id: Math.abs(id), coupling, cutoff, flavours, masses };
}

const massOf = ({ masses }: Line, id: number): number =>
  masses && id === 4 ? M_CHARM : masses && id === 5 ? M_BOTTOM : 0;

const fraction = (y: number): number => 1 / (1 + Math.exp(-y));

/** z between which a condition that holds at `inside` holds, sought by bisection in 0 < z < 1. */
function edges(holds: (z: number) => boolean, inside: number): [number, number] {
  const edge = (outside: number): number => {
    let [a, b] = [inside, outside];
    for (let n = 0; n < 60; n++) {
      const middle = (a + b) / 2;
      if (holds(middle)) a = middle;
      else b = middle;
    }
    return a;
  };
  return [edge(0), edge(1)];
}

/** Rate per ln t at t = qt^2 of one channel, over z below `below`. @param pair PDG number of the quark of g -> q qbar. */
export function channelRate(line: Line, pair: number, t: number, below = 1): number {
  const m2 = massOf(line, pair || line.id) ** 2;
  const c2 = line.cutoff ** 2;
  const pT2 = (z: number): number => {
    const w = 1 - z;
    return (z * w) ** 2 * t - (pair || line.id === 21 ? (pair ? m2 : 0) : w * w * m2);
  };
  // pT is largest at z = 1/2, for a heavy quark where 2 z^2 t - z t - m^2 = 0
  const best = pair || m2 === 0 ? 0.5 : (t + Math.sqrt(t * t + 8 * t * m2)) / (4 * t);
  if (best >= 1 || pT2(best) <= c2) return 0;
  const [low, high] = edges((z) => pT2(z) >= c2, best);
  const top = Math.min(high, below);
  if (top <= low) return 0;
  const y = (z: number): number => Math.log(z / (1 - z));
  const rate = (at: number): number => {
    const z = fraction(at);
    const kappa = z * (1 - z);
    const kernel = pair
      ? TR * (1 - 2 * kappa + (2 * m2) / (kappa * t))
      : line.id === 21
        ? CA * (z / (1 - z) + (1 - z) / z + kappa)
        : CF * ((1 + z * z) / (1 - z) - (2 * m2) / (kappa * t));
    return (line.coupling.alpha(kappa * kappa * t) / (2 * Math.PI)) * kernel * kappa;
  };
  const kinks = line.coupling.kinks
    .map((kink) => Math.sqrt(t / kink) / 4)
    .filter((ratio) => ratio > 1)
    .flatMap((ratio) => [-1, 1].map((sign) => sign * 2 * Math.acosh(Math.sqrt(ratio))))
    .sort((a, b) => a - b);
  return integratePieces(rate, y(low), y(top), kinks);
}

const channelsOf = ({ id, flavours }: Line): number[] =>
  id === 21 ? [0, ...Array.from({ length: flavours }, (_, n) => n + 1)] : [0];

/** Rate per ln t of all channels. */
export const lineRate = (line: Line, t: number): number =>
  channelsOf(line).reduce((sum, pair) => sum + channelRate(line, pair, t), 0);

/**
 * Expected branchings of a line between 16 pTmin^2 and t.
 *
 * In ln t = ln(16 pTmin^2) + x^2, in which the opening of the region is smooth. Accuracy: 1e-9 at fixed coupling without
 * masses, 1e-6 where thresholds or masses open inside.
 */
export function lineExponent(line: Line, t: number): number {
  const lnLow = Math.log(16 * line.cutoff ** 2);
  const top = Math.log(t) - lnLow;
  if (top <= 0) return 0;
  return integrate((x) => 2 * x * lineRate(line, Math.exp(lnLow + x * x)), 0, Math.sqrt(top), 0.25);
}

/** The same as a function of t, interpolated; accuracy 1e-3. */
export function exponentTable(line: Line, highest: number): (t: number) => number {
  const lnLow = Math.log(16 * line.cutoff ** 2);
  const width = Math.sqrt(Math.log(highest * 1.001) - lnLow) / 120;
  const sums = [0];
  for (let n = 0; n < 120; n++) {
    const cell = integrate(
      (x) => 2 * x * lineRate(line, Math.exp(lnLow + x * x)),
      n * width,
      (n + 1) * width,
    );
    sums.push(sums[n] + cell);
  }
  return (t) => {
    const x = Math.sqrt(Math.max(0, Math.log(t) - lnLow)) / width;
    const n = Math.min(119, Math.floor(x));
    return sums[n] + (x - n) * (sums[n + 1] - sums[n]);
  };
}
