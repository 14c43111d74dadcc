import { extname } from 'node:path';
import { type Loss, type Recovery, recover, ShowerFileWriter } from '../../formats/index.ts';
import { defineCommand } from './command.ts';
import { DONE, WrongUse } from './errors.ts';
import { type FileSource, openInput } from './input.ts';
import { flag, oneOf } from './option.ts';
import { openOutput } from './output.ts';
import { grouped, startProgress } from './progress.ts';
import { note } from './streams.ts';

const FORMATS = ['shower'] as const;

/** The format of a file by its extension, unless it was named. A stream has no extension and is native. */
function demandFormat(name: string, option: 'from' | 'to', named: string | undefined): void {
  const extension = name === '-' ? 'shower' : extname(name).slice(1);
  if (named !== undefined || FORMATS.some((format) => format === extension)) return;
  throw new WrongUse(
    'unknown-format',
    `${name}: "${extension}" names no format; the formats are ${FORMATS.join(', ')}, --${option} names one`,
  );
}

function sayLoss({ fromByte, toByte, events, reason }: Loss): void {
  const which =
    events === null
      ? 'no event'
      : events.last === null
        ? `what came from event ${events.first} on`
        : `events ${events.first} to ${events.last}`;
  note(`lost: bytes ${fromByte} to ${toByte - 1}, ${which} (${reason.message}) (${reason.code})`);
}

/** Write what a recovery found. @returns the name of the new file. */
async function write(found: Recovery, name: string, quiet: boolean): Promise<string> {
  const { reader } = found;
  const out = await openOutput(name);
  const writer = new ShowerFileWriter(out, reader.sample, reader.channels, reader.unknown);
  const progress = startProgress(found.eventCount, 'events', quiet);
  let done = 0;
  for await (const batch of reader.batches()) {
    await writer.append(batch);
    done += batch.events.length;
    progress.at(done);
  }
  await writer.finish();
  progress.end();
  await out.finish();
  return out.name;
}

async function mend(source: FileSource, name: string, quiet: boolean): Promise<void> {
  const found = await recover(source);
  const written = await write(found, name, quiet);
  // What was lost is said even with --quiet: the new file does not show it.
  found.losses.forEach(sayLoss);
  if (found.losses.length > 0) note(`the last good event before that is ${found.lastGoodEvent}`);
  if (!quiet || found.losses.length > 0) note(`${written}: ${grouped(found.eventCount)} events`);
}

/** `branchlight convert`: for now from the native format to itself, which mends. */
export const convert = defineCommand({
  name: 'convert',
  purpose: 'write what is whole of a damaged file as a new one',
  details: [
    'Names the last good event, says on standard error what was lost, and ends with 0. A file that is whole is written again as it is. Formats by extension: .shower.',
  ],
  operands: [
    { name: 'IN', required: true },
    { name: 'OUT', required: true },
  ],
  options: {
    from: oneOf(FORMATS, { purpose: 'format of IN', otherwise: 'by its extension' }),
    to: oneOf(FORMATS, { purpose: 'format of OUT', otherwise: 'by its extension' }),
    quiet: flag('no progress and no closing line where nothing was lost'),
  },
  async run(values, [from, to]) {
    demandFormat(from, 'from', values.from);
    demandFormat(to, 'to', values.to);
    const source = await openInput(from);
    await mend(source, to, values.quiet ?? false);
    await source.close();
    return DONE;
  },
});
