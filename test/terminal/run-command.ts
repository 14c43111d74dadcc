import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';

const BIN = resolve('viewer/terminal/branchlight.mjs');

/** How a command ended. */
export interface Ended {
  /** Exit status, or the signal that ended it. */
  readonly status: number | string | null;
  readonly stdout: string;
  readonly stderr: string;
  readonly bytes: Buffer;
}

/** The command line as a process, its output not yet read. */
export function start(words: readonly string[], cwd: string): ChildProcess {
  return spawn(process.execPath, [BIN, ...words], { cwd, stdio: ['pipe', 'pipe', 'pipe'] });
}

/** Output and end of a started command. */
export function ended(child: ChildProcess): Promise<Ended> {
  const out: Buffer[] = [];
  const err: Buffer[] = [];
  child.stdout?.on('data', (piece: Buffer) => out.push(piece));
  child.stderr?.on('data', (piece: Buffer) => err.push(piece));
  return new Promise((done) => {
    child.on('close', (status, signal) => {
      const bytes = Buffer.concat(out);
      done({
        status: signal ?? status,
        stdout: bytes.toString(),
        stderr: Buffer.concat(err).toString(),
        bytes,
      });
    });
  });
}

/** Run the command line to its end. */
export function branchlight(
  words: readonly string[],
  { cwd, input }: { cwd: string; input?: Uint8Array },
): Promise<Ended> {
  const child = start(words, cwd);
  // A command that refuses its arguments closes its input unread.
  child.stdin?.on('error', () => {});
  child.stdin?.end(input);
  return ended(child);
}

/** Run a line of a shell in which `branchlight` is the command. */
export function shell(line: string, cwd: string): Promise<Ended> {
  const defined = `branchlight() { "${process.execPath}" "${BIN}" "$@"; }; ${line}`;
  return ended(spawn('bash', ['-c', defined], { cwd, stdio: ['ignore', 'pipe', 'pipe'] }));
}

/** A folder of its own, and how to remove it. */
export function scratchFolder(): { readonly path: string; remove(): void } {
  const path = mkdtempSync(join(tmpdir(), 'branchlight-test-'));
  return { path, remove: () => rmSync(path, { recursive: true, force: true }) };
}
