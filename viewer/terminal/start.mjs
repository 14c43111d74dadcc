// `npm start`: from a fresh clone to a growing shower in the browser. Installs, builds and grows the demo sample where
// that is not done, then serves the viewer on it.
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { recorded } from './build-stamp.mjs';
import { prepare, root, runLoudly, say } from './set-up.mjs';

// Ten branchings an event on average: something to watch, few enough to follow each. The first event of this seed has
// nineteen, two gluons that become quarks among them, and three wide jets. Trials, so that every card is full.
const DEMO = ['--energy', '500', '--cutoff', '0.6', '--events', '300', '--seed', '9', '--trials'];

/** The demo sample, grown anew when the code that grows or writes it has changed. */
async function demoSample() {
  const made = Object.entries(recorded(root)).filter(([path]) => /^(engine|formats)\//.test(path));
  const hash = createHash('sha256')
    .update(JSON.stringify([DEMO, made.map(([path, [, , bytes]]) => [path, bytes])]))
    .digest('hex')
    .slice(0, 12);
  const folder = join(root, '.cache', 'demo');
  const name = `demo-${hash}`;
  const file = join(folder, name, 'demo.shower');
  if (existsSync(file)) return file;
  say(`growing the demo sample (grow ${DEMO.join(' ')})`);
  mkdirSync(folder, { recursive: true });
  for (const old of readdirSync(folder)) rmSync(join(folder, old), { recursive: true, force: true });
  const aside = join(folder, `aside-${process.pid}`);
  mkdirSync(aside);
  const bin = join(root, 'viewer', 'terminal', 'branchlight.mjs');
  await runLoudly(process.execPath, [bin, 'grow', ...DEMO, '--quiet', '--out', join(aside, 'demo.shower')]);
  renameSync(aside, join(folder, name));
  return file;
}

try {
  await prepare();
  const sample = await demoSample();
  const { run } = await import(pathToFileURL(join(root, 'dist', 'terminal', 'main.mjs')).href);
  say('open this address in a browser:');
  const status = await run(['view', sample], { page: join(root, 'dist', 'viewer') });
  // An interruption is how a viewer is left; npm would report any other status as a failure.
  process.exitCode = status === 130 ? 0 : status;
} catch (error) {
  say(error.message);
  process.exitCode = 3;
}
