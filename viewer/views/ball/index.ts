export { BallElement } from './ball.ts';
export type { HarnessPage } from './harness-page.ts';
