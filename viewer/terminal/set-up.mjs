// Makes a checkout ready to run: packages installed, bundles built. Plain Node and node: imports only, because it runs
// before anything is installed.
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { isBuilt } from './build-stamp.mjs';

/** Top folder of the checkout. */
export const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))));

/** One plain line on standard error; standard output belongs to results. */
export const say = (line) => process.stderr.write(`branchlight: ${line}\n`);

/** Setting up failed; the message says at what. */
export class SetUpError extends Error {
  code = 'set-up-failed';
}

const installStamp = join(root, 'node_modules', '.cache', 'branchlight-lock.txt');
const read = (path) => {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return null;
  }
};

/**
 * Whether node_modules is what package-lock.json asks for: by the hash that the last install left behind, else (somebody
 * installed by hand) by comparing the lock file with npm's own record of what it installed.
 */
export function isInstalled() {
  const lock = read(join(root, 'package-lock.json'));
  if (lock === null) return false;
  const hash = createHash('sha256').update(lock).digest('hex');
  if (read(installStamp) === hash) return true;
  const record = read(join(root, 'node_modules', '.package-lock.json'));
  if (record === null) return false;
  const wanted = JSON.parse(lock).packages;
  const present = JSON.parse(record).packages;
  const same = Object.entries(wanted).every(
    ([path, { integrity, optional }]) =>
      path === '' || present[path]?.integrity === integrity || (optional && !present[path]),
  );
  if (same) rememberInstall(hash);
  return same;
}

function rememberInstall(hash) {
  try {
    mkdirSync(dirname(installStamp), { recursive: true });
    writeFileSync(installStamp, hash);
  } catch {
    // A checkout that only others may write to: the comparison is made again next time.
  }
}

/** Run a program with its whole output on standard error, and wait for it. Throws SetUpError on any other end than 0. */
export async function runLoudly(command, args, env = process.env) {
  const child = spawn(command, args, { cwd: root, env, stdio: ['ignore', 2, 2] });
  const end = await new Promise((resolve) => {
    child.on('error', (error) => resolve(error.message));
    child.on('close', (status, signal) => resolve(signal ?? status));
  });
  if (end !== 0) throw new SetUpError(`"${command} ${args.join(' ')}" ended with ${end}`);
}

/** Install the packages of package-lock.json unless they are there. */
export async function install() {
  if (isInstalled()) return;
  say('installing packages (npm ci)');
  // `include=dev`: the build needs them whatever NODE_ENV says. `prefix`: npx hands its children a prefix of its own.
  await runLoudly('npm', ['ci', '--include=dev', '--no-audit', '--no-fund', '--prefix', root]);
  rememberInstall(
    createHash('sha256')
      .update(readFileSync(join(root, 'package-lock.json')))
      .digest('hex'),
  );
}

/**
 * Install and build whatever is missing or out of date.
 *
 * Cheap when nothing is (a few milliseconds). Two processes that start together, as in a pipe, do not build twice: the
 * second waits for the first.
 */
export async function prepare() {
  if (isBuilt(root)) return;
  await alone(async () => {
    if (isBuilt(root)) return;
    await install();
    say('building');
    await runLoudly(process.execPath, [join(root, 'viewer', 'terminal', 'build.mjs'), '--locked']);
  });
}

const alive = (pid) => {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
};

// A number that was given to another process since must not block for ever.
const staleLockMs = 20 * 60_000;
const ageMs = (path) => {
  try {
    return Date.now() - statSync(path).mtimeMs;
  } catch {
    return 0;
  }
};

/** Run a task while no other process of this checkout runs one. A lock whose owner is dead is taken over. */
export async function alone(task) {
  const lock = join(root, '.cache', 'set-up.lock');
  try {
    mkdirSync(dirname(lock), { recursive: true });
  } catch (error) {
    throw new SetUpError(`cannot write to ${root}: ${error.code}`);
  }
  for (let told = false; ; ) {
    try {
      writeFileSync(lock, String(process.pid), { flag: 'wx' });
      break;
    } catch (error) {
      if (error.code !== 'EEXIST') throw new SetUpError(`cannot write ${lock}: ${error.code}`);
      const owner = Number(read(lock));
      if ((owner > 0 && !alive(owner)) || ageMs(lock) > staleLockMs) {
        rmSync(lock, { force: true });
        continue;
      }
      if (!told) say(`waiting for process ${owner}, which is setting up`);
      told = true;
      await sleep(100);
    }
  }
  try {
    return await task();
  } finally {
    rmSync(lock, { force: true });
  }
}
