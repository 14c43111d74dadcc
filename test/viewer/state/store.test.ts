import { describe, expect, test } from 'vitest';
import { measureSteps } from '../../../engine/index.ts';
import { type OpenedFile, Store } from '../../../viewer/state/index.ts';
import { fileOf, sampleHistories } from '../views/sample-file.ts';

const histories = sampleHistories(12).map((history, event) => ({
  ...history,
  head: { ...history.head, event },
}));
const busy = histories.findIndex(({ steps }) => steps.length >= 6);
const source = (name: string) => ({ name, size: async () => 0, read: async () => new Uint8Array(0) });
const still = { request: () => 0, cancel: () => {} };

function storeOf(
  open: () => Promise<OpenedFile> = async () => ({ file: fileOf(histories), warning: null }),
): Store {
  return new Store({ open, measure: measureSteps, frames: still });
}

// A promise that the test settles by hand.
function delayed<T>() {
  let settle!: (value: T) => void;
  const promise = new Promise<T>((resolve) => {
    settle = resolve;
  });
  return { promise, settle };
}

describe('opening a file', () => {
  test('shows its first event at the hard process', async () => {
    const store = storeOf();
    await store.openSource(source('a.shower'));
    expect(store.state.source).toEqual({ status: 'ready', name: 'a.shower', eventCount: 12, message: null });
    expect(store.state.event).toBe(0);
    expect(store.state.history).toBe(histories[0]);
    expect(store.state.step).toBe(-1);
    expect(store.playhead.time).toBe(0);
  });

  test('reopens a place, and the nearest event where the file has fewer', async () => {
    const store = storeOf();
    await store.openSource(source('a'), busy, 3);
    expect(store.state).toMatchObject({ event: busy, step: 3 });
    expect(store.playhead.passed).toBe(3);
    await store.openSource(source('a'), 500, 9999);
    expect(store.state).toMatchObject({ event: 11, step: -1 });
  });

  test('keeps the message of a damaged file as long as it is open', async () => {
    const store = storeOf(async () => ({ file: fileOf(histories), warning: 'lost from byte 100000' }));
    await store.openSource(source('b'));
    await store.openEvent(3);
    store.selectStep(0);
    expect(store.state.source).toMatchObject({ status: 'ready', message: 'lost from byte 100000' });
  });

  test('says why a file could not be opened, and shows nothing of the one before', async () => {
    let files = 0;
    const store = storeOf(async () => {
      if (files++ > 0) throw new Error('expected a branchlight file');
      return { file: fileOf(histories), warning: null };
    });
    await store.openSource(source('a'));
    await store.openSource(source('b'));
    expect(store.state.source).toEqual({
      status: 'failed',
      name: 'b',
      eventCount: 0,
      message: 'expected a branchlight file',
    });
    expect(store.state.history).toBeNull();
    expect(store.file).toBeNull();
    await expect(store.openEvent(0)).rejects.toThrow(RangeError);
  });

  test('lets the file asked for last win, whichever answers first', async () => {
    const slow = delayed<OpenedFile>();
    let closed = 0;
    const answers = [slow.promise, Promise.resolve({ file: fileOf(histories.slice(0, 5)), warning: null })];
    const store = storeOf(() => answers.shift()!);
    const first = store.openSource(source('slow'));
    await store.openSource(source('quick'));
    slow.settle({ file: { ...fileOf(histories), close: () => void closed++ }, warning: null });
    await first;
    expect(store.state.source).toMatchObject({ name: 'quick', eventCount: 5 });
    expect(closed).toBe(1);
  });

  test('keeps the theme', async () => {
    const store = storeOf();
    store.setTheme('dark');
    await store.openSource(source('a'));
    expect(store.state.theme).toBe('dark');
  });
});

describe('opening an event', () => {
  test('lets the event asked for last win', async () => {
    const slow = delayed<(typeof histories)[0]>();
    const file = fileOf(histories);
    const store = storeOf(async () => ({
      file: { ...file, event: (n) => (n === 1 ? slow.promise : file.event(n)) },
      warning: null,
    }));
    await store.openSource(source('a'));
    const first = store.openEvent(1);
    await store.openEvent(2);
    slow.settle(histories[1]);
    await first;
    expect(store.state.history).toBe(histories[2]);
    expect(store.state.event).toBe(2);
  });

  test('says why it could not be read, and the next one opens again', async () => {
    const file = fileOf(histories);
    const store = storeOf(async () => ({
      file: {
        ...file,
        event: async (n) => (n === 1 ? Promise.reject(new Error('wrong checksum')) : file.event(n)),
      },
      warning: null,
    }));
    await store.openSource(source('a'));
    await store.openEvent(1);
    expect(store.state).toMatchObject({ event: 1, eventMessage: 'wrong checksum', history: null });
    await store.openEvent(2);
    expect(store.state).toMatchObject({ event: 2, eventMessage: null, history: histories[2] });
    expect(store.state.source).toMatchObject({ status: 'ready', message: 'wrong checksum' });
  });

  test('refuses a number that the file lacks and changes nothing', async () => {
    const store = storeOf();
    await store.openSource(source('a'));
    for (const n of [-1, 12, 1.5, NaN]) await expect(store.openEvent(n)).rejects.toThrow(RangeError);
    expect(store.state.history).toBe(histories[0]);
  });
});

describe('selection and clock', () => {
  test('stepping selects the step and moves the clock to its own time', async () => {
    const store = storeOf();
    await store.openSource(source('a'), busy);
    const { evolutionTime } = store.state.measures!;
    store.playhead.stepForward();
    store.playhead.stepForward();
    expect(store.state.step).toBe(1);
    expect(store.playhead.time).toBe(evolutionTime[1]);
    store.playhead.stepBack();
    store.playhead.stepBack();
    expect(store.state.step).toBe(-1);
    expect(store.playhead.time).toBe(0);
  });

  test('selecting a step of the past leaves the clock, one of the future takes it along', async () => {
    const store = storeOf();
    await store.openSource(source('a'), busy);
    store.playhead.toEnd();
    store.selectStep(2);
    expect(store.playhead.time).toBe(store.playhead.end);
    store.playhead.toStart();
    store.selectStep(4);
    expect(store.playhead.time).toBe(store.state.measures!.evolutionTime[4]);
    expect(store.state.step).toBe(4);
  });

  test('a step that the event lacks clears the selection', async () => {
    const store = storeOf();
    await store.openSource(source('a'), busy, 2);
    store.selectStep(99);
    expect(store.state.step).toBe(-1);
  });

  test('listeners hear of their own slice alone', async () => {
    const store = storeOf();
    await store.openSource(source('a'), busy);
    const heard: number[] = [];
    const leave = store.subscribe(
      (s) => s.step,
      (step) => heard.push(step),
    );
    store.setHoverStep(1);
    store.setTheme('dark');
    store.selectStep(0);
    store.selectStep(0);
    leave();
    store.selectStep(1);
    expect(heard).toEqual([-1, 0]);
  });
});
