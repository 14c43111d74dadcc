import type { Store } from '../../state/index.ts';
import type { BallElement } from './ball.ts';

/** What the harness leaves on the page for its tests. */
export interface HarnessPage {
  readonly harness: HTMLElement;
  readonly store: Store;
  readonly ball: BallElement;
  /** Width of plain text as the lettering reckons it [px]. */
  widthOfRuns(text: string, bold: boolean, size: number): number;
}
