/** An event whose shapes are known at 40 digits by brute force: E, px, py, pz to a parton. */
export interface WorkedEvent {
  readonly name: string;
  readonly sqrtS: number;
  readonly partons: readonly (readonly [number, number, number, number])[];
  readonly thrust: number;
  /** Up to its sign, null where not listed. */
  readonly axis: readonly number[] | null;
  /** y_12, y_23, ... */
  readonly durham: readonly number[];
}

/**
 * Durham: Catani, Dokshitzer, Olsson, Turnock, Webber, Phys. Lett. B269 (1991) 432, E scheme; thrust by trying every
 * partition.
 */
export const WORKED_EVENTS: readonly WorkedEvent[] = [
  {
    name: 'A',
    sqrtS: 26,
    partons: [
      [7, 2, 3, 6],
      [3, -1, 2, -2],
      [9, -4, -8, 1],
      [7, 3, 3, -5],
    ],
    thrust: 0.704295932586679,
    axis: [4 / 9, 8 / 9, -1 / 9],
    durham: [0.479289940828402, 0.198904320265467, 0.00903123005037993],
  },
  {
    name: 'B',
    sqrtS: 55,
    partons: [
      [15, 2, 10, 11],
      [11, -6, -2, 9],
      [7, 6, 3, -2],
      [9, -1, -4, -8],
      [13, -1, -7, -10],
    ],
    thrust: 0.807739453914132,
    axis: [-1, 2, 5].map((c) => c / Math.sqrt(30)),
    durham: [0.64, 0.077127033792086, 0.0262258953168044, 0.000596155643629802],
  },
  {
    name: 'C',
    sqrtS: 86,
    partons: [
      [21, 4, 8, 19],
      [15, 10, 2, 11],
      [3, 2, 1, -2],
      [11, -6, 9, -2],
      [25, -9, -12, -20],
      [11, -1, -8, -6],
    ],
    thrust: 0.817653807192462,
    axis: null,
    durham: [
      0.822606814494321, 0.0373650496158457, 0.00965773004712972, 0.00382059456450955, 0.00210924824229313,
    ],
  },
];

/** Momenta as the engine packs them, px, py, pz, E, from E, px, py, pz. */
export function packed(partons: readonly (readonly number[])[]): Float64Array {
  return Float64Array.from(partons.flatMap(([e, x, y, z]) => [x, y, z, e]));
}

/** Massless partons of one energy along directions, adding up to sqrt(s) = 1. */
export function equalPartons(directions: readonly (readonly number[])[]): Float64Array {
  const energy = 1 / directions.length;
  return packed(
    directions.map(([x, y, z]) => {
      const scale = energy / Math.hypot(x, y, z);
      return [energy, scale * x, scale * y, scale * z];
    }),
  );
}

const signs = [-1, 1];

/** Directions of symmetric events with their thrust and first Durham distance (closed forms). */
export const SYMMETRIC_EVENTS = [
  {
    name: 'pair',
    directions: [
      [1, 2, 3],
      [-1, -2, -3],
    ],
    thrust: 1,
    firstY: 1,
  },
  {
    name: 'symmetric three-jet',
    directions: [0, 1, 2].map((n) => [Math.cos((2 * Math.PI * n) / 3), 0, Math.sin((2 * Math.PI * n) / 3)]),
    thrust: 2 / 3,
    firstY: 1 / 3,
  },
  {
    name: 'square',
    directions: [
      [1, 0, 0],
      [0, 1, 0],
      [-1, 0, 0],
      [0, -1, 0],
    ],
    thrust: Math.SQRT1_2,
    firstY: 1 / 8,
  },
  {
    name: 'tetrahedron',
    directions: [
      [1, 1, 1],
      [1, -1, -1],
      [-1, 1, -1],
      [-1, -1, 1],
    ],
    thrust: 1 / Math.sqrt(3),
    firstY: 1 / 6,
  },
  {
    name: 'octahedron',
    directions: [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
      [-1, 0, 0],
      [0, -1, 0],
      [0, 0, -1],
    ],
    thrust: 1 / Math.sqrt(3),
    firstY: 1 / 18,
  },
  {
    name: 'cube',
    directions: signs.flatMap((x) => signs.flatMap((y) => signs.map((z) => [x, y, z]))),
    thrust: 1 / Math.sqrt(3),
    firstY: 1 / 48,
  },
] as const;
