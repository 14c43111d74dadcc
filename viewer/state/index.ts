export type { EventFile, OpenedFile, SummaryColumns } from './event-file.ts';
export { type Frames, Playhead, SPEEDS } from './playhead.ts';
export { Store, type StoreParts, type Theme, type ViewerState } from './store.ts';
export { storeContext } from './store-context.ts';
export { StoreSlice } from './store-slice.ts';
