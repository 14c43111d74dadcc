import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { branchlight, ended, scratchFolder, shell, start } from './run-command.ts';

const folder = scratchFolder();
const cwd = folder.path;
const at = (name: string): string => join(cwd, name);
const hash = (name: string): string =>
  createHash('sha256')
    .update(readFileSync(at(name)))
    .digest('hex');
const MANY = '9007199254740991';

beforeAll(async () => {
  expect((await branchlight(['grow', '--events', '300', '--out', 'a.shower'], { cwd })).status).toBe(0);
});
afterAll(() => folder.remove());

const eventsOf = async (file: string): Promise<string[]> => {
  const { status, stdout } = await branchlight(['show', file, '--event', 'all', '--json'], { cwd });
  expect(status).toBe(0);
  return stdout.split('\n').slice(0, -1);
};

/** Wait until a file that is being written has grown past a size. */
async function grown(name: string, bytes: number): Promise<void> {
  for (let n = 0; n < 500; n++) {
    if (existsSync(at(name)) && statSync(at(name)).size > bytes) return;
    await sleep(10);
  }
  throw new Error(`${name} has not grown past ${bytes} bytes in 5 s`);
}

describe('the bytes of a file', () => {
  test('depend on settings, seed and number of events alone: not on name, folder, time or spelling', async () => {
    const spelt = [
      '--process',
      'ee',
      '--energy',
      '9.11876e1',
      '--seed',
      '1',
      '--shower',
      'dipole',
      '--order',
      'kt',
    ];
    const rest = [
      '--recoil',
      'local',
      '--coupling',
      'one-loop',
      '--alphas-mz',
      '.118',
      '--cmw',
      'off',
      '--cutoff',
    ];
    const last = [
      '1.0',
      '--flavours',
      '5',
      '--masses',
      'off',
      '--velocity-factors',
      'unit',
      '--first-emission',
    ];
    const words = ['grow', ...spelt, ...rest, ...last, 'kernel', '--workers', '1', '--events', '300'];
    expect((await branchlight([...words, '--out', 'other-name.shower'], { cwd })).status).toBe(0);
    expect(hash('other-name.shower')).toBe(hash('a.shower'));
  });

  test('change with the seed and with settings', async () => {
    const seen = new Set([hash('a.shower')]);
    const changes = [['--seed', '2'], ['--order', 'virtuality'], ['--coupling', 'fixed:0.118'], ['--trials']];
    for (const change of changes) {
      await branchlight(['grow', '--events', '300', ...change, '--out', 'changed.shower'], { cwd });
      seen.add(hash('changed.shower'));
    }
    expect(seen.size).toBe(1 + changes.length);
  });

  test('are the same on standard output', async () => {
    const { bytes, status } = await branchlight(['grow', '--events', '300', '--out', '-'], { cwd });
    expect(status).toBe(0);
    expect(createHash('sha256').update(bytes).digest('hex')).toBe(hash('a.shower'));
  });

  test('event n is the same history whatever the number of events', async () => {
    await branchlight(['grow', '--events', '18', '--out', 'short.shower'], { cwd });
    const [short, long] = [await eventsOf('short.shower'), await eventsOf('a.shower')];
    expect(short).toHaveLength(18);
    expect(long.slice(0, 18)).toEqual(short);
  });
});

describe('where the file goes', () => {
  test('a new file is written in place and nothing else is left', async () => {
    const child = start(['grow', '--events', MANY, '--out', 'growing.shower'], cwd);
    const end = ended(child);
    await grown('growing.shower', 10_000);
    expect(existsSync(at('growing.shower.part'))).toBe(false);
    child.kill('SIGINT');
    await end;
    expect(readdirSync(cwd).filter((name) => name.startsWith('growing'))).toEqual(['growing.shower']);
  });

  test('grows at least once a second', async () => {
    const child = start(
      [
        'grow',
        '--events',
        MANY,
        '--energy',
        '10000',
        '--cutoff',
        '0.5',
        '--trials',
        '--out',
        'steady.shower',
      ],
      cwd,
    );
    const end = ended(child);
    await grown('steady.shower', 0);
    const sizes: number[] = [];
    for (let n = 0; n < 3; n++) {
      sizes.push(statSync(at('steady.shower')).size);
      await sleep(1000);
    }
    sizes.push(statSync(at('steady.shower')).size);
    child.kill('SIGINT');
    expect((await end).status).toBe(130);
    for (let n = 1; n < sizes.length; n++) expect(sizes[n], String(sizes)).toBeGreaterThan(sizes[n - 1]);
  });

  test('an existing file stays as it is until the new one is whole', async () => {
    writeFileSync(at('old.shower'), 'old');
    const child = start(['grow', '--events', MANY, '--out', 'old.shower'], cwd);
    const end = ended(child);
    await grown('old.shower.part', 10_000);
    expect(readFileSync(at('old.shower'), 'utf8')).toBe('old');
    child.kill('SIGKILL');
    expect((await end).status).toBe('SIGKILL');
    expect(readFileSync(at('old.shower'), 'utf8')).toBe('old');
    expect(existsSync(at('old.shower.part'))).toBe(true);

    const { status } = await branchlight(['grow', '--events', '300', '--out', 'old.shower'], { cwd });
    expect(status).toBe(0);
    expect(hash('old.shower')).toBe(hash('a.shower'));
    expect(existsSync(at('old.shower.part'))).toBe(false);
  });

  test('behind a link the file is replaced, not the link', async () => {
    writeFileSync(at('target.shower'), 'old');
    symlinkSync('target.shower', at('link.shower'));
    await branchlight(['grow', '--events', '300', '--out', 'link.shower'], { cwd });
    expect(hash('target.shower')).toBe(hash('a.shower'));
    expect(
      readdirSync(cwd, { withFileTypes: true })
        .find(({ name }) => name === 'link.shower')
        ?.isSymbolicLink(),
    ).toBe(true);
  });

  test('a device is written to and stays a device', async () => {
    const { status, stderr } = await branchlight(['grow', '--events', '300', '--out', '/dev/null'], { cwd });
    expect(stderr).toContain('/dev/null: 300 events');
    expect(status).toBe(0);
    expect(statSync('/dev/null').isCharacterDevice()).toBe(true);
  });
});

