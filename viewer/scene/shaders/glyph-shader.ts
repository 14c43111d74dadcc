import { ARROWHEAD } from '../../marks/index.ts';
import { GLYPHS } from '../build/index.ts';
import { PAINTING, PLACING, SHARED } from './shared.ts';

const float = (value: number): string => (Number.isInteger(value) ? `${value}.0` : String(value));
const CODES = Object.entries(GLYPHS)
  .map(([name, code]) => `const int ${name.toUpperCase()} = ${code};`)
  .join('\n');

/** Marks that keep their size on the paper: rings, arrowheads, ticks, ends. */
export const GLYPH_VERTEX = /* glsl */ `${SHARED}${PLACING}
${CODES}
in vec3 aDirection;
in vec3 aTangent;
in vec4 aTurn;
in vec4 aGlyph;
in vec3 aWhen;
in vec2 aLine;
out vec2 vLocal;
out float vDepth;
flat out float vPaper;
flat out ivec2 vGlyph;
flat out vec3 vLook;
flat out int vFuture;

void main() {
  float now = uShell + SAME;
  bool alive = aWhen.x <= now && now < aWhen.y;
  bool future = now < aWhen.x && aWhen.z > 0.5;
  if (!(alive || future)) {
    gl_Position = NOWHERE;
    return;
  }
  float radius = aTurn.w < 0.0 ? uShell : aTurn.w;
  vec3 direction = turned(aDirection, aTangent, aTurn.xyz, radius);
  vec3 seen = uView * direction * radius;
  int glyph = int(aGlyph.x + 0.5);
  vec3 slope = glyph == TIP ? uView * aTangent : uView * direction;
  float inPaper = length(slope.xy);
  bool arrow = glyph == FILLED || glyph == HOLLOW;
  vec2 look = aGlyph.zw * uSize * (future && !arrow ? FUTURE_WIDTH : 1.0);
  if (arrow) {
    float width = aLine.x * uSize * depthWidth(seen.z) * (future ? FUTURE_WIDTH : 1.0);
    look = vec2(${float(ARROWHEAD.length)}, ${float(ARROWHEAD.half)}) * uSize + vec2(${float(ARROWHEAD.lengthPerWidth)}, ${float(ARROWHEAD.halfPerWidth)}) * width;
    // Seen along the line an arrowhead says nothing, and a ray shorter than two of them has no room.
    if (aLine.y > 0.0 && inPaper * uScale * aLine.y < 2.2 * look.x) {
      gl_Position = NOWHERE;
      return;
    }
  }
  vec2 u = inPaper > 1e-6 ? vec2(slope.x, -slope.y) / inPaper : vec2(0.0, -1.0);
  if (glyph == HOLLOW) u = -u;
  if (glyph == RING && future) look = vec2(0.8 * aGlyph.z, 1.0) * uSize;
  if (glyph == TICK) look = vec2(aGlyph.z + 0.5 * aLine.x * depthWidth(seen.z), aGlyph.w) * uSize;
  float reach = max(look.x, look.y) + (EDGE + 1.2) * uSize + 1.0;
  int corner = gl_VertexID & 3;
  vec2 local = reach * vec2(corner < 2 ? -1.0 : 1.0, (corner & 1) == 0 ? 1.0 : -1.0);
  vLocal = local;
  vDepth = seen.z;
  vPaper = paperCode(onPaper(seen));
  vGlyph = ivec2(glyph, int(aGlyph.y + 0.5));
  vLook = vec3(look, aLine.x);
  vFuture = future ? 1 : 0;
  gl_Position = inClip(onPaper(seen) + u * local.x + vec2(-u.y, u.x) * local.y, seen.z);
}
`;

/** Each mark by its distance from the outline, on its edge of paper. */
export const GLYPH_FRAGMENT = /* glsl */ `${SHARED}${PAINTING}
${CODES}
uniform vec3 uHairline;
in vec2 vLocal;
in float vDepth;
flat in float vPaper;
flat in ivec2 vGlyph;
flat in vec3 vLook;
flat in int vFuture;

float triangle(vec2 p, float len, float breadth) {
  vec2 normal = normalize(vec2(breadth, len));
  return max(dot(vec2(p.x - 0.5 * len, abs(p.y)), normal), -(p.x + 0.5 * len));
}

void main() {
  vec3 paper = paperOf(vPaper);
  bool future = vFuture == 1;
  int glyph = vGlyph.x;
  float r = length(vLocal);
  float edge = future ? 0.0 : EDGE * uSize;
  vec3 tint = vGlyph.y == 3 ? uInk : uTints[vGlyph.y];
  float fade = future ? FUTURE_FADE : depthFade(vDepth);
  float drawn = 0.0;
  float shown = 0.0;
  float bias = 0.012;
  if (glyph == RING || glyph == GLUONEND) {
    drawn = inside(abs(r - vLook.x) - 0.5 * vLook.y);
    shown = inside(r - vLook.x - 0.5 * vLook.y - 0.8 * edge);
    bias = glyph == RING ? 0.024 : 0.018;
    if (glyph == RING) {
      fade *= 0.8;
      if (future) {
        tint = uHairline;
        fade = 0.25;
      }
    }
  } else if (glyph == FILLED || glyph == HOLLOW || glyph == TIP) {
    float d = triangle(vLocal, vLook.x, vLook.y);
    float stroke = 1.25 * uSize * (future ? 0.7 : 1.0);
    drawn = glyph == HOLLOW ? inside(abs(d) - 0.5 * stroke) : inside(d);
    shown = inside(d - edge - (glyph == HOLLOW ? 0.5 * stroke : 0.0));
    if (glyph == TIP) fade = 0.0;
  } else if (glyph == TICK) {
    vec2 q = abs(vLocal.yx) - vec2(vLook.x, 0.5 * vLook.y);
    float d = max(q.x, q.y);
    drawn = inside(d);
    shown = inside(max(q.x, q.y - 0.8 * edge));
    bias = 0.014;
  } else {
    drawn = inside(r - vLook.x);
    shown = inside(r - vLook.x - edge);
    if (glyph == CENTRE) {
      fade = 0.0;
      bias = 0.03;
    }
  }
  if (shown < 0.004) discard;
  colour = vec4(mix(paper, mix(tint, paper, fade), drawn), shown);
  gl_FragDepth = future ? futureOrder(vDepth) - 0.003 : max(0.0, happenedOrder(vDepth) - bias);
}
`;
