import {
  applyBoost,
  type MassiveBranching,
  mapDipole,
  mapGlobalDipole,
  mapMassiveDipole,
  twiceDot,
  twiceDotMassive,
} from '../kinematics/index.ts';

/** First colour tag of an event. Source: Les Houches Accord, hep-ph/0109068. */
const FIRST_TAG = 501;

/**
 * The partons and colour dipoles of a final-state shower at one moment, struct of arrays.
 *
 * A slot is a parton, kept while it lives; a dipole joins the slot of its colour end to that of its anticolour end.
 * Slots and dipoles are numbered in the order in which they come to be, so that the same branchings always give the
 * same numbers. Capacity doubles when it runs out; nothing else allocates.
 */
export class DipoleState {
  partons = 0;
  dipoles = 0;
  /** px, py, pz, E [GeV], four to a slot. */
  momenta = new Float64Array(4 * 64);
  /** Slot to PDG number, colour tags, row of the history, generation. A slot is a parton line and gives it its number. */
  id = new Int32Array(64);
  /** Slot to mass [GeV]. */
  mass = new Float64Array(64);
  colour = new Int32Array(64);
  anticolour = new Int32Array(64);
  row = new Int32Array(64);
  generation = new Int32Array(64);
  /** Slot to its dipole as colour end and as anticolour end, -1 for none. */
  colourDipole = new Int32Array(64);
  anticolourDipole = new Int32Array(64);
  /** Dipole to the slots of its two ends. */
  colourEnd = new Int32Array(64);
  anticolourEnd = new Int32Array(64);
  /** Dipole to 2 p.q of its ends [GeV^2], carried along from the branchings so that collinear dipoles keep digits. */
  q2 = new Float64Array(64);
  /** Momenta i, j, partner after the last branching. */
  readonly after = new Float64Array(12);
  /** Dipoles whose q2 the last branching changed. */
  readonly touched = new Int32Array(4);
  touchedCount = 0;
  /** Mass of the event, at rest, whose momenta all recoil [GeV]; 0: the partner alone does. */
  eventMass = 0;
  /** With global recoil: the transformation of all other momenta in the last branching, row by row, px py pz e. */
  readonly boost = new Float64Array(16);
  /** 2 (pi.pj + pi.pk + pj.pk) of the last branching [GeV^2]. */
  shareQ2 = 0;
  /** Transverse momentum of the last branching [GeV] where a mass entered, NaN elsewhere: kT is then the shower's own. */
  massiveKT = NaN;
  private readonly massive: MassiveBranching = {
    mij2: 0,
    mk2: 0,
    mi2: 0,
    mj2: 0,
    q2: 0,
    sij: 0,
    z: 0,
    azimuth: 0,
    kT: 0,
  };
  private nextTag = FIRST_TAG;

  clear(): void {
    this.partons = 0;
    this.dipoles = 0;
    this.nextTag = FIRST_TAG;
  }

  /** A parton of the hard process, without colour yet. @param momenta px, py, pz, E at offset `at`. @returns its slot. */
  addParton(id: number, mass: number, momenta: Float64Array, at: number): number {
    const slot = this.newSlot(id, 0, mass);
    for (let c = 0; c < 4; c++) this.momenta[4 * slot + c] = momenta[at + c];
    return slot;
  }

  /** Join two slots of the hard process by a new colour tag. @returns the dipole. */
  connect(colourEnd: number, anticolourEnd: number): number {
    const tag = this.nextTag++;
    this.colour[colourEnd] = tag;
    this.anticolour[anticolourEnd] = tag;
    return this.newDipole(colourEnd, anticolourEnd, this.measureQ2(colourEnd, anticolourEnd));
  }

  /**
   * 1 - z with its digits, made from what a history records, so that a replay of its tables gives the same bits.
   *
   * Massless kT^2 = z (1-z) y Q^2 has them all; with masses, where 1-z only scales later dipoles, the difference does.
   */
  emissionFraction(dipole: number, z: number, y: number, kT: number, quarkMass: number): number {
    if (this.mass[this.colourEnd[dipole]] > 0 || this.mass[this.anticolourEnd[dipole]] > 0 || quarkMass > 0)
      return 1 - z;
    return (kT * kT) / (z * y * this.q2[dipole]);
  }

