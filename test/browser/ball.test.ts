import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { HarnessPage } from '../../viewer/views/ball/index.ts';
import { BallServer, settle } from './ball-page.ts';

const server = new BallServer();
beforeAll(() => server.start());
afterAll(() => server.stop());

// An event of a dozen steps at 1 TeV.
const EVENT = 'energy=1000&event=9';

type Globals = HarnessPage;

const words = (page: Page): Promise<string[]> =>
  page.evaluate(() =>
    [...document.querySelector('bl-ball')!.shadowRoot!.querySelectorAll('svg text')].map(
      (text) => text.textContent ?? '',
    ),
  );

/** Share of the pixels of a picture of the page that are nearer to a tint than `reach` of 441. */
async function share(page: Page, tint: readonly [number, number, number], reach = 60): Promise<number> {
  const picture = (await page.screenshot()).toString('base64');
  return page.evaluate(
    async ([source, r, g, b, most]) => {
      const bytes = Uint8Array.from(atob(source as string), (c) => c.charCodeAt(0));
      const image = await createImageBitmap(new Blob([bytes], { type: 'image/png' }));
      const canvas = new OffscreenCanvas(image.width, image.height);
      const context = canvas.getContext('2d')!;
      context.drawImage(image, 0, 0);
      const { data } = context.getImageData(0, 0, image.width, image.height);
      let near = 0;
      for (let k = 0; k < data.length; k += 4) {
        const d = Math.hypot(data[k] - Number(r), data[k + 1] - Number(g), data[k + 2] - Number(b));
        if (d < Number(most)) near++;
      }
      return near / (data.length / 4);
    },
    [picture, ...tint, reach] as const,
  );
}
const QUARK = [0x17, 0x3f, 0x86] as const;
const LIT = [0xff, 0xfd, 0xf8] as const;

/** Where a step stands on the page [px]: its ring is found by letting the store point at it. */
const placeOf = (page: Page, step: number): Promise<{ x: number; y: number }> =>
  page.evaluate((wanted) => {
    const { ball } = globalThis as unknown as Globals;
    const box = ball.getBoundingClientRect();
    const at = ball.placeOf(wanted)!;
    return { x: box.x + at.x, y: box.y + at.y };
  }, step);

