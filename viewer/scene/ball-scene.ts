import {
  type BufferGeometry,
  DoubleSide,
  GLSL3,
  Camera as GraphicsCamera,
  Matrix3,
  Mesh,
  RawShaderMaterial,
  Scene,
  WebGLRenderer,
} from 'three';
import { cos } from '../../engine/math/index.ts';
import {
  type BallEvent,
  type Camera,
  type Cone,
  type Projection,
  projectionOf,
  radiusAt,
  type Stage,
  shells,
} from '../layout/index.ts';
import { type Palette, palette as palettes, SHELL_GAP, washShare } from '../marks/index.ts';
import { ballUniforms, writePalette } from './ball-uniforms.ts';
import {
  chainQuads,
  coneGlyphs,
  coneQuads,
  eventGlyphs,
  glyphQuads,
  type LineQuads,
  lineQuads,
  measureAlong,
  netQuads,
  outlineQuads,
  type Quads,
  shellQuads,
  strandQuads,
} from './build/index.ts';
import { meshOf, refill } from './mesh.ts';
import { SceneError } from './scene-error.ts';
import {
  CHAIN_FRAGMENT,
  CHAIN_VERTEX,
  GLYPH_FRAGMENT,
  GLYPH_VERTEX,
  GROUND_FRAGMENT,
  INK_FRAGMENT,
  LINE_VERTEX,
  SCREEN_VERTEX,
  STRAND_FRAGMENT,
  WASH_FRAGMENT,
} from './shaders/index.ts';

const NO_LINES: LineQuads = lineQuads([]);
// One triangle that covers the canvas.
const SCREEN: Quads = {
  columns: { aCorner: { size: 2, values: new Float32Array([-1, -1, 3, -1, -1, 3]) } },
  index: new Uint32Array([0, 1, 2]),
};
const IN_PAPER = [1, 0, 0, 0, 1, 0, 0, 0, 1];

/** Objects and memory of a scene on the graphics processor. */
export interface SceneMemory {
  readonly geometries: number;
  readonly textures: number;
  readonly programs: number;
}

/**
 * The ball on a canvas: static geometry, drawn when `render` is called.
 *
 * An event is built once; the clock writes one uniform, the camera a few and the gaps of dashed lines. Nothing is allocated by
 * `setTime` and `render`. The lettering is not here but in the overlay.
 */
export class BallScene {
  readonly #renderer: WebGLRenderer;
  readonly #uniforms = ballUniforms();
  readonly #scene = new Scene();
  readonly #eye = new GraphicsCamera();
  readonly #materials: RawShaderMaterial[] = [];
  readonly #shells: Mesh<BufferGeometry, RawShaderMaterial>;
  readonly #wash: Mesh<BufferGeometry, RawShaderMaterial>;
  readonly #strands: Mesh<BufferGeometry, RawShaderMaterial>;
  readonly #chains: Mesh<BufferGeometry, RawShaderMaterial>;
  readonly #glyphs: Mesh<BufferGeometry, RawShaderMaterial>;
  readonly #coneLines: Mesh<BufferGeometry, RawShaderMaterial>;
  readonly #coneGlyphs: Mesh<BufferGeometry, RawShaderMaterial>;
  #strandQuads: LineQuads = NO_LINES;
  #event: BallEvent | null = null;
  #cone: Cone | null = null;
  #camera: Camera | null = null;
  #stage: Stage | null = null;
  #palette: Palette = palettes.light;
  #shellKey = '-';
  #disposed = false;

