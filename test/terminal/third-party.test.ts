import { spawnSync } from 'node:child_process';
import { expect, test } from 'vitest';

test('public/THIRD-PARTY.md has the licence of everything that is bundled or served, and of nothing else', () => {
  const check = spawnSync(process.execPath, ['viewer/terminal/third-party.mjs', '--check'], {
    encoding: 'utf8',
  });
  expect(check.stderr).toBe('');
  expect(check.status).toBe(0);
});
