import { CHAIN } from '../../marks/index.ts';
import { PAINTING, PLACING, SHARED } from './shared.ts';

const float = (value: number): string => (Number.isInteger(value) ? `${value}.0` : String(value));

/** Colour chains: dots evenly spaced on the paper along the great circle between two ends that move with the shell. */
export const CHAIN_VERTEX = /* glsl */ `${SHARED}${PLACING}
in vec3 aFrom0;
in vec3 aTangent0;
in vec3 aTurn0;
in vec3 aFrom1;
in vec3 aTangent1;
in vec3 aTurn1;
in vec4 aSpan;
out float vAcross;
out float vAlong;
out float vDepth;

vec3 anyNormal(vec3 a) {
  vec3 size = abs(a);
  if (size.x <= size.y && size.x <= size.z) return normalize(vec3(0.0, a.z, -a.y));
  return size.y <= size.z ? normalize(vec3(-a.z, 0.0, a.x)) : normalize(vec3(a.y, -a.x, 0.0));
}

void main() {
  float now = uShell + SAME;
  if (now < aSpan.x || now >= aSpan.y) {
    gl_Position = NOWHERE;
    return;
  }
  vec3 a = turned(aFrom0, aTangent0, aTurn0, uShell);
  vec3 b = turned(aFrom1, aTangent1, aTurn1, uShell);
  float near = dot(a, b);
  vec3 tangent = b - near * a;
  float across = length(tangent);
  if (across < 1e-5) {
    if (near > 0.0) {
      gl_Position = NOWHERE;
      return;
    }
    // Between opposite points every way is as short: the one that layout takes.
    tangent = anyNormal(a);
    across = 0.0;
  } else tangent /= across;
  float angle = atan(across, near);
  a = uView * a;
  tangent = uView * tangent;
  float unit = uShell * uScale;
  float along = 0.0;
  vec2 before = a.xy;
  int pieces = int(aSpan.w + 0.5);
  int piece = int(aSpan.z + 0.5);
  for (int k = 1; k <= piece; k++) {
    float s = angle * float(k) / aSpan.w;
    vec2 here = a.xy * cos(s) + tangent.xy * sin(s);
    along += length(here - before);
    before = here;
  }
  float s = angle * aSpan.z / aSpan.w;
  vec3 seen = uShell * (a * cos(s) + tangent * sin(s));
  vec3 slope = tangent * cos(s) - a * sin(s);
  vec2 u = vec2(slope.x, -slope.y);
  float length_ = length(u);
  u = length_ > 1e-4 ? u / length_ : vec2(1.0, 0.0);
  float side = (gl_VertexID & 1) == 0 ? 1.0 : -1.0;
  float reach = ${float(CHAIN.dot)} * uSize + 1.0;
  vAcross = side * reach;
  vAlong = along * unit;
  vDepth = seen.z;
  gl_Position = inClip(onPaper(seen) + vec2(-u.y, u.x) * side * reach, seen.z);
}
`;

/** Round ink dots, smaller and paler behind the middle plane. */
export const CHAIN_FRAGMENT = /* glsl */ `${SHARED}${PAINTING}
in float vAcross;
in float vAlong;
in float vDepth;

void main() {
  float spacing = ${float(CHAIN.spacing)} * uSize;
  float along = mod(vAlong, spacing) - 0.5 * spacing;
  bool behind = vDepth < 0.0;
  float radius = (behind ? ${float(CHAIN.behindDot)} : ${float(CHAIN.dot)}) * uSize;
  float shown = inside(length(vec2(along, vAcross)) - radius);
  if (shown < 0.004) discard;
  colour = vec4(mix(uInk, uLit, behind ? ${float(CHAIN.behindFade)} : 0.0), shown);
  gl_FragDepth = happenedOrder(vDepth) - 0.001;
}
`;
