import { drawCosine } from './independent/electroweak.ts';
import {
  add,
  angle,
  CA,
  CF,
  type Coupling,
  type CouplingKind,
  couplingFor,
  cross,
  type Four,
  flavourFractions,
  Generator,
  type MeasuredStep,
  product,
  scale,
  space,
  type Three,
  TR,
  unit,
} from './independent/index.ts';
import { length } from './independent/vectors.ts';

export interface PlainSettings {
  readonly process: 'ee' | 'scalar-gg' | 'scalar-bb';
  readonly energy: number;
  readonly coupling: CouplingKind;
  /** pTmin [GeV]. */
  readonly cutoff: number;
  readonly flavours: number;
  /** PDG number, or null for the electroweak mix; of process ee. */
  readonly quark: number | null;
  readonly masses: boolean;
  /** false: the incoherent cascade. */
  readonly coherent: boolean;
}

interface Found {
  readonly t: number;
  readonly z: number;
  readonly pT: number;
  readonly channel: MeasuredStep['channel'];
  readonly pair: number;
}

interface Twig {
  readonly id: number;
  readonly mass: number;
  readonly start: number;
  /** Light-cone fraction of the jet. */
  readonly fraction: number;
  found: Found | null;
  daughters: [Twig, Twig] | null;
  q2: number;
  p: Four;
}

export interface PlainEvent {
  readonly momenta: Four[];
  readonly ids: number[];
  readonly steps: MeasuredStep[];
  /** Of every step, mothers before daughters. */
  readonly found: Found[];
  readonly regrown: number;
}

/**
 * One-to-two branchings as physics.md section 6 words them, in the plainest way: recursion over the tree, channel by
 * channel competition with constant overestimates flat in ln t, four-vectors of the Sudakov decomposition, an explicit
 * boost whose common factor is found by bisection.
 *
 * With t = qt^2 (coherent) or q^2 - m^2, kappa = z(1-z), M^2 = kappa t or t: P and alpha_s(z(1-z) M^2) as in section 6.
 * The massive incoherent cascade is not in section 6: there the rate is per ln(q^2 - m^2) and 2 m^2/(kappa qt^2) is
 * 2 m^2/(q^2 - m^2).
 */
export class PlainCoherent {
  readonly settings: PlainSettings;
  private readonly random: Generator;
  private readonly coupling: Coupling;
  private readonly alphaMax: number;

  constructor(settings: PlainSettings, seed: number) {
    this.settings = settings;
    this.random = new Generator(seed);
    this.coupling = couplingFor(settings.coupling, settings.cutoff ** 2, settings.energy ** 2);
    this.alphaMax = this.coupling.alpha(settings.cutoff ** 2);
  }

  event(): PlainEvent {
    const { energy, coherent } = this.settings;
    const hard = this.hardPartons();
    for (let regrown = 0; ; regrown++) {
      const masses = hard.map(({ mass }) => mass);
      const roots = hard.map(({ id, mass }, n): Twig => {
        const [b, c] = [(mass / energy) ** 2, (masses[1 - n] / energy) ** 2];
        const lambda = 1 + b * b + c * c - 2 * b - 2 * c - 2 * b * c;
        const start = coherent ? (energy ** 2 * (1 + b - c + Math.sqrt(lambda))) / 2 : energy ** 2;
        return this.bud(id, mass, start, 1);
      });
      if (coherent) for (const root of roots) this.branch(root);
      else {
        const misfit = (): boolean => this.virtuality(roots[0]) + this.virtuality(roots[1]) >= energy;
        this.settle(roots[0], roots[1], misfit);
        for (const root of roots) this.descend(root);
      }
      for (const root of roots) this.build(root);
      if (Math.sqrt(roots[0].q2) + Math.sqrt(roots[1].q2) >= energy) continue;
      roots.forEach((root, n) => {
        this.place(root, hard[n].p);
      });
      this.rescale(
        roots,
        hard.map(({ p }) => p),
      );
      return { ...collect(roots), regrown };
    }
  }

  private bud(id: number, mass: number, start: number, fraction: number): Twig {
    return { id, mass, start, fraction, found: null, daughters: null, q2: 0, p: [0, 0, 0, 0] };
  }

  private quarkMass(id: number): number {
    if (!this.settings.masses) return 0;
    return Math.abs(id) === 4 ? 1.5 : Math.abs(id) === 5 ? 4.8 : 0;
  }

  private hardPartons(): { id: number; mass: number; p: Four }[] {
    const { process, energy } = this.settings;
    const u = (): number => this.random.uniform();
    let id = process === 'scalar-gg' ? 21 : 5;
    let cosine = 2 * u() - 1;
    if (process === 'ee') {
      id = this.settings.quark ?? this.flavour();
      cosine = drawCosine(id, energy, u);
    }
    const mass = this.quarkMass(id);
    const size = Math.sqrt(energy ** 2 / 4 - mass ** 2);
    const sine = Math.sqrt(1 - cosine ** 2);
    const phi = 2 * Math.PI * u();
    const [x, y, z] = [size * sine * Math.cos(phi), size * sine * Math.sin(phi), size * cosine];
    return [
      { id, mass, p: [x, y, z, energy / 2] },
      { id: id === 21 ? 21 : -id, mass, p: [-x, -y, -z, energy / 2] },
    ];
  }

