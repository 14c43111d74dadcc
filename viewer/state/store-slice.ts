import { ContextConsumer } from '@lit/context';
import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { Store, ViewerState } from './store.ts';
import { storeContext } from './store-context.ts';

/**
 * Keeps a component up to date with one slice of the store: it is drawn again when the slice becomes another value.
 *
 * `value` is undefined until the component is connected below a store.
 */
export class StoreSlice<T> implements ReactiveController {
  value: T | undefined;
  readonly #slice: (state: ViewerState) => T;
  readonly #host: ReactiveControllerHost & HTMLElement;
  readonly #context: ContextConsumer<typeof storeContext, ReactiveControllerHost & HTMLElement>;
  #store: Store | undefined;
  #leave: (() => void) | undefined;

  constructor(host: ReactiveControllerHost & HTMLElement, slice: (state: ViewerState) => T) {
    this.#host = host;
    this.#slice = slice;
    host.addController(this);
    this.#context = new ContextConsumer(host, {
      context: storeContext,
      callback: (store) => this.#join(store),
    });
  }

  /** The store itself, undefined until the component is connected below one. */
  get store(): Store | undefined {
    return this.#store;
  }

  hostConnected(): void {
    if (this.#context.value) this.#join(this.#context.value);
  }

  hostDisconnected(): void {
    this.#leave?.();
    this.#leave = undefined;
  }

  #join(store: Store): void {
    this.#leave?.();
    this.#store = store;
    this.#leave = store.subscribe(this.#slice, (value) => {
      this.value = value;
      this.#host.requestUpdate();
    });
  }
}
