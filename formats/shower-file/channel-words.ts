import type { HistoryBatch } from '../../engine/index.ts';
import type { ColumnPart } from './group-writer.ts';

const MOST_CHANNELS = 256;

/** The channel words of a chunk: those of the file, and behind them what its events use besides, in the order of use. */
export class ChannelWords {
  /** All words, where there are more than the file's head has. */
  readonly own: readonly string[] | undefined;
  private readonly codes: Uint8Array | null;

  /** @throws RangeError for more than 256 words or a code without a word. */
  constructor(known: readonly string[], batch: HistoryBatch, from: number, to: number) {
    if (batch.channels.length <= known.length && batch.channels.every((word, k) => word === known[k])) {
      this.codes = null;
      return;
    }
    const words = [...known];
    const codes = new Uint8Array(256);
    const seen = new Uint8Array(256);
    const use = (column: Uint8Array, start: number, end: number) => {
      for (let row = start; row < end; row++) {
        const code = column[row];
        if (seen[code] === 1) continue;
        seen[code] = 1;
        codes[code] = wordCode(words, batch.channels[code] ?? missing(code));
      }
    };
    use(batch.steps.channel, batch.stepStart[from], batch.stepStart[to]);
    if (batch.trials) use(batch.trials.channel, batch.trialStart[from], batch.trialStart[to]);
    this.codes = codes;
    if (words.length > known.length) this.own = words;
  }

  /** The part of a channel column with the codes of this chunk. */
  translated(part: ColumnPart): ColumnPart {
    const { codes } = this;
    if (!codes) return part;
    const values = Uint8Array.from(part.values.subarray(part.start, part.end), (code) => codes[code]);
    return { ...part, values, start: 0, end: values.length };
  }
}

/** The code of a word in a list that gets it where it has not. */
export function wordCode(words: string[], word: string): number {
  const code = words.indexOf(word);
  if (code >= 0) return code;
  if (words.length === MOST_CHANNELS)
    throw new RangeError(`channel ${word}: more than ${MOST_CHANNELS} channels`);
  words.push(word);
  return words.length - 1;
}

function missing(code: number): never {
  throw new RangeError(`channel code ${code} has no word`);
}
