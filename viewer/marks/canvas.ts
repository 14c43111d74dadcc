import { PI } from '../../engine/index.ts';
import {
  type ArcText,
  type Circle,
  type Drawing,
  type Fill,
  LIMB,
  type Mark,
  type Stroke,
  type Text,
} from './display-list.ts';
import { FACES, type Run, SCRIPT } from './lettering.ts';

/** The part of a canvas' drawing context that a drawing needs. */
export type Canvas2d = CanvasRenderingContext2D | OffscreenCanvasRenderingContext2D;

/** Every font that a drawing sets text in, as a canvas names it, so that it can be loaded first. */
export const drawingFonts = (): string[] =>
  (Object.keys(FACES) as (keyof typeof FACES)[]).map((face) => fontOf({ text: '', face }, 12));

/**
 * Paint a drawing on a canvas, `scale` pixels per unit, as the SVG of the same drawing looks. Fonts must be loaded before.
 */
export function paintDrawing(canvas: Canvas2d, drawing: Drawing, scale: number): void {
  canvas.save();
  const margin = drawing.margin ?? 0;
  canvas.setTransform(scale, 0, 0, scale, scale * margin, scale * margin);
  canvas.lineJoin = 'round';
  if (drawing.ground) {
    canvas.fillStyle = drawing.ground;
    canvas.fillRect(-margin, -margin, drawing.width + 2 * margin, drawing.height + 2 * margin);
  }
  for (const mark of drawing.marks) paintMark(canvas, mark);
  canvas.restore();
}

function paintMark(canvas: Canvas2d, mark: Mark): void {
  switch (mark.kind) {
    case 'group':
      for (const inner of mark.marks) paintMark(canvas, inner);
      return;
    case 'polyline':
      canvas.beginPath();
      trace(canvas, mark.points, mark.closed ?? false);
      finish(canvas, mark.fill, mark.stroke);
      return;
    case 'region':
      canvas.beginPath();
      for (const loop of mark.loops) trace(canvas, loop, true);
      canvas.globalAlpha = mark.fill.opacity ?? 1;
      canvas.fillStyle = mark.fill.tint;
      canvas.fill('evenodd');
      canvas.globalAlpha = 1;
      return;
    case 'circle':
      paintCircle(canvas, mark);
      return;
    case 'dots':
      canvas.beginPath();
      for (let k = 0; k < mark.points.length; k += 2) {
        canvas.moveTo(mark.points[k] + mark.radius, mark.points[k + 1]);
        canvas.arc(mark.points[k], mark.points[k + 1], mark.radius, 0, 2 * PI);
      }
      finish(canvas, mark.fill, undefined);
      return;
    case 'text':
      paintText(canvas, mark);
      return;
    case 'arcText':
      paintArcText(canvas, mark);
  }
}

function trace(canvas: Canvas2d, points: readonly number[], closed: boolean): void {
  for (let k = 0; k < points.length; k += 2) {
    if (k === 0) canvas.moveTo(points[k], points[k + 1]);
    else canvas.lineTo(points[k], points[k + 1]);
  }
  if (closed) canvas.closePath();
}

function paintCircle(canvas: Canvas2d, { x, y, radius, fill, stroke, limb }: Circle): void {
  canvas.beginPath();
  canvas.arc(x, y, Math.max(0, radius), 0, 2 * PI);
  if (!fill || !limb) {
    finish(canvas, fill, stroke);
    return;
  }
  const lightX = x + LIMB.x * radius;
  const lightY = y + LIMB.y * radius;
  const shading = canvas.createRadialGradient(lightX, lightY, 0, lightX, lightY, LIMB.radius * radius);
  shading.addColorStop(LIMB.from, fill.tint);
  shading.addColorStop(1, limb);
  canvas.fillStyle = shading;
  canvas.fill();
  finish(canvas, undefined, stroke);
}

function finish(canvas: Canvas2d, fill: Fill | undefined, stroke: Stroke | undefined): void {
  if (fill) {
    canvas.globalAlpha = fill.opacity ?? 1;
    canvas.fillStyle = fill.tint;
    canvas.fill();
  }
  if (stroke) {
    canvas.globalAlpha = stroke.opacity ?? 1;
    canvas.strokeStyle = stroke.tint;
    canvas.lineWidth = stroke.width;
    canvas.lineCap = stroke.cap ?? 'butt';
    canvas.setLineDash(stroke.dash ? [...stroke.dash] : []);
    canvas.lineDashOffset = stroke.offset ?? 0;
    canvas.stroke();
  }
  canvas.globalAlpha = 1;
}

function fontOf(run: Run, size: number): string {
  const { family, weight, style } = FACES[run.face];
  return `${style} ${weight} ${run.place ? SCRIPT.size * size : size}px ${family}`;
}

const shiftOf = (run: Run, size: number): number =>
  run.place === 'sub' ? SCRIPT.sub * size : run.place === 'sup' ? -SCRIPT.sup * size : 0;

function advances(canvas: Canvas2d, line: readonly Run[], size: number): number[] {
  return line.map((run) => {
    canvas.font = fontOf(run, size);
    return canvas.measureText(run.text).width;
  });
}

function paintText(canvas: Canvas2d, mark: Text): void {
  const widths = advances(canvas, mark.runs, mark.size);
  const whole = widths.reduce((sum, width) => sum + width, 0);
  const start = mark.x - (mark.anchor === 'start' ? 0 : mark.anchor === 'end' ? whole : whole / 2);
  // All of the halo first: it must not cut into the letters of the run before.
  for (const pass of mark.halo ? (['halo', 'letters'] as const) : (['letters'] as const)) {
    let x = start;
    mark.runs.forEach((run, k) => {
      canvas.font = fontOf(run, mark.size);
      const y = mark.y + shiftOf(run, mark.size);
      if (pass === 'halo' && mark.halo) {
        strokeLetters(canvas, mark.halo, run.text, x, y);
      } else {
        canvas.fillStyle = mark.tint;
        canvas.fillText(run.text, x, y);
      }
      x += widths[k];
    });
  }
}

function strokeLetters(
  canvas: Canvas2d,
  halo: { readonly tint: string; readonly width: number },
  text: string,
  x: number,
  y: number,
): void {
  canvas.strokeStyle = halo.tint;
  canvas.lineWidth = 2 * halo.width;
  canvas.setLineDash([]);
  canvas.strokeText(text, x, y);
}

// A character at a time, each upright on its own radius, as text on a path is set.
function paintArcText(canvas: Canvas2d, mark: ArcText): void {
  const widths = advances(canvas, mark.runs, mark.size);
  const whole = widths.reduce((sum, width) => sum + width, 0);
  for (const pass of mark.halo ? (['halo', 'letters'] as const) : (['letters'] as const)) {
    let at = -whole / 2;
    for (const run of mark.runs) {
      canvas.font = fontOf(run, mark.size);
      for (const character of run.text) {
        const width = canvas.measureText(character).width;
        canvas.save();
        canvas.translate(mark.x, mark.y);
        canvas.rotate(mark.angle + (at + width / 2) / mark.radius + PI / 2);
        const y = -mark.radius + shiftOf(run, mark.size);
        if (pass === 'halo' && mark.halo) strokeLetters(canvas, mark.halo, character, -width / 2, y);
        else {
          canvas.fillStyle = mark.tint;
          canvas.fillText(character, -width / 2, y);
        }
        canvas.restore();
        at += width;
      }
    }
  }
}
