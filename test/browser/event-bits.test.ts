import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chromium } from 'playwright-core';
import { build } from 'vite';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { BIT_SAMPLES, eventBits } from '../engine/shower/event-bits.ts';

// Chromium as root, without a network of its own
const ARGUMENTS = ['--no-sandbox', '--disable-quic', '--no-first-run', '--disable-background-networking'];

describe('the bits of 1000 events', () => {
  let folder: string;
  let script: string;

  beforeAll(async () => {
    folder = mkdtempSync(join(tmpdir(), 'event-bits-'));
    await build({
      configFile: false,
      logLevel: 'error',
      build: {
        outDir: folder,
        lib: {
          entry: 'test/engine/shower/event-bits.ts',
          formats: ['iife'],
          name: 'bits',
          fileName: () => 'bits.js',
        },
      },
    });
    script = readFileSync(join(folder, 'bits.js'), 'utf8');
  });

  afterAll(() => rmSync(folder, { recursive: true }));

  it('are the same in Node and in Chromium', async () => {
    const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ARGUMENTS });
    try {
      const page = await browser.newPage();
      await page.addScriptTag({ content: script });
      const there = await page.evaluate((samples) => {
        const { eventBits } = (
          globalThis as unknown as { bits: { eventBits: (s: unknown, n: number) => string } }
        ).bits;
        return samples.map((sample) => eventBits(sample, 1000));
      }, BIT_SAMPLES);
      expect(there).toEqual(BIT_SAMPLES.map((sample) => eventBits(sample, 1000)));
    } finally {
      await browser.close();
    }
  });
});
