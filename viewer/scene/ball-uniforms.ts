import { Color, Matrix3, Vector2, Vector4 } from 'three';
import { channels, litEdgeOf, type Palette } from '../marks/index.ts';

/** The values that all materials of the ball share; writing one here changes the next picture and rebuilds nothing. */
export function ballUniforms() {
  return {
    uView: { value: new Matrix3() },
    uPaper: { value: new Vector2(1, 1) },
    uCentre: { value: new Vector2() },
    uScale: { value: 1 },
    uSize: { value: 1 },
    uPixel: { value: 1 },
    uShell: { value: 0 },
    uGround: { value: new Color() },
    uShade: { value: new Color() },
    uLit: { value: new Color() },
    uLitEdge: { value: new Color() },
    uInk: { value: new Color() },
    uHairline: { value: new Color() },
    uRule: { value: new Color() },
    uWash: { value: new Color() },
    uTints: { value: [new Color(), new Color(), new Color(), new Color()] },
    uCaps: { value: [new Vector4(), new Vector4()] },
    uCapShare: { value: new Vector2() },
    uCapRadius: { value: 1 },
  };
}

/** The shared values, by their names in the shaders. */
export type BallUniforms = ReturnType<typeof ballUniforms>;

/** Write a palette; tints go to the shader as they stand on the display, so that screen and file match. */
export function writePalette(uniforms: BallUniforms, palette: Palette): void {
  set(uniforms.uGround.value, palette.ground);
  set(uniforms.uShade.value, palette.shade);
  set(uniforms.uLit.value, palette.lit);
  set(uniforms.uLitEdge.value, litEdgeOf(palette));
  set(uniforms.uInk.value, palette.ink);
  set(uniforms.uHairline.value, palette.hairline);
  set(uniforms.uRule.value, palette.rule);
  set(uniforms.uWash.value, palette.wash);
  [palette.quark, palette.antiquark, palette.gluon, palette.ink].forEach((tint, k) => {
    set(uniforms.uTints.value[k], tint);
  });
}

function set(colour: Color, tint: string): void {
  const [r, g, b] = channels(tint);
  colour.r = r / 255;
  colour.g = g / 255;
  colour.b = b / 255;
}
