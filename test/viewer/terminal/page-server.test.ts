import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { connect } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { type FileSource, openInput } from '../../../viewer/terminal/input.ts';
import { readPage } from '../../../viewer/terminal/page-files.ts';
import { type PageServer, startServer } from '../../../viewer/terminal/page-server.ts';

const SAMPLE = Uint8Array.from({ length: 300_000 }, (_, n) => (n * 31) % 251);
let folder: string;
let sample: FileSource;
let server: PageServer;
let port: number;
let token: string;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'branchlight-test-'));
  mkdirSync(join(folder, 'page', 'assets'), { recursive: true });
  writeFileSync(join(folder, 'page', 'index.html'), '<!doctype html><title>page</title>');
  writeFileSync(join(folder, 'page', 'assets', 'main-1234.js'), 'export {};');
  writeFileSync(join(folder, 'secret.txt'), 'secret');
  writeFileSync(join(folder, 'a.shower'), SAMPLE);
  sample = await openInput(join(folder, 'a.shower'));
  server = await startServer({ page: readPage(join(folder, 'page')), sample, name: 'a.shower' }, 0);
  const { port: bound, pathname } = new URL(server.address);
  port = Number(bound);
  token = pathname.split('/')[1];
});

afterAll(async () => {
  await server.close();
  await sample.close();
  rmSync(folder, { recursive: true });
});

interface Answer {
  readonly status: number;
  readonly headers: NodeJS.Dict<string | string[]>;
  readonly body: Buffer;
}

/** A request with exactly this path: nothing resolves `..` or encodes on the way. */
function ask(path: string, headers: Record<string, string> = {}, method = 'GET'): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const sent = request({ host: '127.0.0.1', port, path, method, headers }, (response) => {
      const pieces: Buffer[] = [];
      response.on('data', (piece: Buffer) => pieces.push(piece));
      response.on('end', () =>
        resolve({ status: response.statusCode ?? 0, headers: response.headers, body: Buffer.concat(pieces) }),
      );
    });
    sent.on('error', reject);
    sent.end();
  });
}

/** Bytes as they come for bytes as they are. */
function raw(text: string): Promise<string> {
  return new Promise((resolve, reject) => {
    const socket = connect(port, '127.0.0.1', () => socket.end(text));
    let answer = '';
    socket.setEncoding('latin1');
    socket.on('data', (piece) => {
      answer += piece;
    });
    socket.on('close', () => resolve(answer));
    socket.on('error', reject);
  });
}

function expectGuarded({ headers }: Answer): void {
  const policy = String(headers['content-security-policy']);
  expect(policy).toContain("default-src 'none'");
  expect(policy).toContain("script-src 'self'");
  expect(policy).toContain("frame-ancestors 'none'");
  expect(policy).not.toMatch(/unsafe|wasm|\*|https?:/);
  expect(headers['x-content-type-options']).toBe('nosniff');
  expect(headers['referrer-policy']).toBe('no-referrer');
  expect(headers['cross-origin-resource-policy']).toBe('same-origin');
  expect(headers['cache-control']).toBe('no-store');
  expect(headers['set-cookie']).toBeUndefined();
  expect(headers['access-control-allow-origin']).toBeUndefined();
}

