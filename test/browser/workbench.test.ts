import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { ask, Bench, branchlight, until, words } from './workbench.ts';

const bench = new Bench();
const EVENTS = 300;
let page: Page;

beforeAll(async () => {
  branchlight(
    'grow',
    '--quiet',
    '--energy',
    '1000',
    '--events',
    String(EVENTS),
    '--out',
    bench.path('demo.shower'),
  );
  branchlight('grow', '--quiet', '--events', '40', '--seed', '5', '--out', bench.path('other.shower'));
  await bench.start(bench.path('demo.shower'));
});
afterAll(() => bench.stop());
afterEach(async () => {
  await page?.close();
  expect(bench.troubles.splice(0)).toEqual([]);
});

const cardTitle = (): Promise<string> => words(page.locator('bl-card h2'));
const clockState = (): Promise<string> => words(page.locator('bl-clock .now'));

/** Drop a file on the page as a hand would. */
async function drop(name: string, bytes: Uint8Array): Promise<void> {
  await page.evaluate(
    ({ name, text }) => {
      const bytes = Uint8Array.from(atob(text), (letter) => letter.charCodeAt(0));
      const dataTransfer = new DataTransfer();
      dataTransfer.items.add(new File([bytes], name));
      for (const type of ['dragenter', 'dragover', 'drop']) {
        document.body.dispatchEvent(new DragEvent(type, { dataTransfer, bubbles: true, cancelable: true }));
      }
    },
    { name, text: Buffer.from(bytes).toString('base64') },
  );
}

