import { type Camera, orbit, pan, type Stage, zoomAbout } from '../../layout/index.ts';

/** What the pointer and the keys may ask of the ball. */
export interface GestureTarget {
  readonly camera: Camera;
  readonly stage: Stage;
  /** Take a camera at once. */
  aim(camera: Camera): void;
  /** Back to the event's first view. */
  reset(): void;
  /** The pointer is at (x, y) [px], or has left where both are NaN. */
  point(x: number, y: number): void;
  /** A click at (x, y) [px] without a drag. */
  choose(x: number, y: number): void;
  dragging(is: boolean): void;
}

/** A pointer that moved less than this between down and up is a click [px]. */
const CLICK = 4;
/** Orbit per key press [rad at a rim of one radius], and zoom. */
const KEY_TURN = 0.087;
const KEY_ZOOM = 1.2;

/**
 * Listen for orbit (drag, arrows), pan (drag with Shift or another button), zoom (wheel, pinch, + and −), reset (double click, 0).
 *
 * Keys count only while the element has the focus, and are then kept from everyone else. @returns what ends that.
 */
export function listenForGestures(element: HTMLElement, target: GestureTarget): () => void {
  const pointers = new Map<number, { x: number; y: number }>();
  let moved = 0;
  const at = (event: PointerEvent | WheelEvent | MouseEvent): { x: number; y: number } => {
    const box = element.getBoundingClientRect();
    return { x: event.clientX - box.left, y: event.clientY - box.top };
  };
  const down = (event: PointerEvent): void => {
    // The focus stays where it is: arrows belong to the clock until someone tabs to the ball.
    element.setPointerCapture(event.pointerId);
    pointers.set(event.pointerId, at(event));
    if (pointers.size === 1) moved = 0;
    target.dragging(true);
  };
  const move = (event: PointerEvent): void => {
    const here = at(event);
    const before = pointers.get(event.pointerId);
    if (!before) {
      target.point(here.x, here.y);
      return;
    }
    const dx = here.x - before.x;
    const dy = here.y - before.y;
    moved += Math.abs(dx) + Math.abs(dy);
    if (pointers.size === 2) pinch(event.pointerId, here);
    else if (moved >= CLICK) {
      const shifting = event.shiftKey || (event.buttons & ~1) !== 0;
      target.aim((shifting ? pan : orbit)(target.camera, target.stage, dx, dy));
    } else return;
    pointers.set(event.pointerId, here);
  };
  const pinch = (moving: number, here: { x: number; y: number }): void => {
    const before = pointers.get(moving)!;
    const other = [...pointers.entries()].find(([id]) => id !== moving)![1];
    const reach = (p: { x: number; y: number }): number => Math.hypot(p.x - other.x, p.y - other.y) || 1;
    const middle = { x: (here.x + other.x) / 2, y: (here.y + other.y) / 2 };
    target.aim(zoomAbout(target.camera, target.stage, middle.x, middle.y, reach(here) / reach(before)));
  };
  const up = (event: PointerEvent): void => {
    const known = pointers.delete(event.pointerId);
    target.dragging(pointers.size > 0);
    if (!known || pointers.size > 0 || event.type === 'pointercancel' || moved >= CLICK) return;
    const { x, y } = at(event);
    target.choose(x, y);
  };
  const leave = (): void => target.point(Number.NaN, Number.NaN);
  const wheel = (event: WheelEvent): void => {
    event.preventDefault();
    const lines = event.deltaMode === 1 ? 16 : event.deltaMode === 2 ? 400 : 1;
    const { x, y } = at(event);
    const factor = Math.exp(-Math.max(-240, Math.min(240, event.deltaY * lines)) / 480);
    target.aim(zoomAbout(target.camera, target.stage, x, y, factor));
  };
  const key = (event: KeyboardEvent): void => {
    if (event.ctrlKey || event.altKey || event.metaKey) return;
    if (pressed(event.key, event.shiftKey, target)) event.preventDefault();
  };
  const reset = (): void => target.reset();
  const menu = (event: Event): void => event.preventDefault();
  const calm = (event: MouseEvent): void => event.preventDefault();
  const listeners = {
    pointerdown: down,
    pointermove: move,
    pointerup: up,
    pointercancel: up,
    pointerleave: leave,
    keydown: key,
    dblclick: reset,
    contextmenu: menu,
    mousedown: calm,
  } as unknown as Record<string, EventListener>;
  for (const [name, listener] of Object.entries(listeners)) element.addEventListener(name, listener);
  element.addEventListener('wheel', wheel, { passive: false });
  return () => {
    for (const [name, listener] of Object.entries(listeners)) element.removeEventListener(name, listener);
    element.removeEventListener('wheel', wheel);
  };
}

function pressed(key: string, shift: boolean, target: GestureTarget): boolean {
  const { camera, stage } = target;
  const step = KEY_TURN * stage.radius * camera.zoom;
  const turns: Readonly<Record<string, readonly [number, number]>> = {
    ArrowLeft: [step, 0],
    ArrowRight: [-step, 0],
    ArrowUp: [0, step],
    ArrowDown: [0, -step],
  };
  const turn = shift ? undefined : turns[key];
  if (turn) target.aim(orbit(camera, stage, turn[0], turn[1]));
  else if (key === '+' || key === '=') target.aim(zoomAbout(camera, stage, stage.x, stage.y, KEY_ZOOM));
  else if (key === '-' || key === '−') target.aim(zoomAbout(camera, stage, stage.x, stage.y, 1 / KEY_ZOOM));
  else if (key === '0') target.reset();
  else return false;
  return true;
}
