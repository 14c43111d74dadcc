import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { growEvent, KINDS, ROLES, resolveSettings } from '../../engine/index.ts';
import { FileBatch, historyToJson, jsonText } from '../../formats/index.ts';
import { addEvent, anyEvent, buildBatch, plainEvent, sampleHead } from './random-histories.ts';

describe('an event as JSON', () => {
  it('gives every double back with the same bits', () => {
    fc.assert(
      fc.property(anyEvent, (shape) => {
        const history = buildBatch(sampleHead(), [shape]).view(0);
        const read = JSON.parse(jsonText(historyToJson(history)));
        for (const name of ['t', 'z', 'kT'] as const) {
          const column = Array.from(history.steps[name], (value) => (Number.isNaN(value) ? null : value));
          expect(
            read.steps[name].map((value: unknown, k: number) => Object.is(value, column[k])),
          ).not.toContain(false);
        }
      }),
      { seed: 3, numRuns: 50 },
    );
  });

  it('prints words for codes, null for a missing number, and row numbers always', () => {
    const sample = sampleHead();
    const batch = buildBatch(sample, [plainEvent(4)]);
    batch.steps.alphaS[0] = NaN;
    batch.steps.partner[0] = -1;
    const json = historyToJson(batch.view(0));
    expect(json.steps.alphaS[0]).toBe(null);
    expect(json.steps.partner[0]).toBe(-1);
    expect(json.entries.role).toEqual(Array.from(batch.view(0).entries.role, (code) => ROLES[code]));
    expect(json.steps.kind).toEqual(Array.from(batch.view(0).steps.kind, (code) => KINDS[code]));
    expect(json.head.process).toEqual({ name: 'ee', incoming: [11, -11], outgoing: [2, -1] });
  });

  it('has no key for a column or table that was not recorded', () => {
    const json = historyToJson(growEvent(resolveSettings(), 17));
    expect(Object.keys(json)).toEqual(['head', 'entries', 'steps']);
    expect(json.steps).not.toHaveProperty('noEmission');
    expect(json.steps).toHaveProperty('t');
    const few = historyToJson(
      buildBatch(sampleHead({ entries: ['id'], trials: null }), [plainEvent(1)]).view(0),
    );
    expect(Object.keys(few.entries)).toEqual(['id']);
  });

  it('prints columns of an author, several numbers to a row as a list or null', () => {
    const batch = new FileBatch(sampleHead());
    addEvent(batch, plainEvent(1, 2));
    batch.own.steps = {
      pair: { values: Float64Array.of(NaN, NaN, 1, NaN), each: 2 },
      count: { values: Int32Array.of(-1, 7), each: 1 },
    };
    const { steps } = historyToJson(batch.view(0));
    expect(steps.pair).toEqual([null, [1, null]]);
    expect(steps.count).toEqual([-1, 7]);
  });

  it('prints a head with missing numbers as null', () => {
    const sample = { ...sampleHead(), hardScale: NaN, tLow: NaN };
    const { head } = historyToJson(buildBatch(sample, [plainEvent(1)]).view(0));
    expect([head.hardScale, head.tLow]).toEqual([null, null]);
  });
});

describe('jsonText', () => {
  it('prints what JSON.stringify cannot', () => {
    expect(jsonText([0, -0, Infinity, -Infinity, NaN, 2n ** 60n])).toBe(
      '[0,-0,1e999,-1e999,null,1152921504606846976]',
    );
    expect(JSON.parse(jsonText([-0, -Infinity]))).toEqual([-0, -Infinity]);
  });

  it('prints everything else as JSON.stringify does', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        fc.pre(
          !JSON.stringify(value, (_, item) => (Object.is(item, -0) ? 'negative' : item)).includes('negative'),
        );
        expect(jsonText(value)).toBe(JSON.stringify(value));
      }),
      { seed: 4 },
    );
  });
});
