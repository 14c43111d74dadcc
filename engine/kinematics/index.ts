export { branchDipole, mapDipole, twiceDot } from './dipole-map.ts';
export {
  kallen,
  type MassiveBranching,
  mapMassiveDipole,
  twiceDotMassive,
} from './massive-dipole-map.ts';
