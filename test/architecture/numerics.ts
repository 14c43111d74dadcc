import { type Breach, isCode, type SourceSet } from './source-set.ts';
import { globalReferences, lineAt, type Node, parse, walk } from './syntax.ts';

/** Where the same input must give the same bits in every JavaScript engine. */
const SAME_BITS = /^(engine|viewer\/layout|viewer\/marks|viewer\/figure)\//;
/** Where neither the screen nor Node may be touched. */
const PURE = /^(engine|formats|viewer\/(layout|marks|figure|scene\/build))\//;

/** The members of Math that the language defines to the last bit. Its constants are doubles, the same everywhere. */
const EXACT_MEMBERS = new Set(
  'abs min max floor ceil round trunc sign sqrt fround imul clz32 PI E LN2 LN10 LOG2E LOG10E SQRT2 SQRT1_2'.split(
    ' ',
  ),
);
const CLOCKS = new Set(
  'Date performance setTimeout setInterval setImmediate requestAnimationFrame queueMicrotask'.split(' '),
);
const SCREEN = new Set(
  'window document navigator location history self screen localStorage sessionStorage customElements'.split(
    ' ',
  ),
);
const NODE = new Set('process Buffer require'.split(' '));
/** Of the world outside, in Node and in browsers alike: formats may read from it, the rest may not. */
const WORLD = new Set('fetch XMLHttpRequest WebSocket Worker crypto indexedDB globalThis'.split(' '));
const ELEMENT = /^((HTML|SVG)\w*Element|Element|Node|ShadowRoot|CustomEvent|EventTarget|WebGL\w+)$/;

function mathFault(node: Node, parent: Node): string | null {
  if (parent.type !== 'MemberExpression' || parent.object !== node) return 'Math by another name';
  if (parent.computed !== false) return 'a member of Math that is computed';
  const member = (parent.property as Node).name as string;
  if (member === 'random') return 'Math.random: take engine/random';
  return EXACT_MEMBERS.has(member) ? null : `Math.${member}: take it from engine/math`;
}

/** Functions whose last digit depends on the JavaScript engine, clocks, and the screen, where they are not allowed. */
export function numericsBreaches(files: SourceSet): Breach[] {
  const breaches: Breach[] = [];
  for (const [file, text] of files) {
    if (!isCode(file) || !PURE.test(file)) continue;
    const program = parse(file, text);
    const refuse = (rule: string, node: Node, message: string): void => {
      breaches.push({ rule, file, line: lineAt(text, node.start), message });
    };
    const sameBits = SAME_BITS.test(file);
    for (const { name, node, parent } of globalReferences(program)) {
      if (SCREEN.has(name) || ELEMENT.test(name)) refuse('pure', node, `${name} is of the screen`);
      else if (NODE.has(name)) refuse('pure', node, `${name} is of Node`);
      else if (WORLD.has(name) && !file.startsWith('formats/'))
        refuse('pure', node, `${name} is of the world outside`);
      if (!sameBits) continue;
      if (CLOCKS.has(name)) refuse('numerics', node, `${name} is a clock`);
      if (name === 'Math') {
        const message = mathFault(node, parent);
        if (message !== null) refuse('numerics', node, message);
      }
    }
    if (!sameBits) continue;
    walk(program, (node) => {
      if (node.operator === '**' || node.operator === '**=') {
        // Powers of whole numbers that are not doubles are exact.
        if ((node.left as Node).bigint === undefined)
          refuse('numerics', node, '** : take pow from engine/math');
      }
    });
  }
  return breaches;
}
