import { html, LitElement, nothing, type PropertyValues } from 'lit';
import { customElement, property, state } from 'lit/decorators.js';
import type { History } from '../../../engine/index.ts';
import {
  type BallEvent,
  ballEvent,
  type Camera,
  type Cone,
  clampCamera,
  coneOf,
  finenessAt,
  firstCamera,
  retrace,
  type Stage,
  stageOf,
} from '../../layout/index.ts';
import { type KeyFold, keysFit, palette } from '../../marks/index.ts';
import { BallScene, SceneError, type SceneMemory } from '../../scene/index.ts';
import { type Playhead, StoreSlice } from '../../state/index.ts';
import { BoxSize } from '../frame/index.ts';
import { notationStyles } from '../type/index.ts';
import { ballStyles } from './ball.styles.ts';
import { BallPicture, OVERLAY_PARTS } from './ball-picture.ts';
import { type CameraTurn, cameraAt } from './camera-turn.ts';
import { type GestureTarget, listenForGestures } from './gestures.ts';
import { Overlay } from './overlay.ts';
import { announcementOf, readoutOf } from './readout.ts';
import { pngOf, type SavedPaper, svgOf } from './save.ts';

/** How near to a branching the pointer must be to mean it [px]. */
const REACH = 10;

/** How long after the last picture of a moving view the ball counts as at rest [ms]. */
const SETTLE_MS = 160;

const START: Camera = { azimuth: 0, elevation: 0.3, zoom: 1, panX: 0, panY: 0 };

/**
 * The ball: the event in momentum space, radius its evolution time, drawn by the graphics processor or, where there is none, as
 * vector lines. It fills its box, and takes event, clock, selection and theme from the store.
 */
@customElement('bl-ball')
export class BallElement extends LitElement implements GestureTarget {
  static override styles = [notationStyles, ballStyles];

  /** Draw as vector lines even where there is a graphics processor. */
  @property({ type: Boolean, reflect: true }) vector = false;

  /** Keys that were opened or closed by hand; until then they are open where they fit beside the ball. */
  @state() private keysLeft: boolean | null = null;
  @state() private keysRight: boolean | null = null;
  /** Why there is no scene, empty where there is one. */
  @state() private failure = '';

  readonly #history = new StoreSlice(this, (s) => s.history);
  readonly #measures = new StoreSlice(this, (s) => s.measures);
  readonly #step = new StoreSlice(this, (s) => s.step);
  readonly #hover = new StoreSlice(this, (s) => s.hoverStep);
  readonly #theme = new StoreSlice(this, (s) => s.theme);
  readonly #box = new BoxSize(this);

  #event: BallEvent | null = null;
  #sceneEvent: BallEvent | null | undefined;
  #camera: Camera = START;
  #home: Camera = START;
  #turn: CameraTurn | null = null;
  #stage: Stage = stageOf(0, 0);
  #cone: Cone | null = null;
  #picture: BallPicture | null = null;
  #time = 0;
  #running = false;
  #fineness = 1;
  #moving = false;
  #settle = 0;
  #drawn = 0;
  #frame = 0;
  #viewChanged = true;
  #leave: (() => void)[] = [];
  #playhead: Playhead | null = null;

  override render() {
    const history = this.#history.value ?? null;
    const measures = this.#measures.value ?? null;
    const hover = this.#hover.value ?? -1;
    const shown = history !== null && hover >= 0 && hover < history.steps.length;
    const selected = history ? announcementOf(history, measures, this.#step.value ?? -1) : '';
    const keys = this.#keys();
    return html`
      <div class="plate" tabindex="0" role="application" aria-roledescription="ball" ?data-over=${shown}
        aria-label="Ball of the event: arrow keys turn it, plus and minus zoom, 0 goes back to the first view">
        <canvas aria-hidden="true" ?hidden=${this.#isVector}></canvas>
        <svg aria-hidden="true"></svg>
      </div>
      ${this.#event ? [this.#keyButton('left', keys.left), this.#keyButton('right', keys.right)] : nothing}
      <div class="readout" ?hidden=${!shown}>${shown ? readoutOf(history, measures, hover) : nothing}</div>
      <div class="unseen" role="status">${selected}</div>
    `;
  }

  #keyButton(side: 'left' | 'right', open: boolean) {
    const word = side === 'left' ? 'lines' : 'angles';
    const fold = (): void => {
      if (side === 'left') this.keysLeft = !open;
      else this.keysRight = !open;
    };
    return html`<button class="key-${side}" aria-expanded=${open ? 'true' : 'false'} @click=${fold}
      ><span class="unseen">key to </span>${word} ${open ? '▾' : '▸'}</button>`;
  }

  #keys(): KeyFold {
    const fit = keysFit(this.#stage, this.#camera);
    return { left: this.keysLeft ?? fit.left, right: this.keysRight ?? fit.right };
  }

