import { allImports, type Import } from './imports.ts';
import { type Breach, isCode, type SourceSet } from './source-set.ts';

interface Layer {
  /** The files that it holds, by path. */
  readonly holds: RegExp;
  /** What it may import from the project, by path. */
  readonly mayImport: RegExp;
  /** Packages that it may import, by specifier. */
  readonly packages: RegExp;
  /** Said of a breach. */
  readonly rule: string;
}

const NONE = /^$/;
const ANY = /./;

// The first layer that holds a file is its layer: the stricter rooms of the viewer stand before the viewer.
const LAYERS: readonly Layer[] = [
  {
    holds: /^engine\//,
    mayImport: /^engine\//,
    packages: NONE,
    rule: 'engine imports no package and nothing outside engine',
  },
  {
    holds: /^formats\//,
    mayImport: /^(formats|engine)\//,
    packages: /^(msgpackr|fflate|saxes)(\/|$)/,
    rule: 'formats imports engine, msgpackr, fflate and parsers',
  },
  {
    holds: /^viewer\/(layout|marks|figure|scene\/build)\//,
    mayImport: /^(engine|formats|viewer\/(layout|marks|figure|scene\/build))\//,
    packages: NONE,
    rule: 'layout, marks, figures and geometry are pure: no package, nothing of the screen',
  },
  {
    holds: /^viewer\/scene\//,
    mayImport: /^(engine|formats|viewer\/(layout|marks|figure|scene|state))\//,
    packages: /^three(\/|$)/,
    rule: 'the scene imports three and the pure parts, no component',
  },
  {
    holds: /^viewer\/terminal\//,
    mayImport: /^(engine|formats|viewer\/(terminal|layout|marks|figure|fonts))\//,
    packages: /^(node:|vite$)/,
    rule: 'the command line imports engine, formats and what is pure, and packages of Node alone',
  },
  {
    holds: /^viewer\/fonts\//,
    mayImport: /^viewer\/fonts\//,
    packages: /^(node:|subset-font$)/,
    rule: 'cutting fonts is a step of the build and imports nothing of the rest',
  },
  {
    holds: /^viewer\//,
    mayImport: /^(engine|formats|viewer)\/(?!terminal\/|scene\/build\/)/,
    packages: /^(?!node:|three(\/|$)|vite(\/|$)|vitest(\/|$)|playwright)/,
    rule: 'the viewer imports engine and formats; three is for the scene, node: for the command line',
  },
  { holds: /^test\//, mayImport: ANY, packages: ANY, rule: '' },
  {
    holds: /^[^/]+$/,
    mayImport: /^[^/]+$/,
    packages: ANY,
    rule: 'a configuration file imports no part of the project',
  },
];

/** Rooms that only one other room may enter. */
const HOSTS: readonly { room: RegExp; host: RegExp; rule: string }[] = [
  {
    room: /^viewer\/scene\//,
    host: /^(viewer\/scene|viewer\/views\/ball|test)\//,
    rule: 'components reach the scene through its one host element, viewer/views/ball',
  },
];

/** References into another layer, to a package, or into a room with a host, that the house does not allow. */
export function layerBreaches(files: SourceSet): Breach[] {
  const breaches: Breach[] = [];
  const refuse = (i: Import, rule: string): void => {
    const what = i.specifier === null ? 'an address that is computed' : `'${i.specifier}'`;
    breaches.push({ rule: 'layer', file: i.from, line: i.line, message: `imports ${what}: ${rule}` });
  };
  for (const i of allImports(files)) {
    const layer = LAYERS.find(({ holds }) => holds.test(i.from));
    if (layer === undefined) refuse(i, 'code stands in engine, formats, viewer or test');
    else if (i.target === null) {
      if (
        i.specifier === null
          ? layer.packages !== ANY && !/^viewer\//.test(i.from)
          : !layer.packages.test(i.specifier)
      ) {
        refuse(i, layer.rule);
      }
    } else if (!layer.mayImport.test(i.target)) refuse(i, layer.rule);
    else {
      const host = HOSTS.find(({ room }) => room.test(i.target as string));
      if (host && !host.host.test(i.from)) refuse(i, host.rule);
    }
    if (i.target?.startsWith('test/') && !i.from.startsWith('test/'))
      refuse(i, 'nothing points into the tests');
  }
  for (const path of files.keys()) {
    if (path.startsWith('public/') && (isCode(path) || /\.(html?|wasm)$/.test(path))) {
      breaches.push({ rule: 'layer', file: path, line: 0, message: 'public holds no code' });
    }
  }
  return breaches;
}
