import { ContextProvider } from '@lit/context';
import { html, LitElement, nothing } from 'lit';
import { customElement, property } from 'lit/decorators.js';
import { blobSource } from '../../../formats/index.ts';
import {
  applyTheme,
  followAddress,
  SPEEDS,
  type Store,
  storeContext,
  type ViewerState,
} from '../../state/index.ts';
import type { BarElement, Command, CommandEvent, GoToEventEvent, NeighbourEvent } from '../bar/index.ts';
import '../angle-trail/index.ts';
import '../ball/index.ts';
import '../bar/index.ts';
import '../card/index.ts';
import '../clock/index.ts';
import '../events/index.ts';
import { type KeyCommand, keyCommand } from '../help/index.ts';
import '../notice/index.ts';
import { appStyles } from './app.styles.ts';
import { download } from './download.ts';
import { FileDrop } from './file-drop.ts';

/** Dots per CSS pixel of a saved picture. */
const PNG_SCALE = 3;

/** The whole workbench: one store handed down, one layout, the keys, files from wherever they come. */
@customElement('bl-app')
export class AppElement extends LitElement {
  static override styles = appStyles;

  /** Whether the list of events stands in the place of card and trail, in windows without a column for it. */
  @property({ type: Boolean, reflect: true, attribute: 'list-open' }) listOpen = false;

  readonly #provider = new ContextProvider(this, { context: storeContext });
  readonly #drop = new FileDrop(this, (file) => this.#openBlob(file));
  #store: Store | undefined;
  #state: ViewerState | undefined;
  #leave: (() => void)[] = [];

  /** The store of the workbench, set once by the page. */
  set store(store: Store) {
    this.#store = store;
    this.#provider.setValue(store);
    if (this.isConnected) this.#join();
  }
  get store(): Store | undefined {
    return this.#store;
  }

  override connectedCallback(): void {
    super.connectedCallback();
    addEventListener('keydown', this.#press);
    this.#join();
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    removeEventListener('keydown', this.#press);
    for (const end of this.#leave) end();
    this.#leave = [];
  }

  #join(): void {
    const store = this.#store;
    if (!store || this.#leave.length > 0) return;
    const redraw = (): void => {
      this.#state = store.state;
      this.requestUpdate();
    };
    this.#leave = [
      store.subscribe((s) => s.source, redraw),
      store.subscribe((s) => s.eventMessage, redraw),
      store.subscribe((s) => s.history === null, redraw),
      store.subscribe(
        (s) => s.theme,
        (theme) => applyTheme(document, theme),
      ),
      store.subscribe((s) => s.history?.head.event, this.#title),
      followAddress(store, window),
    ];
  }

  readonly #title = (event: number | undefined): void => {
    const { name } = this.#store!.state.source;
    document.title = event === undefined ? 'Branchlight' : `event ${event}, ${name} – Branchlight`;
  };

  override render() {
    const state = this.#state;
    if (!state) return nothing;
    const { source } = state;
    const shown = state.history !== null;
    return html`
      <div class="top">
        <bl-bar .savable=${shown} .listOpen=${this.listOpen}
          @bl-command=${this.#command} @bl-go-to-event=${this.#goTo} @bl-neighbour=${this.#neighbour}></bl-bar>
        ${
          source.status === 'ready' && source.message
            ? html`<div class="banner" role="alert"><b>damaged file</b> <span>${source.message}</span></div>`
            : nothing
        }
      </div>
      <bl-events></bl-events>
      ${
        shown
          ? html`<main class="centre"><bl-ball></bl-ball><bl-clock></bl-clock></main>
              <div class="right"><bl-angle-trail></bl-angle-trail><bl-card></bl-card></div>`
          : html`<main class="centre alone">${this.#notice(state)}</main>`
      }
      ${this.#drop.over ? html`<div class="drop">Drop to open</div>` : nothing}
      <input type="file" hidden accept=".shower,.part" @change=${this.#picked} />
      <bl-help></bl-help>
    `;
  }

  #notice({ source, event, eventMessage }: ViewerState) {
    const notice = (kind: string, message = '') =>
      html`<bl-notice kind=${kind} name=${source.name} .event=${event} .message=${message} @bl-command=${this.#command}></bl-notice>`;
    if (source.status === 'empty') return notice('empty');
    if (source.status === 'failed') return notice('failed', source.message ?? '');
    if (eventMessage !== null) return notice('event-failed', eventMessage);
    if (source.status === 'ready' && source.eventCount === 0) return notice('no-events');
    return notice('loading');
  }

  #openBlob(file: File): void {
    void this.#store?.openSource(blobSource(file, file.name));
  }

  readonly #picked = (event: Event): void => {
    const input = event.target as HTMLInputElement;
    const file = input.files?.[0];
    if (file) this.#openBlob(file);
    // The same file can be opened again.
    input.value = '';
  };

  readonly #goTo = (event: Event): void => {
    void this.#store?.openEvent((event as GoToEventEvent).number);
  };

  readonly #neighbour = (event: Event): void => {
    this.#part('bl-events')?.openNeighbour((event as NeighbourEvent).distance);
  };

  readonly #command = (event: Event): void => {
    this.#run((event as CommandEvent).command);
  };

