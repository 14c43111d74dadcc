import axe from 'axe-core';
import type { Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { ask, Bench, branchlight, until, words } from './workbench.ts';

const bench = new Bench();
let page: Page;

beforeAll(async () => {
  branchlight('grow', '--quiet', '--energy', '1000', '--events', '60', '--out', bench.path('demo.shower'));
  await bench.start(bench.path('demo.shower'));
});
afterAll(() => bench.stop());
afterEach(async () => {
  await page?.close();
  expect(bench.troubles.splice(0)).toEqual([]);
});

/** Element that has the focus, through all shadow roots: what it is called, how it is outlined, whether it is in view. */
const focused = (): Promise<{ tag: string; name: string; outline: string; seen: boolean } | null> =>
  page.evaluate(() => {
    let element = document.activeElement;
    while (element?.shadowRoot?.activeElement) element = element.shadowRoot.activeElement;
    if (!element || element === document.body) return null;
    const { outlineStyle, outlineWidth } = getComputedStyle(element);
    const { width, height, left, top } = element.getBoundingClientRect();
    const label =
      element.getAttribute('aria-label') ?? element.closest('label')?.textContent ?? element.textContent;
    return {
      tag: element.tagName.toLowerCase(),
      name: (label ?? '').replace(/\s+/g, ' ').trim(),
      outline: `${outlineStyle} ${outlineWidth}`,
      seen: width > 0 && height > 0 && left < innerWidth && top < innerHeight,
    };
  });

/** Serious findings of the accessibility scan, each with the elements that it is about. */
async function findings(): Promise<string[]> {
  // Sent by the debugger: the page's own policy would refuse a script tag.
  await page.evaluate(axe.source);
  const { violations } = (await page.evaluate(
    'axe.run(document, { resultTypes: ["violations"] })',
  )) as axe.AxeResults;
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(
      ({ id, nodes }) =>
        `${id}: ${nodes.map(({ target, failureSummary }) => `${target} ${failureSummary}`).join('; ')}`,
    );
}

describe('with the keyboard alone', () => {
  test('every control is reached in order, named and seen to have the focus', async () => {
    page = await bench.open('#event=28&step=2', 1920, 1080);
    const found: { tag: string; name: string }[] = [];
    for (let k = 0; k < 200; k++) {
      await page.keyboard.press('Tab');
      const here = await focused();
      if (!here) break;
      expect(here.name, `${here.tag} number ${k}`).not.toBe('');
      expect(here.outline, here.name).toBe('solid 2px');
      expect(here.seen, here.name).toBe(true);
      found.push(here);
    }
    const names = found.map(({ name }) => name).join('\n');
    for (const control of [
      ...['open file …', 'save SVG', 'save PNG', 'dark', 'keys', 'previous event', 'next event', 'event'],
      ...[
        'order by',
        'events',
        'Ball',
        'to the hard process',
        'play',
        'evolution time',
        'all parton lines',
        'along',
      ],
      'opening angle: copy claimed and measured',
    ]) {
      expect(names).toContain(control);
    }
  });

  test('an event is played, stepped, searched, and the selection cleared', async () => {
    page = await bench.open('#event=28');
    await page.keyboard.press(']');
    await page.keyboard.press(']');
    expect(await ask(page, (app) => app.store!.playhead.speed)).toBe(4);
    await page.keyboard.press('Space');
    await until(page, (app) => app.store!.playhead.time > 1);
    await page.keyboard.press('Space');
    expect(await ask(page, (app) => app.store!.playhead.playing)).toBe(false);
    await page.keyboard.press('Shift+ArrowLeft');
    expect(await ask(page, ({ store }) => store!.playhead.direction)).toBe(-1);
    await until(page, ({ store }) => !store!.playhead.playing);
    await page.keyboard.press('ArrowRight');
    expect(await words(page.locator('bl-card h2'))).toBe('Step 0');
    await page.keyboard.press('Escape');
    expect(await words(page.locator('bl-card h2'))).toBe('Event 28');
    await page.keyboard.press('End');
    expect(await ask(page, ({ store }) => store!.playhead.time === store!.playhead.end)).toBe(true);
    await page.keyboard.press('ArrowDown');
    await until(page, (app) => app.store!.state.history?.head.event === 29);
    await page.keyboard.press('p');
    await until(page, (app) => app.store!.state.history?.head.event === 28);
  });

  test('the list of keys opens, keeps the keys to itself and closes', async () => {
    page = await bench.open('#event=28');
    await page.keyboard.press('?');
    const dialog = page.locator('bl-help dialog');
    expect(await dialog.isVisible()).toBe(true);
    await page.keyboard.press('ArrowRight');
    expect(await ask(page, (app) => app.store!.state.step)).toBe(-1);
    await bench.look(page, 'keys-1280');
    await page.keyboard.press('Escape');
    expect(await dialog.isVisible()).toBe(false);
  });

  test('the definition of a quantity is read where its row has the focus', async () => {
    page = await bench.open('#event=28&step=2');
    await page.locator('bl-card tr[data-key=birthAngle] .term').focus();
    expect(await words(page.locator('bl-card .definition'))).toMatch(
      /^birth angle Opening angle of the last step/,
    );
  });
});

describe('the accessibility scan finds nothing serious', () => {
  test.each(['light', 'dark'] as const)(
    'in the %s theme, with a step selected and with none',
    async (theme) => {
      page = await bench.open('#event=28&step=2', 1920, 1080);
      if (theme === 'dark') await page.getByRole('button', { name: 'dark', exact: true }).click();
      expect(await ask(page, () => document.documentElement.dataset.theme)).toBe(theme);
      expect(await findings()).toEqual([]);
      await bench.look(page, `step-1920-${theme}`);
      await page.keyboard.press('Escape');
      expect(await findings()).toEqual([]);
      await bench.look(page, `event-1920-${theme}`);
    },
  );

  test('with the list of keys open, and in a narrow window', async () => {
    page = await bench.open('#event=28&step=2', 420, 800);
    expect(await findings()).toEqual([]);
    await page.keyboard.press('?');
    expect(await findings()).toEqual([]);
  });
});

describe('in a window of', () => {
  test.each([
    [1920, 1080],
    [1600, 900],
    [1280, 720],
    [1024, 768],
    [900, 700],
    [420, 800],
  ])('%d by %d everything has its place', async (width, height) => {
    page = await bench.open('#event=28&step=2', width, height);
    await bench.look(page, `step-${width}`);
    const { wide, boxes, small } = await page.evaluate(() => {
      const app = document.querySelector('bl-app')!;
      const box = (tag: string) => {
        const { left, top, right, bottom } = app.renderRoot.querySelector(tag)!.getBoundingClientRect();
        return { tag, left, top, right, bottom };
      };
      // The smallest letters on the screen, indices apart.
      const small: string[] = [];
      const look = (root: Document | ShadowRoot): void => {
        for (const element of root.querySelectorAll('*')) {
          if (element.shadowRoot) look(element.shadowRoot);
          const own = [...element.childNodes].some((node) => node.nodeType === 3 && node.textContent!.trim());
          if (!own || element.closest('sub, sup, tspan, style, noscript, .unseen')) continue;
          const size = Number.parseFloat(getComputedStyle(element).fontSize);
          if (size < 11.7)
            small.push(`${element.tagName} ${size} ${element.textContent!.trim().slice(0, 30)}`);
        }
      };
      look(document);
      const boxes = ['bl-bar', 'bl-ball', 'bl-clock', 'bl-angle-trail', 'bl-card'].map(box);
      return { wide: document.documentElement.scrollWidth, boxes, small };
    });
    expect(wide).toBeLessThanOrEqual(width);
    expect(small).toEqual([]);
    for (const { tag, left, right, top, bottom } of boxes) {
      expect(left, tag).toBeGreaterThanOrEqual(0);
      expect(right, tag).toBeLessThanOrEqual(width);
      expect(bottom - top, tag).toBeGreaterThan(30);
    }
    // No two of them lie over one another.
    for (const a of boxes) {
      for (const b of boxes.slice(boxes.indexOf(a) + 1)) {
        const apart = a.right <= b.left || b.right <= a.left || a.bottom <= b.top || b.bottom <= a.top;
        expect(apart, `${a.tag} and ${b.tag}`).toBe(true);
      }
    }
    const visible = width >= 860;
    if (visible) for (const { tag, bottom } of boxes) expect(bottom, tag).toBeLessThanOrEqual(height);
  });
});
