import type { Page } from 'playwright-core';
import type { HarnessPage } from '../../viewer/views/ball/index.ts';
import { BallServer, settle } from '../browser/ball-page.ts';
import { calibrationTurn } from './calibration.ts';

// 340 branchings: fixed coupling 0.35 at 100 TeV down to 0.6 GeV, seed 1, event 0.
const DENSE = 'energy=100000&cutoff=0.6&coupling=0.35&seed=1&event=0';
// A dozen branchings at 1 TeV.
const PLAIN = 'energy=1000&seed=1&event=9';
const SECONDS = 6;

/** How fast the ball moves on the software renderer of this machine. */
export interface SceneFigures {
  readonly words: string;
  readonly steps: number;
  readonly framesPerSecond: number;
  /** Processor time of all of the browser's processes per frame [ms]: what a busy machine does not change much. */
  readonly cpuMs: number;
  /** That over the time of a turn of the calibration loop, in thousands of turns. */
  readonly ratio: number;
}

/** Playing and turning events of few and of more than 300 branchings, the ball filling a window of 1280 by 720. */
export async function sceneTable(): Promise<SceneFigures[]> {
  const server = new BallServer();
  await server.start();
  try {
    const turnNs = Math.min(calibrationTurn(), calibrationTurn(), calibrationTurn());
    const rows: SceneFigures[] = [];
    for (const [words, query, move] of [
      ['play, few steps', PLAIN, play],
      ['play, more than 300 steps', DENSE, play],
      ['turn, more than 300 steps', `${DENSE}&time=1`, turn],
    ] as const) {
      const { page } = await server.open(query, [1280, 720]);
      await settle(page);
      const steps = await page.evaluate(
        () => (globalThis as unknown as HarnessPage).store.state.history!.steps.length,
      );
      const before = await processorMs(page);
      const frames = await page.evaluate(move, SECONDS);
      const cpuMs = ((await processorMs(page)) - before) / frames;
      rows.push({
        words,
        steps,
        framesPerSecond: frames / SECONDS,
        cpuMs,
        ratio: (cpuMs * 1e6) / turnNs / 1000,
      });
      await page.close();
    }
    return rows;
  } finally {
    await server.stop();
  }
}

// Both run on the page, and give back how many frames were drawn in `seconds`.
async function play(seconds: number): Promise<number> {
  const { store } = globalThis as unknown as HarnessPage;
  store.playhead.toStart();
  store.playhead.speed = store.playhead.end / (1.2 * seconds);
  store.playhead.play();
  let frames = 0;
  const end = performance.now() + 1000 * seconds;
  while (performance.now() < end) {
    await new Promise((done) => requestAnimationFrame(done));
    frames++;
  }
  store.playhead.pause();
  return frames;
}

async function turn(seconds: number): Promise<number> {
  const { ball } = globalThis as unknown as HarnessPage;
  let frames = 0;
  const end = performance.now() + 1000 * seconds;
  while (performance.now() < end) {
    ball.aim({ ...ball.camera, azimuth: ball.camera.azimuth + 0.02 });
    await new Promise((done) => requestAnimationFrame(done));
    frames++;
  }
  return frames;
}

async function processorMs(page: Page): Promise<number> {
  const session = await page.context().browser()!.newBrowserCDPSession();
  const { processInfo } = await session.send('SystemInfo.getProcessInfo');
  await session.detach();
  return 1000 * processInfo.reduce((sum, { cpuTime }) => sum + cpuTime, 0);
}
