import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterEach, describe, expect, it } from 'vitest';
import { blobSource, ShowerFileReader, urlSource } from '../../formats/index.ts';
import { writeFile } from './memory-file.ts';
import { buildBatch, plainEvent, sampleHead } from './random-histories.ts';
import { firstDifference } from './same-bits.ts';

const sample = sampleHead();
const batch = buildBatch(
  sample,
  Array.from({ length: 500 }, (_, n) => plainEvent(n)),
);
const file = await writeFile(sample, [batch]);

let server: Server | null = null;
afterEach(() => server?.close());

async function serve(listener: RequestListener): Promise<string> {
  server = createServer(listener);
  await new Promise<void>((resolve) => server?.listen(0, '127.0.0.1', resolve));
  return `http://127.0.0.1:${(server.address() as AddressInfo).port}/a.shower`;
}

const ranges: RequestListener = (request, response) => {
  const [, from, to] = /^bytes=(\d+)-(\d+)$/.exec(request.headers.range ?? '') ?? [];
  const end = Math.min(Number(to), file.length - 1);
  response.writeHead(206, { 'Content-Range': `bytes ${from}-${end}/${file.length}` });
  response.end(file.subarray(Number(from), end + 1));
};

async function expectEvent(source: Parameters<typeof ShowerFileReader.open>[0]): Promise<void> {
  const reader = await ShowerFileReader.open(source);
  expect(firstDifference(await reader.event(321), batch.view(321))).toBe(null);
}

describe('a file behind an address', () => {
  it('is read by ranges, a few of them for an event', async () => {
    let bytes = 0;
    const url = await serve((request, response) => {
      const [from, to] = String(request.headers.range).match(/\d+/g) ?? [];
      bytes += Math.min(Number(to) + 1, file.length) - Number(from);
      ranges(request, response);
    });
    await expectEvent(urlSource(url, 'a.shower'));
    expect(bytes).toBeLessThan(file.length / 2);
  });

  it('is read from a server that knows no ranges', async () => {
    let requests = 0;
    const url = await serve((_request, response) => {
      requests++;
      response.end(file);
    });
    await expectEvent(urlSource(url, 'a.shower'));
    expect(requests).toBe(1);
  });

  it('that is not there gives a typed error', async () => {
    const url = await serve((_request, response) => response.writeHead(404).end());
    await expect(ShowerFileReader.open(urlSource(url, 'a.shower'))).rejects.toMatchObject({
      code: 'cannot-read',
      found: 'status 404',
      file: 'a.shower',
    });
    server?.close();
    server?.closeAllConnections();
    await expect(ShowerFileReader.open(urlSource(url, 'gone'))).rejects.toMatchObject({
      code: 'cannot-read',
    });
  });

  it('that changes its size meanwhile gives a typed error', async () => {
    let requests = 0;
    const url = await serve((request, response) => {
      if (requests++ < 1) return ranges(request, response);
      response.writeHead(206, { 'Content-Range': `bytes 0-0/${file.length + 1}` });
      return response.end(file.subarray(0, 1));
    });
    await expect(ShowerFileReader.open(urlSource(url, 'a'))).rejects.toMatchObject({ code: 'cannot-read' });
  });
});

it('a blob is read in pieces', async () => {
  await expectEvent(blobSource(new Blob([file as Uint8Array<ArrayBuffer>]), 'dropped.shower'));
});
