export { AppElement } from './app.ts';
