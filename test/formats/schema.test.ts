import { describe, expect, it } from 'vitest';
import { createGrower, growEvent, HistoryBatch, resolveSettings, SampleSummary } from '../../engine/index.ts';
import { FileBatch, type FileHistory, historyToJson, jsonText } from '../../formats/index.ts';
import { schemaFaults } from './json-schema.ts';
import { addEvent, plainEvent, sampleHead } from './random-histories.ts';

/** A batch of an author with columns of his own. */
function foreign(): FileBatch {
  const batch = new FileBatch(sampleHead({ entries: ['id', 'role'] }), ['mine']);
  for (let n = 0; n < 30; n++) addEvent(batch, { ...plainEvent(n, 1), flavour: 'any' });
  batch.steps.boost?.fill(NaN, 0, 16);
  batch.steps.channel.fill(0);
  batch.trials?.channel.fill(0);
  const { length } = batch.steps;
  batch.own.steps = {
    matrix: { values: Float64Array.from({ length: 16 * length }, (_, k) => (k < 16 ? NaN : k)), each: 16 },
    mine: { values: new Float64Array(length), each: 1 },
  };
  return batch;
}

describe('history.schema.json', () => {
  it('is met by events of ours, with and without trials, and by foreign ones', () => {
    const grown = [false, true].map((trials) => growEvent(resolveSettings({ trials }), 17));
    const batch = foreign();
    const histories = [...grown, ...batch.events.map((_, n): FileHistory => batch.view(n))];
    expect(
      schemaFaults(
        'history.schema.json',
        histories.map((history) => jsonText(historyToJson(history))),
      ),
    ).toEqual([]);
  });

  it('is broken by what is no history', () => {
    const good = historyToJson(growEvent(resolveSettings(), 17));
    const bad = [
      {},
      { ...good, head: { ...good.head, status: 'fine' } },
      { ...good, entries: { ...good.entries, role: [1] } },
      { ...good, steps: { ...good.steps, i: [null] } },
      { ...good, steps: { ...good.steps, t: ['1'] } },
      { ...good, steps: { ...good.steps, boost: [[1, 2, 3]] } },
      { ...good, more: 1 },
    ];
    for (const document of bad)
      expect(schemaFaults('history.schema.json', [jsonText(document)])).not.toEqual([]);
  });
});

describe('summary.schema.json', () => {
  const summarised = (events: number) => {
    const grower = createGrower(resolveSettings());
    const batch = new HistoryBatch(grower.sample);
    const summary = new SampleSummary();
    for (let n = 0; n < events; n++) {
      grower.grow(batch, n);
      summary.add(batch.view(n));
    }
    return summary.result();
  };

  it('is met by the means of samples of any size', () => {
    const documents = [1, 2, 100].map((events) => JSON.stringify(summarised(events)));
    expect(schemaFaults('summary.schema.json', documents)).toEqual([]);
  });

  it('is broken by a missing key and by a fraction above 1', () => {
    const { partons: _partons, ...without } = summarised(10);
    const impossible = { ...summarised(10), noBranching: { mean: 1.5, error: 0, count: 10 } };
    for (const document of [without, impossible]) {
      expect(schemaFaults('summary.schema.json', [JSON.stringify(document)])).not.toEqual([]);
    }
  });
});
