export { BarElement } from './bar.ts';
export { type Command, CommandEvent, GoToEventEvent, NeighbourEvent } from './bar-events.ts';
