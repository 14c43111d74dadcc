import type { CHANNELS } from '../history/index.ts';
import { quarkMass } from '../qcd/index.ts';
import { EndPhaseSpace } from './end-phase-space.ts';
import { type EndRates, MasslessKtRates, QuadratureRates } from './end-rates.ts';
import { ExponentTable } from './exponent-table.ts';
import type { KernelSettings } from './kernel-settings.ts';
import { Strength } from './strength.ts';
import { G_GG, G_QQ, MassiveDensity, MasslessDensity, Q_QG, type ZDensity } from './z-density.ts';

/** Channels of a dipole end that share one phase space: their rates, and the table of their exponents. */
export interface EndFamily {
  readonly space: EndPhaseSpace;
  readonly density: ZDensity;
  readonly rates: EndRates;
  readonly table: ExponentTable;
}

/** Which channel of which dipole end. */
export interface DipoleEnd {
  readonly channel: (typeof CHANNELS)[number];
  /** PDG numbers. */
  readonly emitter: number;
  readonly partner: number;
  /** PDG number of the quark of g -> q qbar. */
  readonly flavour?: number;
  /** 2 p.q of the dipole [GeV^2], up to the square of the event's energy. */
  readonly q2: number;
  /** Whether the first emission's matrix element corrects the rates where it is asked for: the hard process's own dipoles. */
  readonly first?: boolean;
}

/** Kinds of partons by what their mass does in a kernel. */
export const LIGHT = 0;
export const CHARM = 1;
export const BOTTOM = 2;
const KINDS = [0, quarkMass(4), quarkMass(5)];

/**
 * Everything that one set of settings needs, made when it is first asked for.
 *
 * A massless family takes 10 to 100 ms to tabulate, a massive one 20 to 200 ms, with published velocity factors up to
 * 1.3 s; an event with heavy quarks may need five of them, all events together fifteen.
 */
export class DipoleKernels {
  readonly settings: KernelSettings;
  /** Massless flavours that a gluon splits into, and the kinds of the heavy ones. */
  readonly lightFlavours: number;
  readonly heavyFlavours: readonly number[];
  private readonly strength: Strength;
  private readonly emissions: (EndFamily | null)[] = new Array(9).fill(null);
  private readonly splittings: (EndFamily | null)[] = new Array(9).fill(null);
  private firstGap: EndFamily | null = null;

  /** @throws LandauPoleError where the cutoff is not above the pole of the coupling. */
  constructor(settings: KernelSettings) {
    this.settings = settings;
    const { flavours, masses } = settings;
    this.lightFlavours = masses ? Math.min(flavours, 3) : flavours;
    this.heavyFlavours = masses ? [CHARM, BOTTOM].slice(0, Math.max(0, flavours - 3)) : [];
    this.strength = new Strength(settings);
  }

  /** Kind of a parton by PDG number. */
  kindOf(id: number): number {
    const flavour = Math.abs(id);
    return this.settings.masses && (flavour === 4 || flavour === 5) ? flavour - 3 : LIGHT;
  }

  /** Mass [GeV] that the kernels give a parton, by PDG number. */
  massOf(id: number): number {
    return KINDS[this.kindOf(id)];
  }

  /**
   * Family of an end that keeps its kind: q -> q g alone for a heavy emitter; else q -> q g, g -> g g and g -> q qbar of
   * one massless flavour.
   */
  emission(emitter: number, partner: number): EndFamily {
    const at = 3 * emitter + partner;
    this.emissions[at] ??= this.makeEmission(KINDS[emitter], KINDS[partner]);
    return this.emissions[at];
  }

  /** Family of g -> Q Qbar of a heavy flavour. */
  splitting(quark: number, partner: number): EndFamily {
    const at = 3 * quark + partner;
    this.splittings[at] ??= this.makeMassive(0, KINDS[partner], KINDS[quark], KINDS[quark], [G_QQ]);
    return this.splittings[at];
  }

  /** Family of the massless ends of the hard process's dipoles, corrected to the matrix element; null where it is not. */
  first(): EndFamily | null {
    const { firstEmission, energy } = this.settings;
    if (firstEmission === null) return null;
    if (this.firstGap === null) {
      const { strength, virtuality } = this;
      const space = new EndPhaseSpace(virtuality, { emitter: 0, partner: 0, i: 0, j: 0 });
      const density = new MasslessDensity(virtuality, strength, firstEmission);
      const rates = new QuadratureRates(virtuality, density, null, space, strength);
      const table = new ExponentTable(rates, space, strength.bends, energy * energy, true);
      this.firstGap = { space, density, rates, table };
    }
    return this.firstGap;
  }

  /** Family of one channel of an end. */
  familyOf({ channel, emitter, partner, flavour = 0, first = false }: DipoleEnd): EndFamily {
    const corrected = first ? this.first() : null;
    if (corrected !== null) return corrected;
    const quark = channel === 'g_qq' ? this.kindOf(flavour) : LIGHT;
    return quark === LIGHT
      ? this.emission(this.kindOf(emitter), this.kindOf(partner))
      : this.splitting(quark, this.kindOf(partner));
  }

  private get virtuality(): boolean {
    return this.settings.order === 'virtuality';
  }

  private makeEmission(emitter: number, partner: number): EndFamily {
    if (emitter > 0) return this.makeMassive(emitter, partner, emitter, 0, [Q_QG]);
    if (partner > 0) return this.makeMassive(0, partner, 0, 0, [Q_QG, G_GG, G_QQ]);
    const { strength, virtuality } = this;
    const space = new EndPhaseSpace(virtuality, { emitter: 0, partner: 0, i: 0, j: 0 });
    const density = new MasslessDensity(virtuality, strength, null);
    const rates = virtuality
      ? new QuadratureRates(true, density, null, space, strength)
      : new MasslessKtRates(strength);
    return this.tabulate(rates, density, space);
  }

  private makeMassive(
    emitter: number,
    partner: number,
    i: number,
    j: number,
    channels: readonly number[],
  ): EndFamily {
    const { strength, virtuality } = this;
    const { velocityFactors } = this.settings;
    const masses = { emitter, partner, i, j };
    const space = new EndPhaseSpace(virtuality, masses);
    const density = new MassiveDensity(virtuality, velocityFactors, strength, masses, channels);
    // with velocity factors all of them can be negative beside a heavy partner, without only q -> q g of a heavy quark
    const turns = emitter > 0 || (velocityFactors === 'published' && partner > 0);
    const rates = new QuadratureRates(virtuality, density, turns ? density : null, space, strength);
    return this.tabulate(rates, density, space);
  }

  private tabulate(rates: EndRates, density: ZDensity, space: EndPhaseSpace): EndFamily {
    const { energy } = this.settings;
    const table = new ExponentTable(rates, space, this.strength.bends, energy * energy, false);
    return { space, density, rates, table };
  }
}
