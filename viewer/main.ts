import './fonts/fonts.css';
import './page.css';
import { measureSteps } from '../engine/index.ts';
import { type ByteSource, urlSource } from '../formats/index.ts';
import { installTheme, openShowerFile, readPlace, Store } from './state/index.ts';
import './views/app/index.ts';

/** The file that the page was served with, null where it came without one. */
async function servedFile(): Promise<ByteSource | null> {
  const response = await fetch('session.json').catch(() => null);
  if (!response?.ok) return null;
  const session: { file: { name: string; address: string } | null } = await response.json();
  return session.file && urlSource(new URL(session.file.address, document.baseURI), session.file.name);
}

installTheme(document);
const store = new Store({ open: openShowerFile, measure: (history) => measureSteps(history) });
document.querySelector('bl-app')!.store = store;

const place = readPlace(location.hash);
const source = await servedFile();
if (source) await store.openSource(source, place.event, place.step);
