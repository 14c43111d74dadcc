import { spawnSync } from 'node:child_process';

const RUNS = 9;
const BIN = 'viewer/terminal/branchlight.mjs';

/** How long a command takes to start, beside a bare Node. */
export interface StartFigures {
  readonly words: string;
  readonly ms: number;
  /** Over the time of `node -e 0` in the same run. */
  readonly ratio: number;
}

/** Median wall time of a program [ms]. */
function median(words: readonly string[]): number {
  const times = Array.from({ length: RUNS }, () => {
    const start = performance.now();
    const { status } = spawnSync(process.execPath, words);
    if (status !== 0) throw new Error(`${words.join(' ')} ended with ${status}`);
    return performance.now() - start;
  });
  return times.sort((a, b) => a - b)[(RUNS - 1) / 2];
}

/** The help texts, which are to be there in well under 300 ms. */
export function startTable(): StartFigures[] {
  // Builds first where that is needed, so that it is not measured.
  median([BIN, '--version']);
  const bare = median(['-e', '0']);
  return [['--help'], ['grow', '--help'], ['--version']].map((words) => {
    const ms = median([BIN, ...words]);
    return { words: `branchlight ${words.join(' ')}`, ms, ratio: ms / bare };
  });
}
