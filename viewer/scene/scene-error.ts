/** Why the ball cannot be drawn by the graphics processor; the vector ball takes its place. */
export class SceneError extends Error {
  readonly code = 'no-webgl';
  constructor(found: string) {
    super(`The ball needs a WebGL 2 context, found ${found}. It is drawn as vector lines instead.`);
    this.name = 'SceneError';
  }
}
