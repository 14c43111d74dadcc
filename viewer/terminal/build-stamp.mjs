// Knows whether the bundles in dist/ were built from the sources as they are.
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

const folders = ['engine', 'formats', 'viewer', 'public'];
const files = ['index.html', 'package.json', 'package-lock.json', 'tsconfig.json'];
const stampPath = (root) => join(root, '.cache', 'built.json');

function* walk(root, folder) {
  for (const item of readdirSync(join(root, folder), { withFileTypes: true })) {
    const path = `${folder}/${item.name}`;
    if (item.isDirectory()) yield* walk(root, path);
    else yield path;
  }
}

/** All that a bundle is made from, as paths from the top folder. */
function sources(root) {
  const inFolders = folders
    .filter((folder) => existsSync(join(root, folder)))
    .flatMap((folder) => [...walk(root, folder)]);
  return [...files.filter((file) => existsSync(join(root, file))), ...inFolders];
}

const hashOf = (root, path) =>
  createHash('sha256')
    .update(readFileSync(join(root, path)))
    .digest('hex');

/** Size, time and hash of every source: what `remember` wants, taken before a build starts. */
export function snapshot(root) {
  const state = {};
  for (const path of sources(root)) {
    const { mtimeMs, size } = statSync(join(root, path));
    state[path] = [mtimeMs, size, hashOf(root, path)];
  }
  return state;
}

/** Record that dist/ was built from the sources of this snapshot. */
export function remember(root, state) {
  mkdirSync(dirname(stampPath(root)), { recursive: true });
  writeFileSync(stampPath(root), JSON.stringify(state));
}

/** What `remember` recorded, null where there is nothing of the kind. */
export function recorded(root) {
  try {
    return JSON.parse(readFileSync(stampPath(root), 'utf8'));
  } catch {
    return null;
  }
}

/**
 * Whether dist/ stands for the sources as they are: same files, each with the recorded size and time, or, where a
 * checkout gave it a new time, with the recorded hash.
 */
export function isBuilt(root) {
  if (!existsSync(join(root, 'dist', 'terminal', 'main.mjs'))) return false;
  if (!existsSync(join(root, 'dist', 'viewer', 'index.html'))) return false;
  const state = recorded(root);
  if (state === null) return false;
  const paths = sources(root);
  if (paths.length !== Object.keys(state).length) return false;
  let touched = false;
  for (const path of paths) {
    const known = state[path];
    if (!known) return false;
    const { mtimeMs, size } = statSync(join(root, path));
    if (size !== known[1]) return false;
    if (mtimeMs === known[0]) continue;
    if (hashOf(root, path) !== known[2]) return false;
    known[0] = mtimeMs;
    touched = true;
  }
  if (touched) {
    try {
      remember(root, state);
    } catch {
      // A checkout that only others may write to: the hashes are compared again next time.
    }
  }
  return true;
}
