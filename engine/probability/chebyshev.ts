import { cos } from '../math/index.ts';

/**
 * Interpolation on the n Chebyshev points of [-1, 1], the interior ones, as matrices.
 *
 * All matrices are n by n, row after row.
 */
export interface ChebyshevRule {
  readonly n: number;
  readonly nodes: Float64Array;
  /** Values at the nodes to Chebyshev coefficients. */
  readonly toChebyshev: Float64Array;
  /** Values at the nodes to coefficients of powers, the constant first. */
  readonly toPowers: Float64Array;
}

/** @param n 1 to 12: beyond, powers lose digits. */
export function chebyshevRule(n: number): ChebyshevRule {
  const nodes = new Float64Array(n);
  const toChebyshev = new Float64Array(n * n);
  const toPowers = new Float64Array(n * n);
  const powers = chebyshevPowers(n);
  for (let k = 0; k < n; k++) {
    nodes[k] = -cos(((k + 0.5) * Math.PI) / n);
    for (let j = 0; j < n; j++) {
      const value = polynomial(powers[j], nodes[k]);
      const share = ((j === 0 ? 1 : 2) * value) / n;
      toChebyshev[j * n + k] = share;
      for (let m = 0; m <= j; m++) toPowers[m * n + k] += powers[j][m] * share;
    }
  }
  return { n, nodes, toChebyshev, toPowers };
}

/** Powers of T_0 to T_(n-1). */
function chebyshevPowers(n: number): number[][] {
  const rows: number[][] = [[1], [0, 1]];
  for (let j = 2; j < n; j++) {
    const row = [0, ...rows[j - 1].map((c) => 2 * c)];
    rows[j - 2].forEach((c, m) => {
      row[m] -= c;
    });
    rows.push(row);
  }
  return rows;
}

function polynomial(powers: readonly number[], x: number): number {
  let sum = 0;
  for (let m = powers.length - 1; m >= 0; m--) sum = sum * x + powers[m];
  return sum;
}
