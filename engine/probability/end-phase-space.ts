import { kallen } from '../kinematics/index.ts';
import { log } from '../math/index.ts';

/** Masses [GeV] of a dipole end's branching: emitter and partner before, i and j after. */
export interface EndMasses {
  readonly emitter: number;
  readonly partner: number;
  readonly i: number;
  readonly j: number;
}

/**
 * Where, along ln t at a given Q^2, the rate of a dipole end begins, bends or ends:
 * at a t of its own, where s_ij reaches the edge of phase space at a given kT^2, or at the highest t.
 */
export type Edge =
  | { readonly kind: 'fixed'; readonly lnT: number }
  | { readonly kind: 'rim'; readonly kT2: number }
  | { readonly kind: 'highest' };

/**
 * Phase space of a dipole end in (t, z), with or without masses.
 *
 * Q^2 is 2 pt_ij.pt_k. At given s_ij = s the fraction z lies where kT^2 = z(1-z) s - (1-z) m_i^2 - z m_j^2 is at least
 * r(s) = m_k^2 lambda(s,m_i^2,m_j^2)/(Q^2 + m_ij^2 - s)^2, the rim: z_- < z < z_+ of the paper in other words, since
 * 1 - v^2 = 4 s m_k^2/(Q^2 + m_ij^2 - s)^2. r grows with s and meets the largest kT^2, lambda/4s, at the largest s.
 *
 * Source: Catani, Dittmaier, Seymour, Trocsanyi, Nucl. Phys. B627 (2002) 189, section 5.
 */
export class EndPhaseSpace {
  readonly masses: EndMasses;
  /** Left by `open` [GeV^2]: z lies where kT^2 at s_ij = limitS is at least limitKT2. */
  limitS = 0;
  limitKT2 = 0;
  /** Left by `setRange` and `open`: half rapidities. */
  low = 0;
  high = 0;
  private readonly virtuality: boolean;
  private readonly mij2: number;
  private readonly mi2: number;
  private readonly mj2: number;
  private readonly mk: number;
  private readonly mk2: number;

  constructor(virtuality: boolean, masses: EndMasses) {
    this.masses = masses;
    this.virtuality = virtuality;
    this.mij2 = masses.emitter * masses.emitter;
    this.mi2 = masses.i * masses.i;
    this.mj2 = masses.j * masses.j;
    this.mk = masses.partner;
    this.mk2 = this.mk * this.mk;
  }

  /** s_ij at which the largest kT^2 over z is the given one [GeV^2]: lambda/4s = kT^2. */
  pairMass2At(kT2: number): number {
    const { mi2, mj2 } = this;
    const root = Math.sqrt(kT2 + mi2) + Math.sqrt(kT2 + mj2);
    return root * root;
  }

  /** The Q^2 [GeV^2] of a dipole whose s_ij can just be s. */
  dipoleAt(s: number): number {
    return s - this.mij2 + 2 * this.mk * Math.sqrt(s);
  }

  /** Largest s_ij [GeV^2]: (Q - m_k)^2, without cancellation. */
  highestPairMass2(q2: number): number {
    const reach = (q2 + this.mij2) / (Math.sqrt(q2 + this.mij2 + this.mk2) + this.mk);
    return reach * reach;
  }

  /** t [GeV^2] at the largest kT^2 of a given s_ij: kT^2 itself or s_ij - m_ij^2. */
  topOf(s: number): number {
    return this.virtuality ? s - this.mij2 : kallen(s, this.mi2, this.mj2) / (4 * s);
  }

  /** s_ij [GeV^2] at which the edge of phase space in z has the given kT^2: r(s) = kT^2; the largest s_ij where m_k = 0. */
  rim(kT2: number, q2: number): number {
    const { mi2, mj2, mij2, mk, mk2 } = this;
    const rest = q2 + mij2;
    if (mk === 0) return rest;
    const kT = Math.sqrt(kT2);
    // m_j = 0 leaves lambda a square and the equation linear
    if (mj2 === 0) return (kT * rest + mk * mi2) / (mk + kT);
    // (m_k^2 - kT^2) s^2 + (2 kT^2 rest - 4 m^2 m_k^2) s - kT^2 rest^2 = 0
    const a = mk2 - kT2;
    const b = 2 * kT2 * rest - 4 * mi2 * mk2;
    const root = Math.sqrt(Math.max(0, b * b + 4 * a * kT2 * rest * rest));
    return b >= 0 ? (2 * kT2 * rest * rest) / (b + root) : (root - b) / (2 * a);
  }

