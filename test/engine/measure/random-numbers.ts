/** Uniform numbers in (0, 1) of a test's own: a 32-bit counter through a mixing function. */
export function uniforms(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let x = state;
    x = Math.imul(x ^ (x >>> 16), 0x21f0aaad);
    x = Math.imul(x ^ (x >>> 15), 0x735a2d97);
    return (((x ^ (x >>> 15)) >>> 0) + 0.5) / 2 ** 32;
  };
}
