import { historyToJson, jsonText, ShowerFileReader } from '../../formats/index.ts';
import { defineCommand } from './command.ts';
import { DONE } from './errors.ts';
import { EVENT_RANGE, readEventRange, withinFile } from './event-range.ts';
import { eventText, headText } from './event-text.ts';
import { openInput } from './input.ts';
import { custom, flag } from './option.ts';
import { print } from './streams.ts';

/** `branchlight show`: head and events of a file as text or JSON. */
export const show = defineCommand({
  name: 'show',
  purpose: "print a file's head and the entries and steps of its events",
  details: [
    'As text, six digits a number, - where nothing was recorded; or with --json exactly the tables of the history, full precision, one object a line.',
  ],
  operands: [{ name: 'FILE', required: true }],
  options: {
    event: custom(EVENT_RANGE, { purpose: 'which events; A..B includes both', otherwise: 0 }, readEventRange),
    json: flag('one JSON object per event'),
    quiet: flag('no word on standard error'),
  },
  async run(values, operands) {
    const source = await openInput(operands[0]);
    const reader = await ShowerFileReader.open(source);
    const range = values.event ?? { from: 0, to: 0 };
    const { first, last } = withinFile(range, reader.eventCount, source.name);
    if (!values.json) {
      await print(`${source.name}: ${reader.eventCount} events\n${headText(reader.sample)}\n`);
    }
    for (let n = first; n <= last; n++) {
      const history = await reader.event(n);
      await print(values.json ? `${jsonText(historyToJson(history))}\n` : `\n${eventText(history)}`);
    }
    await source.close();
    return DONE;
  },
});
