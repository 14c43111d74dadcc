export { branchDipole, mapDipole, twiceDot } from './dipole-map.ts';
