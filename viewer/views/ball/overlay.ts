import { type Mark, svgMarks } from '../../marks/index.ts';

const SVG = 'http://www.w3.org/2000/svg';

/** A mark on the screen: the text that it was made from, and for lettering where that stands. */
interface Drawn {
  text: string;
  x: number;
  y: number;
}

interface Part {
  readonly group: SVGGElement;
  /** One child a mark. */
  readonly drawn: Drawn[];
}

/**
 * The SVG over or in place of the canvas, in parts. A mark that is the same as the one in its place in the last picture is left
 * alone, and lettering that only moved is moved, so that passing a step lays out one number and turning the ball none.
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
      if (k >= drawn.length) {
        group.append(group.ownerDocument.createElementNS(SVG, 'g'));
        drawn.push({ text: '', x: 0, y: 0 });
      }
      renew(group.children[k], drawn[k], mark, `${this.#prefix}-${name}-${k}`);
    });
    while (drawn.length > marks.length) {
      drawn.pop();
      group.lastElementChild!.remove();
    }
  }
}

function renew(holder: Element, drawn: Drawn, mark: Mark, prefix: string): void {
  const letters = mark.kind === 'text';
  const text = svgMarks([letters ? { ...mark, x: 0, y: 0 } : mark], { prefix });
  if (text !== drawn.text) {
    drawn.text = text;
    drawn.x = 0;
    drawn.y = 0;
    holder.innerHTML = text;
  }
  if (!letters || (mark.x === drawn.x && mark.y === drawn.y)) return;
  drawn.x = mark.x;
  drawn.y = mark.y;
  holder.firstElementChild!.setAttribute('x', mark.x.toFixed(2));
  holder.firstElementChild!.setAttribute('y', mark.y.toFixed(2));
}
