import { type Mark, svgMarks } from '../../marks/index.ts';

const SVG = 'http://www.w3.org/2000/svg';

interface Part {
  readonly group: SVGGElement;
  /** One child a mark, and the text that it was made from. */
  readonly drawn: string[];
}

/**
 * The SVG over or in place of the canvas, in parts. A mark that is the same as the one in its place in the last picture is left
 * alone, so that passing a step lays out one number and not all of them.
 */
export class Overlay {
  readonly #parts = new Map<string, Part>();
  readonly #prefix: string;

  /** @param names Parts from the lowest to the uppermost. */
  constructor(svg: SVGSVGElement, names: readonly string[], prefix: string) {
    this.#prefix = prefix;
    for (const name of names) {
      const group = svg.ownerDocument.createElementNS(SVG, 'g');
      group.dataset.part = name;
      svg.append(group);
      this.#parts.set(name, { group, drawn: [] });
    }
  }

  /** Bring a part up to date with its marks. */
  draw(name: string, marks: readonly Mark[]): void {
    const { group, drawn } = this.#parts.get(name)!;
    marks.forEach((mark, k) => {
      const text = svgMarks([mark], { prefix: `${this.#prefix}-${name}-${k}` });
      if (text === drawn[k]) return;
      if (k >= drawn.length) group.append(group.ownerDocument.createElementNS(SVG, 'g'));
      drawn[k] = text;
      group.children[k].innerHTML = text;
    });
    while (drawn.length > marks.length) {
      drawn.pop();
      group.lastElementChild!.remove();
    }
  }
}
