import {
  type ArcText,
  type Circle,
  type Dots,
  type Drawing,
  type Fill,
  type Group,
  type Halo,
  LIMB,
  type Mark,
  type Region,
  type Stroke,
  type Text,
} from './display-list.ts';
import { FACES, type Run, SCRIPT } from './lettering.ts';
import { arcPath } from './svg-path.ts';
import { widthOf } from './text-width.ts';

/** Where the SVG text goes: a file of its own, or the inside of an svg element on the screen. */
export interface SvgOptions {
  /** Prefix of the names of paths, so that two drawings on one page do not share any. */
  readonly prefix?: string;
}

/**
 * A drawing as an SVG document: presentation attributes only, text as text in named fonts, a title and a description.
 *
 * Numbers are rounded to a hundredth of a unit. The same drawing gives the same bytes.
 */
export function svgDocument(drawing: Drawing, options: SvgOptions = {}): string {
  const { ground, title, description, margin = 0 } = drawing;
  const width = drawing.width + 2 * margin;
  const height = drawing.height + 2 * margin;
  const box = `${n(-margin)} ${n(-margin)} ${n(width)} ${n(height)}`;
  const corner = margin === 0 ? '' : ` x="${n(-margin)}" y="${n(-margin)}"`;
  const paper = ground ? `<rect${corner} width="${n(width)}" height="${n(height)}" fill="${ground}"/>\n` : '';
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${n(width)}" height="${n(height)}" viewBox="${box}" role="img">
<title>${escapeText(title)}</title>
<desc>${escapeText(description)}</desc>
${paper}${svgMarks(drawing.marks, options)}
</svg>
`;
}

/** Marks as SVG elements, one a line, to stand inside an svg element. */
export function svgMarks(marks: readonly Mark[], options: SvgOptions = {}): string {
  const state = { prefix: options.prefix ?? 'arc', count: 0 };
  return lines(marks, state);
}

// An empty group leaves no line.
const lines = (marks: readonly Mark[], state: State): string =>
  marks
    .map((mark) => svgMark(mark, state))
    .filter((line) => line !== '')
    .join('\n');

interface State {
  readonly prefix: string;
  count: number;
}

function svgMark(mark: Mark, state: State): string {
  switch (mark.kind) {
    case 'polyline':
      return `<path d="${pointsPath(mark.points, mark.closed ?? false)}"${paint(mark.fill, mark.stroke)}/>`;
    case 'region':
      return region(mark);
    case 'circle':
      return circle(mark, state);
    case 'dots':
      return dots(mark);
    case 'text':
      return text(mark);
    case 'arcText':
      return arcText(mark, state);
    case 'group':
      return group(mark, state);
  }
}

function group(mark: Group, state: State): string {
  const inner = lines(mark.marks, state);
  const name = mark.name === '' ? '' : ` id="${state.prefix}-${escapeText(mark.name)}"`;
  return inner === '' ? '' : `<g${name}>\n${inner}\n</g>`;
}

function pointsPath(points: readonly number[], closed: boolean): string {
  let d = '';
  for (let k = 0; k < points.length; k += 2) d += `${k === 0 ? 'M' : 'L'}${n(points[k])} ${n(points[k + 1])}`;
  return closed ? `${d}Z` : d;
}

function region(mark: Region): string {
  const d = mark.loops.map((loop) => pointsPath(loop, true)).join('');
  return `<path d="${d}" fill-rule="evenodd"${paint(mark.fill, undefined)}/>`;
}

function circle(mark: Circle, state: State): string {
  const { x, y, radius, fill, limb } = mark;
  const at = `cx="${n(x)}" cy="${n(y)}" r="${n(radius)}"`;
  if (!fill || !limb) return `<circle ${at}${paint(fill, mark.stroke)}/>`;
  const id = `${state.prefix}-${state.count++}`;
  const light = `cx="${n(x + LIMB.x * radius)}" cy="${n(y + LIMB.y * radius)}" r="${n(LIMB.radius * radius)}"`;
  const stops = `<stop offset="${LIMB.from}" stop-color="${fill.tint}"/><stop offset="1" stop-color="${limb}"/>`;
  return `<radialGradient id="${id}" gradientUnits="userSpaceOnUse" ${light}>${stops}</radialGradient><circle ${at}${paint({ tint: `url(#${id})` }, mark.stroke)}/>`;
}

// A dot is a line without length and with round ends: one element for all of them.
function dots(mark: Dots): string {
  let d = '';
  for (let k = 0; k < mark.points.length; k += 2) d += `M${n(mark.points[k])} ${n(mark.points[k + 1])}h0`;
  const opacity = mark.fill.opacity === undefined ? '' : ` stroke-opacity="${n(mark.fill.opacity)}"`;
  return `<path d="${d}" fill="none" stroke="${mark.fill.tint}"${opacity} stroke-width="${n(2 * mark.radius)}" stroke-linecap="round"/>`;
}

function text(mark: Text): string {
  const attributes = `x="${n(mark.x)}" y="${n(mark.y)}" font-size="${n(mark.size)}" text-anchor="${mark.anchor}" fill="${mark.tint}"${haloAttributes(mark.halo)}`;
  return `<text ${attributes}${common(mark.runs)}>${spans(mark.runs, mark.size)}</text>`;
}

function arcText(mark: ArcText, state: State): string {
  const id = `${state.prefix}-${state.count++}`;
  const half = (0.55 * widthOf(mark.runs, mark.size) + mark.size) / mark.radius;
  const d = arcPath(mark.x, mark.y, mark.radius, mark.angle - half, mark.angle + half);
  const attributes = `font-size="${n(mark.size)}" text-anchor="middle" fill="${mark.tint}"${haloAttributes(mark.halo)}`;
  return `<path id="${id}" d="${d}" fill="none"/><text ${attributes}${common(mark.runs)}><textPath href="#${id}" startOffset="50%">${spans(mark.runs, mark.size)}</textPath></text>`;
}

const haloAttributes = (halo: Halo | undefined): string =>
  halo
    ? ` stroke="${halo.tint}" stroke-width="${n(2 * halo.width)}" stroke-linejoin="round" paint-order="stroke"`
    : '';

// The face of the first run on the text element; others on their own spans.
function common(line: readonly Run[]): string {
  return line.length > 0 ? faceAttributes(line[0]) : '';
}

function faceAttributes(run: Run): string {
  const { family, weight, style } = FACES[run.face];
  return ` font-family="${family}" font-weight="${weight}"${style === 'italic' ? ' font-style="italic"' : ''}`;
}

// dy is relative to the run before, so every shift is taken back by the next run.
function spans(line: readonly Run[], size: number): string {
  let lowered = 0;
  return line
    .map((run, k) => {
      const wanted = run.place === 'sub' ? SCRIPT.sub * size : run.place === 'sup' ? -SCRIPT.sup * size : 0;
      const shift = wanted - lowered;
      lowered = wanted;
      if (k === 0 && !run.place) return escapeText(run.text);
      const dy = shift === 0 ? '' : ` dy="${n(shift)}"`;
      const script = run.place ? ` font-size="${n(SCRIPT.size * size)}"` : '';
      const { weight, style, family } = FACES[run.face];
      return `<tspan${dy}${script} font-family="${family}" font-weight="${weight}" font-style="${style}">${escapeText(run.text)}</tspan>`;
    })
    .join('');
}

function paint(fill: Fill | undefined, stroke: Stroke | undefined): string {
  let out = fill ? ` fill="${fill.tint}"` : ' fill="none"';
  if (fill?.opacity !== undefined && fill.opacity < 1) out += ` fill-opacity="${n(fill.opacity)}"`;
  if (!stroke) return out;
  out += ` stroke="${stroke.tint}" stroke-width="${n(stroke.width)}"`;
  if (stroke.dash) out += ` stroke-dasharray="${stroke.dash.map(n).join(' ')}"`;
  if (stroke.offset) out += ` stroke-dashoffset="${n(stroke.offset)}"`;
  if (stroke.cap === 'round') out += ' stroke-linecap="round"';
  if (stroke.opacity !== undefined && stroke.opacity < 1) out += ` stroke-opacity="${n(stroke.opacity)}"`;
  return `${out} stroke-linejoin="round"`;
}

const n = (value: number): string => String(Math.round(value * 100) / 100);

function escapeText(value: string): string {
  return (
    value
      .replace(/&/g, '&amp;')
      .replace(/</g, '&lt;')
      .replace(/>/g, '&gt;')
      .replace(/"/g, '&quot;')
      // Characters that XML cannot hold at all; a label from a foreign file may have them.
      // biome-ignore lint/suspicious/noControlCharactersInRegex: these are what is removed.
      .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '\ufffd')
  );
}