describe('the ball in a browser', () => {
  it('draws an event under a strict content policy without a complaint', async () => {
    const { page, faults } = await server.open(`${EVENT}&time=1`);
    expect(await share(page, QUARK)).toBeGreaterThan(0.001);
    expect(await words(page)).toContain('no step to come');
    expect(faults).toEqual([]);
    await page.close();
  });

  it('grows: the lit disc and the lines widen as the clock runs, and the last text is that of the end', async () => {
    const { page, faults } = await server.open(EVENT);
    expect(await words(page)).toContain('hard process');
    const [lit, quark] = [await share(page, LIT, 6), await share(page, QUARK)];
    await page.evaluate(() => {
      const { store } = globalThis as unknown as Globals;
      store.playhead.speed = store.playhead.end / 1.5;
      store.playhead.play();
    });
    await page.waitForFunction(() => !(globalThis as unknown as Globals).store.playhead.playing);
    await settle(page);
    expect(await words(page)).toContain('no step to come');
    expect(await share(page, LIT, 6)).toBeGreaterThan(lit);
    expect(await share(page, QUARK)).toBeGreaterThan(quark);
    expect(faults).toEqual([]);
    await page.close();
  });

  it('picks the branching under the pointer: hover reads it out, a click selects it, a click beside it selects none', async () => {
    const { page } = await server.open(`${EVENT}&time=1`);
    const at = await placeOf(page, 2);
    await page.mouse.move(at.x + 3, at.y - 4);
    await settle(page);
    const readout = page.locator('bl-ball .readout');
    expect(await readout.isVisible()).toBe(true);
    expect(await readout.textContent()).toMatch(/^\s*2\s.*→.*kT = .* GeV.*θ = .* rad/s);
    await page.mouse.click(at.x + 3, at.y - 4);
    await settle(page);
    const selected = () => page.evaluate(() => (globalThis as unknown as Globals).store.state.step);
    expect(await selected()).toBe(2);
    expect((await words(page)).some((text) => /^θ = [\d.]+ rad$/.test(text))).toBe(true);
    expect(await page.locator('bl-ball [role=status]').textContent()).toMatch(/^step 2, .* opening angle/);
    const { width, height } = page.viewportSize()!;
    await page.mouse.click(width / 2, height - 30);
    expect(await selected()).toBe(-1);
    await page.close();
  });

  it('turns with a drag, which selects nothing, and with the arrows once it has the focus', async () => {
    const { page } = await server.open(`${EVENT}&time=1&step=4`);
    const camera = () => page.evaluate(() => (globalThis as unknown as Globals).ball.camera);
    const first = await camera();
    await page.keyboard.press('ArrowLeft');
    expect(await camera()).toEqual(first);
    await page.mouse.move(400, 300);
    await page.mouse.down();
    await page.mouse.move(460, 320, { steps: 4 });
    await page.mouse.up();
    const dragged = await camera();
    expect(dragged.azimuth).not.toBe(first.azimuth);
    expect(dragged.elevation).toBeGreaterThan(first.elevation);
    expect(await page.evaluate(() => (globalThis as unknown as Globals).store.state.step)).toBe(4);
    await page.locator('bl-ball .plate').focus();
    await page.keyboard.press('ArrowLeft');
    await page.keyboard.press('+');
    const keyed = await camera();
    expect(keyed.azimuth).toBeLessThan(dragged.azimuth);
    expect(keyed.zoom).toBeCloseTo(1.2, 6);
    await page.keyboard.press('0');
    expect(await camera()).toEqual(first);
    await page.close();
  });

  it('zooms about the pointer with the wheel, and a double click goes back, at once where motion is to be reduced', async () => {
    const { page } = await server.open(`${EVENT}&time=1`);
    await page.emulateMedia({ reducedMotion: 'reduce' });
    const at = await placeOf(page, 3);
    // A pointer stands on whole pixels.
    const pointer = { x: Math.round(at.x), y: Math.round(at.y) };
    await page.mouse.move(pointer.x, pointer.y);
    await page.mouse.wheel(0, -240);
    await settle(page);
    const after = await placeOf(page, 3);
    const zoom = () => page.evaluate(() => (globalThis as unknown as Globals).ball.camera.zoom);
    expect(await zoom()).toBeGreaterThan(1.5);
    expect(after.x - pointer.x).toBeCloseTo((await zoom()) * (at.x - pointer.x), 6);
    expect(after.y - pointer.y).toBeCloseTo((await zoom()) * (at.y - pointer.y), 6);
    await page.mouse.dblclick(at.x, at.y);
    expect(await zoom()).toBe(1);
    await page.close();
  });

  it('moves nothing by itself: without a cause no frame is drawn', async () => {
    const { page } = await server.open(`${EVENT}&time=0.7&step=3`);
    const asked = await page.evaluate(async () => {
      let count = 0;
      const request = globalThis.requestAnimationFrame;
      globalThis.requestAnimationFrame = (tick) => {
        count++;
        return request(tick);
      };
      await new Promise((done) => setTimeout(done, 600));
      globalThis.requestAnimationFrame = request;
      return count;
    });
    expect(asked).toBe(0);
    await page.close();
  });

  it('keeps its memory on the graphics processor while it plays and turns', async () => {
    const { page } = await server.open(`${EVENT}&step=4`);
    const memory = () => page.evaluate(() => (globalThis as unknown as Globals).ball.memory);
    const before = await memory();
    expect(before!.geometries).toBeGreaterThan(5);
    await page.evaluate(async () => {
      const { ball, store } = globalThis as unknown as Globals;
      const frame = () => new Promise((done) => requestAnimationFrame(done));
      for (let k = 0; k <= 20; k++) {
        store.playhead.seek((store.playhead.end * k) / 20);
        ball.aim({ ...ball.camera, azimuth: k / 10 });
        await frame();
      }
    });
    await settle(page);
    expect(await memory()).toEqual(before);
    await page.close();
  });

  it('leaves no object and no context behind: after twenty mounts the memory is that of the first', async () => {
    const { page, faults } = await server.open(`${EVENT}&time=1&step=4`);
    const figures = await page.evaluate(async () => {
      const { ball, harness } = globalThis as unknown as Globals;
      const frames = async () => {
        for (let k = 0; k < 3; k++) await new Promise((done) => requestAnimationFrame(done));
      };
      const found: string[] = [JSON.stringify(ball.memory)];
      const canvases: HTMLCanvasElement[] = [];
      for (let k = 0; k < 20; k++) {
        canvases.push(ball.shadowRoot!.querySelector('canvas')!);
        ball.remove();
        if (ball.memory !== null) throw new Error('a scene outlives its element');
        harness.append(ball);
        await frames();
        found.push(JSON.stringify(ball.memory));
      }
      const alive = canvases.filter((canvas) => !canvas.getContext('webgl2')!.isContextLost()).length;
      const now = ball.shadowRoot!.querySelector('canvas')!.getContext('webgl2')!;
      return { found: [...new Set(found)], alive, working: !now.isContextLost() };
    });
    expect(figures.found).toEqual([expect.stringContaining('geometries')]);
    expect(figures.alive).toBe(0);
    expect(figures.working).toBe(true);
    expect(await share(page, QUARK)).toBeGreaterThan(0.001);
    expect(faults.filter((fault) => !/Context Lost/.test(fault))).toEqual([]);
    await page.close();
  });

  it('draws vector lines where there is no WebGL, and still steps, turns and picks', async () => {
    const { page, faults } = await server.open(EVENT, [920, 760], () => {
      const original = HTMLCanvasElement.prototype.getContext;
      HTMLCanvasElement.prototype.getContext = function (
        this: HTMLCanvasElement,
        kind: string,
        ...rest: unknown[]
      ) {
        return kind.startsWith('webgl')
          ? null
          : (original as (...all: unknown[]) => unknown).call(this, kind, ...rest);
      } as typeof original;
    });
    const paths = () => page.locator('bl-ball svg path').count();
    expect(await paths()).toBeGreaterThan(20);
    expect(await page.evaluate(() => (globalThis as unknown as Globals).ball.memory)).toBe(null);
    const quark = await share(page, QUARK);
    for (let k = 0; k < 5; k++)
      await page.evaluate(() => (globalThis as unknown as Globals).store.playhead.stepForward());
    await settle(page);
    expect(await words(page)).toContain('after step 4');
    expect(await share(page, QUARK)).toBeGreaterThan(quark);
    const at = await placeOf(page, 1);
    await page.mouse.click(at.x, at.y);
    expect(await page.evaluate(() => (globalThis as unknown as Globals).store.state.step)).toBe(1);
    expect(faults).toEqual([]);
    await page.close();
  });

  it('goes over to vector lines when its context is lost', async () => {
    const { page } = await server.open(`${EVENT}&time=1`);
    await page.evaluate(() => {
      const canvas = (globalThis as unknown as Globals).ball.shadowRoot!.querySelector('canvas')!;
      canvas.getContext('webgl2')!.getExtension('WEBGL_lose_context')!.loseContext();
    });
    await page.waitForFunction(() => (globalThis as unknown as Globals).ball.memory === null);
    await settle(page);
    expect(await page.locator('bl-ball svg [data-part=ball] path').count()).toBeGreaterThan(20);
    expect(await share(page, QUARK)).toBeGreaterThan(0.001);
    await page.close();
  });

  it('shows the same picture as vector lines and by the graphics processor', async () => {
    const tints = [QUARK, LIT, [0x0a, 0x7b, 0x82], [0xb2, 0x74, 0x08], [0x1f, 0x23, 0x29]] as const;
    const counts: number[][] = [];
    for (const query of [`${EVENT}&time=0.8`, `${EVENT}&time=0.8&vector`]) {
      const { page } = await server.open(query);
      const found: number[] = [];
      for (const tint of tints) found.push(await share(page, tint));
      counts.push(found);
      await page.close();
    }
    counts[0].forEach((count, k) => {
      expect(counts[1][k] / count).toBeGreaterThan(0.8);
      expect(counts[1][k] / count).toBeLessThan(1.25);
    });
  });

  it('saves itself as an SVG that the browser reads, and as a PNG at the scale asked for', async () => {
    const { page } = await server.open(`${EVENT}&step=4`);
    const saved = await page.evaluate(async () => {
      const { ball } = globalThis as unknown as Globals;
      const svg = new DOMParser().parseFromString(ball.saveSvg(), 'image/svg+xml');
      const image = await createImageBitmap(await ball.savePng(2));
      const canvas = new OffscreenCanvas(image.width, image.height);
      const context = canvas.getContext('2d')!;
      context.drawImage(image, 0, 0);
      const { data } = context.getImageData(0, 0, image.width, image.height);
      let dark = 0;
      for (let k = 0; k < data.length; k += 4) if (data[k] + data[k + 1] + data[k + 2] < 300) dark++;
      // The words in the upper left corner, where nothing else is drawn.
      let corner = 0;
      for (let y = 0; y < 160; y++)
        for (let x = 0; x < 200; x++) if (data[4 * (y * image.width + x)] < 140) corner++;
      return {
        error: svg.querySelector('parsererror')?.textContent ?? null,
        texts: [...svg.querySelectorAll('text')].map((text) => text.textContent),
        size: [image.width, image.height],
        box: [ball.clientWidth, ball.clientHeight],
        dark: dark / (image.width * image.height),
        corner,
      };
    });
    expect(saved.error).toBe(null);
    expect(saved.texts).toContain('after step 4');
    expect(saved.texts.some((text) => /^θ = [\d.]+ rad$/.test(text ?? ''))).toBe(true);
    // The box at two dots a pixel, and a margin of 16 px all round.
    expect(saved.size).toEqual(saved.box.map((length) => 2 * (length + 32)));
    expect(saved.dark).toBeGreaterThan(0.003);
    expect(saved.corner).toBeGreaterThan(300);
    await page.close();
  });

  it('measures text as the browser does, within 3 %', async () => {
    const { page } = await server.open(`${EVENT}&step=4`);
    const worst = await page.evaluate(async () => {
      await document.fonts.ready;
      const { ball, widthOfRuns } = globalThis as unknown as Globals;
      const texts = [...ball.shadowRoot!.querySelectorAll<SVGTextElement>('svg text')].filter(
        (text) => !text.querySelector('textPath, tspan') && !text.hasAttribute('font-style'),
      );
      return texts.map((text) => {
        const bold = text.getAttribute('font-weight') === '600';
        const own = widthOfRuns(text.textContent!, bold, Number(text.getAttribute('font-size')));
        return Math.abs(own / text.getComputedTextLength() - 1);
      });
    });
    expect(worst.length).toBeGreaterThan(15);
    expect(Math.max(...worst)).toBeLessThan(0.03);
    await page.close();
  });

  it('shows an event without a branching', async () => {
    const { page, faults } = await server.open('energy=20&cutoff=4&silent');
    expect(await words(page)).toContain('no branching in this event');
    expect(faults).toEqual([]);
    await page.close();
  });

  it('folds its keys away and takes them back', async () => {
    const { page } = await server.open(`${EVENT}&time=1`);
    const button = page.locator('bl-ball button.key-left');
    const shown = async () => (await words(page)).includes('gluon, doubled');
    expect(await shown()).toBe((await button.getAttribute('aria-expanded')) === 'true');
    const before = await shown();
    await button.click();
    await settle(page);
    expect(await shown()).toBe(!before);
    await page.close();
  });
});
