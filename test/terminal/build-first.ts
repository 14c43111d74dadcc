import { execFileSync } from 'node:child_process';

/** Vitest's global set-up: the bundles in dist/ stand for the sources as they are. */
export function setup(): void {
  execFileSync(process.execPath, ['viewer/terminal/branchlight.mjs', '--version'], {
    stdio: ['ignore', 'ignore', 'inherit'],
  });
}
