export { BoxSize } from './box-size.ts';
export { releaseFocus } from './release-focus.ts';
