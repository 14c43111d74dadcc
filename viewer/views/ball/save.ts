import {
  ballDrawing,
  type Drawing,
  drawingFonts,
  type KeyFold,
  paintDrawing,
  palette,
  svgDocument,
} from '../../marks/index.ts';
import type { BallPicture } from './ball-picture.ts';

/** Paper of a saved file: that of the screen's theme, or white for slides and print. */
export type SavedPaper = 'screen' | 'white';

/** Paper round a saved ball [px]. */
const MARGIN = 16;

/** The picture as an SVG file. @throws Error while it shows no event. */
export const svgOf = (picture: BallPicture | null, keys: KeyFold, paper: SavedPaper): string =>
  svgDocument(drawingOf(picture, keys, paper));

/** The picture as a PNG of `scale` dots per CSS pixel. @throws Error while it shows no event. */
export async function pngOf(
  picture: BallPicture | null,
  keys: KeyFold,
  paper: SavedPaper,
  scale: number,
): Promise<Blob> {
  const drawing = drawingOf(picture, keys, paper);
  // A font that the page has not used yet is not there when the canvas asks for it.
  await Promise.all(drawingFonts().map((font) => document.fonts.load(font)));
  const width = Math.round((drawing.width + 2 * MARGIN) * scale);
  const height = Math.round((drawing.height + 2 * MARGIN) * scale);
  const canvas = new OffscreenCanvas(width, height);
  const context = canvas.getContext('2d');
  if (!context) throw new Error(`a picture of ${width} x ${height} dots is too large for this browser`);
  paintDrawing(context, drawing, scale);
  return canvas.convertToBlob({ type: 'image/png' });
}

function drawingOf(picture: BallPicture | null, keys: KeyFold, paper: SavedPaper): Drawing {
  const view = picture?.view;
  if (!picture || !view) throw new Error('there is no ball to save: no event is shown');
  const tints = paper === 'white' ? palette.print : view.palette;
  return ballDrawing(
    { ...view, palette: tints, hover: -1 },
    { keys, corners: true, before: picture.places, foot: 0 },
    MARGIN,
  );
}
