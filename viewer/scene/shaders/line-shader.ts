import { ANTIQUARK_DASH, GLUON_LEAST, RING, RING_DASH } from '../../marks/index.ts';
import { LINE_STYLES } from '../build/index.ts';
import { PAINTING, PLACING, SHARED } from './shared.ts';

const float = (value: number): string => (Number.isInteger(value) ? `${value}.0` : String(value));
const STYLES = Object.entries(LINE_STYLES)
  .map(([name, code]) => `const int ${name.toUpperCase()} = ${code};`)
  .join('\n');

/** Lines of one quad a segment, mitred on the paper, with an edge of paper of their own. */
export const LINE_VERTEX = /* glsl */ `${SHARED}${PLACING}
${STYLES}
in vec3 aPoint;
in vec3 aBefore;
in vec3 aAfter;
in vec2 aLine;
in float aRadius;
in float aAlong;
uniform vec3 uTints[4];
out float vAcross;
out float vHalf;
out float vRadius;
out float vAlong;
out float vDepth;
out float vPaper;
flat out int vStyle;
flat out vec3 vTint;

float edgeOf(int style) {
  if (style <= OTHER) return EDGE * uSize;
  return style == TURN ? 1.2 * EDGE * uSize : 0.0;
}

// A difference of two places as it lies on the paper.
vec2 stretch(vec3 d) {
  return uScale * vec2(dot(vec3(uView[0].x, uView[1].x, uView[2].x), d), -dot(vec3(uView[0].y, uView[1].y, uView[2].y), d));
}

void main() {
  int corner = gl_VertexID & 3;
  bool first = corner < 2;
  float side = (corner & 1) == 0 ? 1.0 : -1.0;
  int style = int(aLine.y + 0.5);
  float grow = style == NET || style == OUTLINE ? uShell : 1.0;
  vec3 seen = uView * aPoint * grow;
  vec2 here = onPaper(seen);
  vec2 into = stretch(aPoint - aBefore) * grow;
  vec2 away = stretch(aAfter - aPoint) * grow;
  float intoLength = length(into);
  float awayLength = length(away);
  into = intoLength > 1e-3 ? into / intoLength : vec2(0.0);
  away = awayLength > 1e-3 ? away / awayLength : vec2(0.0);
  if (intoLength <= 1e-3) into = away;
  if (awayLength <= 1e-3) away = into;
  vec2 own = first ? away : into;
  if (dot(own, own) < 0.5) own = vec2(1.0, 0.0);
  vec2 normal = vec2(-own.y, own.x);
  float half_ = 0.5 * max(aLine.x * uSize * (style <= OTHER ? depthWidth(seen.z) : 1.0), style == GLUON ? ${float(GLUON_LEAST)} : 0.0);
  float reach = half_ + edgeOf(style) + 0.7;
  vec2 sum = into + away;
  vec2 offset = normal;
  // A mitre up to twice the width; sharper corners are covered by letting both segments run on a little.
  if (length(sum) > 1.0) {
    vec2 mitre = normalize(vec2(-sum.y, sum.x));
    offset = mitre / dot(mitre, normal);
  } else {
    here += own * (first ? -0.6 : 0.6) * half_;
  }
  vAcross = side * reach;
  vHalf = half_;
  vRadius = aRadius;
  vAlong = aAlong;
  vDepth = seen.z;
  vPaper = paperCode(here);
  vStyle = style;
  vTint = uTints[min(style, OTHER)];
  gl_Position = inClip(here + offset * side * reach, seen.z);
}
`;

const [partnerDash, partnerGap] = RING_DASH.partner;
const [birthDash, birthGap, birthDot, birthGap2] = RING_DASH.birth;

const LINE_INPUT = /* glsl */ `${STYLES}
in float vAcross;
in float vHalf;
in float vRadius;
in float vAlong;
in float vDepth;
in float vPaper;
flat in int vStyle;
flat in vec3 vTint;
// Part of a dash from "begin" on, in a pattern of period "period".
float dashed(float begin, float dash, float period) {
  float at = mod(vAlong - begin, period);
  return inside(abs(at - 0.5 * dash) - 0.5 * dash);
}
`;