  #part<K extends keyof HTMLElementTagNameMap>(tag: K): HTMLElementTagNameMap[K] | null {
    return this.renderRoot.querySelector(tag);
  }

  #run(command: Command): void {
    if (command === 'open') this.renderRoot.querySelector<HTMLInputElement>('input[type=file]')!.click();
    else if (command === 'events') this.listOpen = !this.listOpen;
    else if (command === 'help') this.#part('bl-help')!.toggle();
    else void this.#save(command);
  }

  async #save(command: 'save-svg' | 'save-png'): Promise<void> {
    const ball = this.#part('bl-ball');
    if (!ball) return;
    const name = `event-${this.#store!.state.event}`;
    if (command === 'save-svg')
      download(new Blob([ball.saveSvg()], { type: 'image/svg+xml' }), `${name}.svg`);
    else download(await ball.savePng(PNG_SCALE), `${name}.png`);
  }

  readonly #press = (event: KeyboardEvent): void => {
    if (event.defaultPrevented) return;
    const help = this.#part('bl-help');
    // An open list of keys keeps them to itself, but for the one that closes it.
    if (help?.open && event.key !== '?') return;
    const command = keyCommand(event, event.composedPath()[0] as Element | null);
    if (!command) return;
    event.preventDefault();
    this.#obey(command);
  };

  #obey(command: KeyCommand): void {
    const store = this.#store;
    if (!store) return;
    const { playhead } = store;
    const actions: Readonly<Record<KeyCommand, () => void>> = {
      toggle: () => playhead.toggle(),
      'step-forward': () => playhead.stepForward(),
      'step-back': () => playhead.stepBack(),
      play: () => playhead.play(),
      reverse: () => playhead.reverse(),
      'to-start': () => playhead.toStart(),
      'to-end': () => playhead.toEnd(),
      slower: () => this.#changeSpeed(-1),
      faster: () => this.#changeSpeed(1),
      'next-event': () => this.#part('bl-events')?.openNeighbour(1),
      'previous-event': () => this.#part('bl-events')?.openNeighbour(-1),
      'go-to-event': () => (this.#part('bl-bar') as BarElement | null)?.focusEvent(),
      clear: () => store.selectStep(-1),
      open: () => this.#run('open'),
      theme: () => store.setTheme(store.state.theme === 'dark' ? 'light' : 'dark'),
      help: () => this.#run('help'),
    };
    actions[command]();
  }

  #changeSpeed(direction: 1 | -1): void {
    const { playhead } = this.#store!;
    const known = SPEEDS as readonly number[];
    const next = known[known.indexOf(playhead.speed) + direction];
    if (next) playhead.speed = next;
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-app': AppElement;
  }
}
