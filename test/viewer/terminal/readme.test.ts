import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { COMMANDS } from '../../../viewer/terminal/commands.ts';
import { CODES } from '../../../viewer/terminal/errors.ts';

const rows = readFileSync('README.md', 'utf8')
  .split('\n')
  .filter((line) => line.startsWith('| `'))
  .map((line) =>
    line
      .slice(1, -1)
      .split('|')
      .map((cell) => cell.trim()),
  );

test('the README lists every code with its exit status and remedy, and no other', () => {
  const listed = rows.filter((cells) => cells.length === 3);
  expect(listed).toEqual(
    Object.entries(CODES).map(([code, { status, remedy }]) => [`\`${code}\``, String(status), remedy]),
  );
});

test('the README lists every command', () => {
  const listed = rows.filter((cells) => cells.length === 2).map(([command]) => command.match(/[a-z]+/)?.[0]);
  expect(listed).toEqual(COMMANDS.map(({ name }) => name));
});
