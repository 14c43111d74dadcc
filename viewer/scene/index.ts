export { BallScene, type SceneMemory } from './ball-scene.ts';
export { SceneError } from './scene-error.ts';
