import { expect, test } from 'vitest';
import { palette } from '../../../viewer/marks/index.ts';
import { themeCss } from '../../../viewer/state/index.ts';

test('every tint of every theme is a custom property of the page', () => {
  const css = themeCss();
  for (const tints of Object.values(palette)) {
    for (const [role, tint] of Object.entries(tints)) expect(css).toContain(`--${role}: ${tint};`);
  }
});

test('rows take the wash at half strength in the light and a fifth in the dark', () => {
  const css = themeCss();
  expect(css).toContain(`color-mix(in srgb, ${palette.light.wash} 50%, transparent)`);
  expect(css).toContain(`color-mix(in srgb, ${palette.dark.wash} 20%, transparent)`);
});
