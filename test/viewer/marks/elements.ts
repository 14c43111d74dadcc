/** An element of a parsed document: name, attributes, children and text in order. */
export interface Element {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: Element[];
  text: string;
}

/**
 * A strict little reader of the XML that the writer may produce: elements with double-quoted attributes and text with the five
 * entities; anything else is refused.
 *
 * @throws Error that names the place of what is not well formed.
 */
export function readElements(source: string): Element {
  const root: Element = { name: '', attributes: {}, children: [], text: '' };
  const open = [root];
  let at = 0;
  const refuse = (why: string): never => {
    throw new Error(`${why} at ${at}: ${source.slice(at, at + 60)}`);
  };
  while (at < source.length) {
    const here = open[open.length - 1];
    if (source[at] !== '<') {
      const end = source.indexOf('<', at);
      const text = source.slice(at, end < 0 ? undefined : end);
      if (text.includes('>')) refuse('a bare >');
      here.text += decode(text, refuse);
      at += text.length;
      continue;
    }
    const tag =
      /^<(\/?)([a-zA-Z]+)((?:\s+[a-zA-Z:-]+="[^"<]*")*)\s*(\/?)>/.exec(source.slice(at)) ?? refuse('no tag');
    at += tag[0].length;
    if (tag[1]) {
      if (open.pop()!.name !== tag[2] || open.length === 0) refuse(`</${tag[2]}> closes another`);
      continue;
    }
    const attributes: Record<string, string> = {};
    for (const [, name, value] of tag[3].matchAll(/([a-zA-Z:-]+)="([^"]*)"/g)) {
      if (name in attributes) refuse(`${name} twice`);
      attributes[name] = decode(value, refuse);
    }
    const element: Element = { name: tag[2], attributes, children: [], text: '' };
    here.children.push(element);
    if (!tag[4]) open.push(element);
  }
  if (open.length !== 1) refuse(`${open[open.length - 1].name} stays open`);
  return root;
}

const ENTITIES: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

function decode(text: string, refuse: (why: string) => never): string {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: these cannot stand in a document.
  if (/[\u0000-\u0008\u000b\u000c\u000e-\u001f]/.test(text)) refuse('a control character');
  return text.replace(/&(?:(\w+);)?/g, (_, name?: string) => (name && ENTITIES[name]) || refuse('a bare &'));
}

/** All elements of a document in order. */
export const allElements = (root: Element): Element[] => [root, ...root.children.flatMap(allElements)];

/** The text of an element and of all in it, in document order as far as text does not stand between children. */
export const wholeText = (element: Element): string =>
  element.text + element.children.map(wholeText).join('');
