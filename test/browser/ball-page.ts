import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { extname, join } from 'node:path';
import { type Browser, chromium, type Page } from 'playwright-core';
import { build } from 'vite';

// Chromium as root, without a network of its own, drawing by its software renderer.
const ARGUMENTS = [
  '--no-sandbox',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--use-gl=angle',
  '--use-angle=swiftshader',
  '--enable-unsafe-swiftshader',
];
const TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript',
  '.css': 'text/css',
  '.woff2': 'font/woff2',
};
const POLICY =
  "default-src 'none'; script-src 'self'; style-src 'self'; font-src 'self'; img-src 'self'; base-uri 'none'; object-src 'none'";
const HARNESS = 'viewer/views/ball/harness.html';

/** A page with the ball alone, and everything that went wrong on it. */
export interface BallPage {
  readonly page: Page;
  /** Errors, refused requests and breaches of the policy. */
  readonly faults: string[];
}

/** The ball's harness, built as the viewer is and served under a strict content policy, in a browser. */
export class BallServer {
  #folder = '';
  #server: Server | undefined;
  #browser: Browser | undefined;

  async start(): Promise<void> {
    this.#folder = mkdtempSync(join(tmpdir(), 'ball-'));
    await build({
      configFile: false,
      logLevel: 'error',
      build: { outDir: this.#folder, emptyOutDir: true, target: 'es2022', rollupOptions: { input: HARNESS } },
    });
    this.#server = createServer((request, response) => {
      const path = join(this.#folder, new URL(request.url ?? '/', 'http://x').pathname);
      if (!path.startsWith(this.#folder) || !existsSync(path) || extname(path) === '') {
        // Browsers ask for an icon by themselves.
        response.writeHead(path.endsWith('favicon.ico') ? 204 : 404).end();
        return;
      }
      response.writeHead(200, {
        'content-type': TYPES[extname(path)] ?? 'application/octet-stream',
        'content-security-policy': POLICY,
      });
      response.end(readFileSync(path));
    });
    await new Promise<void>((resolve) => this.#server!.listen(0, '127.0.0.1', resolve));
    this.#browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ARGUMENTS });
  }

  /**
   * Open the harness on an event.
   *
   * @param query What is grown and shown, see harness.ts.
   * @param before Runs on the page before anything else.
   */
  async open(
    query: string,
    size: readonly [number, number] = [920, 760],
    before?: () => void,
  ): Promise<BallPage> {
    const page = await this.#browser!.newPage({ viewport: { width: size[0], height: size[1] } });
    const faults: string[] = [];
    page.on('pageerror', (error) => faults.push(String(error)));
    page.on('console', (message) => {
      if (message.type() === 'error' || /webgl/i.test(message.text())) faults.push(message.text());
    });
    page.on('requestfailed', (request) => faults.push(`failed: ${request.url()}`));
    if (before) await page.addInitScript(before);
    const { port } = this.#server!.address() as AddressInfo;
    await page.goto(`http://127.0.0.1:${port}/${HARNESS}?${query}`);
    await page.waitForFunction(
      () => (globalThis as { store?: { state: { history: unknown } } }).store?.state.history,
    );
    await settle(page);
    return { page, faults };
  }

  async stop(): Promise<void> {
    await this.#browser?.close();
    this.#server?.close();
    if (this.#folder) rmSync(this.#folder, { recursive: true });
  }
}

/** Wait until the ball has drawn what was asked for: labels settle 160 ms after the last change of view. */
export const settle = async (page: Page): Promise<void> => {
  await page.waitForTimeout(300);
  await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))));
};
