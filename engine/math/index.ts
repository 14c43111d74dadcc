export const log = Math.log;
export const exp = Math.exp;
export const log1p = Math.log1p;
export const expm1 = Math.expm1;
export const pow = Math.pow;
export const sin = Math.sin;
export const cos = Math.cos;
export const tan = Math.tan;
export const asin = Math.asin;
export const acos = Math.acos;
export const atan = Math.atan;
export const atan2 = Math.atan2;
export const sinh = Math.sinh;
export const cosh = Math.cosh;
export const tanh = Math.tanh;
export const atanh = Math.atanh;
export function sinCos(out: Float64Array, x: number): void {
  out[0] = Math.sin(x);
  out[1] = Math.cos(x);
}
