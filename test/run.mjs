// `npm test`: everything. Plain Node until the packages are installed; plain lines about what it does; the last line
// counts all tests.
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { alone, install, prepare, root } from '../viewer/terminal/set-up.mjs';

const say = (line) => process.stdout.write(`${line}\n`);
const SUITES = [
  ['fast tests', 'vitest.config.ts'],
  ['physics', 'vitest.physics.ts'],
  ['command line', 'vitest.terminal.ts'],
  ['browser', 'vitest.browser.ts'],
];

/** Debian packages of the list that are not installed; null where this is no Debian. */
function missingPackages() {
  const names = readFileSync(join(root, 'test', 'debian-packages.txt'), 'utf8')
    .split('\n')
    .filter((line) => line && !line.startsWith('#'));
  const installed = (name) => {
    // biome-ignore lint/suspicious/noTemplateCurlyInString: a field of dpkg-query
    const query = spawnSync('dpkg-query', ['-W', '-f=${db:Status-Status}', name], { encoding: 'utf8' });
    if (query.error) return null;
    return query.stdout === 'installed';
  };
  if (installed(names[0]) === null) return null;
  return names.filter((name) => !installed(name));
}

/** Install what is missing, or say what to do. Tests that need it fail by themselves otherwise. */
function installDebianPackages() {
  const missing = missingPackages();
  if (missing === null) {
    say(
      'This is no Debian: the tests need chromium at /usr/bin/chromium and the packages of test/debian-packages.txt.',
    );
    return;
  }
  if (missing.length === 0) return;
  const command = `apt-get install -y --no-install-recommends ${missing.join(' ')}`;
  if (process.getuid?.() !== 0) {
    say(`Missing Debian packages; tests that need them will fail. Install them with:\n  sudo ${command}`);
    return;
  }
  say(`Installing Debian packages: ${missing.join(' ')}`);
  const options = {
    stdio: ['ignore', 'ignore', 'inherit'],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  };
  spawnSync('apt-get', ['update', '-q'], options);
  const { status } = spawnSync('apt-get', command.split(' ').slice(1), options);
  if (status !== 0) say(`"${command}" ended with ${status}; tests that need these packages will fail.`);
}

/** Run one Vitest configuration. What fails outside a test (a file that does not load, an error nobody caught) counts. */
async function runSuite(config) {
  const report = join(root, '.cache', `${config}.json`);
  mkdirSync(join(root, '.cache'), { recursive: true });
  rmSync(report, { force: true });
  const vitest = join(root, 'node_modules', 'vitest', 'vitest.mjs');
  const args = [
    vitest,
    'run',
    '--config',
    config,
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ];
  const child = spawn(process.execPath, args, { cwd: root, stdio: ['ignore', 'inherit', 'inherit'] });
  const status = await new Promise((resolve) => child.on('close', resolve));
  if (!existsSync(report)) return { passed: 0, failed: 1 };
  const { numPassedTests, numFailedTests, testResults } = JSON.parse(readFileSync(report, 'utf8'));
  const unloaded = testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  ).length;
  const failed = numFailedTests + unloaded;
  const empty = numPassedTests + failed === 0;
  return { passed: numPassedTests, failed: failed || (status !== 0 || empty ? 1 : 0) };
}

let passed = 0;
let failed = 0;
try {
  installDebianPackages();
  await alone(install);
  await prepare();
  for (const [name, config] of SUITES) {
    say(`\n== ${name}`);
    const result = await runSuite(config);
    passed += result.passed;
    failed += result.failed;
  }
} catch (error) {
  say(error.message);
  failed += 1;
}
process.exitCode = failed === 0 && passed > 0 ? 0 : 1;
say(`\n${passed} passed, ${failed} failed`);
