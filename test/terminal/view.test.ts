import type { ChildProcess } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { branchlight, type Ended, ended, scratchFolder, start } from './run-command.ts';

const folder = scratchFolder();
const cwd = folder.path;
const at = (name: string): string => join(cwd, name);

beforeAll(async () => {
  await branchlight(['grow', '--events', '100', '--out', 'a.shower'], { cwd });
});
afterAll(() => folder.remove());

/** A viewer that serves, its address, and how to stop it. */
async function serve(
  ...words: string[]
): Promise<{ address: string; child: ChildProcess; end: Promise<Ended> }> {
  const child = start(['view', ...words], cwd);
  const end = ended(child);
  const address = await new Promise<string>((resolve, reject) => {
    child.stdout?.once('data', (piece: Buffer) => resolve(piece.toString()));
    child.once('close', (status) => reject(new Error(`view ended with ${status}`)));
  });
  return { address, child, end };
}

describe('view FILE', () => {
  test('prints its address alone on a line, serves page and file there, and ends with 130 when interrupted', async () => {
    const { address, child, end } = await serve('a.shower');
    expect(address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/[\w-]{32}\/\n$/);
    const base = address.trim();
    const page = await fetch(base, { redirect: 'error' });
    expect(page.status).toBe(200);
    expect(await page.text()).toContain('<bl-app>');
    const session = await (await fetch(`${base}session.json`)).json();
    expect(session.file.name).toBe('a.shower');
    const sample = await fetch(new URL(session.file.address, base));
    expect(Buffer.from(await sample.arrayBuffer()).equals(readFileSync(at('a.shower')))).toBe(true);
    expect((await fetch(new URL('/', base))).status).toBe(404);
    child.kill('SIGINT');
    const { status, stdout, stderr } = await end;
    expect(status).toBe(130);
    expect(stdout).toBe(address);
    expect(stderr).toBe('branchlight: serving until interrupted (Ctrl-C)\n');
    await expect(fetch(base)).rejects.toThrow();
  });

  test('every address in the page and its styles is relative, and nothing is inline', async () => {
    const { address, child, end } = await serve('a.shower', '--quiet');
    const base = address.trim();
    const page = await (await fetch(base)).text();
    const addresses = [...page.matchAll(/(?:src|href)="([^"]*)"/g)].map(([, each]) => each);
    expect(addresses.length).toBeGreaterThan(1);
    expect(page).not.toMatch(/<style|style=|<script(?![^>]* src=)| on[a-z]+="/);
    for (const each of addresses) {
      expect(each).toMatch(/^\.\//);
      const asset = await fetch(new URL(each, base));
      expect(asset.status, each).toBe(200);
      if (!each.endsWith('.css')) continue;
      for (const [, inside] of (await asset.text()).matchAll(/url\(["']?([^"')]+)/g)) {
        expect(inside).toMatch(/^(\.\.?\/|[a-z0-9-]+\.)/);
        expect((await fetch(new URL(inside, new URL(each, base)))).status, inside).toBe(200);
      }
    }
    child.kill('SIGTERM');
    expect((await end).stderr).toBe('');
  });

  test('goes on serving the file that it opened when another takes its name', async () => {
    const { address, child, end } = await serve('a.shower');
    const before = readFileSync(at('a.shower'));
    await branchlight(['grow', '--events', '100', '--seed', '2', '--out', 'a.shower'], { cwd });
    const served = await (await fetch(`${address.trim()}sample.shower`)).arrayBuffer();
    expect(Buffer.from(served).equals(before)).toBe(true);
    child.kill('SIGINT');
    await end;
  });

  test('refuses a damaged file with 3 and how to mend it', async () => {
    writeFileSync(at('short.shower'), readFileSync(at('a.shower')).subarray(0, 20_000));
    const { status, stderr, stdout } = await branchlight(['view', 'short.shower'], { cwd });
    expect([status, stdout]).toEqual([3, '']);
    expect(stderr).toMatch(/short\.shower.*byte \d+.*branchlight convert/);
  });
});

test('view without FILE serves an empty viewer', async () => {
  const { address, child, end } = await serve();
  expect(await (await fetch(`${address.trim()}session.json`)).json()).toEqual({ file: null });
  child.kill('SIGINT');
  await end;
});

test('view --port takes that port, and refuses it with 2 while it is taken', async () => {
  const first = await serve();
  const { port } = new URL(first.address);
  const second = await branchlight(['view', '--port', port], { cwd });
  expect(second.status).toBe(2);
  expect(second.stderr).toMatch(/--port takes a free port.*\(port-taken\)\n$/);
  first.child.kill('SIGINT');
  await first.end;
  const third = await serve('--port', port);
  expect(new URL(third.address).port).toBe(port);
  third.child.kill('SIGINT');
  await third.end;
});

test('view - serves what arrives on standard input', async () => {
  const { bytes } = await branchlight(['grow', '--events', '20', '--out', '-'], { cwd });
  const child = start(['view', '-', '--quiet'], cwd);
  const end = ended(child);
  child.stdin?.end(bytes);
  const address = await new Promise<string>((resolve) => {
    child.stdout?.once('data', (piece: Buffer) => resolve(piece.toString().trim()));
  });
  const served = await (await fetch(`${address}sample.shower`)).arrayBuffer();
  expect(Buffer.from(served).equals(bytes)).toBe(true);
  const { file } = await (await fetch(`${address}session.json`)).json();
  expect(file).toEqual({ name: 'standard input', address: 'sample.shower', size: bytes.length });
  child.kill('SIGINT');
  await end;
});
