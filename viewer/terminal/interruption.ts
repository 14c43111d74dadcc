import { INTERRUPTED } from './errors.ts';

type Listener = () => void;
let stop: Listener | null = null;
let asked = false;

/**
 * From now on an interrupt or a request to end (SIGINT, SIGTERM, SIGHUP) ends the program with 130, at once unless
 * `onInterruption` asked for a clean stop; a second one always at once.
 */
export function watchInterruptions(): void {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
    process.on(signal, () => {
      if (asked || !stop) process.exit(INTERRUPTED);
      asked = true;
      stop();
    });
  }
}

/** Have a clean stop: `listener` is called once instead of the program ending. */
export function onInterruption(listener: Listener): void {
  stop = listener;
}
