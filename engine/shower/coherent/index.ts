export { CoherentShower } from './coherent-shower.ts';
