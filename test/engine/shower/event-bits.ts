import {
  createGrower,
  ENTRY_COLUMNS,
  type GrowSettings,
  type History,
  HistoryBatch,
  resolveSettings,
  STEP_COLUMNS,
} from '../../../engine/index.ts';

/**
 * A 64-bit hash of every bit of the histories of `count` events, as hexadecimal text.
 *
 * Runs in Node and in a browser page alike. FNV-1a in two 32-bit lanes over the bytes of the columns.
 */
export function eventBits(settings: Partial<GrowSettings>, count: number): string {
  const lanes = new Uint32Array([0x811c9dc5, 0x01234567]);
  const grower = createGrower(resolveSettings(settings));
  const batch = new HistoryBatch(grower.sample);
  for (let event = 0; event < count; event++) {
    batch.clear();
    grower.grow(batch, event);
    hashHistory(lanes, batch.view(0));
  }
  return [...lanes].map((lane) => lane.toString(16).padStart(8, '0')).join('');
}

function hashHistory(lanes: Uint32Array, history: History): void {
  const tables: [object, readonly { name: string }[]][] = [
    [history.entries, ENTRY_COLUMNS],
    [history.steps, STEP_COLUMNS],
  ];
  for (const [table, specs] of tables) {
    for (const { name } of specs) {
      const column = (table as Record<string, ArrayBufferView>)[name];
      const bytes = new Uint8Array(column.buffer, column.byteOffset, column.byteLength);
      for (const byte of bytes) {
        lanes[0] = Math.imul(lanes[0] ^ byte, 0x01000193);
        lanes[1] = Math.imul(lanes[1] ^ byte, 0x01000193) + 1;
      }
    }
  }
}

/** The samples whose bits are compared between Node and browsers. */
export const BIT_SAMPLES: readonly Partial<GrowSettings>[] = [
  { seed: 1 },
  { seed: 2, energy: 1000, order: 'virtuality', coupling: { kind: 'two-loop' } },
  { seed: 3, shower: 'coherent', energy: 1000, masses: true },
  {
    seed: 4,
    shower: 'coherent',
    coherence: false,
    process: 'scalar-gg',
    energy: 300,
    coupling: { kind: 'two-loop' },
  },
];
