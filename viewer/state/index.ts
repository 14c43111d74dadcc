export { type Place, placeFragment, readPlace } from './address.ts';
export type { EventFile, OpenedFile, SummaryColumns } from './event-file.ts';
export { type Frames, Playhead, SPEEDS } from './playhead.ts';
export { stepNumber } from './step-number.ts';
export { Store, type StoreParts, type Theme, type ViewerState } from './store.ts';
export { storeContext } from './store-context.ts';
export { StoreSlice } from './store-slice.ts';
export { applyTheme, installTheme, themeCss } from './theme.ts';