  /**
   * Branch one end of a dipole; the partner at the other end recoils.
   *
   * @param fromColourEnd whether the emitter is the dipole's colour end.
   * @param flavour 0: a gluon is emitted; else the emitter, a gluon, splits into this quark (i) and antiquark (j).
   * @param w 1 - z. @param quarkMass of the quarks that a gluon splits into [GeV], 0 for an emitted gluon.
   * @returns the slot of j. `after` holds the momenta, `touched` the dipoles that changed.
   */
  branch(
    dipole: number,
    fromColourEnd: boolean,
    flavour: number,
    z: number,
    w: number,
    y: number,
    azimuth: number,
    quarkMass: number,
  ): number {
    const emitter = fromColourEnd ? this.colourEnd[dipole] : this.anticolourEnd[dipole];
    const partner = fromColourEnd ? this.anticolourEnd[dipole] : this.colourEnd[dipole];
    const massive = this.mass[emitter] > 0 || this.mass[partner] > 0 || quarkMass > 0;
    let partnerShare = 1 - y;
    // 2 (pi.pj + pi.pk + pj.pk): what y and z are shares of
    let q2 = this.q2[dipole] - (flavour === 0 ? 0 : 2 * quarkMass * quarkMass);
    this.massiveKT = NaN;
    if (this.eventMass > 0) {
      const { after, boost, momenta } = this;
      const rho = mapGlobalDipole(
        after,
        boost,
        momenta,
        4 * emitter,
        4 * partner,
        q2,
        z,
        w,
        y,
        azimuth,
        this.eventMass,
      );
      const b = y / (z + w * y);
      q2 *= rho * rho * (1 - w * b);
      partnerShare = rho * (1 - b);
      for (let slot = 0; slot < this.partons; slot++)
        if (slot !== emitter && slot !== partner) applyBoost(momenta, 4 * slot, boost);
    } else if (massive) this.mapMassive(emitter, partner, this.q2[dipole], y * q2, quarkMass, z, azimuth);
    else mapDipole(this.after, this.momenta, 4 * emitter, 4 * partner, q2, z, w, y, azimuth);
    this.shareQ2 = q2;
    const j = this.newSlot(flavour === 0 ? 21 : -flavour, this.generation[emitter] + 1, quarkMass);
    if (flavour !== 0) this.mass[emitter] = quarkMass;
    this.placeMomenta(emitter, j, partner);
    this.touchedCount = 0;
    // the emitter's and the partner's other dipole, which this branching stretches
    const emitterOther = fromColourEnd ? this.anticolourDipole[emitter] : this.colourDipole[emitter];
    const partnerOther = fromColourEnd ? this.colourDipole[partner] : this.anticolourDipole[partner];
    if (flavour === 0) this.insertGluon(dipole, fromColourEnd, emitter, j, q2, w, y);
    else this.splitGluon(dipole, fromColourEnd, emitter, j, flavour, q2, z, w, y);
    if (partnerOther >= 0 && partnerOther !== emitterOther) {
      // a massless partner keeps its direction and a share of its momentum
      if (massive) this.remeasure(partnerOther);
      else this.setQ2(partnerOther, this.q2[partnerOther] * partnerShare);
    }
    if (emitterOther >= 0) {
      // between two gluons that share both lines the splitting leaves either quark with the partner: known as well as
      // the first dipole, and the same whichever of the two lines radiated
      if (emitterOther === partnerOther && flavour !== 0)
        this.setQ2(emitterOther, (fromColourEnd ? w : z) * (1 - y) * q2);
      else this.remeasure(emitterOther);
    }
    return j;
  }

  private mapMassive(
    emitter: number,
    partner: number,
    q2: number,
    twicePiPj: number,
    quarkMass: number,
    z: number,
    azimuth: number,
  ): void {
    const { massive } = this;
    massive.mij2 = this.mass[emitter] * this.mass[emitter];
    massive.mk2 = this.mass[partner] * this.mass[partner];
    massive.mi2 = quarkMass > 0 ? quarkMass * quarkMass : massive.mij2;
    massive.mj2 = quarkMass * quarkMass;
    massive.q2 = q2;
    massive.sij = twicePiPj + massive.mi2 + massive.mj2;
    massive.z = z;
    massive.azimuth = azimuth;
    if (!mapMassiveDipole(this.after, this.momenta, 4 * emitter, 4 * partner, massive))
      throw new RangeError(`branching at z ${z}, s_ij ${massive.sij} GeV^2: outside its phase space`);
    this.massiveKT = massive.kT;
  }

