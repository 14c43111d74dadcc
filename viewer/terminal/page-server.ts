import { createHash, randomBytes, timingSafeEqual } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo, Socket } from 'node:net';
import { pipeline } from 'node:stream/promises';
import type { ByteSource } from '../../formats/index.ts';
import { readRange } from './byte-range.ts';
import { Trouble, WrongUse } from './errors.ts';

import type { PageFile } from './page-files.ts';

const SAMPLE = 'sample.shower';
const SESSION = 'session.json';
const LOOPBACK = '127.0.0.1';
/** Requests under way get this long to finish when the server closes. */
const PATIENCE_MS = 5000;

const POLICY = [
  "default-src 'none'",
  "script-src 'self'",
  "style-src 'self'",
  "img-src 'self' blob: data:",
  "font-src 'self'",
  "connect-src 'self'",
  "worker-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'none'",
].join('; ');

/** On every response, refusals included. */
const HEADERS: Readonly<Record<string, string>> = {
  'Content-Security-Policy': POLICY,
  'X-Content-Type-Options': 'nosniff',
  'X-Frame-Options': 'DENY',
  'Referrer-Policy': 'no-referrer',
  'Cross-Origin-Resource-Policy': 'same-origin',
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Embedder-Policy': 'require-corp',
  'Permissions-Policy': 'camera=(), geolocation=(), microphone=()',
  // The address is secret and new each time: nothing of it may stay behind on a disk.
  'Cache-Control': 'no-store',
};

/** What is served: the page's files, and the sample that it opens at once (null: none). */
export interface Served {
  readonly page: ReadonlyMap<string, PageFile>;
  readonly sample: ByteSource | null;
  /** Name of the sample as the page shows it. */
  readonly name: string;
}

/** A server that listens. */
export interface PageServer {
  /** http://127.0.0.1:PORT/TOKEN/ */
  readonly address: string;
  /** Stop listening and let the requests under way finish. */
  close(): Promise<void>;
}

/**
 * Serve page and sample on the loopback address, under a path that nobody can guess.
 *
 * Another user of the machine can reach the port, and a page of another site can have the browser ask it; neither knows
 * the token (192 random bits), and a request that names a host or an origin other than this machine's is refused, so
 * that a foreign name that resolves here gets nothing either.
 *
 * @param port 0 for any that is free.
 * @throws WrongUse where the port is taken, Trouble where listening is impossible.
 */
export async function startServer(served: Served, port: number): Promise<PageServer> {
  const token = randomBytes(24).toString('base64url');
  const session = JSON.stringify({
    file: served.sample && { name: served.name, address: SAMPLE, size: await served.sample.size() },
  });
  const server = createServer((request, response) => {
    answer(request, response, token, served, session).catch(() => response.destroy());
  });
  server.on('clientError', (_error, socket) => refuseMalformed(socket as Socket));
  // Node hands these over without an answer of its own.
  server.on('connect', (_request, socket) => refuseMalformed(socket as Socket));
  await listen(server, port);
  const { port: bound } = server.address() as AddressInfo;
  return { address: `http://${LOOPBACK}:${bound}/${token}/`, close: () => close(server) };
}

async function answer(
  request: IncomingMessage,
  response: ServerResponse,
  token: string,
  served: Served,
  session: string,
): Promise<void> {
  for (const [name, value] of Object.entries(HEADERS)) response.setHeader(name, value);
  if (!isOurHost(request.headers.host)) return refuse(response, 403, 'foreign host');
  const { origin } = request.headers;
  if (origin !== undefined && origin !== `http://${request.headers.host}`) {
    return refuse(response, 403, 'foreign origin');
  }
  const address = behindToken(request.url ?? '', token);
  if (address === null) return refuse(response, 404, 'not found');
  if (request.method !== 'GET' && request.method !== 'HEAD') {
    response.setHeader('Allow', 'GET, HEAD');
    return refuse(response, 405, 'only GET and HEAD');
  }
  if (address === SESSION) return send(request, response, 'application/json; charset=utf-8', session);
  if (address === SAMPLE && served.sample) return sendSample(request, response, served.sample);
  const file = served.page.get(address);
  if (!file) return refuse(response, 404, 'not found');
  return send(request, response, file.type, file.bytes);
}

