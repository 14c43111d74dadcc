import { basename } from 'node:path';
import { ShowerFileReader } from '../../formats/index.ts';
import { defineCommand } from './command.ts';
import { INTERRUPTED } from './errors.ts';
import { type FileSource, openInput } from './input.ts';
import { onInterruption } from './interruption.ts';
import { flag, integer } from './option.ts';
import { readPage } from './page-files.ts';
import { startServer } from './page-server.ts';
import { note, print } from './streams.ts';

/** `branchlight view`: the viewer in the browser, on a file or empty. */
export const view = defineCommand({
  name: 'view',
  purpose: 'serve the viewer on the loopback address and print its address',
  details: [
    'Prints http://127.0.0.1:PORT/TOKEN/ and serves until it is interrupted. The address is the key: whoever does not know it, other users of this machine included, gets nothing. Nothing is served but the viewer and FILE.',
    'FILE may be - for a sample on standard input; it is read to its end first. Without FILE the viewer starts empty and opens what is dropped on it.',
  ],
  operands: [{ name: 'FILE', required: false }],
  options: {
    port: integer(0, 65535, { purpose: 'port to listen on', otherwise: 'any that is free' }),
    quiet: flag('no word on standard error'),
  },
  async run(values, operands, place) {
    let sample: FileSource | null = null;
    if (operands.length > 0) {
      if (operands[0] === '-' && !values.quiet) note('reading standard input');
      sample = await openInput(operands[0]);
      // A file that the viewer could not open is refused here, where the reason can be read.
      await ShowerFileReader.open(sample);
    }
    const name = sample ? basename(sample.name) : '';
    const server = await startServer({ page: readPage(place.page), sample, name }, values.port ?? 0);
    const interruption = new Promise<void>((resolve) => onInterruption(resolve));
    await print(`${server.address}\n`);
    if (!values.quiet) note('serving until interrupted (Ctrl-C)');
    await interruption;
    await server.close();
    await sample?.close();
    return INTERRUPTED;
  },
});
