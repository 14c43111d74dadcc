import { branch } from './branching.ts';
import { type Coupling, type CouplingKind, couplingFor } from './coupling.ts';
import { drawCosine, flavourFractions } from './electroweak.ts';
import {
  GLUON_BOUND,
  gluonKernel,
  type Kernel,
  PAIR_BOUND,
  pairKernel,
  QUARK_BOUND,
  quarkKernel,
} from './kernels.ts';
import { Generator } from './random.ts';
import { angle, type Four, product, space } from './vectors.ts';

export interface Settings {
  readonly energy: number;
  readonly order: 'kt' | 'virtuality';
  readonly coupling: CouplingKind;
  /** kTmin [GeV]. */
  readonly cutoff: number;
  readonly flavours: number;
  /** PDG number, or null for the electroweak mix. */
  readonly quark: number | null;
}

export interface Parton {
  readonly id: number;
  readonly p: Four;
  /** Opening angle of the step that made it as emitter or emission; pi from the hard process. */
  readonly birthAngle: number;
}

export interface StepRecord {
  readonly channel: 'q_qg' | 'g_gg' | 'g_qq';
  /** PDG number of the quark of g -> q qbar, otherwise 0. */
  readonly pair: number;
  readonly t: number;
  readonly z: number;
  readonly openingAngle: number;
  readonly birthAngle: number;
  readonly partnerAngle: number;
}

export interface ShowerEvent {
  readonly flavour: number;
  /** cos of the quark's polar angle. */
  readonly cosine: number;
  readonly partons: readonly Parton[];
  readonly steps: readonly StepRecord[];
}

interface Channel {
  readonly name: StepRecord['channel'];
  readonly kernel: Kernel;
  readonly weight: number;
  readonly bound: number;
}

interface Proposal {
  chain: number;
  emitter: number;
  partner: number;
  channel: Channel;
  lnT: number;
  y: number;
  z: number;
}

/**
 * The dipole shower of e+e- -> q qbar in the plainest way that its definition allows.
 *
 * A colour singlet is a chain quark, gluons, antiquark; neighbours are dipoles; a gluon emission is inserted between
 * the ends of its dipole, and g -> q qbar cuts the chain in two at the gluon. Every end and channel of every dipole
 * competes by itself: from the last t it draws trials in ln t with a constant overestimate, flat in ln(z/(1-z)) over
 * the widest range that the cutoff leaves, until one is accepted or falls below the best of the others.
 */
export class PlainShower {
  readonly settings: Settings;
  private readonly random: Generator;
  private readonly coupling: Coupling;
  private readonly alphaMax: number;
  private readonly cut2: number;
  private readonly quark: Channel;
  private readonly gluon: readonly Channel[];

  constructor(settings: Settings, seed: number) {
    this.settings = settings;
    this.random = new Generator(seed);
    this.cut2 = settings.cutoff ** 2;
    this.coupling = couplingFor(settings.coupling, this.cut2, settings.energy ** 2);
    this.alphaMax = this.coupling.alpha(this.cut2);
    this.quark = { name: 'q_qg', kernel: quarkKernel, weight: 1, bound: QUARK_BOUND };
    this.gluon = [
      { name: 'g_gg', kernel: gluonKernel, weight: 1, bound: GLUON_BOUND },
      {
        name: 'g_qq',
        kernel: pairKernel,
        weight: settings.flavours,
        bound: settings.flavours * PAIR_BOUND,
      },
    ];
  }

  /** The next event of this sequence. */
  event(): ShowerEvent {
    const { energy, order, flavours } = this.settings;
    const flavour = this.settings.quark ?? this.drawFlavour();
    const cosine = drawCosine(flavour, energy, () => this.random.uniform());
    const chains: Parton[][] = [this.hardPair(flavour, cosine)];
    const steps: StepRecord[] = [];
    let lnT = Math.log(order === 'kt' ? energy ** 2 / 4 : energy ** 2);
    for (;;) {
      const next = this.nextStep(chains, lnT);
      if (!next) break;
      lnT = next.lnT;
      steps.push(this.apply(chains, next, flavours));
    }
    return { flavour, cosine, partons: chains.flat(), steps };
  }

  private drawFlavour(): number {
    const { energy, flavours } = this.settings;
    let u = this.random.uniform();
    const fractions = flavourFractions(energy, flavours);
    for (let n = 0; n < fractions.length - 1; n++) {
      u -= fractions[n];
      if (u < 0) return n + 1;
    }
    return fractions.length;
  }