describe('stopping', () => {
  for (const signal of ['SIGINT', 'SIGTERM'] as const) {
    test(`${signal} keeps the finished events in a whole file and ends with 130`, async () => {
      const name = `${signal}.shower`;
      const child = start(['grow', '--events', MANY, '--out', name], cwd);
      const end = ended(child);
      await grown(name, 200_000);
      child.kill(signal);
      const { status, stderr, stdout } = await end;
      expect(status).toBe(130);
      expect(stdout).toBe('');
      expect(stderr).toMatch(
        new RegExp(
          `^branchlight: interrupted: [\\d ]+ of [\\d ]+ events are kept in .*${name} \\(interrupted\\)\n$`,
        ),
      );
      const kept = await eventsOf(name);
      expect(kept.length).toBe(Number(stderr.match(/interrupted: ([\d ]+) of/)?.[1].replaceAll(' ', '')));
      const whole = await eventsOf('a.shower');
      const common = Math.min(kept.length, whole.length);
      expect(kept.slice(0, common)).toEqual(whole.slice(0, common));
    });
  }

  test('an interrupted replacement leaves the old file and keeps what was done beside it', async () => {
    writeFileSync(at('before.shower'), 'old');
    const child = start(['grow', '--events', MANY, '--out', 'before.shower'], cwd);
    const end = ended(child);
    await grown('before.shower.part', 10_000);
    child.kill('SIGINT');
    const { status, stderr } = await end;
    expect(status).toBe(130);
    expect(stderr).toContain('before.shower.part');
    expect(readFileSync(at('before.shower'), 'utf8')).toBe('old');
    expect((await branchlight(['show', 'before.shower.part'], { cwd })).status).toBe(0);
  });

  test('after SIGKILL show refuses the file with its place, and convert mends it', async () => {
    const child = start(['grow', '--events', MANY, '--out', 'killed.shower'], cwd);
    const end = ended(child);
    await grown('killed.shower', 200_000);
    child.kill('SIGKILL');
    expect((await end).status).toBe('SIGKILL');

    const refused = await branchlight(['show', 'killed.shower'], { cwd });
    expect(refused.status).toBe(3);
    expect(refused.stderr).toMatch(/killed\.shower.*byte \d+.*expected/);

    const mended = await branchlight(['convert', 'killed.shower', 'mended.shower'], { cwd });
    expect(mended.status).toBe(0);
    expect(mended.stderr).toMatch(/event \d+/);
    const kept = await eventsOf('mended.shower');
    const whole = await eventsOf('a.shower');
    const common = Math.min(kept.length, whole.length);
    expect(common).toBeGreaterThan(100);
    expect(kept.slice(0, common)).toEqual(whole.slice(0, common));
  });

  test('ends quietly with 0 when the reader of its output goes away', async () => {
    const { status, stderr } = await shell(
      `set -o pipefail; branchlight grow --events ${MANY} --quiet --out - | head -c 100000 > /dev/null`,
      cwd,
    );
    expect(stderr).toBe('');
    expect(status).toBe(0);
  });
});

describe('what it says', () => {
  test('one closing line on standard error, nothing on standard output', async () => {
    const { stdout, stderr } = await branchlight(['grow', '--events', '300', '--out', 'b.shower'], { cwd });
    expect(stdout).toBe('');
    expect(stderr).toMatch(/^branchlight: b\.shower: 300 events, [\d ]+ steps, [\d.]+ [kM]?B in [\d.]+ s\n$/);
  });

  test('nothing with --quiet', async () => {
    const { stdout, stderr } = await branchlight(
      ['grow', '--events', '300', '--quiet', '--out', 'b.shower'],
      { cwd },
    );
    expect(stdout + stderr).toBe('');
  });

  test('progress with rate and time left only where standard error is a terminal', async () => {
    const line = 'branchlight grow --events 40000 --energy 1000 --out c.shower';
    expect((await shell(`${line} 2>&1`, cwd)).stdout).not.toContain('left');
    // `script` gives the command a terminal and copies what it prints there.
    const bin = join(process.cwd(), 'viewer', 'terminal', 'branchlight.mjs');
    const words = line.replace('branchlight', `'${process.execPath}' '${bin}'`);
    const { stdout } = await shell(`script -qec "${words}" /dev/null`, cwd);
    expect(stdout).toMatch(/\r[\d ]+ of 40 000 events, [\d ]+\/s, [\d.]+ s left/);
    expect(stdout).toMatch(/c\.shower: 40 000 events/);
  });
});
