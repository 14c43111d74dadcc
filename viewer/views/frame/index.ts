export { BoxSize } from './box-size.ts';
