import type { ReactiveController, ReactiveControllerHost } from 'lit';

/** Width and height of a component's box [px], drawn again whenever they change; 0 before the first layout. */
export class BoxSize implements ReactiveController {
  width = 0;
  height = 0;
  readonly #host: ReactiveControllerHost & HTMLElement;
  #observer: ResizeObserver | undefined;

  constructor(host: ReactiveControllerHost & HTMLElement) {
    this.#host = host;
    host.addController(this);
  }

  hostConnected(): void {
    this.#observer = new ResizeObserver(([entry]) => {
      const { width, height } = entry.contentRect;
      if (width === this.width && height === this.height) return;
      this.width = width;
      this.height = height;
      this.#host.requestUpdate();
    });
    this.#observer.observe(this.#host);
  }

  hostDisconnected(): void {
    this.#observer?.disconnect();
    this.#observer = undefined;
  }
}
