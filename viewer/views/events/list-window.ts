/** What a scrolled list shows: rows `from` up to, not including, `to`, and where the first of them stands. */
export interface ListWindow {
  readonly from: number;
  readonly to: number;
  /** Place of row `from` from the top of the scrolled content [px]. */
  readonly top: number;
  /** Height of the scrolled content [px]. */
  readonly height: number;
}

// Browsers lose rows of boxes higher than some 16 million px; above this the content is a scale model of the list.
const TALLEST = 12_000_000;

/**
 * Rows of a long list of equal rows that a box scrolled to `scrollTop` shows.
 *
 * Exact while the list is under 12 million px high; beyond that the scroll bar spans the list proportionally, and row
 * `from` always stands at a whole row's start.
 */
export function listWindow(count: number, row: number, boxHeight: number, scrollTop: number): ListWindow {
  const full = count * row;
  const height = Math.min(full, TALLEST);
  const fits = Math.ceil(boxHeight / row) + 1;
  if (full <= TALLEST) {
    const from = Math.min(Math.max(Math.floor(scrollTop / row), 0), Math.max(count - 1, 0));
    return { from, to: Math.min(from + fits, count), top: from * row, height };
  }
  const share = Math.min(Math.max(scrollTop / (height - boxHeight), 0), 1);
  const from = Math.round(share * Math.max(count - Math.floor(boxHeight / row), 0));
  return { from, to: Math.min(from + fits, count), top: scrollTop, height };
}

/** Where to scroll so that a place of the list is in view, as little as possible from `scrollTop`. */
export function scrollToPlace(
  place: number,
  count: number,
  row: number,
  boxHeight: number,
  scrollTop: number,
): number {
  if (count * row > TALLEST) {
    const shown = Math.max(count - Math.floor(boxHeight / row), 1);
    const { from, to } = listWindow(count, row, boxHeight, scrollTop);
    if (place >= from && place < to - 2) return scrollTop;
    return (Math.min(place, shown) / shown) * (TALLEST - boxHeight);
  }
  const top = place * row;
  if (top < scrollTop) return top;
  return top + row > scrollTop + boxHeight ? top + row - boxHeight : scrollTop;
}