  private flavour(): number {
    const fractions = flavourFractions(this.settings.energy, this.settings.flavours);
    let u = this.random.uniform();
    for (let n = 0; n < fractions.length - 1; n++) {
      u -= fractions[n];
      if (u < 0) return n + 1;
    }
    return fractions.length;
  }

  // ---- evolution

  private branch(twig: Twig): void {
    twig.found = this.next(twig, twig.start);
    if (!twig.found) return;
    this.divide(twig, 2);
    for (const daughter of twig.daughters!) this.branch(daughter);
  }

  private divide(twig: Twig, power: number): void {
    const { t, z, channel, pair } = twig.found!;
    const scale = this.settings.coherent ? t : t + twig.mass ** 2;
    const [first, second] = channel === 'g_qq' ? [pair, -pair] : [twig.id, 21];
    twig.daughters = [
      this.bud(first, this.quarkMass(first), z ** power * scale, z * twig.fraction),
      this.bud(second, this.quarkMass(second), (1 - z) ** power * scale, (1 - z) * twig.fraction),
    ];
  }

  private square(twig: Twig): number {
    return twig.mass ** 2 + (twig.found ? twig.found.t : 0);
  }

  private virtuality(twig: Twig): number {
    return Math.sqrt(this.square(twig));
  }

  // both evolve; while they do not fit, the one with more of its range evolves on
  private settle(b: Twig, c: Twig, misfit: () => boolean): void {
    for (const twig of [b, c]) twig.found = this.next(twig, twig.start - twig.mass ** 2);
    while (misfit()) {
      const part = (twig: Twig): number => (twig.found ? this.square(twig) / twig.start : -1);
      const worse = part(c) > part(b) ? c : b;
      worse.found = this.next(worse, worse.found!.t);
    }
  }

  private descend(twig: Twig): void {
    if (!twig.found) return;
    this.divide(twig, 1);
    const [b, c] = twig.daughters!;
    const { z } = twig.found;
    this.settle(b, c, () => (1 - z) * this.square(b) + z * this.square(c) > z * (1 - z) * this.square(twig));
    this.descend(b);
    this.descend(c);
  }

  // highest accepted branching of all channels below t
  private next(twig: Twig, t: number): Found | null {
    const channels: [MeasuredStep['channel'], number][] =
      twig.id === 21
        ? [
            ['g_gg', 0],
            ...Array.from({ length: this.settings.flavours }, (_, n): [MeasuredStep['channel'], number] => [
              'g_qq',
              n + 1,
            ]),
          ]
        : [['q_qg', 0]];
    let best: Found | null = null;
    for (const [channel, pair] of channels) {
      const found = this.compete(twig, t, channel, pair, best ? best.t : 0);
      if (found) best = found;
    }
    return best;
  }

  private compete(
    twig: Twig,
    t: number,
    channel: MeasuredStep['channel'],
    pair: number,
    least: number,
  ): Found | null {
    const { cutoff, coherent, energy } = this.settings;
    const [m2, quark2] = [twig.mass ** 2, this.quarkMass(pair) ** 2];
    // smallest 1-z anywhere below t
    const edge = coherent ? cutoff / Math.sqrt(t) : cutoff ** 2 / t;
    if (!(edge < 0.25)) return null;
    const soft = Math.log((1 - edge) / edge);
    const area = channel === 'g_qq' ? TR : channel === 'q_qg' ? 2 * CF * soft : 2 * CA * soft;
    for (;;) {
      t *= this.random.uniform() ** (1 / ((this.alphaMax / (2 * Math.PI)) * area));
      if (t <= least || t < 4 * cutoff ** 2) return null;
      let z = this.random.uniform();
      let shape = TR;
      if (channel !== 'g_qq') {
        // density 1/(1-z), and for the gluon half of it mirrored
        z = 1 - edge * ((1 - edge) / edge) ** this.random.uniform();
        if (channel === 'g_gg' && this.random.uniform() < 0.5) z = 1 - z;
        shape = channel === 'q_qg' ? (2 * CF) / (1 - z) : CA / (z * (1 - z));
      }
      const kappa = z * (1 - z);
      const pair2 = coherent ? kappa * t : t;
      const light2 = channel === 'g_qq' ? quark2 : (1 - z) ** 2 * m2;
      const pT2 = kappa * pair2 - light2;
      if (pT2 < cutoff ** 2) continue;
      if (!coherent && Math.sqrt(t / kappa) >= twig.fraction * energy) continue;
      const kernel =
        channel === 'q_qg'
          ? CF * ((1 + z * z) / (1 - z) - (2 * m2) / pair2)
          : channel === 'g_gg'
            ? CA * (z / (1 - z) + (1 - z) / z + kappa)
            : TR * (1 - 2 * kappa + (2 * quark2) / pair2);
      const ratio = (kernel / shape) * (this.coupling.alpha(kappa * pair2) / this.alphaMax);
      if (ratio > 1 + 1e-12) throw new Error(`rate exceeds its bound: ${ratio} at z = ${z}, t = ${t}`);
      if (this.random.uniform() < ratio) return { t, z, pT: Math.sqrt(pT2), channel, pair };
    }
  }

