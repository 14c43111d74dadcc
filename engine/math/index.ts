/**
 * Elementary functions that give the same bits in every JavaScript engine, built on + - * / and sqrt with literal
 * tables, and the numerical tools that stand on them. Special values are those of the functions of the same name
 * of the language. Measured against exact arithmetic in test/engine/math.
 */
export { acos, asin, atan, atan2 } from './arc.ts';
export { exp, expm1 } from './exp.ts';
export { cosh, sinh, tanh } from './hyperbolic.ts';
export { atanh, log, log1p } from './log.ts';
export { pow } from './power.ts';
export {
  applyRule,
  gaussLegendre,
  type Integral,
  type IntegrateOptions,
  integrate,
  QuadratureError,
  type QuadratureRule,
} from './quadrature.ts';
export { findRoot, RootError, type RootOptions } from './roots.ts';
export { cos, sin, sinCos, tan } from './sine.ts';
export {
  angleBetween,
  boostFromRest,
  boostToRest,
  dot,
  mass,
  massSquared,
  momentum,
  product,
} from './vectors.ts';