  /**
   * @param canvas A canvas that has no context yet.
   * @throws SceneError where the browser gives no WebGL 2 context.
   */
  constructor(canvas: HTMLCanvasElement) {
    const context = canvas.getContext('webgl2', {
      alpha: false,
      antialias: false,
      depth: true,
      stencil: false,
      powerPreference: 'high-performance',
      preserveDrawingBuffer: false,
    });
    if (!context) throw new SceneError('none');
    this.#renderer = new WebGLRenderer({ canvas, context: context as WebGL2RenderingContext });
    this.#renderer.autoClear = true;
    this.#renderer.info.autoReset = true;
    const flat = this.#material(LINE_VERTEX, INK_FRAGMENT, false);
    // Circles about the middle lie in the plane of the paper from wherever one looks.
    const outline = this.#material(LINE_VERTEX, INK_FRAGMENT, true);
    const circles = this.#material(LINE_VERTEX, INK_FRAGMENT, false);
    for (const material of [outline, circles]) {
      material.uniforms = { ...material.uniforms, uView: { value: new Matrix3() } };
    }
    const glyphs = this.#material(GLYPH_VERTEX, GLYPH_FRAGMENT, true);
    this.#shells = meshOf(NO_LINES, circles, 1);
    this.#wash = meshOf(SCREEN, this.#material(SCREEN_VERTEX, WASH_FRAGMENT, false), 2);
    this.#wash.visible = false;
    this.#strands = meshOf(NO_LINES, this.#material(LINE_VERTEX, STRAND_FRAGMENT, true), 3);
    this.#coneLines = meshOf(NO_LINES, this.#material(LINE_VERTEX, INK_FRAGMENT, true), 5);
    this.#chains = meshOf(NO_LINES, this.#material(CHAIN_VERTEX, CHAIN_FRAGMENT, true), 6);
    this.#glyphs = meshOf(NO_LINES, glyphs, 7);
    this.#coneGlyphs = meshOf(NO_LINES, glyphs, 8);
    this.#scene.matrixWorldAutoUpdate = false;
    this.#scene.add(
      meshOf(SCREEN, this.#material(SCREEN_VERTEX, GROUND_FRAGMENT, false), 0),
      this.#shells,
      meshOf(netQuads(), flat, 1),
      this.#wash,
      this.#strands,
      meshOf(outlineQuads(), outline, 4),
      this.#coneLines,
      this.#chains,
      this.#glyphs,
      this.#coneGlyphs,
    );
    this.setPalette(palettes.light);
  }

