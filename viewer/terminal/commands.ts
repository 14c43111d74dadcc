import type { Command } from './command.ts';

/** A command as the overview shows it, and how to load it. */
export interface CommandEntry {
  readonly name: string;
  readonly purpose: string;
  load(): Promise<Command>;
}

/**
 * All commands, in the order of the overview.
 *
 * Purposes are said here as well as by the commands, so that the overview loads none of them; a test compares.
 */
export const COMMANDS: readonly CommandEntry[] = [
  {
    name: 'grow',
    purpose: 'simulate events and record their histories',
    load: async () => (await import('./grow.ts')).grow,
  },
  {
    name: 'show',
    purpose: "print a file's head and the entries and steps of its events",
    load: async () => (await import('./show.ts')).show,
  },
  {
    name: 'summary',
    purpose: 'sample means with statistical errors; reads and verifies every chunk',
    load: async () => (await import('./summary.ts')).summary,
  },
  {
    name: 'view',
    purpose: 'serve the viewer on the loopback address and print its address',
    load: async () => (await import('./view.ts')).view,
  },
  {
    name: 'convert',
    purpose: 'write what is whole of a damaged file as a new one',
    load: async () => (await import('./convert.ts')).convert,
  },
];
