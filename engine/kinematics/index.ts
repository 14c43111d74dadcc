export { branchDipole, mapDipole, twiceDot } from './dipole-map.ts';
export { applyBoost, mapGlobalDipole } from './global-recoil.ts';
export {
  kallen,
  type MassiveBranching,
  mapMassiveDipole,
  twiceDotMassive,
} from './massive-dipole-map.ts';
export { transverseAxes } from './transverse-axes.ts';
