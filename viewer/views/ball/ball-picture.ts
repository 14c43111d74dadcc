import {
  type BallEvent,
  type Camera,
  type Cone,
  momentOf,
  pickPoint,
  radiusAt,
  type Stage,
} from '../../layout/index.ts';
import {
  type BallView,
  ballMarks,
  type KeyFold,
  letter,
  letterClock,
  type Palette,
  type Plate,
  plateOf,
  selectionMarks,
} from '../../marks/index.ts';
import type { BallScene } from '../../scene/index.ts';
import type { Overlay } from './overlay.ts';

/** Parts of the overlay, from the lowest up: the vector ball, the highlights, the lettering. */
export const OVERLAY_PARTS = ['ball', 'selection', 'still', 'clock'] as const;

/** Room left under the keys for the words that fold them [px]. */
export const KEY_FOOT = 20;

/** Everything that a picture of the ball depends on but the clock. */
export interface PictureState {
  readonly event: BallEvent;
  readonly camera: Camera;
  readonly stage: Stage;
  readonly palette: Palette;
  readonly cone: Cone | null;
  readonly hover: number;
  readonly keys: KeyFold;
  /** Whether the view is on its way: then only the first steps are numbered. */
  readonly moving: boolean;
}

/** Steps that keep their number while the view moves. */
const MOST_MOVING = 40;

/**
 * One picture after another of the ball: scene below, overlay above, both brought up to date in the same frame and only as far
 * as something changed.
 *
 * While the clock runs a frame writes one uniform and the few texts that name the time; at a step the lettering is placed anew.
 */
export class BallPicture {
  readonly #overlay: Overlay;
  #scene: BallScene | null = null;
  #plate: Plate | null = null;
  #keys: KeyFold = { left: false, right: false };
  #places: ReadonlyMap<string, number> = new Map();
  #moving = false;
  #lettered: number | null = null;

  constructor(overlay: Overlay) {
    this.#overlay = overlay;
  }

  /** Draw the ball on this scene; without one it is drawn as vector lines. */
  set scene(scene: BallScene | null) {
    this.#scene = scene;
  }
  get scene(): BallScene | null {
    return this.#scene;
  }

  /** The view as it stands, null before the first picture. */
  get view(): BallView | null {
    return this.#plate;
  }

  /** Places of the labels, so that a saved file has them where the screen has. */
  get places(): ReadonlyMap<string, number> {
    return this.#places;
  }

  /** Where a step stands on the paper [px], null before the first picture. */
  placeOf(step: number): { x: number; y: number } | null {
    const steps = this.#plate?.steps;
    if (!steps || !(step >= 0 && 3 * step < steps.length)) return null;
    return { x: steps[3 * step], y: steps[3 * step + 1] };
  }

  /** Branching within `reach` px of a place, −1 for none. */
  pick(x: number, y: number, reach: number): number {
    const steps = this.#plate?.steps;
    return steps ? pickPoint(steps, steps.length / 3, x, y, reach) : -1;
  }

  /** Draw with another camera, selection, size, theme or event. */
  draw(state: PictureState, time: number): void {
    if (this.#plate?.event.strands !== state.event.strands) this.#places = new Map();
    this.#keys = state.keys;
    this.#moving = state.moving;
    this.#plate = plateOf({ ...state, time });
    this.#letter(false);
    this.#scene?.setTime(time);
    this.#scene?.setCamera(state.camera);
    this.#scene?.render();
  }

  /** Draw at another time, everything else as it was. @param running Whether the clock runs on: then no label changes place. */
  drawTime(time: number, running: boolean): void {
    if (!this.#plate) return;
    const { event } = this.#plate;
    this.#plate = {
      ...this.#plate,
      time,
      moment: momentOf(event, time),
      shell: radiusAt(event.strands.scale, time),
    };
    if (this.#plate.moment.step !== this.#lettered || !running) this.#letter(running);
    else this.#letterClock();
    this.#scene?.setTime(time);
    this.#scene?.render();
  }

  /** Draw no event. */
  clear(camera: Camera): void {
    this.#plate = null;
    for (const part of OVERLAY_PARTS) this.#overlay.draw(part, []);
    this.#scene?.setCamera(camera);
    this.#scene?.render();
  }

  // The places of labels depend on the view alone, so that none jumps while the clock runs.
  #letter(samePlaces: boolean): void {
    const plate = this.#plate!;
    const { still, clock, places } = letter(plate, {
      keys: this.#keys,
      corners: true,
      before: this.#places,
      ...(this.#moving ? { most: MOST_MOVING } : {}),
      ...(samePlaces ? { fixed: this.#places } : {}),
      foot: KEY_FOOT,
    });
    this.#places = places;
    this.#lettered = plate.moment.step;
    this.#overlay.draw('ball', this.#scene ? [] : ballMarks(plate));
    this.#overlay.draw('selection', this.#scene ? selectionMarks(plate) : []);
    this.#overlay.draw('still', still);
    this.#overlay.draw('clock', clock);
  }

  #letterClock(): void {
    if (!this.#scene) this.#overlay.draw('ball', ballMarks(this.#plate!));
    this.#overlay.draw('clock', letterClock(this.#plate!, this.#places));
  }
}
