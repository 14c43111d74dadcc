import { type ChildProcess, execFileSync, spawn } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';
import { type Browser, chromium, type Locator, type Page } from 'playwright-core';
import type { AppElement } from '../../viewer/views/app/index.ts';

const root = fileURLToPath(new URL('../../', import.meta.url));
const program = join(root, 'viewer/terminal/branchlight.mjs');
const screenshots = join(root, '.cache/screenshots');

// Chromium as root, without a network of its own, drawing on the processor.
const ARGUMENTS = [
  ...['--no-sandbox', '--disable-quic', '--no-first-run', '--disable-background-networking'],
  ...['--disable-component-update', '--disable-sync'],
  ...['--use-gl=angle', '--use-angle=swiftshader', '--enable-unsafe-swiftshader'],
];

/** Run the command line to its end. @returns what it printed. */
export function branchlight(...words: string[]): string {
  return execFileSync(process.execPath, [program, ...words], {
    stdio: ['ignore', 'pipe', 'inherit'],
    encoding: 'utf8',
  });
}

/** A sample, the server on it and a browser: what every test of the workbench works with. */
export class Bench {
  readonly folder = mkdtempSync(join(tmpdir(), 'workbench-'));
  #server: ChildProcess | undefined;
  #browser: Browser | undefined;
  /** Address that `branchlight view` printed. */
  address = '';
  /** What went wrong on any page so far: policy violations, errors, complaints on the console. */
  readonly troubles: string[] = [];

  /** Path of a file in a folder of its own. */
  path(name: string): string {
    return join(this.folder, name);
  }

  /** Serve a file with the real command and start the browser. */
  async start(file: string): Promise<void> {
    mkdirSync(screenshots, { recursive: true });
    this.#server = spawn(process.execPath, [program, 'view', file], { stdio: ['ignore', 'pipe', 'inherit'] });
    const lines = createInterface({ input: this.#server.stdout! });
    this.address = await new Promise((resolve) => lines.once('line', resolve));
    this.#browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ARGUMENTS });
  }

  async stop(): Promise<void> {
    await this.#browser?.close();
    this.#server?.kill('SIGINT');
    rmSync(this.folder, { recursive: true, force: true });
  }

  /** Open the workbench, at a place of the served file. */
  async open(fragment = '', width = 1280, height = 720): Promise<Page> {
    const page = await this.#browser!.newPage({ viewport: { width, height }, reducedMotion: 'reduce' });
    page.on('pageerror', (error) => this.troubles.push(String(error)));
    page.on('console', (message) => {
      if (message.type() === 'error' || message.type() === 'warning') this.troubles.push(message.text());
    });
    await page.addInitScript(() => {
      addEventListener('securitypolicyviolation', (event) => {
        console.error(`policy violation: ${event.violatedDirective} ${event.blockedURI}`);
      });
    });
    await page.goto(this.address + fragment);
    await until(page, (app) => app.store?.state.history != null);
    return page;
  }

  /** Keep a picture for the eye; nothing is compared with it. */
  async look(page: Page, name: string): Promise<void> {
    await page.screenshot({ path: join(screenshots, `${name}.png`) });
  }
}

/** Ask the workbench itself. The policy of the page forbids what a page-side wait would need, so this asks again and again. */
export async function until(
  page: Page,
  holds: (app: AppElement) => boolean,
  patienceMs = 30_000,
): Promise<void> {
  const end = Date.now() + patienceMs;
  while (!(await ask(page, holds))) {
    if (Date.now() > end) throw new Error(`the workbench did not reach: ${holds}`);
    await page.waitForTimeout(50);
  }
}

/** What the workbench answers. The question is sent as text, so it must stand alone. */
export function ask<T>(page: Page, question: (app: AppElement) => T): Promise<T> {
  return page.evaluate(`(${question})(document.querySelector('bl-app'))`) as Promise<T>;
}

/** The text of an element, spaces run together. */
export async function words(locator: Locator): Promise<string> {
  return ((await locator.textContent()) ?? '').replace(/\s+/g, ' ').trim();
}
