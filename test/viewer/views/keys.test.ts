import { describe, expect, test } from 'vitest';
import { KEY_GROUPS, keyCommand } from '../../../viewer/views/help/index.ts';

const press = (key: string, held: Partial<Record<'shift' | 'ctrl' | 'alt' | 'meta', boolean>> = {}) => ({
  key,
  shiftKey: held.shift ?? false,
  ctrlKey: held.ctrl ?? false,
  altKey: held.alt ?? false,
  metaKey: held.meta ?? false,
});

// Names of the help as the browser calls the keys.
const KEY_NAMES: Readonly<Record<string, string>> = {
  Space: ' ',
  '→': 'ArrowRight',
  '←': 'ArrowLeft',
  '↓': 'ArrowDown',
  '↑': 'ArrowUp',
  Esc: 'Escape',
};

describe('keys', () => {
  test('do what the help lists, every one of them', () => {
    const listed = KEY_GROUPS.filter(({ name }) => !name.startsWith('Ball'))
      .flatMap(({ lines }) => lines.flatMap(({ keys }) => keys))
      .filter((key) => key !== 'Tab');
    for (const key of listed) {
      const shift = key.startsWith('Shift ');
      const bare = key.replace('Shift ', '');
      expect(keyCommand(press(KEY_NAMES[bare] ?? bare, { shift }), null), key).not.toBeNull();
    }
  });

  test('are left to the browser with Ctrl, Alt or Meta', () => {
    for (const held of ['ctrl', 'alt', 'meta'] as const)
      expect(keyCommand(press('n', { [held]: true }), null)).toBeNull();
  });

  test('are left to fields, lists of choices, and Space to a button', () => {
    expect(keyCommand(press('n'), { tagName: 'INPUT' })).toBeNull();
    expect(keyCommand(press('ArrowRight'), { tagName: 'SELECT' })).toBeNull();
    expect(keyCommand(press(' '), { tagName: 'BUTTON' })).toBeNull();
    expect(keyCommand(press('ArrowRight'), { tagName: 'BUTTON' })).toBe('step-forward');
  });

  test('find ? and [ also on layouts that type them with Shift', () => {
    expect(keyCommand(press('?', { shift: true }), null)).toBe('help');
    expect(keyCommand(press('[', { shift: true }), null)).toBe('slower');
    expect(keyCommand(press('Home', { shift: true }), null)).toBeNull();
  });
});
