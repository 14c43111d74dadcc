import { once } from 'node:events';

/** Print on standard output, waiting where its reader is slow. */
export async function print(data: string | Uint8Array): Promise<void> {
  if (!process.stdout.write(data)) await once(process.stdout, 'drain');
}

/** One plain line on standard error. */
export function note(line: string): void {
  process.stderr.write(`branchlight: ${line}\n`);
}

/**
 * End quietly with 0 when the reader of standard output closes the pipe, and go on without notes when that of standard
 * error does.
 */
export function endWithReader(): void {
  process.stdout.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code !== 'EPIPE') note(`standard output: ${error.message} (cannot-write)`);
    process.exit(error.code === 'EPIPE' ? 0 : 3);
  });
  process.stderr.on('error', () => {});
}