describe('what has the token', () => {
  test('the address has 192 random bits and answers with the page itself', async () => {
    expect(server.address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/[A-Za-z0-9_-]{32}\/$/);
    const page = await ask(`/${token}/`);
    expect(page.status).toBe(200);
    expect(page.headers['content-type']).toBe('text/html; charset=utf-8');
    expect(page.body.toString()).toContain('<title>page</title>');
    expectGuarded(page);
  });

  test('the page learns name, address and size of the sample', async () => {
    const session = await ask(`/${token}/session.json`);
    expect(JSON.parse(session.body.toString())).toEqual({
      file: { name: 'a.shower', address: 'sample.shower', size: SAMPLE.length },
    });
    expectGuarded(session);
  });

  test('serves assets with their types and heads without bodies', async () => {
    const asset = await ask(`/${token}/assets/main-1234.js`);
    expect(asset.headers['content-type']).toBe('text/javascript; charset=utf-8');
    const head = await ask(`/${token}/assets/main-1234.js`, {}, 'HEAD');
    expect(head.status).toBe(200);
    expect(head.headers['content-length']).toBe('10');
    expect(head.body).toHaveLength(0);
  });

  test('serves the sample whole and in ranges', async () => {
    const whole = await ask(`/${token}/sample.shower`);
    expect(whole.status).toBe(200);
    expect(whole.body.equals(SAMPLE)).toBe(true);
    expect(whole.headers['accept-ranges']).toBe('bytes');
    const part = await ask(`/${token}/sample.shower`, { Range: 'bytes=100000-100009' });
    expect(part.status).toBe(206);
    expect(part.headers['content-range']).toBe('bytes 100000-100009/300000');
    expect([...part.body]).toEqual([...SAMPLE.subarray(100_000, 100_010)]);
    const tail = await ask(`/${token}/sample.shower`, { Range: 'bytes=-5' });
    expect([...tail.body]).toEqual([...SAMPLE.subarray(-5)]);
    const beyond = await ask(`/${token}/sample.shower`, { Range: 'bytes=300000-' });
    expect(beyond.status).toBe(416);
    expect(beyond.headers['content-range']).toBe('bytes */300000');
    for (const answer of [whole, part, tail, beyond]) expectGuarded(answer);
  });

  test('answers only GET and HEAD', async () => {
    for (const method of ['POST', 'PUT', 'DELETE', 'OPTIONS', 'PATCH']) {
      const answer = await ask(`/${token}/`, {}, method);
      expect(answer.status, method).toBe(405);
      expect(answer.headers.allow).toBe('GET, HEAD');
      expectGuarded(answer);
    }
  });

  test('allows the names of this machine, through a tunnel as well', async () => {
    for (const host of [`127.0.0.1:${port}`, `localhost:${port}`, 'localhost:8080', '127.0.0.1']) {
      expect((await ask(`/${token}/`, { Host: host, Origin: `http://${host}` })).status, host).toBe(200);
    }
  });
});