// A tunnel from another machine ends at another port of its loopback address, under these names.
const isOurHost = (host: string | undefined): boolean =>
  /^(127\.0\.0\.1|localhost)(:\d{1,5})?$/.test(host ?? '');

/** What follows `/TOKEN/` in a request's address without its query, null where that is not the token. */
function behindToken(url: string, token: string): string | null {
  const match = url.match(/^\/([^/?#]*)\/([^?#]*)/);
  if (!match) return null;
  const digest = (text: string): Buffer => createHash('sha256').update(text).digest();
  return timingSafeEqual(digest(match[1]), digest(token)) ? match[2] : null;
}

function refuse(response: ServerResponse, status: number, text: string): void {
  response.writeHead(status, { 'Content-Type': 'text/plain; charset=utf-8' });
  response.end(`${text}\n`);
}

function refuseMalformed(socket: Socket): void {
  if (!socket.writable) {
    socket.destroy();
    return;
  }
  const head = Object.entries(HEADERS).map(([name, value]) => `${name}: ${value}\r\n`);
  socket.end(`HTTP/1.1 400 Bad Request\r\n${head.join('')}Connection: close\r\nContent-Length: 0\r\n\r\n`);
}

function send(
  request: IncomingMessage,
  response: ServerResponse,
  type: string,
  body: string | Uint8Array,
): void {
  response.writeHead(200, { 'Content-Type': type, 'Content-Length': Buffer.byteLength(body) });
  response.end(request.method === 'HEAD' ? undefined : body);
}

async function sendSample(
  request: IncomingMessage,
  response: ServerResponse,
  sample: ByteSource,
): Promise<void> {
  const size = await sample.size();
  response.setHeader('Accept-Ranges', 'bytes');
  // There is no validator that a condition could name, so a conditional range is answered with the whole.
  const wanted = request.headers['if-range'] === undefined ? request.headers.range : undefined;
  const range = readRange(wanted, size);
  if (range === 'unsatisfiable') {
    response.setHeader('Content-Range', `bytes */${size}`);
    return refuse(response, 416, 'range not satisfiable');
  }
  const { start, end } = range ?? { start: 0, end: size - 1 };
  if (range) response.setHeader('Content-Range', `bytes ${start}-${end}/${size}`);
  response.writeHead(range ? 206 : 200, {
    'Content-Type': 'application/octet-stream',
    'Content-Length': end - start + 1,
  });
  if (request.method === 'HEAD' || size === 0) response.end();
  else await pipeline(pieces(sample, start, end), response);
}

const PIECE_BYTES = 1 << 18;

async function* pieces(sample: ByteSource, start: number, end: number): AsyncGenerator<Uint8Array> {
  for (let at = start; at <= end; at += PIECE_BYTES) {
    yield await sample.read(at, Math.min(PIECE_BYTES, end + 1 - at));
  }
}

function listen(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      reject(
        error.code === 'EADDRINUSE' || error.code === 'EACCES'
          ? new WrongUse('port-taken', `--port takes a free port of ${LOOPBACK}; ${port} is not`)
          : new Trouble('cannot-serve', `cannot listen on ${LOOPBACK}: ${error.message}`),
      );
    });
    server.listen({ host: LOOPBACK, port, exclusive: true }, resolve);
  });
}

function close(server: Server): Promise<void> {
  return new Promise((resolve) => {
    const deadline = setTimeout(() => server.closeAllConnections(), PATIENCE_MS);
    // Again and again: a connection whose request was under way is kept for a next one when that is answered.
    const idle = setInterval(() => server.closeIdleConnections(), 20);
    server.close(() => {
      clearTimeout(deadline);
      clearInterval(idle);
      resolve();
    });
  });
}
