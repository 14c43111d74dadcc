// `npm run build`: the viewer's page in dist/viewer and the command line in dist/terminal. The same sources give the same
// bytes. Both are built aside and moved into place, so that an interrupted build leaves the last good one.
import { existsSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { remember, snapshot } from './build-stamp.mjs';
import { alone, install, root, say } from './set-up.mjs';

async function build() {
  const state = snapshot(root);
  // Vite bundles the development build of a package where a test runner set this to anything else.
  process.env.NODE_ENV = 'production';
  const { pageBundle, terminalBundle } = await import('./bundles.mjs');
  const { build: bundle } = await import('vite');
  const aside = join(root, '.cache', `build-${process.pid}`);
  try {
    await bundle(pageBundle(root, join(aside, 'viewer')));
    await bundle(terminalBundle(root, join(aside, 'terminal')));
    const dist = join(root, 'dist');
    if (existsSync(dist)) renameSync(dist, join(aside, 'before'));
    renameSync(aside, dist);
    rmSync(join(dist, 'before'), { recursive: true, force: true });
    remember(root, state);
  } finally {
    rmSync(aside, { recursive: true, force: true });
  }
}

try {
  if (process.argv.includes('--locked')) {
    await build();
  } else {
    await alone(async () => {
      await install();
      await build();
    });
  }
} catch (error) {
  say(`the build failed: ${error.message}`);
  process.exitCode = 3;
}
