/** Kolmogorov's limiting survival function Q(l) = 2 sum (-1)^(k-1) exp(-2 k^2 l^2). */
export function kolmogorov(l: number): number {
  if (l < 0.2) return 1;
  let sum = 0;
  for (let k = 1; k <= 100; k++) sum += (k % 2 ? 2 : -2) * Math.exp(-2 * k * k * l * l);
  return Math.min(1, Math.max(0, sum));
}

/** Probability of a sample at least as far from the uniform distribution on (0, 1), Stephens' finite-n correction. */
export function uniformPValue(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const n = sorted.length;
  let distance = 0;
  sorted.forEach((v, k) => {
    distance = Math.max(distance, v - k / n, (k + 1) / n - v);
  });
  const root = Math.sqrt(n);
  return kolmogorov((root + 0.12 + 0.11 / root) * distance);
}

function lnGamma(x: number): number {
  // Stirling's series after shifting the argument above 15; error below 1e-15.
  let shift = 0;
  while (x < 15) {
    shift -= Math.log(x);
    x++;
  }
  const i = 1 / (x * x);
  const series = (1 / 12 - i * (1 / 360 - i * (1 / 1260 - i / 1680))) / x;
  return shift + (x - 0.5) * Math.log(x) - x + 0.5 * Math.log(2 * Math.PI) + series;
}

/** Survival function of chi-square with `degrees` degrees of freedom: series below the mean, continued fraction above. */
export function chiSquareSurvival(chiSquare: number, degrees: number): number {
  const [a, x] = [degrees / 2, chiSquare / 2];
  const front = Math.exp(-x + a * Math.log(x) - lnGamma(a));
  if (x < a + 1) {
    let [term, sum] = [1 / a, 1 / a];
    for (let n = 1; term > 1e-17 * sum; n++) {
      term *= x / (a + n);
      sum += term;
    }
    return 1 - front * sum;
  }
  let b = x + 1 - a;
  let c = 1e300;
  let d = 1 / b;
  let h = d;
  for (let n = 1; n < 10000; n++) {
    const an = -n * (n - a);
    b += 2;
    d = 1 / (an * d + b);
    c = b + an / c;
    const step = d * c;
    h *= step;
    if (Math.abs(step - 1) < 1e-15) break;
  }
  return front * h;
}

/** p-value of observed counts against expected ones; `constraints` is 1 where the total was fixed by the data. */
export function countsPValue(
  observed: readonly number[],
  expected: readonly number[],
  constraints: number,
): number {
  let chiSquare = 0;
  observed.forEach((o, n) => {
    chiSquare += (o - expected[n]) ** 2 / expected[n];
  });
  return chiSquareSurvival(chiSquare, observed.length - constraints);
}