  // ---- kinematics

  private build(twig: Twig): void {
    twig.q2 = twig.mass ** 2;
    if (!twig.daughters) return;
    const [b, c] = twig.daughters;
    this.build(b);
    this.build(c);
    const { z, pT } = twig.found!;
    twig.q2 = this.settings.coherent
      ? pT ** 2 / (z * (1 - z)) + b.q2 / z + c.q2 / (1 - z)
      : this.square(twig);
  }

  private place(root: Twig, p: Four): void {
    const axis = unit(space(p));
    const n: Four = [-axis[0], -axis[1], -axis[2], 1];
    const e1 = unit(cross(axis, Math.abs(axis[0]) < 0.6 ? [1, 0, 0] : [0, 1, 0]));
    const e2 = cross(axis, e1);
    const put = (twig: Twig, alpha: number, k: Three): void => {
      const k2 = k[0] ** 2 + k[1] ** 2 + k[2] ** 2;
      const beta = (twig.q2 + k2 - alpha ** 2 * product(p, p)) / (2 * alpha * product(p, n));
      twig.p = add(add(scale(alpha, p), scale(beta, n)), [k[0], k[1], k[2], 0]);
      if (!twig.daughters) return;
      const [b, c] = twig.daughters;
      const { z } = twig.found!;
      const pT = Math.sqrt(Math.max(0, z * (1 - z) * twig.q2 - (1 - z) * b.q2 - z * c.q2));
      const phi = 2 * Math.PI * this.random.uniform();
      const kick = e1.map((x, d) => pT * (Math.cos(phi) * x + Math.sin(phi) * e2[d]));
      put(b, z * alpha, [z * k[0] + kick[0], z * k[1] + kick[1], z * k[2] + kick[2]]);
      const w = 1 - z;
      put(c, w * alpha, [w * k[0] - kick[0], w * k[1] - kick[1], w * k[2] - kick[2]]);
    };
    put(root, 1, [0, 0, 0]);
  }

  private rescale(roots: readonly Twig[], parents: readonly Four[]): void {
    const sizes = parents.map((p) => length(space(p)));
    const excess = (k: number): number =>
      roots.reduce((sum, { q2 }, n) => sum + Math.sqrt(q2 + (k * sizes[n]) ** 2), -this.settings.energy);
    let [low, high] = [0, 2];
    for (let n = 0; n < 200; n++) {
      const middle = (low + high) / 2;
      if (excess(middle) < 0) low = middle;
      else high = middle;
    }
    roots.forEach((root, n) => {
      const axis = unit(space(parents[n]));
      const before = axis[0] * root.p[0] + axis[1] * root.p[1] + axis[2] * root.p[2];
      const after = low * sizes[n];
      // exp of the rapidity: (E + p)/mass before and after
      const ratio = (Math.sqrt(root.q2 + after ** 2) + after) / (root.p[3] + before);
      const [ch, sh] = [(ratio + 1 / ratio) / 2, (ratio - 1 / ratio) / 2];
      const turn = (twig: Twig): void => {
        const along = axis[0] * twig.p[0] + axis[1] * twig.p[1] + axis[2] * twig.p[2];
        const grown = ch * along + sh * twig.p[3] - along;
        twig.p = add(twig.p, [
          grown * axis[0],
          grown * axis[1],
          grown * axis[2],
          ch * twig.p[3] + sh * along - twig.p[3],
        ]);
        for (const daughter of twig.daughters ?? []) turn(daughter);
      };
      turn(root);
    });
  }
}

function collect(roots: readonly Twig[]): Omit<PlainEvent, 'regrown'> {
  const momenta: Four[] = [];
  const ids: number[] = [];
  const steps: MeasuredStep[] = [];
  const found: Found[] = [];
  const walk = (twig: Twig, birthAngle: number): void => {
    if (!twig.daughters || !twig.found) {
      momenta.push(twig.p);
      ids.push(twig.id);
      return;
    }
    const [b, c] = twig.daughters;
    const openingAngle = angle(space(b.p), space(c.p));
    const { channel, pair } = twig.found;
    found.push(twig.found);
    // colours are not followed here: no partner angle
    steps.push({ channel, pair, openingAngle, birthAngle, partnerAngle: NaN });
    walk(b, openingAngle);
    walk(c, openingAngle);
  };
  for (const root of roots) walk(root, Math.PI);
  return { momenta, ids, steps, found };
}
