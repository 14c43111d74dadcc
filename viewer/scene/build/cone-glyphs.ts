import { type BallEvent, type Cone, greatCircle } from '../../layout/index.ts';
import { endsOf, TIP_LENGTH, turnPath } from '../../marks/index.ts';
import { endLook, GLYPHS, type Glyph, still } from './glyph-quads.ts';

/** Glyphs of a selected step's cone: the ends of *i*, *j* and *k* on its shell, and the tip of the emitter's arrow. */
export function coneGlyphs(event: BallEvent, cone: Cone, scale: number, size: number): Glyph[] {
  const { entries } = event.history;
  const always = { from: -1, until: Infinity };
  const glyphs = endsOf({ event }, cone).map(({ row, direction }) =>
    still(direction, cone.radius, { ...endLook(entries.id[row], entries.e[row]), ...always }),
  );
  const path = turnPath(cone, scale, size);
  if (path.length >= 6 && cone.i) {
    const tangent = new Float64Array(3);
    const tip = path.subarray(path.length - 3).map((value) => value / cone.radius);
    greatCircle(tangent, 0, tip, 0, cone.i, 0);
    const head = { glyph: GLYPHS.tip, length: TIP_LENGTH, breadth: 0.42 * TIP_LENGTH };
    // The glyph is centred; half its length back from the tip.
    const back = (0.5 * TIP_LENGTH * size) / (cone.radius * scale);
    const centre = tip.map((value, k) => value - back * tangent[k]);
    glyphs.push(still(centre, cone.radius, { ...head, ...always, tangent }));
  }
  return glyphs;
}