  private measureQ2(a: number, b: number): number {
    const ma = this.mass[a];
    const mb = this.mass[b];
    if (ma === 0 && mb === 0) return twiceDot(this.momenta, 4 * a, 4 * b);
    return twiceDotMassive(this.momenta, 4 * a, 4 * b, ma * ma, mb * mb);
  }

  private remeasure(dipole: number): void {
    this.setQ2(dipole, this.measureQ2(this.colourEnd[dipole], this.anticolourEnd[dipole]));
  }

  /** The new gluon sits between emitter and partner: it takes over the dipole, and a new one joins it to the emitter. */
  private insertGluon(
    dipole: number,
    fromColourEnd: boolean,
    i: number,
    j: number,
    q2: number,
    w: number,
    y: number,
  ): void {
    const tag = this.nextTag++;
    let fresh: number;
    if (fromColourEnd) {
      // i (c', a), j (c, c')
      this.colour[j] = this.colour[i];
      this.anticolour[j] = tag;
      this.colour[i] = tag;
      this.colourEnd[dipole] = j;
      this.colourDipole[j] = dipole;
      fresh = this.newDipole(i, j, y * q2);
    } else {
      // i (c, a'), j (a', a)
      this.anticolour[j] = this.anticolour[i];
      this.colour[j] = tag;
      this.anticolour[i] = tag;
      this.anticolourEnd[dipole] = j;
      this.anticolourDipole[j] = dipole;
      fresh = this.newDipole(j, i, y * q2);
    }
    this.touched[this.touchedCount++] = fresh;
    this.setQ2(dipole, w * (1 - y) * q2);
  }

  /** Colour goes to the quark, which stays in the emitter's slot, anticolour to the antiquark. */
  private splitGluon(
    dipole: number,
    fromColourEnd: boolean,
    i: number,
    j: number,
    flavour: number,
    q2: number,
    z: number,
    w: number,
    y: number,
  ): void {
    this.id[i] = flavour;
    this.anticolour[j] = this.anticolour[i];
    this.colour[j] = 0;
    this.anticolour[i] = 0;
    const other = this.anticolourDipole[i];
    this.anticolourDipole[j] = other;
    this.anticolourEnd[other] = j;
    this.anticolourDipole[i] = -1;
    // radiating through its colour the quark keeps the partner, through its anticolour the antiquark does
    this.setQ2(dipole, (fromColourEnd ? z : w) * (1 - y) * q2);
  }

  private setQ2(dipole: number, q2: number): void {
    this.q2[dipole] = q2;
    this.touched[this.touchedCount++] = dipole;
  }

  private placeMomenta(i: number, j: number, k: number): void {
    const { after, momenta } = this;
    for (let c = 0; c < 4; c++) {
      momenta[4 * i + c] = after[c];
      momenta[4 * j + c] = after[4 + c];
      momenta[4 * k + c] = after[8 + c];
    }
  }

  private newSlot(id: number, generation: number, mass: number): number {
    const slot = this.partons++;
    if (slot === this.id.length) this.growSlots();
    this.id[slot] = id;
    this.mass[slot] = mass;
    this.colour[slot] = 0;
    this.anticolour[slot] = 0;
    this.colourDipole[slot] = -1;
    this.anticolourDipole[slot] = -1;
    this.generation[slot] = generation;
    return slot;
  }

  private newDipole(colourEnd: number, anticolourEnd: number, q2: number): number {
    const dipole = this.dipoles++;
    if (dipole === this.q2.length) this.growDipoles();
    this.colourEnd[dipole] = colourEnd;
    this.anticolourEnd[dipole] = anticolourEnd;
    this.colourDipole[colourEnd] = dipole;
    this.anticolourDipole[anticolourEnd] = dipole;
    this.q2[dipole] = q2;
    return dipole;
  }

  private growSlots(): void {
    this.momenta = widen(this.momenta);
    this.id = widen(this.id);
    this.mass = widen(this.mass);
    this.colour = widen(this.colour);
    this.anticolour = widen(this.anticolour);
    this.row = widen(this.row);
    this.generation = widen(this.generation);
    this.colourDipole = widen(this.colourDipole);
    this.anticolourDipole = widen(this.anticolourDipole);
  }

  private growDipoles(): void {
    this.colourEnd = widen(this.colourEnd);
    this.anticolourEnd = widen(this.anticolourEnd);
    this.q2 = widen(this.q2);
  }
}

/** The same column at twice its length. */
function widen<T extends Float64Array | Int32Array>(column: T): T {
  const wider = new (column.constructor as new (length: number) => T)(2 * column.length);
  wider.set(column);
  return wider;
}
