export { Philox, uniform } from './philox.ts';