describe('what is refused', () => {
  test('everything without the token, with the same answer', async () => {
    const wrong = token.replace(/^./, (letter) => (letter === 'A' ? 'B' : 'A'));
    const paths = [
      '/',
      `/${token}`,
      `/${wrong}/`,
      `/${token}x/`,
      `/${token.slice(0, -1)}/`,
      `//${token}/`,
      `/./${token}/`,
      '/index.html',
      '/session.json',
      '/sample.shower',
      '/assets/main-1234.js',
      '/favicon.ico',
      `/x/../${token}/`,
    ];
    for (const path of paths) {
      const answer = await ask(path);
      expect(answer.status, path).toBe(404);
      expect(answer.body.toString(), path).toBe('not found\n');
      expectGuarded(answer);
    }
  });

  test('every way out of the folder of the page', async () => {
    const ways = [
      '../secret.txt',
      '..%2fsecret.txt',
      '%2e%2e/secret.txt',
      '%2e%2e%2fsecret.txt',
      '..\\secret.txt',
      '..%5csecret.txt',
      'assets/../../secret.txt',
      'assets/..%2f..%2fsecret.txt',
      '....//secret.txt',
      '/etc/passwd',
      '//etc/passwd',
      join(folder, 'secret.txt'),
      'secret.txt%00.html',
      '.',
      'assets',
      'assets/',
    ];
    for (const way of ways) {
      const answer = await ask(`/${token}/${way}`);
      expect(answer.status, way).toBe(404);
      expect(answer.body.toString(), way).not.toContain('secret');
    }
  });

  test('a foreign host, whatever it asks for', async () => {
    const hosts = [
      'evil.example',
      `evil.example:${port}`,
      '127.0.0.1.evil.example',
      'localhost.evil.example',
      '0.0.0.0',
    ];
    for (const host of [...hosts, '127.0.0.1@evil.example']) {
      const answer = await ask(`/${token}/`, { Host: host });
      expect(answer.status, host).toBe(403);
      expectGuarded(answer);
    }
  });

  test('a foreign origin, even from this machine', async () => {
    const origins = [
      'http://evil.example',
      'null',
      'https://127.0.0.1',
      `https://127.0.0.1:${port}`,
      'http://127.0.0.1:1',
    ];
    for (const origin of origins) {
      const answer = await ask(`/${token}/sample.shower`, { Origin: origin });
      expect(answer.status, origin).toBe(403);
      expectGuarded(answer);
    }
  });

  test('what is no HTTP, with the same headers', async () => {
    for (const text of [
      'nonsense\r\n\r\n',
      `GET /${token}/ HTTP/1.1\r\n\r\n`,
      `CONNECT evil.example:80 HTTP/1.1\r\nHost: x\r\n\r\n`,
    ]) {
      const answer = await raw(text);
      expect(answer, text).toMatch(/^HTTP\/1\.1 400 /);
      expect(answer, text).not.toContain('<title>');
    }
    expect(await raw('nonsense\r\n\r\n')).toContain("Content-Security-Policy: default-src 'none'");
    expect(await raw(`GET /${token}/ HTTP/1.1\r\nHost:\r\n\r\n`)).toMatch(/^HTTP\/1\.1 403 /);
    expect(await raw(`GET /${token}/ HTTP/1.0\r\n\r\n`)).toMatch(/^HTTP\/1\.1 403 /);
    expect(await raw(`GET http://evil.example/${token}/ HTTP/1.1\r\nHost: 127.0.0.1\r\n\r\n`)).toMatch(
      /^HTTP\/1\.1 404 /,
    );
  });

  test('other addresses of this machine', async () => {
    // 127.0.0.2 is this machine too, and nothing listens there.
    const refused = await new Promise((resolve) => {
      const socket = connect(port, '127.0.0.2');
      socket.on('connect', () => resolve('connected'));
      socket.on('error', (error: NodeJS.ErrnoException) => resolve(error.code));
    });
    expect(refused).toBe('ECONNREFUSED');
  });

  test('a port that is taken, naming the option', async () => {
    await expect(startServer({ page: new Map(), sample: null, name: '' }, port)).rejects.toMatchObject({
      code: 'port-taken',
    });
  });
});

test('without a sample the page is told so and nothing stands in its place', async () => {
  const empty = await startServer({ page: readPage(join(folder, 'page')), sample: null, name: '' }, 0);
  try {
    expect(await (await fetch(`${empty.address}session.json`)).json()).toEqual({ file: null });
    expect((await fetch(`${empty.address}sample.shower`)).status).toBe(404);
  } finally {
    await empty.close();
  }
});

test('two servers never share a token', async () => {
  const other = await startServer({ page: new Map(), sample: null, name: '' }, 0);
  expect(new URL(other.address).pathname).not.toBe(`/${token}/`);
  await other.close();
});

test('a request under way when the server closes is finished, and no other is begun', async () => {
  const big = await openInput(join(folder, 'a.shower'));
  const closing = await startServer({ page: new Map(), sample: big, name: '' }, 0);
  const { port: its, pathname } = new URL(closing.address);
  const body = await new Promise<number>((resolve, reject) => {
    const sent = request({ port: its, host: '127.0.0.1', path: `${pathname}sample.shower` }, (response) => {
      // The head is here, the body is not yet read: close now.
      const closed = closing.close();
      let bytes = 0;
      response.on('data', (piece: Buffer) => {
        bytes += piece.length;
      });
      response.on('end', () => closed.then(() => resolve(bytes)));
      response.on('error', reject);
    });
    sent.on('error', reject);
    sent.end();
  });
  expect(body).toBe(SAMPLE.length);
  await expect(fetch(closing.address)).rejects.toThrow();
  await big.close();
});
