import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { breachesOf, sentence } from './house.ts';
import { readSourceSet, type SourceSet } from './source-set.ts';

const found = (files: Record<string, string>): string[] =>
  breachesOf(new Map(Object.entries(files))).map(({ rule, file }) => `${rule} ${file}`);

const SOUND: Record<string, string> = {
  'index.html': '',
  'package.json': '',
  'vitest.config.ts': `import { defineConfig } from 'vitest/config'; export default defineConfig({});`,
  'public/icon.svg': '',
  'engine/index.ts': `export { grow } from './shower/index.ts';`,
  'engine/constants.ts': `export const CF = 4 / 3;`,
  'engine/math/index.ts': `export { log } from './log.ts';`,
  'engine/math/log.ts': `export const log = (x: number): number => Math.sqrt(x) * Math.PI + Math.fround(x);`,
  'engine/shower/index.ts': `export { grow } from './grow.ts';`,
  'engine/shower/grow.ts': `
    import { log } from '../math/index.ts';
    import { CF } from '../constants.ts';
    export interface Settings { process: string; location: { performance: number } }
    export function grow({ process, location }: Settings): number {
      return log(CF) + process.length + location.performance + Number(2n ** 3n);
    }`,
  'formats/index.ts': `export { read } from './shower-file/index.ts';`,
  'formats/shower-file/index.ts': `export { read } from './read.ts';`,
  'formats/shower-file/read.ts': `
    import { unpack } from 'msgpackr';
    import type { grow } from '../../engine/index.ts';
    export const read = (b: Uint8Array): typeof grow => unpack(b);`,
  'viewer/main.ts': `import './views/ball/index.ts'; import './page.css';`,
  'viewer/page.css': '',
  'viewer/layout/index.ts': `import { log } from '../../engine/math/index.ts'; export const radius = log;`,
  'viewer/scene/index.ts': `import { Scene } from 'three'; import { strip } from './build/index.ts'; export const s = [Scene, strip];`,
  'viewer/scene/build/index.ts': `import { radius } from '../../layout/index.ts'; export const strip = radius;`,
  'viewer/views/ball/index.ts': `
    import { LitElement } from 'lit';
    import { s } from '../../scene/index.ts';
    export const element = document.createElement('div');
    export const parts = [LitElement, s, Date.now(), Math.log(2)];`,
  'viewer/terminal/start.mjs': `import { spawn } from 'node:child_process'; import { setUp } from './set-up.mjs'; setUp(spawn);`,
  'viewer/terminal/set-up.mjs': `export const setUp = (f) => import('vite').then(f);`,
  'test/engine/math/log.test.ts': `import { log } from '../../../engine/math/log.ts'; import { it } from 'vitest'; it('', () => log(1));`,
};

describe('the house as it stands', () => {
  const root = fileURLToPath(new URL('../..', import.meta.url));
  const files: SourceSet = readSourceSet(root);
  it('holds the files that a checkout has', () => {
    expect(files.has('engine/math/log.ts')).toBe(true);
    expect(files.has('package.json')).toBe(true);
    expect([...files.keys()].some((path) => path.includes('node_modules'))).toBe(false);
  });
  it('breaks none of its rules', () => {
    expect(breachesOf(files).map(sentence)).toEqual([]);
  });
});

