import { createContext } from '@lit/context';
import type { Store } from './store.ts';

/** Key under which the workbench hands its store down to every component. */
export const storeContext = createContext<Store>(Symbol('branchlight store'));