  /**
   * Find the range of z at t above a cutoff in kT^2 [GeV^2].
   *
   * @returns whether there is one; its ends are in `low` and `high`, what it came from in `limitS` and `limitKT2`.
   */
  open(t: number, q2: number, cutoff2: number): boolean {
    if (this.virtuality) {
      const s = t + this.mij2;
      const away = q2 + this.mij2 - s;
      const rim = this.mk2 === 0 ? 0 : (this.mk2 * kallen(s, this.mi2, this.mj2)) / (away * away);
      this.limitS = s;
      this.limitKT2 = Math.max(rim, cutoff2);
    } else {
      if (!(t >= cutoff2)) return false;
      this.limitS = this.rim(t, q2);
      this.limitKT2 = t;
    }
    const { limitS, limitKT2 } = this;
    // the margin because at m_k = 0 in kt ordering it is the highest itself
    return limitS <= this.highestPairMass2(q2) * (1 + 1e-12) && this.setRange(limitS, limitKT2);
  }

  /**
   * Half rapidities b of the two z at which kT^2 has the given value at s_ij = s; z = 1/(1 + exp(-2b)).
   *
   * @returns false, nothing set, where kT^2 does not get so high.
   */
  setRange(s: number, kT2: number): boolean {
    const { mi2, mj2 } = this;
    const square = kallen(s, mi2, mj2) - 4 * s * kT2;
    if (!(square > 0)) return false;
    const root = Math.sqrt(square);
    // z^2 s - z (s + mi2 - mj2) + mi2 + kT2 = 0, and the like for 1 - z: the small roots from the products
    const zHigh = (s + mi2 - mj2 + root) / (2 * s);
    const wHigh = (s + mj2 - mi2 + root) / (2 * s);
    this.low = 0.5 * log((mi2 + kT2) / (s * zHigh * wHigh));
    this.high = 0.5 * log((s * zHigh * wHigh) / (mj2 + kT2));
    return true;
  }

  /** Edges along ln t at this Q^2, ascending; empty where nothing can branch. @param bends kT^2 of the coupling's bends. */
  edges(q2: number, bends: readonly number[]): Edge[] {
    const highest = this.topOf(this.highestPairMass2(q2));
    const found: { t: number; edge: Edge }[] = [];
    for (const kT2 of bends) {
      const s = this.pairMass2At(kT2);
      if (this.dipoleAt(s) >= q2) continue;
      const t = this.topOf(s);
      found.push({ t, edge: { kind: 'fixed', lnT: log(t) } });
      if (this.virtuality && this.mk > 0)
        found.push({ t: this.rim(kT2, q2) - this.mij2, edge: { kind: 'rim', kT2 } });
    }
    if (found.length > 0) found.push({ t: highest, edge: { kind: 'highest' } });
    return found.sort((a, b) => a.t - b.t).map(({ edge }) => edge);
  }

  /** ln t of an edge at this Q^2. */
  placeOf(edge: Edge, q2: number): number {
    if (edge.kind === 'fixed') return edge.lnT;
    if (edge.kind === 'rim') return log(this.rim(edge.kT2, q2) - this.mij2);
    return log(this.topOf(this.highestPairMass2(q2)));
  }

  /** Q^2 [GeV^2] between which the order of the edges does not change, ascending, the first where branching begins. */
  columns(bends: readonly number[], highest: number): number[] {
    const found: number[] = [];
    for (const kT2 of bends) {
      const s = this.pairMass2At(kT2);
      found.push(this.dipoleAt(s));
      if (!this.virtuality || this.mk === 0) continue;
      // the rim of a lower bend passes s: (total - s - mk2)^2 lower = mk2 lambda(s)
      const root = Math.sqrt(kallen(s, this.mi2, this.mj2));
      for (const lower of bends)
        if (lower < kT2) found.push(s - this.mij2 + (this.mk * root) / Math.sqrt(lower));
    }
    const inside = found.filter((q2) => q2 < highest).sort((a, b) => a - b);
    return inside.length === 0 ? [] : [...inside, highest];
  }
}