/**
 * Parton lines: solid, cut by gaps or with an open core, on their edge of paper, faint beyond the current shell.
 *
 * Apart from the ink lines' shader, since a software renderer works through every branch: together they took twice the time.
 */
export const STRAND_FRAGMENT = /* glsl */ `${SHARED}${PAINTING}${LINE_INPUT}
void main() {
  float across = abs(vAcross);
  bool happened = vRadius <= uShell + SAME;
  float least = vStyle == GLUON ? ${float(GLUON_LEAST / 2)} : 0.45;
  float half_ = happened ? vHalf : max(vHalf * FUTURE_WIDTH, least);
  float off = across - half_;
  float shown = inside(off - EDGE * uSize);
  if (shown < 0.004) discard;
  float drawn = inside(off);
  // The edge of paper lies a little deeper than its line, so that it cuts what is behind and not its own continuation.
  gl_FragDepth = happened
    ? happenedOrder(vDepth) + (drawn < 0.5 ? 0.01 : 0.0)
    : futureOrder(vDepth) + (drawn < 0.5 ? 0.002 : 0.0);
  if (vStyle == GLUON) drawn *= 1.0 - inside(across - max(half_ - max(0.95, 0.5 * half_), 0.45));
  if (vStyle == ANTIQUARK) drawn *= dashed(0.0, ${float(ANTIQUARK_DASH[0])} * uSize, ${float(ANTIQUARK_DASH[0] + ANTIQUARK_DASH[1])} * uSize);
  float fade = happened ? depthFade(vDepth) : FUTURE_FADE;
  colour = vec4(mix(paperOf(vPaper), vTint, drawn * (1.0 - fade)), shown);
}
`;

/** Lines of the atlas: rings, silhouettes, the emitter's turn, net, outline, rim, dotted shells; none of them waits for the clock. */
export const INK_FRAGMENT = /* glsl */ `${SHARED}${PAINTING}${LINE_INPUT}
uniform vec3 uRule;
uniform vec3 uHairline;
void main() {
  float across = abs(vAcross);
  float drawn = inside(across - vHalf);
  float fade = vDepth < 0.0 && vStyle <= BIRTH ? ${float(RING.behindFade)} : 0.0;
  vec3 tint = vStyle >= RIM ? uHairline : uInk;
  if (vStyle == PARTNER) drawn *= dashed(0.0, ${float(partnerDash)} * uSize, ${float(partnerDash + partnerGap)} * uSize);
  if (vStyle == BIRTH) {
    float period = ${float(birthDash + birthGap + birthDot + birthGap2)} * uSize;
    float dot_ = dashed(${float(birthDash + birthGap)} * uSize, ${float(birthDot)} * uSize, period);
    drawn *= max(dashed(0.0, ${float(birthDash)} * uSize, period), dot_);
  }
  if (vStyle == SILHOUETTE) {
    fade = 0.45;
    drawn *= dashed(0.0, 6.0 * uSize, 10.0 * uSize);
  }
  if (vStyle == DOTTED) {
    float at = mod(vAlong, 4.2 * uSize) - 2.1 * uSize;
    drawn = 0.55 * inside(length(vec2(at, vAcross)) - 0.48 * uSize);
  }
  if (vStyle == NET) {
    if (vDepth < 0.0) discard;
    tint = uRule;
    fade = 0.2;
  }
  bool edged = vStyle == TURN;
  float shown = edged ? inside(across - vHalf - 1.2 * EDGE * uSize) : drawn;
  if (shown < 0.004) discard;
  colour = vec4(mix(paperOf(vPaper), tint, (edged ? drawn : 1.0) * (1.0 - fade)), shown);
  gl_FragDepth = happenedOrder(vDepth) + (edged && drawn < 0.5 ? 0.01 : 0.0);
}
`;
