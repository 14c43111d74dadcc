#!/usr/bin/env node
// The package's bin: committed, executable and free of dependencies, so that `npx branchlight` works in a fresh clone.
// It sets up or rebuilds first where that is needed and then hands over to the built command line.
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { prepare, root, say } from './set-up.mjs';

try {
  await prepare();
} catch (error) {
  say(`${error.message} (${error.code ?? 'set-up-failed'})`);
  process.exit(3);
}
const { run } = await import(pathToFileURL(join(root, 'dist', 'terminal', 'main.mjs')).href);
process.exitCode = await run(process.argv.slice(2), { page: join(root, 'dist', 'viewer') });
