import { PAINTING, SHARED } from './shared.ts';

/** One triangle over the whole canvas. */
export const SCREEN_VERTEX = /* glsl */ `${SHARED}
in vec2 aCorner;
void main() { gl_Position = vec4(aCorner, 1.0, 1.0); }
`;

/**
 * The paper itself: ground, what is to come in the shade, what has happened lit.
 *
 * It covers every pixel, which is what a software renderer spends its time on: with dotted shells and washes in here a picture
 * took 120 ms instead of a few, so those are drawn apart.
 */
export const GROUND_FRAGMENT = /* glsl */ `${SHARED}${PAINTING}
void main() {
  vec2 d = placeOnPaper() - uCentre;
  float r = length(d);
  float shell = uShell * uScale;
  vec3 tint = mix(uGround, uShade, inside(r - uScale));
  colour = vec4(mix(tint, litTint(limbOf(d, shell)), inside(r - shell)), 1.0);
}
`;

/** The wash of a selection on its caps: what of the ball's near or far side lies inside a ring, once. */
export const WASH_FRAGMENT = /* glsl */ `${SHARED}${PAINTING}
uniform vec3 uWash;
uniform vec4 uCaps[2];
uniform vec2 uCapShare;
uniform float uCapRadius;

float capped(vec4 cap, vec2 q, float z) {
  float s = dot(cap.xy, q) + abs(cap.z) * z - cap.w;
  return clamp(0.5 + s / max(fwidth(s), 1e-6), 0.0, 1.0);
}

void main() {
  vec2 d = placeOnPaper() - uCentre;
  vec2 q = vec2(d.x, -d.y) / (uScale * uCapRadius);
  float z = sqrt(max(0.0, 1.0 - dot(q, q)));
  float first = uCapShare.x > 0.0 ? uCapShare.x * capped(uCaps[0], q, z) : 0.0;
  float second = uCapShare.y > 0.0 ? uCapShare.y * capped(uCaps[1], q, z) : 0.0;
  float share = 1.0 - (1.0 - first) * (1.0 - second);
  if (share < 0.004 || dot(q, q) > 1.0) discard;
  colour = vec4(uWash, share);
}
`;
