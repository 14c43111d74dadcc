import { exp, log } from '../math/index.ts';

const LN_2 = Math.LN2;

/**
 * The fixed windows of ln 2 in t, from the hard scale down, in which overestimates are constant.
 *
 * Arrays by number of the window, 0 at the hard scale; the last one ends at the lowest t.
 */
export class EvolutionWindows {
  readonly count: number;
  readonly lnLow: Float64Array;
  /** Lower end [GeV^2]. */
  readonly low: Float64Array;
  /** Largest alpha_s over the window for a coupling whose argument is t. */
  readonly alphaS: Float64Array;
  private readonly lnHardScale: number;

  /** @param hardScale, @param lowest ends of the evolution [GeV^2]. @param alphaS a coupling that falls with ln t. */
  constructor(hardScale: number, lowest: number, alphaS: (lnT: number) => number) {
    this.lnHardScale = log(hardScale);
    const lnLowest = log(lowest);
    this.count = Math.max(1, Math.ceil((this.lnHardScale - lnLowest) / LN_2));
    this.lnLow = new Float64Array(this.count);
    this.low = new Float64Array(this.count);
    this.alphaS = new Float64Array(this.count);
    for (let window = 0; window < this.count; window++) {
      const lnLow = window === this.count - 1 ? lnLowest : this.lnHardScale - (window + 1) * LN_2;
      this.lnLow[window] = lnLow;
      this.low[window] = exp(lnLow);
      this.alphaS[window] = alphaS(lnLow);
    }
  }

  /** Number of the window that holds ln t. */
  at(lnT: number): number {
    const window = Math.floor((this.lnHardScale - lnT) / LN_2);
    return window < 0 ? 0 : window < this.count ? window : this.count - 1;
  }
}
