import { ContextProvider } from '@lit/context';
import { type GrowSettings, growEvent, measureSteps, resolveSettings } from '../../../engine/index.ts';
import { plain, widthOf } from '../../marks/index.ts';
import { applyTheme, type EventFile, installTheme, Store, storeContext } from '../../state/index.ts';
import { BallElement } from './ball.ts';
import type { HarnessPage } from './harness-page.ts';

/** Events grown on the spot, behind the interface of an open file. */
function grownFile(settings: GrowSettings): EventFile {
  const first = growEvent(settings, 0);
  return {
    sample: first.head,
    eventCount: 1_000_000,
    event: async (n) => growEvent(settings, n),
    summaries: async () => ({ branchings: [], finalPartons: [], hardestKT: [], worstCoherence: [] }),
  };
}

/** The ball under a store of its own, for tests and for looking: what is grown and shown is said by the address. */
class HarnessElement extends HTMLElement {
  readonly store = new Store({
    open: async () => ({ file: this.file, warning: null }),
    measure: measureSteps,
  });
  file: EventFile = grownFile(resolveSettings({}));

  connectedCallback(): void {
    new ContextProvider(this, { context: storeContext, initialValue: this.store });
    if (!this.firstElementChild) this.append(new BallElement());
  }
}
customElements.define('bl-ball-harness', HarnessElement);

const asked = new URLSearchParams(location.search);
const number = (name: string, otherwise: number): number => Number(asked.get(name) ?? otherwise);

async function show(): Promise<void> {
  installTheme(document);
  const harness = document.querySelector<HarnessElement>('bl-ball-harness')!;
  const coupling = asked.has('coupling')
    ? { coupling: { kind: 'fixed' as const, value: number('coupling', 0.118) } }
    : {};
  const settings = resolveSettings({
    energy: number('energy', 1000),
    cutoff: number('cutoff', 1),
    seed: number('seed', 1),
    ...coupling,
  });
  harness.file = grownFile(settings);
  const { store } = harness;
  if (asked.get('theme') === 'dark') store.setTheme('dark');
  applyTheme(document, store.state.theme);
  if (asked.has('vector')) harness.querySelector('bl-ball')!.vector = true;
  const least = number('least', 0);
  let event = number('event', 0);
  if (least > 0) while (growEvent(settings, event).steps.length < least) event++;
  if (asked.has('silent')) while (growEvent(settings, event).steps.length > 0) event++;
  const nothing = { name: 'grown', size: async () => 0, read: async () => new Uint8Array() };
  await store.openSource(nothing, event, number('step', -1));
  const { playhead } = store;
  if (asked.has('time')) playhead.seek(number('time', 1) * playhead.end);
  const page: HarnessPage = {
    harness,
    store,
    ball: harness.querySelector('bl-ball')!,
    widthOfRuns: (text, bold, size) => widthOf(plain(text, bold), size),
  };
  Object.assign(globalThis, page);
}

void show();
