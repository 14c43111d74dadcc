import { posix } from 'node:path';
import { isCode, type SourceSet } from './source-set.ts';
import { lineAt, type Node, parse, walk } from './syntax.ts';

/** One reference from a file to another file or to a package. */
export interface Import {
  readonly from: string;
  /** As written, without a `?…` ending; null for an expression. */
  readonly specifier: string | null;
  /** Path of the file meant, for a relative specifier; null for a package. */
  readonly target: string | null;
  /** Dynamic imports wait until they are called; a worker is started by its address. */
  readonly kind: 'static' | 'dynamic' | 'worker';
  /** `export * from`. */
  readonly everything: boolean;
  readonly line: number;
}

const literal = (node: unknown): string | null => {
  const { type, value } = node as Node;
  return type === 'Literal' && typeof value === 'string' ? value : null;
};

/** `new URL('./x.ts', import.meta.url)`: how a worker's file is named. */
function workerAddress(node: Node): string | null {
  if (node.type !== 'NewExpression' || (node.callee as Node).name !== 'URL') return null;
  const [first, second] = node.arguments as Node[];
  if (second?.type !== 'MemberExpression' || (second.object as Node).type !== 'MetaProperty') return null;
  const address = literal(first);
  return address !== null && isCode(address) ? address : null;
}

/** Everything that one file imports, types included. */
export function importsOf(path: string, text: string): Import[] {
  const found: Import[] = [];
  const add = (node: Node, specifier: string | null, kind: Import['kind'], everything = false): void => {
    const bare = specifier?.replace(/\?.*$/, '') ?? null;
    const target = bare !== null && /^\.\.?(\/|$)/.test(bare) ? posix.join(posix.dirname(path), bare) : null;
    found.push({ from: path, specifier: bare, target, kind, everything, line: lineAt(text, node.start) });
  };
  walk(parse(path, text), (node) => {
    switch (node.type) {
      case 'ImportDeclaration':
      case 'ExportNamedDeclaration':
      case 'ExportAllDeclaration':
        if (node.source) add(node, literal(node.source), 'static', node.type === 'ExportAllDeclaration');
        break;
      case 'TSImportType':
        add(node, literal(node.source), 'static');
        break;
      case 'ImportExpression':
        add(node, literal(node.source), 'dynamic');
        break;
      case 'NewExpression': {
        const address = workerAddress(node);
        if (address !== null) add(node, address, 'worker');
      }
    }
  });
  return found;
}

const known = new WeakMap<SourceSet, Import[]>();

/** The imports of every code file, read once for each set of files: three rules ask for them. */
export function allImports(files: SourceSet): Import[] {
  let found = known.get(files);
  if (found === undefined) {
    found = [...files].flatMap(([path, text]) => (isCode(path) ? importsOf(path, text) : []));
    known.set(files, found);
  }
  return found;
}
