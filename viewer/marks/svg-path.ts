import { cos, sin } from '../../engine/math/index.ts';

/** Path data of a circular arc from one angle to another [rad, clockwise on the paper], for SVG. */
export function arcPath(x: number, y: number, radius: number, from: number, to: number): string {
  const n = (value: number): number => Math.round(value * 100) / 100;
  const at = (angle: number): string => `${n(x + radius * cos(angle))} ${n(y + radius * sin(angle))}`;
  const large = Math.abs(to - from) > 3.141592653589793 ? 1 : 0;
  return `M${at(from)}A${n(radius)} ${n(radius)} 0 ${large} ${to > from ? 1 : 0} ${at(to)}`;
}
