/** The reader asked for another event by its number. */
export class GoToEventEvent extends Event {
  static readonly type = 'bl-go-to-event';
  constructor(readonly number: number) {
    super(GoToEventEvent.type, { bubbles: true, composed: true });
  }
}

/** The reader asked for the event before or after the one shown. */
export class NeighbourEvent extends Event {
  static readonly type = 'bl-neighbour';
  constructor(readonly distance: 1 | -1) {
    super(NeighbourEvent.type, { bubbles: true, composed: true });
  }
}

export type Command = 'open' | 'save-svg' | 'save-png' | 'events' | 'help';

/** The reader pressed one of the words in the bar. */
export class CommandEvent extends Event {
  static readonly type = 'bl-command';
  constructor(readonly command: Command) {
    super(CommandEvent.type, { bubbles: true, composed: true });
  }
}
