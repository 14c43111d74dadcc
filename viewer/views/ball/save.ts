import {
  ballDrawing,
  type Drawing,
  drawingFonts,
  type KeyFold,
  paintDrawing,
  svgDocument,
} from '../../marks/index.ts';
import type { BallPicture } from './ball-picture.ts';

/** The picture as an SVG file. @throws Error while it shows no event. */
export const svgOf = (picture: BallPicture | null, keys: KeyFold): string =>
  svgDocument(drawingOf(picture, keys));

/** The picture as a PNG of `scale` dots per CSS pixel. @throws Error while it shows no event. */
export async function pngOf(picture: BallPicture | null, keys: KeyFold, scale: number): Promise<Blob> {
  const drawing = drawingOf(picture, keys);
  // A font that the page has not used yet is not there when the canvas asks for it.
  await Promise.all(drawingFonts().map((font) => document.fonts.load(font)));
  const canvas = new OffscreenCanvas(Math.round(drawing.width * scale), Math.round(drawing.height * scale));
  const context = canvas.getContext('2d');
  if (!context)
    throw new Error(`a picture of ${canvas.width} x ${canvas.height} dots is too large for this browser`);
  paintDrawing(context, drawing, scale);
  return canvas.convertToBlob({ type: 'image/png' });
}

function drawingOf(picture: BallPicture | null, keys: KeyFold): Drawing {
  const view = picture?.view;
  if (!picture || !view) throw new Error('there is no ball to save: no event is shown');
  return ballDrawing({ ...view, hover: -1 }, { keys, corners: true, before: picture.places, foot: 0 });
}
