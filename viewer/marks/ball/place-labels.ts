/** A box on the paper [px]. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Something that wants a label: where its mark is, how big, and what the label needs. */
export interface LabelWish {
  /** Name of the label, the same from picture to picture. */
  readonly key: string;
  readonly x: number;
  readonly y: number;
  /** Distance from the mark's centre to the label's box [px]. */
  readonly clearance: number;
  readonly width: number;
  readonly height: number;
  /** A wish that must be met takes the least bad place where no free one is left (labels still never overlap). */
  readonly must?: boolean;
  /** May stand farther out where there is no room near the mark. */
  readonly far?: boolean;
  /** Stands on its mark, in the middle, or nowhere. */
  readonly centred?: boolean;
}

const AROUND = [
  [1, 0],
  [0.8, -0.8],
  [0, 1],
  [0, -1],
  [-1, 0],
  [0.8, 0.8],
  [-0.8, -0.8],
  [-0.8, 0.8],
] as const;

/**
 * Places that are tried about a mark, in order of preference: right, upper right, below, above, left, then the other corners, as
 * multiples of the clearance; after those the same farther out, for labels that may lead a line to their mark.
 */
export const PLACES: readonly (readonly [number, number])[] = [
  ...AROUND,
  ...AROUND.map(([x, y]) => [2.6 * x, 2.6 * y] as const),
];

/** Whether a place is far enough from the mark to need a line to it. */
export const isFar = (at: number): boolean => at >= AROUND.length;

const CELL = 4;

/**
 * The paper as a grid of cells: which are taken by labels (never to be used again), and how much ink the others hold.
 *
 * One is filled per placing; memory is reused by `clear`.
 */
export class LabelGrid {
  readonly columns: number;
  readonly lines: number;
  readonly #taken: Uint8Array;
  readonly #ink: Uint8Array;
  readonly #width: number;
  readonly #height: number;

  constructor(width: number, height: number) {
    this.#width = width;
    this.#height = height;
    this.columns = Math.ceil(width / CELL) + 1;
    this.lines = Math.ceil(height / CELL) + 1;
    this.#taken = new Uint8Array(this.columns * this.lines);
    this.#ink = new Uint8Array(this.columns * this.lines);
  }

  clear(): void {
    this.#taken.fill(0);
    this.#ink.fill(0);
  }

  /** Spread ink of a weight (1: a line, 3: a mark) along a line from (x0, y0) to (x1, y1). */
  inkLine(x0: number, y0: number, x1: number, y1: number, weight: number): void {
    const dx = x1 - x0;
    const dy = y1 - y0;
    const pieces = Math.min(4000, Math.ceil(Math.max(Math.abs(dx), Math.abs(dy)) / CELL));
    for (let k = 0; k <= pieces; k++) {
      const share = pieces === 0 ? 0 : k / pieces;
      this.#addInk(x0 + dx * share, y0 + dy * share, weight);
    }
  }

  #addInk(x: number, y: number, weight: number): void {
    if (!(x >= 0 && y >= 0 && x < this.#width && y < this.#height)) return;
    const cell = Math.floor(y / CELL) * this.columns + Math.floor(x / CELL);
    this.#ink[cell] = Math.min(200, Math.max(this.#ink[cell], weight));
  }

  /** Keep a box free of labels. */
  take(box: Box): void {
    this.#each(box, (cell) => {
      this.#taken[cell] = 1;
      return true;
    });
  }

  /** Cost of covering a box: the ink in it; Infinity where it leaves the paper or touches a label. */
  cost(box: Box): number {
    const { x, y, width, height } = box;
    if (!(x >= 1 && y >= 1 && x + width < this.#width - 1 && y + height < this.#height - 1)) return Infinity;
    let sum = 0;
    const free = this.#each(box, (cell) => {
      sum += this.#ink[cell];
      return this.#taken[cell] === 0;
    });
    return free ? sum : Infinity;
  }

  #each(box: Box, visit: (cell: number) => boolean): boolean {
    const left = Math.max(0, Math.floor(box.x / CELL));
    const right = Math.min(this.columns - 1, Math.floor((box.x + box.width) / CELL));
    const top = Math.max(0, Math.floor(box.y / CELL));
    const bottom = Math.min(this.lines - 1, Math.floor((box.y + box.height) / CELL));
    for (let line = top; line <= bottom; line++) {
      for (let column = left; column <= right; column++) {
        if (!visit(line * this.columns + column)) return false;
      }
    }
    return true;
  }
}

/** The box of a label at one of the PLACES about its mark. */
export function boxAt(wish: LabelWish, at: number): Box {
  const [ux, uy] = wish.centred ? [0, 0] : PLACES[at];
  const { x, y, clearance, width, height } = wish;
  return {
    x: x + ux * clearance + (ux > 0 ? 0 : ux < 0 ? -width : -width / 2),
    y: y + uy * clearance + (uy > 0 ? 0 : uy < 0 ? -height : -height / 2),
    width,
    height,
  };
}

/** Most ink that a label may cover, per cell of its box. */
const MOST_INK = 0.75;

/**
 * Place labels one after the other where they cover least; no two ever overlap.
 *
 * @param before Places in the last picture by key: one is kept unless another is clearly better.
 * @returns Place (an index of PLACES) by key; a label for which no free place was found has none.
 */
export function placeLabels(
  grid: LabelGrid,
  wishes: readonly LabelWish[],
  before: ReadonlyMap<string, number> = new Map(),
): Map<string, number> {
  const places = new Map<string, number>();
  for (const wish of wishes) {
    const cells = ((wish.width + CELL) * (wish.height + CELL)) / (CELL * CELL);
    const kept = before.get(wish.key);
    let least = wish.must ? Infinity : MOST_INK * cells;
    let best = -1;
    for (let at = 0; at < (wish.centred ? 1 : wish.far ? PLACES.length : AROUND.length); at++) {
      const cost = grid.cost(boxAt(wish, at)) + (kept === at ? -4 : 0.3 * at + (isFar(at) ? 5 : 0));
      if (cost >= least) continue;
      least = cost;
      best = at;
    }
    if (best < 0) continue;
    places.set(wish.key, best);
    grid.take(boxAt(wish, best));
  }
  return places;
}
