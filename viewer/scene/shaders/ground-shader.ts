import { PAINTING, SHARED } from './shared.ts';

/** Most dotted shells that the ground draws. */
export const MOST_SHELLS = 16;

/** The paper itself: ground, shade, lit disc, dotted shells, rim, and the wash on the caps of a selection. */
export const GROUND_VERTEX = /* glsl */ `${SHARED}
in vec2 aCorner;
void main() { gl_Position = vec4(aCorner, 1.0, 1.0); }
`;

export const GROUND_FRAGMENT = /* glsl */ `${SHARED}${PAINTING}
uniform vec3 uHairline;
uniform vec3 uWash;
uniform float uShells[${MOST_SHELLS}];
uniform int uShellCount;
uniform vec4 uCaps[2];
uniform vec2 uCapShare;
uniform float uCapRadius;

float dotted(float r, vec2 d, float radius) {
  if (abs(r - radius) > 2.0 * uSize) return 0.0;
  float count = floor(6.2831853 * radius / (4.2 * uSize));
  float at = fract(atan(d.y, d.x) / 6.2831853 * count) - 0.5;
  return 0.55 * inside(length(vec2(r - radius, at * 6.2831853 * radius / count)) - 0.48 * uSize);
}

float capped(vec4 cap, vec2 d) {
  vec2 q = vec2(d.x, -d.y) / (uScale * uCapRadius);
  float r2 = dot(q, q);
  if (r2 >= 1.0) return 0.0;
  float z = sqrt(1.0 - r2);
  float flat_ = dot(cap.xy, q);
  float s = flat_ + abs(cap.z) * z - cap.w;
  return clamp(0.5 + s / max(fwidth(s), 1e-6), 0.0, 1.0);
}

void main() {
  vec2 p = placeOnPaper();
  vec2 d = p - uCentre;
  float r = length(d);
  vec3 tint = mix(uGround, uShade, inside(r - uScale));
  tint = mix(tint, litAt(p), inside(r - uShell * uScale));
  for (int k = 0; k < ${MOST_SHELLS}; k++) {
    if (k >= uShellCount) break;
    tint = mix(tint, uHairline, dotted(r, d, uShells[k] * uScale));
  }
  tint = mix(tint, uHairline, inside(abs(r - uScale) - 0.45 * uSize));
  if (uCapShare.x > 0.0) tint = mix(tint, uWash, uCapShare.x * capped(uCaps[0], d));
  if (uCapShare.y > 0.0) tint = mix(tint, uWash, uCapShare.y * capped(uCaps[1], d));
  colour = vec4(tint, 1.0);
  gl_FragDepth = 1.0;
}
`;
