export { EventStrips, stripPath } from './event-strips.ts';
export { EventsElement } from './events.ts';
export { type ListWindow, listWindow, scrollToPlace } from './list-window.ts';
export { orderEvents, SUMMARY_KEYS, type SummaryKey, SummaryTable } from './summary-table.ts';
