import type { Run } from './lettering.ts';

/** How an outline is drawn; lengths in units of the drawing. */
export interface Stroke {
  readonly tint: string;
  readonly width: number;
  /** Lengths of dash and gap in turn; `offset` is how far along the pattern the line begins. */
  readonly dash?: readonly number[];
  readonly offset?: number;
  readonly cap?: 'butt' | 'round';
  /** 0 to 1, 1 where absent. */
  readonly opacity?: number;
}

/** How an area is filled; opacity 0 to 1, 1 where absent. */
export interface Fill {
  readonly tint: string;
  readonly opacity?: number;
}

/** A line through points x, y, x, y …; `closed` joins the last to the first. */
export interface Polyline {
  readonly kind: 'polyline';
  readonly points: readonly number[];
  readonly closed?: boolean;
  readonly stroke?: Stroke;
  readonly fill?: Fill;
}

/** A region bounded by closed loops of points; a place is inside when it is inside an odd number of them. */
export interface Region {
  readonly kind: 'region';
  readonly loops: readonly (readonly number[])[];
  readonly fill: Fill;
}

/** A circle about (x, y), filled, outlined or both. */
export interface Circle {
  readonly kind: 'circle';
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  readonly stroke?: Stroke;
  readonly fill?: Fill;
  /** Tint towards which the fill changes at the lower right limb, as on a ball that is lit from the upper left. */
  readonly limb?: string;
}

/** Where the light of a shaded circle stands, and from where on it changes, in units of its radius. */
export const LIMB = { x: -0.2, y: -0.25, radius: 1.32, from: 0.62 } as const;

/** Round dots of one size: `points` x, y, x, y …. */
export interface Dots {
  readonly kind: 'dots';
  readonly points: readonly number[];
  readonly radius: number;
  readonly fill: Fill;
}

/** Paper round letters, `width` on every side, so that lines do not run into them. */
export interface Halo {
  readonly tint: string;
  readonly width: number;
}

/** One line of text; (x, y) is on its baseline at the anchor. */
export interface Text {
  readonly kind: 'text';
  readonly x: number;
  readonly y: number;
  readonly runs: readonly Run[];
  readonly size: number;
  readonly tint: string;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly halo?: Halo;
}

/** Text along a circle, its middle at `angle` [rad, 0 rightward, counted clockwise on the paper], read clockwise. */
export interface ArcText {
  readonly kind: 'arcText';
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  readonly angle: number;
  readonly runs: readonly Run[];
  readonly size: number;
  readonly tint: string;
  readonly halo?: Halo;
}

/** Marks that belong together, drawn in order; the name may be empty. */
export interface Group {
  readonly kind: 'group';
  readonly name: string;
  readonly marks: readonly Mark[];
}

/** A mark as plain data; later marks cover earlier ones. */
export type Mark = Polyline | Region | Circle | Dots | Text | ArcText | Group;

/** A drawing: paper of a size, and marks on it. x rightward, y downward from the upper left corner inside the margin. */
export interface Drawing {
  readonly width: number;
  readonly height: number;
  /** Paper round all of it, in addition to width and height; 0 where absent. */
  readonly margin?: number;
  /** Tint of the paper, null for none. */
  readonly ground: string | null;
  readonly title: string;
  readonly description: string;
  readonly marks: readonly Mark[];
}
