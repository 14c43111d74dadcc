import type { EntryTable } from '../history/index.ts';
import { GLUON } from './dipole-exponents.ts';
import { CHARM, type DipoleKernels, type EndFamily } from './dipole-kernels.ts';
import type { LiveDipoles } from './live-dipoles.ts';
import { G_GG, G_QQ, Q_QG } from './z-density.ts';

/** Flavours of g -> q qbar, by PDG number. */
const MOST_FLAVOURS = 5;

// scratch, not reentrant: rates of a gluon's two sides, g -> g g and then each flavour
const ofSide = new Float64Array(2 * (1 + MOST_FLAVOURS));
const rates = new Float64Array(3);

/**
 * All that competes at one t: dipole ends with their channels, and their rates per unit of ln t.
 *
 * In a fixed order, that of section 9's cumulative probability: by emitter's row, by channel with g -> q qbar by flavour,
 * and for a gluon its colour's dipole before its anticolour's. Arrays have room for more than `count`.
 */
export class Competitors {
  count = 0;
  /** Rows of the entries. */
  emitter = new Int32Array(256);
  partner = new Int32Array(256);
  /** Codes into CHANNELS. */
  channel = new Uint8Array(256);
  /** PDG number of the quark of g -> q qbar, else 0. */
  flavour = new Uint8Array(256);
  /** Whether the emitter radiates through its colour. */
  throughColour = new Uint8Array(256);
  rate = new Float64Array(256);
  /** Sum of all rates. */
  total = 0;

  /** Take the dipoles as they are, at ln t. */
  fill(entries: EntryTable, dipoles: LiveDipoles, kernels: DipoleKernels, lnT: number, first: boolean): void {
    this.count = 0;
    this.total = 0;
    for (let n = 0; n < dipoles.rowCount; n++) {
      const row = dipoles.rows[n];
      const colour = dipoles.ofTag(entries.colour[row]);
      const anticolour = dipoles.ofTag(entries.anticolour[row]);
      if (entries.id[row] === GLUON)
        this.addGluon(entries, dipoles, kernels, lnT, first, row, colour, anticolour);
      else if (colour >= 0 || anticolour >= 0) {
        const dipole = colour >= 0 ? colour : anticolour;
        const through = colour >= 0;
        const partner = through ? dipoles.anticolourRow[dipole] : dipoles.colourRow[dipole];
        const family = familyOf(kernels, entries.id[row], entries.id[partner], first);
        if (!family.table.enter(dipoles.q2[dipole])) continue;
        family.table.rate(rates, lnT);
        this.add(row, partner, Q_QG, 0, through, rates[0]);
      }
    }
  }

  private addGluon(
    entries: EntryTable,
    dipoles: LiveDipoles,
    kernels: DipoleKernels,
    lnT: number,
    first: boolean,
    row: number,
    colour: number,
    anticolour: number,
  ): void {
    const { flavours } = kernels.settings;
    for (let side = 0; side < 2; side++) {
      const dipole = side === 0 ? colour : anticolour;
      if (dipole < 0) return;
      const partner = side === 0 ? dipoles.anticolourRow[dipole] : dipoles.colourRow[dipole];
      const partnerId = entries.id[partner];
      gluonRates(side * (1 + MOST_FLAVOURS), kernels, partnerId, dipoles.q2[dipole], lnT, first);
    }
    const partnerOf = (through: boolean): number =>
      through ? dipoles.anticolourRow[colour] : dipoles.colourRow[anticolour];
    for (let n = 0; n <= flavours; n++)
      for (const through of BOTH_SIDES) {
        const value = ofSide[(through ? 0 : 1 + MOST_FLAVOURS) + n];
        this.add(row, partnerOf(through), n === 0 ? G_GG : G_QQ, n, through, value);
      }
  }

  private add(
    emitter: number,
    partner: number,
    channel: number,
    flavour: number,
    throughColour: boolean,
    rate: number,
  ): void {
    if (!(rate > 0)) return;
    const at = this.count++;
    if (at === this.rate.length) this.widen();
    this.emitter[at] = emitter;
    this.partner[at] = partner;
    this.channel[at] = channel;
    this.flavour[at] = flavour;
    this.throughColour[at] = throughColour ? 1 : 0;
    this.rate[at] = rate;
    this.total += rate;
  }

  private widen(): void {
    this.emitter = doubled(this.emitter);
    this.partner = doubled(this.partner);
    this.channel = doubled(this.channel);
    this.flavour = doubled(this.flavour);
    this.throughColour = doubled(this.throughColour);
    this.rate = doubled(this.rate);
  }
}

const BOTH_SIDES = [true, false] as const;

/** Family of the channels in which an emitter keeps its kind. */
function familyOf(kernels: DipoleKernels, emitter: number, partner: number, first: boolean): EndFamily {
  return (
    (first ? kernels.first() : null) ?? kernels.emission(kernels.kindOf(emitter), kernels.kindOf(partner))
  );
}

/** g -> g g and g -> q qbar of each flavour at one side of a gluon, into ofSide. */
function gluonRates(
  at: number,
  kernels: DipoleKernels,
  partnerId: number,
  q2: number,
  lnT: number,
  first: boolean,
): void {
  const { table } = familyOf(kernels, GLUON, partnerId, first);
  rates.fill(0);
  if (table.enter(q2)) table.rate(rates, lnT);
  ofSide[at] = rates[G_GG];
  for (let flavour = 1; flavour <= kernels.lightFlavours; flavour++) ofSide[at + flavour] = rates[G_QQ];
  for (const kind of kernels.heavyFlavours) {
    const heavy = kernels.splitting(kind, kernels.kindOf(partnerId)).table;
    rates[0] = 0;
    if (heavy.enter(q2)) heavy.rate(rates, lnT);
    ofSide[at + CHARM_FLAVOUR + kind - CHARM] = rates[0];
  }
}

const CHARM_FLAVOUR = 4;

function doubled<T extends Float64Array | Int32Array | Uint8Array>(column: T): T {
  const wider = new (column.constructor as new (length: number) => T)(2 * column.length);
  wider.set(column);
  return wider;
}