  get #isVector(): boolean {
    return this.vector || this.failure !== '';
  }

  override connectedCallback(): void {
    super.connectedCallback();
    if (!this.hasUpdated) return;
    this.#open();
    this.requestUpdate();
  }

  override firstUpdated(): void {
    const overlay = new Overlay(this.renderRoot.querySelector('svg')!, OVERLAY_PARTS, 'ball');
    this.#picture = new BallPicture(overlay);
    this.#open();
  }

  #open(): void {
    this.#leave.push(listenForGestures(this.#part('.plate'), this));
    this.#sceneEvent = undefined;
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    cancelAnimationFrame(this.#frame);
    this.#frame = 0;
    clearTimeout(this.#settle);
    this.#moving = false;
    this.#turn = null;
    for (const end of this.#leave) end();
    this.#leave = [];
    this.#playhead = null;
    this.#closeScene();
  }

  // A canvas whose context was given back cannot draw again, so the next scene gets a new one.
  #closeScene(): void {
    const scene = this.#picture?.scene;
    if (!scene) return;
    this.#picture!.scene = null;
    const canvas = this.#part('canvas');
    // Giving a context back loses it as well, which is told later.
    canvas.removeEventListener('webglcontextlost', this.#lost);
    scene.dispose();
    const fresh = canvas.cloneNode(false) as HTMLCanvasElement;
    canvas.replaceWith(fresh);
  }

  #openScene(): void {
    const canvas = this.#part<HTMLCanvasElement>('canvas');
    try {
      this.#picture!.scene = new BallScene(canvas);
      this.#sceneEvent = undefined;
      canvas.addEventListener('webglcontextlost', this.#lost);
    } catch (error) {
      if (!(error instanceof SceneError)) throw error;
      this.failure = error.message;
    }
  }

  readonly #lost = (): void => {
    this.#closeScene();
    this.failure = new SceneError('that its context was lost').message;
  };

  override willUpdate(): void {
    const { width, height } = this.#box;
    if (width !== this.#stage.width || height !== this.#stage.height) this.#stage = stageOf(width, height);
    const history = this.#history.value ?? null;
    if (history !== (this.#event?.history ?? null)) this.#take(history);
    const step = this.#step.value ?? -1;
    if (!this.#event || !(step >= 0 && step < this.#event.history.steps.length)) this.#cone = null;
    else if (this.#cone?.step !== step) {
      const birthAngle = this.#measures.value?.birthAngle[step] ?? Number.NaN;
      this.#cone = coneOf(this.#event.history, this.#event.strands, step, birthAngle);
    }
  }

  #take(history: History | null): void {
    this.#event = history ? ballEvent(history) : null;
    if (this.#event) this.#home = firstCamera(this.#event.strands);
    this.#camera = this.#home;
    this.#fineness = 1;
    this.#turn = null;
    this.#cone = null;
    this.#time = this.#history.store?.playhead.time ?? 0;
  }

  override updated(_changed: PropertyValues): void {
    if (!this.#picture || !this.isConnected) return;
    this.#followClock();
    if (this.#isVector) this.#closeScene();
    else if (!this.#picture.scene) this.#openScene();
    const { scene } = this.#picture;
    if (scene) {
      if (this.#sceneEvent !== this.#event) scene.setEvent(this.#event);
      this.#sceneEvent = this.#event;
      scene.setPalette(palette[this.#theme.value ?? 'light']);
      scene.setStage(this.#stage, Math.min(2, devicePixelRatio || 1));
      scene.setCone(this.#cone);
    }
    this.#redraw();
  }

  // The store may be handed down after the component is there.
  #followClock(): void {
    const playhead = this.#history.store?.playhead ?? null;
    if (playhead === this.#playhead) return;
    this.#playhead = playhead;
    if (playhead) this.#leave.push(playhead.subscribe(this.#tick));
  }

  readonly #tick = (time: number): void => {
    const running = this.#playhead?.playing ?? false;
    if (time === this.#time && running === this.#running) return;
    this.#time = time;
    this.#running = running;
    this.#ask();
  };

  #redraw(): void {
    this.#viewChanged = true;
    this.#ask();
  }

  #ask(): void {
    if (this.#frame === 0 && this.isConnected) this.#frame = requestAnimationFrame(this.#draw);
  }

  readonly #draw = (nowMs: number): void => {
    this.#frame = 0;
    const picture = this.#picture;
    if (!picture || this.#stage.width < 1 || this.#stage.height < 1) return;
    if (this.#turn) this.#followTurn(nowMs);
    if (!this.#event) picture.clear(this.#camera);
    else if (this.#viewChanged) {
      picture.draw(
        {
          event: this.#event,
          camera: this.#camera,
          stage: this.#stage,
          palette: palette[this.#theme.value ?? 'light'],
          cone: this.#cone,
          hover: this.#hover.value ?? -1,
          keys: this.#keys(),
          moving: this.#moving,
        },
        this.#time,
      );
      this.#placeReadout();
    } else picture.drawTime(this.#time, this.#running);
    this.#viewChanged = false;
    if (this.#turn) this.#redraw();
    // Counted from the picture, not from the hand, and in pictures where those are slow: else the full lettering would be set
    // between any two of them.
    clearTimeout(this.#settle);
    const wait = Math.max(SETTLE_MS, Math.min(1000, 2 * (nowMs - this.#drawn)));
    this.#drawn = nowMs;
    if (this.#moving) this.#settle = window.setTimeout(this.#settled, wait);
  };

  #followTurn(nowMs: number): void {
    const turn = this.#turn!;
    this.#camera = cameraAt(turn, nowMs);
    this.#moving = true;
    this.#viewChanged = true;
    if (this.#camera === turn.to) this.aim(turn.to);
  }

  // Beside the branching, on the side where there is room.
  #placeReadout(): void {
    const at = this.#picture!.placeOf(this.#hover.value ?? -1);
    if (!at) return;
    const { style } = this.#part<HTMLElement>('.readout');
    const { width, height } = this.#stage;
    const right = at.x > width - 190;
    const low = at.y > 90;
    style.left = right ? 'auto' : `${at.x + 14}px`;
    style.right = right ? `${width - at.x + 14}px` : 'auto';
    style.top = low ? 'auto' : `${at.y + 12}px`;
    style.bottom = low ? `${height - at.y + 12}px` : 'auto';
  }

  #part<E extends Element = HTMLElement>(selector: string): E {
    return this.renderRoot.querySelector<E>(selector)!;
  }

  get camera(): Camera {
    return this.#turn?.to ?? this.#camera;
  }

  get stage(): Stage {
    return this.#stage;
  }

  /** Where a step stands in the element [px], null where it does not. */
  placeOf(step: number): { x: number; y: number } | null {
    return this.#picture?.placeOf(step) ?? null;
  }

  /** Look from a camera, at once. */
  aim(camera: Camera): void {
    const { left, right } = this.#keys();
    this.#turn = null;
    this.#camera = clampCamera(camera);
    const keys = this.#keys();
    if (keys.left !== left || keys.right !== right) this.requestUpdate();
    this.#refine();
    if (!this.#moving) this.#drawn = performance.now();
    this.#moving = true;
    this.#redraw();
  }

  // Turns that are enlarged are traced more finely; the strands stay where they are.
  #refine(): void {
    const fineness = finenessAt(this.#camera.zoom);
    if (!this.#event || fineness === this.#fineness) return;
    this.#fineness = fineness;
    this.#event = retrace(this.#event, fineness);
    this.requestUpdate();
  }

  readonly #settled = (): void => {
    this.#moving = false;
    this.#redraw();
  };

  /** Go back to the event's first view, in 0.3 s, or at once where motion is to be reduced. */
  reset(): void {
    if (matchMedia('(prefers-reduced-motion: reduce)').matches) {
      this.aim(this.#home);
      return;
    }
    this.#turn = { from: this.#camera, to: this.#home, begunMs: performance.now() };
    this.#redraw();
  }

  point(x: number, y: number): void {
    const store = this.#history.store;
    if (!store || !this.#event) return;
    const step = Number.isNaN(x) ? -1 : (this.#picture?.pick(x, y, REACH) ?? -1);
    if (step !== store.state.hoverStep) store.setHoverStep(step);
  }

  choose(x: number, y: number): void {
    const step = this.#picture?.pick(x, y, REACH) ?? -1;
    this.#history.store?.selectStep(step);
  }

  dragging(is: boolean): void {
    this.#part('.plate').toggleAttribute('data-dragging', is);
  }

  /**
   * The ball as it stands as an SVG file: text as text, vector lines sorted by depth.
   *
   * @param paper That of the screen's theme, or white for slides and print.
   * @throws Error while no event is shown.
   */
  saveSvg(paper: SavedPaper = 'screen'): string {
    return svgOf(this.#picture, this.#keys(), paper);
  }

  /**
   * The ball as it stands as a PNG, all lettering included.
   *
   * @param scale Dots per CSS pixel. @param paper As in saveSvg.
   * @throws Error while no event is shown.
   */
  savePng(scale: number, paper: SavedPaper = 'screen'): Promise<Blob> {
    return pngOf(this.#picture, this.#keys(), paper, scale);
  }

  /** What the scene holds on the graphics processor; null where the ball is drawn as vector lines. */
  get memory(): SceneMemory | null {
    return this.#picture?.scene?.memory ?? null;
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-ball': BallElement;
  }
}
