export { BallElement } from './ball.ts';
