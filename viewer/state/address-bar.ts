import { placeFragment, readPlace } from './address.ts';
import type { Store } from './store.ts';

/**
 * Keeps the fragment of the page's address at the event and step on the screen, so that it reopens them, and follows it
 * when it is changed by hand. @returns what ends that.
 */
export function followAddress(store: Store, page: Window): () => void {
  const write = (): void => {
    const { event, step, source, history } = store.state;
    // While an event is on its way the address keeps what was asked for.
    if (source.status !== 'ready' || !history) return;
    const fragment = placeFragment({ event, step });
    if (fragment !== page.location.hash)
      page.history.replaceState(null, '', fragment || page.location.pathname);
  };
  const read = (): void => {
    const { event, step } = readPlace(page.location.hash);
    const { source, event: shown } = store.state;
    if (source.status !== 'ready' || event < 0 || event >= source.eventCount) return;
    if (event === shown) store.selectStep(step);
    else void store.openEvent(event, step);
  };
  const leave = [store.subscribe((s) => s.history, write), store.subscribe((s) => s.step, write)];
  page.addEventListener('hashchange', read);
  return () => {
    for (const end of leave) end();
    page.removeEventListener('hashchange', read);
  };
}