describe('the checker', () => {
  it('lets a sound house pass', () => {
    expect(breachesOf(new Map(Object.entries(SOUND))).map(sentence)).toEqual([]);
  });

  const seeded: [string, Record<string, string>, string[]][] = [
    [
      'the engine imports a package',
      { 'engine/math/log.ts': `import 'fflate'; export const log = 1;` },
      ['layer engine/math/log.ts'],
    ],
    [
      'the engine imports node',
      { 'engine/math/log.ts': `import 'node:fs'; export const log = 1;` },
      ['layer engine/math/log.ts'],
    ],
    [
      'the engine imports a type of formats',
      {
        'engine/constants.ts': `import type { read } from '../formats/index.ts'; export type R = typeof read; export const CF = 1;`,
      },
      ['layer engine/constants.ts', 'cycle formats/shower-file/read.ts'],
    ],
    [
      'the engine names a type by import()',
      {
        'engine/constants.ts': `export type R = import('../viewer/layout/index.ts').X; export const CF = 1;`,
      },
      ['layer engine/constants.ts'],
    ],
    [
      'the engine imports from a computed address',
      { 'engine/constants.ts': `export const CF = (n: string) => import(n);` },
      ['layer engine/constants.ts'],
    ],
    [
      'the engine imports a test',
      { 'engine/constants.ts': `import '../test/engine/math/log.test.ts'; export const CF = 1;` },
      ['layer engine/constants.ts', 'layer engine/constants.ts', 'door engine/constants.ts'],
    ],
    [
      'formats import the viewer',
      { 'formats/index.ts': `import '../viewer/layout/index.ts';` },
      ['layer formats/index.ts'],
    ],
    [
      'formats import node',
      { 'formats/index.ts': `import { readFileSync } from 'node:fs'; readFileSync('');` },
      ['layer formats/index.ts'],
    ],
    [
      'layout imports lit',
      { 'viewer/layout/index.ts': `import { html } from 'lit'; export const radius = html;` },
      ['layer viewer/layout/index.ts'],
    ],
    [
      'layout imports state',
      {
        'viewer/layout/index.ts': `import '../state/index.ts'; export const radius = 1;`,
        'viewer/state/index.ts': '',
      },
      ['layer viewer/layout/index.ts'],
    ],
    [
      'marks import three',
      { 'viewer/marks/index.ts': `import type { Color } from 'three'; export type C = Color;` },
      ['layer viewer/marks/index.ts'],
    ],
    [
      'geometry imports three',
      { 'viewer/scene/build/index.ts': `import { Vector3 } from 'three'; export const strip = Vector3;` },
      ['layer viewer/scene/build/index.ts'],
    ],
    [
      'a view imports three',
      { 'viewer/views/card/index.ts': `import { Vector3 } from 'three/webgpu'; export const v = Vector3;` },
      ['layer viewer/views/card/index.ts'],
    ],
    [
      'a second view enters the scene',
      { 'viewer/views/card/index.ts': `import { s } from '../../scene/index.ts'; export const v = s;` },
      ['layer viewer/views/card/index.ts'],
    ],
    [
      'a view imports node',
      { 'viewer/views/card/index.ts': `import 'node:fs';` },
      ['layer viewer/views/card/index.ts'],
    ],
    [
      'a view imports the command line',
      { 'viewer/views/card/index.ts': `import '../../terminal/index.ts';`, 'viewer/terminal/index.ts': '' },
      ['layer viewer/views/card/index.ts'],
    ],
    [
      'the command line imports a view',
      { 'viewer/terminal/main.ts': `import '../views/ball/index.ts';` },
      ['layer viewer/terminal/main.ts'],
    ],
    [
      'a worker of the engine stands in the viewer',
      { 'engine/constants.ts': `export const CF = new URL('../viewer/main.ts', import.meta.url);` },
      ['layer engine/constants.ts'],
    ],
    ['public holds code', { 'public/early.js': '' }, ['layer public/early.js']],
    ['public holds a page', { 'public/more.html': '' }, ['layer public/more.html']],
    [
      'configuration imports the project',
      { 'vitest.config.ts': `import './engine/index.ts';` },
      ['layer vitest.config.ts'],
    ],
    [
      'an import goes past an index',
      { 'engine/shower/grow.ts': `import { log } from '../math/log.ts'; export const grow = log;` },
      ['door engine/shower/grow.ts'],
    ],
    [
      'an import goes down past an index',
      { 'engine/index.ts': `export { grow } from './shower/grow.ts';` },
      ['door engine/index.ts'],
    ],
    [
      'a dynamic import goes past an index',
      { 'engine/index.ts': `export const f = () => import('./shower/grow.ts');` },
      ['door engine/index.ts'],
    ],
    [
      'another layer enters by a side door',
      { 'formats/index.ts': `export { grow } from '../engine/shower/index.ts';` },
      ['door formats/index.ts'],
    ],
    [
      'a test looks into a folder that it does not mirror',
      { 'test/laws/a.test.ts': `import '../../engine/math/log.ts';` },
      ['door test/laws/a.test.ts'],
    ],
    [
      'an import has no extension',
      { 'engine/index.ts': `export { grow } from './shower';` },
      ['extension engine/index.ts'],
    ],
    [
      'export *',
      { 'engine/math/index.ts': `export * from './log.ts';` },
      ['export-all engine/math/index.ts'],
    ],
    [
      'export * as',
      { 'engine/math/index.ts': `export * as log from './log.ts';` },
      ['export-all engine/math/index.ts'],
    ],
    [
      'two files import each other',
      {
        'engine/math/log.ts': `import { exp } from './exp.ts'; export const log = exp;`,
        'engine/math/exp.ts': `import { log } from './log.ts'; export const exp = log;`,
      },
      ['cycle engine/math/exp.ts'],
    ],
    [
      'a file imports itself by its index',
      { 'engine/math/log.ts': `import { log as l } from './index.ts'; export const log = l;` },
      ['cycle engine/math/log.ts'],
    ],
    [
      'three folders in a circle, one link a type',
      {
        'engine/math/log.ts': `import type { grow } from '../shower/index.ts'; export const log = (x: typeof grow) => 1;`,
      },
      ['cycle engine/math/log.ts'],
    ],
    ['a folder at top level', { 'scripts/build.ts': '' }, ['top-level scripts']],
    ['a file at top level', { 'notes.md': '' }, ['top-level notes.md']],
    ['code at top level', { 'server.mjs': '' }, ['top-level server.mjs']],
    ['a vague name', { 'engine/math/utils.ts': '' }, ['name engine/math/utils.ts']],
    ['a vague folder', { 'viewer/helpers/a.ts': '' }, ['name viewer/helpers/a.ts']],
    [
      'Math.log in the engine',
      { 'engine/constants.ts': `export const CF = Math.log(2);` },
      ['numerics engine/constants.ts'],
    ],
    [
      'Math.hypot in layout',
      { 'viewer/layout/a.ts': `export const a = Math.hypot(1, 2);` },
      ['numerics viewer/layout/a.ts'],
    ],
    [
      'Math.cbrt in marks',
      { 'viewer/marks/a.ts': `export const a = Math.cbrt(2);` },
      ['numerics viewer/marks/a.ts'],
    ],
    [
      'Math.sin in figures',
      { 'viewer/figure/a.ts': `export const a = Math.sin(2);` },
      ['numerics viewer/figure/a.ts'],
    ],
    [
      'Math taken apart',
      { 'engine/constants.ts': `const { log } = Math; export const CF = log(2);` },
      ['numerics engine/constants.ts'],
    ],
    [
      'Math by index',
      { 'engine/constants.ts': `export const CF = Math['log'](2);` },
      ['numerics engine/constants.ts'],
    ],
    [
      'Math passed on',
      { 'engine/constants.ts': `export const CF = [2].map(Math.exp);` },
      ['numerics engine/constants.ts'],
    ],
    [
      'Math.random',
      { 'engine/constants.ts': `export const CF = Math.random();` },
      ['numerics engine/constants.ts'],
    ],
    ['a power', { 'engine/constants.ts': `export const CF = 2 ** 0.5;` }, ['numerics engine/constants.ts']],
    [
      'a power in place',
      { 'engine/constants.ts': `export let CF = 2; CF **= 0.5;` },
      ['numerics engine/constants.ts'],
    ],
    ['a date', { 'engine/constants.ts': `export const CF = Date.now();` }, ['numerics engine/constants.ts']],
    [
      'a new date',
      { 'engine/constants.ts': `export const CF = new Date();` },
      ['numerics engine/constants.ts'],
    ],
    [
      'a clock',
      { 'viewer/layout/a.ts': `export const a = performance.now();` },
      ['numerics viewer/layout/a.ts'],
    ],
    [
      'a timer',
      { 'engine/constants.ts': `export const CF = setTimeout(() => 1, 2);` },
      ['numerics engine/constants.ts'],
    ],
    [
      'Math by way of globalThis',
      { 'engine/constants.ts': `export const CF = globalThis.Math.log(2);` },
      ['pure engine/constants.ts'],
    ],
    [
      'the page, from layout',
      { 'viewer/layout/a.ts': `export const a = document.body;` },
      ['pure viewer/layout/a.ts'],
    ],
    [
      'a type of the page, from geometry',
      { 'viewer/scene/build/a.ts': `export type A = HTMLCanvasElement;` },
      ['pure viewer/scene/build/a.ts'],
    ],
    [
      'the network, from the engine',
      { 'engine/constants.ts': `export const CF = fetch('x');` },
      ['pure engine/constants.ts'],
    ],
    ['Node, from formats', { 'formats/a.ts': `export const a = process.env;` }, ['pure formats/a.ts']],
    [
      'a package before it is installed',
      { 'viewer/terminal/set-up.mjs': `import 'vite'; export const setUp = 1;` },
      ['before-install viewer/terminal/set-up.mjs'],
    ],
  ];
  for (const [name, change, expected] of seeded) {
    it(`finds what is wrong when ${name}`, () => {
      expect(found({ ...SOUND, ...change })).toEqual(expected);
    });
  }
});
