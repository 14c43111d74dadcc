import { beforeEach, describe, expect, test } from 'vitest';
import { Playhead } from '../../../viewer/state/index.ts';

// Frames that a test draws by hand.
function handFrames() {
  let waiting: ((nowMs: number) => void) | null = null;
  return {
    request(tick: (nowMs: number) => void) {
      waiting = tick;
      return 1;
    },
    cancel() {
      waiting = null;
    },
    draw(nowMs: number) {
      const tick = waiting;
      waiting = null;
      tick?.(nowMs);
    },
    get waiting() {
      return waiting !== null;
    },
  };
}

let frames: ReturnType<typeof handFrames>;
let rested: number[];
let playhead: Playhead;

beforeEach(() => {
  frames = handFrames();
  rested = [];
  playhead = new Playhead((step) => rested.push(step), frames);
  playhead.load([1, 2.5, 2.5, 4], 6);
});

describe('playhead', () => {
  test('runs at its speed in L per second and stops at the end', () => {
    playhead.speed = 2;
    playhead.play();
    frames.draw(1000);
    frames.draw(1100);
    expect(playhead.time).toBeCloseTo(0.2, 12);
    for (let now = 1200; now < 6000; now += 100) frames.draw(now);
    expect(playhead.time).toBe(6);
    expect(playhead.playing).toBe(false);
    expect(frames.waiting).toBe(false);
  });

  test('runs backward and stops at the hard process', () => {
    playhead.seek(0.3);
    playhead.reverse();
    frames.draw(0);
    frames.draw(100);
    expect(playhead.time).toBeCloseTo(0.2, 12);
    frames.draw(200);
    frames.draw(300);
    frames.draw(400);
    expect(playhead.time).toBe(0);
    expect(playhead.playing).toBe(false);
  });

  test('starts again from the far end when it stands at the near one', () => {
    playhead.toEnd();
    playhead.play();
    expect(playhead.time).toBe(0);
    playhead.toStart();
    playhead.reverse();
    expect(playhead.time).toBe(6);
  });

  test('does not jump after a long pause between frames', () => {
    playhead.play();
    frames.draw(0);
    frames.draw(60_000);
    expect(playhead.time).toBeLessThanOrEqual(0.25);
  });

  test('steps through every step, also through two at one time, and back', () => {
    for (let k = 0; k < 4; k++) playhead.stepForward();
    expect(rested).toEqual([0, 1, 2, 3]);
    expect(playhead.time).toBe(4);
    playhead.stepForward();
    expect(playhead.time).toBe(6);
    playhead.stepBack();
    playhead.stepBack();
    playhead.stepBack();
    playhead.stepBack();
    playhead.stepBack();
    expect(rested).toEqual([0, 1, 2, 3, 3, 2, 1, 0, -1]);
    expect(playhead.time).toBe(0);
  });

  test('steps back from between two steps to the one that was passed last', () => {
    playhead.seek(3);
    playhead.stepBack();
    expect(rested).toEqual([2]);
    expect(playhead.time).toBe(2.5);
  });

  test('stepping ends playback', () => {
    playhead.play();
    playhead.stepForward();
    expect(playhead.playing).toBe(false);
    expect(frames.waiting).toBe(false);
  });

  test('keeps its time inside the clock', () => {
    playhead.seek(99);
    expect(playhead.time).toBe(6);
    playhead.seek(-1);
    expect(playhead.time).toBe(0);
    playhead.seek(NaN);
    expect(playhead.time).toBe(0);
  });

  test('counts a step as passed exactly at its own time', () => {
    playhead.seek(2.5);
    expect(playhead.passed).toBe(2);
    playhead.seek(2.5 - 1e-12);
    expect(playhead.passed).toBe(0);
  });

  test('gives a step whose time is missing or falls the time of the one before', () => {
    playhead.load([1, NaN, 0.5, 3], 4);
    expect([0, 1, 2, 3].map((step) => playhead.timeOf(step))).toEqual([1, 1, 1, 3]);
  });

  test('reaches the last step although it lies beyond the declared end', () => {
    playhead.load([1, 7], 6);
    expect(playhead.end).toBe(7);
  });

  test('tells its listeners at once, and no longer after they left', () => {
    const heard: number[] = [];
    const leave = playhead.subscribe((time) => heard.push(time));
    playhead.seek(1);
    leave();
    playhead.seek(2);
    expect(heard).toEqual([0, 1]);
  });

  test('refuses a speed that is not above zero', () => {
    expect(() => {
      playhead.speed = 0;
    }).toThrow(RangeError);
  });
});