  private hardPair(flavour: number, cosine: number): Parton[] {
    const e = this.settings.energy / 2;
    const phi = 2 * Math.PI * this.random.uniform();
    const sine = Math.sqrt(1 - cosine * cosine);
    const [x, y, z] = [e * sine * Math.cos(phi), e * sine * Math.sin(phi), e * cosine];
    return [
      { id: flavour, p: [x, y, z, e], birthAngle: Math.PI },
      { id: -flavour, p: [-x, -y, -z, e], birthAngle: Math.PI },
    ];
  }

  private nextStep(chains: readonly Parton[][], lnT: number): Proposal | null {
    const lowest = Math.log(this.settings.order === 'kt' ? this.cut2 : 4 * this.cut2);
    let best: Proposal | null = null;
    for (let chain = 0; chain < chains.length; chain++) {
      const partons = chains[chain];
      for (let n = 0; n + 1 < partons.length; n++) {
        const q2 = 2 * product(partons[n].p, partons[n + 1].p);
        for (const [emitter, partner] of [
          [n, n + 1],
          [n + 1, n],
        ]) {
          const channels = partons[emitter].id === 21 ? this.gluon : [this.quark];
          for (const channel of channels) {
            const found = this.compete(q2, channel, lnT, best ? best.lnT : lowest);
            if (found) best = { chain, emitter, partner, channel, ...found };
          }
        }
      }
    }
    return best;
  }

  // First accepted trial of one end and channel between lnT and lnLow.
  private compete(
    q2: number,
    channel: Channel,
    lnT: number,
    lnLow: number,
  ): { lnT: number; y: number; z: number } | null {
    const root = 1 - (4 * this.cut2) / q2;
    if (root <= 0) return null;
    const r = Math.sqrt(root);
    const widest = Math.log((1 + r) / (1 - r));
    const kt = this.settings.order === 'kt';
    const overestimate = ((this.alphaMax * channel.bound) / (2 * Math.PI)) * 2 * widest;
    for (;;) {
      lnT += Math.log(this.random.uniform()) / overestimate;
      if (lnT < lnLow) return null;
      const z = 1 / (1 + Math.exp(-widest * (2 * this.random.uniform() - 1)));
      const t = Math.exp(lnT);
      const y = kt ? t / (z * (1 - z) * q2) : t / q2;
      if (y >= 1) continue;
      const kT2 = kt ? t : z * (1 - z) * t;
      if (kT2 < this.cut2) continue;
      const rate = channel.weight * z * (1 - z) * (1 - y) * channel.kernel(z, y);
      const ratio = (rate / channel.bound) * (this.coupling.alpha(kT2) / this.alphaMax);
      if (ratio > 1 + 1e-12) throw new Error(`rate exceeds its bound: ${ratio} at z = ${z}, y = ${y}`);
      if (this.random.uniform() < ratio) return { lnT, y, z };
    }
  }

  private apply(chains: Parton[][], step: Proposal, flavours: number): StepRecord {
    const partons = chains[step.chain];
    const before = partons[step.emitter];
    const partner = partons[step.partner];
    const phi = 2 * Math.PI * this.random.uniform();
    const after = branch(before.p, partner.p, step.y, step.z, phi);
    const openingAngle = angle(space(after.i), space(after.j));
    const pair =
      step.channel.name === 'g_qq' ? Math.min(flavours, 1 + Math.floor(flavours * this.random.uniform())) : 0;
    partons[step.partner] = { ...partner, p: after.k };
    if (pair > 0) {
      // The quark keeps the gluon's colour, so it heads the rest of the chain; the antiquark ends the chain before it.
      const quark: Parton = { id: pair, p: after.i, birthAngle: openingAngle };
      const antiquark: Parton = { id: -pair, p: after.j, birthAngle: openingAngle };
      const tail = partons.splice(step.emitter);
      partons.push(antiquark);
      chains.push([quark, ...tail.slice(1)]);
    } else {
      partons[step.emitter] = { id: before.id, p: after.i, birthAngle: openingAngle };
      const gluon: Parton = { id: 21, p: after.j, birthAngle: openingAngle };
      partons.splice(Math.max(step.emitter, step.partner), 0, gluon);
    }
    return {
      channel: step.channel.name,
      pair,
      t: Math.exp(step.lnT),
      z: step.z,
      openingAngle,
      birthAngle: before.birthAngle,
      partnerAngle: angle(space(before.p), space(partner.p)),
    };
  }
}
