import { FUTURE, LIMB, LIT_EDGE } from '../../marks/index.ts';

const float = (value: number): string => (Number.isInteger(value) ? `${value}.0` : String(value));

/** Declarations of both stages: the view, the clock, the tints. Lengths in CSS pixels, y downward. */
export const SHARED = /* glsl */ `
precision highp float;
precision highp int;
uniform mat3 uView;
uniform vec2 uPaper;
uniform vec2 uCentre;
uniform float uScale;
uniform float uSize;
uniform float uPixel;
uniform float uShell;
const float SAME = 1e-6;
float limbOf(vec2 d, float shell) {
  float t = length(d - vec2(${float(LIMB.x)}, ${float(LIMB.y)}) * shell) / (${float(LIMB.radius)} * shell);
  return clamp((t - ${float(LIMB.from)}) / ${float(1 - LIMB.from)}, 0.0, 1.0);
}
const float EDGE = ${float(LIT_EDGE)};
const float FUTURE_FADE = ${float(FUTURE.fade)};
const float FUTURE_WIDTH = ${float(FUTURE.width)};
`;

/** For vertices: ball coordinates to paper and clip space, place on a turn. */
export const PLACING = /* glsl */ `
vec2 onPaper(vec3 seen) { return uCentre + uScale * vec2(seen.x, -seen.y); }
vec4 inClip(vec2 paper, float depth) {
  return vec4(2.0 * paper.x / uPaper.x - 1.0, 1.0 - 2.0 * paper.y / uPaper.y, -0.5 * depth, 1.0);
}
const vec4 NOWHERE = vec4(2.0, 2.0, 2.0, 1.0);
float turnedBy(float angle, float rise, float height) {
  float share = height == 0.0 ? 1.0 : rise / height;
  if (share >= 1.0) return angle;
  if (share <= 0.0) return 0.0;
  return angle * sqrt(share * (2.0 - share));
}
vec3 turned(vec3 direction, vec3 tangent, vec3 turn, float radius) {
  if (turn.x == 0.0) return direction;
  float s = turnedBy(turn.x, radius - turn.y, turn.z);
  return direction * cos(s) + tangent * sin(s);
}
// 0 to 1: inside the current shell, the nearer to 1 the nearer to the shaded limb; 2: in the shade outside.
float paperCode(vec2 paper) {
  vec2 d = paper - uCentre;
  float shell = uShell * uScale;
  return dot(d, d) < shell * shell ? limbOf(d, shell) : 2.0;
}
float depthWidth(float depth) { return 1.0 + clamp(depth, 0.0, 1.0) / 7.0; }
`;

/** For fragments: the tint of the paper at a place, fading with depth, order in depth. */
export const PAINTING = /* glsl */ `
uniform vec3 uGround;
uniform vec3 uShade;
uniform vec3 uLit;
uniform vec3 uLitEdge;
uniform vec3 uInk;
uniform vec3 uTints[4];
out vec4 colour;
vec2 placeOnPaper() { return vec2(gl_FragCoord.x, uPaper.y * uPixel - gl_FragCoord.y) / uPixel; }
// What is inside within half a pixel of a border at distance 0, negative inside.
float inside(float distance) { return clamp(0.5 - distance * uPixel, 0.0, 1.0); }
vec3 litTint(float limb) { return mix(uLit, uLitEdge, limb); }
// The paper under a mark by the code that its vertices were given.
vec3 paperOf(float code) { return code < 1.5 ? litTint(clamp(code, 0.0, 1.0)) : uShade; }
float depthFade(float depth) { return 0.46 * clamp(0.5 - 0.5 * depth, 0.0, 1.0); }
// Near to far: what has happened from 0.02 to 0.82, the current shell at 0.42, what is to come from 0.86 to 0.98.
float happenedOrder(float depth) { return 0.02 + 0.8 * clamp(0.5 - 0.5 * depth, 0.0, 1.0); }
float futureOrder(float depth) { return 0.86 + 0.12 * clamp(0.5 - 0.5 * depth, 0.0, 1.0); }
`;
