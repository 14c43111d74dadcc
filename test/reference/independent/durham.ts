import { add, angle, type Four, space } from './vectors.ts';

/**
 * Durham clustering by looking at every pair in every round.
 *
 * @returns y at which n+1 jets become n: element n-1, for n = 1 to the number of partons less one.
 * Source: Catani et al., Phys. Lett. B269 (1991) 432; E scheme.
 */
export function durhamTransitions(momenta: readonly Four[], sqrtS: number): number[] {
  const jets = [...momenta];
  const transitions: number[] = new Array(Math.max(0, jets.length - 1));
  while (jets.length > 1) {
    let [first, second, least] = [0, 1, Infinity];
    for (let a = 0; a < jets.length; a++) {
      for (let b = a + 1; b < jets.length; b++) {
        const energy = Math.min(jets[a][3], jets[b][3]);
        // 1 - cos = 2 sin^2(half)
        const half = Math.sin(angle(space(jets[a]), space(jets[b])) / 2);
        const y = (4 * energy * energy * half * half) / (sqrtS * sqrtS);
        if (y < least) [first, second, least] = [a, b, y];
      }
    }
    transitions[jets.length - 2] = least;
    jets[first] = add(jets[first], jets[second]);
    jets.splice(second, 1);
  }
  return transitions;
}

/** Number of jets at `yCut`: clustering stops as soon as no pair is closer. */
export function jetCount(transitions: readonly number[], yCut: number): number {
  for (let n = transitions.length; n >= 1; n--) if (transitions[n - 1] > yCut) return n + 1;
  return 1;
}