describe('the served sample', () => {
  test('is opened and shown from its hard process on', async () => {
    page = await bench.open();
    expect(await page.title()).toBe('event 0, demo.shower – Branchlight');
    expect(await words(page.locator('bl-bar .total'))).toBe(`of ${EVENTS}`);
    expect(await cardTitle()).toBe('Event 0');
    expect(await clockState()).toMatch(/500 GeV, hard process/);
    await bench.look(page, 'opened-1280');
  });

  test('plays to the end by itself', async () => {
    page = await bench.open('#event=28');
    await page.locator('bl-clock select').selectOption('8');
    await page.keyboard.press('Escape');
    await page.locator('bl-clock').getByRole('button', { name: 'play', exact: true }).click();
    await until(page, (app) => app.store!.playhead.playing);
    await until(page, (app) => !app.store!.playhead.playing);
    const [time, end, steps] = await ask(page, ({ store }) => [
      store!.playhead.time,
      store!.playhead.end,
      store!.state.history!.steps.length,
    ]);
    expect(time).toBe(end);
    expect(await clockState()).toMatch(new RegExp(`1\\.00 GeV, after step ${steps - 1}$`));
    expect(await page.locator('bl-clock .mark.future').count()).toBe(0);
    expect(await page.locator('bl-angle-trail .column.future').count()).toBe(0);
    await bench.look(page, 'played-1280');
  });

  test('steps forward and back, the same step in clock, card, trail and address', async () => {
    page = await bench.open('#event=28');
    for (let k = 0; k < 3; k++) await page.keyboard.press('ArrowRight');
    await page.keyboard.press('ArrowLeft');
    expect(await cardTitle()).toBe('Step 1');
    expect(await clockState()).toMatch(/after step 1$/);
    expect(await page.locator('bl-angle-trail .chosen-number').textContent()).toBe('1');
    expect(await page.locator('bl-clock .mark[data-selected] text').textContent()).toBe('1');
    expect(page.url()).toMatch(/#event=28&step=1$/);
    const same = await ask(
      page,
      ({ store }) => store!.playhead.time === store!.state.measures!.evolutionTime[1],
    );
    expect(same).toBe(true);
  });

  test('reopens event and step from the address, also when it is changed by hand', async () => {
    page = await bench.open('#event=17&step=2');
    expect(await cardTitle()).toBe('Step 2');
    expect(await page.locator('bl-bar input').inputValue()).toBe('17');
    await page.evaluate(() => {
      location.hash = '#event=28&step=4';
    });
    await until(page, (app) => app.store!.state.step === 4);
    expect(await cardTitle()).toBe('Step 4');
    expect(await page.locator('bl-bar input').inputValue()).toBe('28');
  });
});

describe('one selection', () => {
  test('a branching that is picked in the ball is the step of the card and of the trail', async () => {
    page = await bench.open('#event=28');
    await page.keyboard.press('End');
    const box = (await page.locator('bl-ball').boundingBox())!;
    // Points all over the ball, the golden angle apart, until one is on a branching.
    let step = -1;
    for (let k = 1; k < 1200 && step < 0; k++) {
      const radius = 0.47 * Math.min(box.width, box.height) * Math.sqrt(k / 1200);
      const x = box.x + box.width / 2 + radius * Math.cos(k * 2.39996);
      const y = box.y + box.height / 2 + radius * Math.sin(k * 2.39996);
      await page.mouse.move(x, y);
      step = await ask(page, (app) => app.store!.state.hoverStep);
      if (step >= 0) await page.mouse.click(x, y);
    }
    expect(step).toBeGreaterThanOrEqual(0);
    expect(await ask(page, (app) => app.store!.state.step)).toBe(step);
    expect(await cardTitle()).toBe(`Step ${step}`);
    expect(await page.locator('bl-angle-trail .chosen-number').textContent()).toBe(String(step));
    await bench.look(page, 'picked-1280');
  });

  test('a click in the trail selects the step, and takes the clock to one still to come', async () => {
    page = await bench.open('#event=28');
    const hit = page.locator('bl-angle-trail .hit');
    const { width, height } = (await hit.boundingBox())!;
    const steps = await ask(page, (app) => app.store!.state.history!.steps.length);
    await hit.click({ position: { x: ((5 + 0.5) / steps) * width, y: height / 2 } });
    expect(await cardTitle()).toBe('Step 5');
    expect(await clockState()).toMatch(/after step 5$/);
    await hit.click({ position: { x: ((1 + 0.5) / steps) * width, y: height / 2 } });
    expect(await cardTitle()).toBe('Step 1');
    expect(await clockState()).toMatch(/after step 5$/);
  });

  test('the clock is dragged, and a mark that is clicked comes to rest on its step', async () => {
    page = await bench.open('#event=28');
    const axis = (await page.locator('bl-clock [role=slider]').boundingBox())!;
    await page.mouse.move(axis.x + 3, axis.y + 30);
    await page.mouse.down();
    await page.mouse.move(axis.x + axis.width / 2, axis.y + 30, { steps: 4 });
    await page.mouse.up();
    expect(await ask(page, ({ store }) => store!.playhead.time / store!.playhead.end)).toBeCloseTo(0.5, 2);
    const at = await ask(page, ({ store }) => store!.playhead.timeOf(2) / store!.playhead.end);
    await page.mouse.click(axis.x + at * axis.width + 2, axis.y + 30);
    expect(await cardTitle()).toBe('Step 2');
    const same = await ask(page, ({ store }) => store!.playhead.time === store!.playhead.timeOf(2));
    expect(same).toBe(true);
  });

  test('the card prints claimed and measured alike, and copies the whole number', async () => {
    page = await bench.open('#event=28&step=3');
    await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
    const cells = page.locator('bl-card tr[data-key=kT] .number-cell');
    expect(await words(cells.nth(0))).toBe(await words(cells.nth(1)));
    expect(await page.locator('bl-card tr.differs').count()).toBe(0);
    await cells.nth(0).click();
    const claimed = await ask(page, (app) => app.store!.state.history!.steps.kT[3]);
    expect(Number(await page.evaluate(() => navigator.clipboard.readText()))).toBe(claimed);
  });

  test('the event’s own command makes the same event again', async () => {
    page = await bench.open('#event=28');
    const command = (await words(page.locator('bl-card code'))).replace(
      'again.shower',
      bench.path('again.shower'),
    );
    branchlight(...command.split(' ').slice(1), '--quiet');
    const show = (file: string) =>
      JSON.parse(branchlight('show', bench.path(file), '--event', '28', '--json'));
    expect(show('again.shower')).toEqual(show('demo.shower'));
  });

  test('the trail shows one parton line when asked to', async () => {
    page = await bench.open('#event=28');
    const choice = page.locator('bl-angle-trail select').first();
    await choice.selectOption({ index: 2 });
    const aside = await page.locator('bl-angle-trail .column.aside').count();
    const steps = await ask(page, (app) => app.store!.state.history!.steps.length);
    const shown = Number((await words(choice.locator('option').nth(2))).match(/(\d+) steps?$/)![1]);
    expect(aside).toBe(steps - shown);
    expect(shown).toBeGreaterThan(0);
  });
});

describe('events', () => {
  test('are chosen from the list, which holds all and draws few', async () => {
    page = await bench.open('', 1920, 1080);
    const rows = page.locator('bl-events .row');
    const drawn = await rows.count();
    expect(drawn).toBeLessThan(60);
    await rows.nth(7).click();
    await until(page, (app) => app.store!.state.history?.head.event === 7);
    expect(await page.locator('bl-events [aria-selected=true]').getAttribute('data-event')).toBe('7');
    await page.locator('bl-events .box').press('End');
    await until(page, (app) => app.store!.state.history?.head.event === 299);
    await page.locator(`bl-events [data-event="${EVENTS - 1}"]`).waitFor();
    await bench.look(page, 'events-1920');
  });

  test('are ordered by a quantity of the index, and stepped through in that order', async () => {
    page = await bench.open('', 1920, 1080);
    await page.locator('bl-events select').selectOption('branchings');
    await page.locator('bl-events .state', { hasText: 'in the file' }).waitFor();
    const steps = (await page.locator('bl-events .row .steps').allTextContents()).map(Number);
    expect(steps[0]).toBeGreaterThan(10);
    expect(steps).toEqual([...steps].sort((a, b) => b - a));
    await page.locator('bl-events .row').first().click();
    await page.keyboard.press('n');
    const second = Number(await page.locator('bl-events .row').nth(1).getAttribute('data-event'));
    await until(page, (app) => app.store!.state.history !== null);
    expect(await ask(page, (app) => app.store!.state.event)).toBe(second);
  });

  test('are reached by number, and a number that the file lacks is refused in words', async () => {
    page = await bench.open();
    await page.keyboard.press('g');
    await page.keyboard.type('123');
    await page.keyboard.press('Enter');
    await until(page, (app) => app.store!.state.history?.head.event === 123);
    expect(await cardTitle()).toBe('Event 123');
    await page.keyboard.press('g');
    await page.keyboard.type('999999');
    await page.keyboard.press('Enter');
    expect(await ask(page, (app) => app.store!.state.event)).toBe(123);
    expect(await page.locator('bl-bar input').inputValue()).toBe('123');
  });
});

describe('files', () => {
  test('that are dropped are opened', async () => {
    page = await bench.open('#event=28&step=3');
    await drop('other.shower', readFileSync(bench.path('other.shower')));
    await until(
      page,
      (app) => app.store!.state.source.name === 'other.shower' && app.store!.state.history !== null,
    );
    expect(await words(page.locator('bl-bar .total'))).toBe('of 40');
    expect(await cardTitle()).toBe('Event 0');
    expect(await words(page.locator('bl-bar .process'))).toMatch(/91\.1876 GeV/);
    expect(await page.locator('.drop').count()).toBe(0);
  });

  test('that are picked are opened', async () => {
    page = await bench.open();
    await page.locator('bl-app input[type=file]').setInputFiles(bench.path('other.shower'));
    await until(
      page,
      (app) => app.store!.state.source.eventCount === 40 && app.store!.state.history !== null,
    );
    expect(await cardTitle()).toBe('Event 0');
  });

  test('that are cut off show what is whole under a lasting message', async () => {
    page = await bench.open();
    const whole = readFileSync(bench.path('demo.shower'));
    await drop('cut.shower', whole.subarray(0, Math.floor(whole.length * 0.6)));
    await until(
      page,
      (app) => app.store!.state.source.name === 'cut.shower' && app.store!.state.history !== null,
    );
    const left = await ask(page, (app) => app.store!.state.source.eventCount);
    expect(left).toBeGreaterThan(0);
    expect(left).toBeLessThan(EVENTS);
    const banner = page.getByRole('alert');
    expect(await words(banner)).toMatch(
      new RegExp(`cut\\.shower, byte \\d+: expected .*${left} events are whole`, 's'),
    );
    await page.keyboard.press('n');
    await page.keyboard.press('ArrowRight');
    expect(await banner.isVisible()).toBe(true);
    await bench.look(page, 'cut-off-1280');
  });

  test('that are damaged in the middle say so at the event that is lost, and open the others', async () => {
    page = await bench.open();
    const bytes = Uint8Array.from(readFileSync(bench.path('demo.shower')));
    bytes[Math.floor(bytes.length / 2)] ^= 0x10;
    await drop('scratched.shower', bytes);
    await until(
      page,
      (app) =>
        app.store!.state.source.name === 'scratched.shower' && app.store!.state.source.status === 'ready',
    );
    const events = await ask(page, (app) => app.store!.state.source.eventCount);
    let damaged = -1;
    for (let event = 0; event < events && damaged < 0; event += 8) {
      await page.evaluate((n) => document.querySelector('bl-app')!.store!.openEvent(n), event);
      if (await ask(page, (app) => app.store!.state.eventMessage !== null)) damaged = event;
    }
    expect(damaged).toBeGreaterThan(0);
    expect(await words(page.locator('bl-notice div'))).toMatch(
      /could not be read[\s\S]*scratched\.shower, byte \d+: expected/,
    );
    await bench.look(page, 'damaged-event-1280');
    await page.evaluate(() => document.querySelector('bl-app')!.store!.openEvent(0));
    expect(await cardTitle()).toBe('Event 0');
    expect(await words(page.getByRole('alert'))).toMatch(/scratched\.shower, byte \d+/);
  });

  test('that are something else are refused in words, not with a blank', async () => {
    page = await bench.open();
    await drop('notes.txt', Buffer.from('A page of notes, and no shower at all.'));
    await until(page, (app) => app.store!.state.source.status === 'failed');
    const notice = page.locator('bl-notice div');
    expect(await words(notice)).toMatch(/notes\.txt could not be opened[\s\S]*notes\.txt, byte 0: expected/);
    expect(await page.locator('bl-ball').count()).toBe(0);
    await bench.look(page, 'foreign-1280');
    await drop('other.shower', readFileSync(bench.path('other.shower')));
    await until(page, (app) => app.store!.state.history !== null);
    expect(await notice.count()).toBe(0);
  });

  test('of the ball are saved as SVG with its text as text, and as PNG', async () => {
    page = await bench.open('#event=28&step=3');
    const [svg] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('button', { name: 'save SVG' }).click(),
    ]);
    expect(svg.suggestedFilename()).toBe('event-28.svg');
    await svg.saveAs(bench.path('event-28.svg'));
    const text = readFileSync(bench.path('event-28.svg'), 'utf8');
    expect(text).toMatch(/^(<\?xml[^>]*\?>\s*)?<svg[\s\S]*<\/svg>\s*$/);
    expect(text).toContain('<text');
    const [png] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('button', { name: 'save PNG' }).click(),
    ]);
    expect(png.suggestedFilename()).toBe('event-28.png');
    await png.saveAs(bench.path('event-28.png'));
    expect(readFileSync(bench.path('event-28.png')).subarray(1, 4).toString()).toBe('PNG');
  });
});
