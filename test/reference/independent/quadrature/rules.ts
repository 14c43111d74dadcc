export interface Rule {
  readonly nodes: readonly number[];
  readonly weights: readonly number[];
}

/** Gauss-Legendre rule on [-1, 1] by Newton's method on the three-term recursion. */
export function legendreRule(n: number): Rule {
  const nodes: number[] = [];
  const weights: number[] = [];
  for (let k = 0; k < n; k++) {
    let x = Math.cos((Math.PI * (k + 0.75)) / (n + 0.5));
    let slope = 1;
    for (let round = 0; round < 100; round++) {
      let [p, previous] = [1, 0];
      for (let m = 1; m <= n; m++) {
        [p, previous] = [((2 * m - 1) * x * p - (m - 1) * previous) / m, p];
      }
      slope = (n * (x * p - previous)) / (x * x - 1);
      const step = p / slope;
      x -= step;
      if (Math.abs(step) < 1e-15) break;
    }
    nodes.push(x);
    weights.push(2 / ((1 - x * x) * slope * slope));
  }
  return { nodes, weights };
}

const RULE = legendreRule(20);

/** Integral from a to b, 20 points on each of equal panels no wider than `panel`. */
export function integrate(f: (x: number) => number, a: number, b: number, panel = 1): number {
  if (b === a) return 0;
  const count = Math.max(1, Math.ceil(Math.abs(b - a) / panel));
  const half = (b - a) / (2 * count);
  let sum = 0;
  for (let n = 0; n < count; n++) {
    const middle = a + (2 * n + 1) * half;
    for (let k = 0; k < 20; k++) sum += RULE.weights[k] * f(middle + half * RULE.nodes[k]);
  }
  return half * sum;
}

/** The same over [a, b] cut at those of `breaks` (ascending) that lie inside. */
export function integratePieces(
  f: (x: number) => number,
  a: number,
  b: number,
  breaks: readonly number[],
  panel = 1,
): number {
  let sum = 0;
  let from = a;
  for (const x of breaks) {
    if (x <= from || x >= b) continue;
    sum += integrate(f, from, x, panel);
    from = x;
  }
  return sum + integrate(f, from, b, panel);
}