  #material(vertexShader: string, fragmentShader: string, depth: boolean): RawShaderMaterial {
    const material = new RawShaderMaterial({
      glslVersion: GLSL3,
      side: DoubleSide,
      vertexShader,
      fragmentShader,
      transparent: true,
      depthTest: depth,
      depthWrite: depth,
    });
    material.uniforms = this.#uniforms;
    this.#materials.push(material);
    return material;
  }

  /** Show an event, null for the empty ball. */
  setEvent(event: BallEvent | null): void {
    this.#event = event;
    this.#strandQuads = event ? strandQuads(event) : NO_LINES;
    refill(this.#strands, this.#strandQuads);
    refill(this.#chains, event ? chainQuads(event) : NO_LINES);
    refill(this.#glyphs, glyphQuads(event ? eventGlyphs(event) : []));
    this.setCone(null);
    this.#aim();
  }

  setPalette(palette: Palette): void {
    this.#palette = palette;
    writePalette(this.#uniforms, palette);
    this.#writeCone();
  }

  /** Take a size [CSS px]. @param pixelRatio Device pixels per CSS pixel. */
  setStage(stage: Stage, pixelRatio: number): void {
    // Setting a size, the same one too, gives the canvas new memory.
    if (stage === this.#stage && pixelRatio === this.#uniforms.uPixel.value) return;
    this.#stage = stage;
    this.#renderer.setPixelRatio(pixelRatio);
    this.#renderer.setSize(stage.width, stage.height, false);
    this.#uniforms.uPixel.value = pixelRatio;
    this.#uniforms.uPaper.value.set(stage.width, stage.height);
    this.#uniforms.uSize.value = stage.size;
    this.#aim();
  }

  setCamera(camera: Camera): void {
    this.#camera = camera;
    this.#aim();
  }

  /** Grow the shell to evolution time L. */
  setTime(time: number): void {
    if (this.#event) this.#uniforms.uShell.value = radiusAt(this.#event.strands.scale, time);
  }

  /** Show the cone of a selected step, null for none. */
  setCone(cone: Cone | null): void {
    this.#cone = cone;
    refill(this.#coneGlyphs, glyphQuads([]));
    this.#writeCone();
  }

  /** Draw the picture as everything stands. */
  render(): void {
    if (this.#disposed || !this.#stage || !this.#camera) return;
    this.#renderer.render(this.#scene, this.#eye);
  }

  /** What the scene holds on the graphics processor. */
  get memory(): SceneMemory {
    const { memory, programs } = this.#renderer.info;
    return { geometries: memory.geometries, textures: memory.textures, programs: programs?.length ?? 0 };
  }

  /** Give everything back, the context included; the canvas cannot be used again. */
  dispose(): void {
    if (this.#disposed) return;
    this.#disposed = true;
    for (const child of this.#scene.children) {
      if (child instanceof Mesh) child.geometry.dispose();
    }
    for (const material of this.#materials) material.dispose();
    this.#scene.clear();
    this.#renderer.dispose();
    // Browsers keep only some sixteen contexts alive and collect late.
    this.#renderer.forceContextLoss();
  }

  #aim(): void {
    if (!this.#camera || !this.#stage) return;
    const projection = projectionOf(this.#camera, this.#stage);
    const uniforms = this.#uniforms;
    const [a, b, c, d, e, f, g, h, i] = projection.rotation;
    uniforms.uView.value.set(a, b, c, d, e, f, g, h, i);
    uniforms.uCentre.value.set(projection.x, projection.y);
    uniforms.uScale.value = projection.scale;
    if (measureAlong(this.#strandQuads, projection.rotation, projection.scale)) {
      this.#strands.geometry.attributes.aAlong.needsUpdate = true;
    }
    this.#writeShells(projection);
    this.#writeCone(projection);
  }

  // The gaps of the dots are measured in pixels, so another zoom means other dots.
  #writeShells({ scale }: Projection): void {
    const radii = this.#event?.strands.scale;
    const key = radii ? `${this.#event?.strands.scale.end} ${scale}` : '';
    if (key === this.#shellKey) return;
    this.#shellKey = key;
    const found = radii ? shells(radii, SHELL_GAP / scale).map(({ radius }) => radius) : [];
    const quads = shellQuads(radii ? [radii.inner, ...found] : []);
    measureAlong(quads, IN_PAPER, scale);
    refill(this.#shells, quads);
  }

  #writeCone(projection: Projection | null = this.#projection()): void {
    const uniforms = this.#uniforms;
    uniforms.uCapShare.value.set(0, 0);
    this.#wash.visible = false;
    if (!projection || !this.#stage || (!this.#cone && !this.#coneLines.visible)) return;
    const quads = coneQuads(this.#cone, projection, this.#stage.size);
    measureAlong(quads, projection.rotation, projection.scale);
    refill(this.#coneLines, quads);
    if (!this.#cone || !this.#event) return;
    refill(
      this.#coneGlyphs,
      glyphQuads(coneGlyphs(this.#event, this.#cone, projection.scale, this.#stage.size)),
    );
    uniforms.uCapRadius.value = this.#cone.radius;
    for (const ring of this.#cone.rings) {
      const share = washShare(this.#palette, ring);
      if (share === 0) continue;
      this.#wash.visible = true;
      const [x, y, z] = ring.axis;
      const r = projection.rotation;
      const at = ring.kind === 'opening' ? 0 : 1;
      uniforms.uCaps.value[at].set(
        r[0] * x + r[1] * y + r[2] * z,
        r[3] * x + r[4] * y + r[5] * z,
        r[6] * x + r[7] * y + r[8] * z,
        cos(ring.angle),
      );
      if (at === 0) uniforms.uCapShare.value.x = share;
      else uniforms.uCapShare.value.y = share;
    }
  }

  #projection(): Projection | null {
    return this.#camera && this.#stage ? projectionOf(this.#camera, this.#stage) : null;
  }
}
