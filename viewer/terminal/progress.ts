/** How far long work is, on standard error, rewritten in its line. */
export interface Progress {
  /** `done` of the total are finished. Cheap: draws at most five times a second. */
  at(done: number): void;
  /** Take the line away. */
  end(): void;
}

const SILENT: Progress = { at: () => {}, end: () => {} };
const EVERY_MS = 200;

/** 1234567 as `1 234 567`. */
export const grouped = (count: number): string => String(count).replace(/\B(?=(\d{3})+$)/g, ' ');

/** A duration in the unit that suits it. */
export function duration(seconds: number): string {
  if (seconds < 99.5) return `${seconds < 9.95 ? seconds.toFixed(1) : seconds.toFixed(0)} s`;
  const minutes = Math.round(seconds / 60);
  return minutes < 100 ? `${minutes} min` : `${(minutes / 60).toFixed(1)} h`;
}

/** Bytes in kB, MB or GB (powers of ten). */
export function byteSize(bytes: number): string {
  if (bytes < 1000) return `${bytes} B`;
  const unit = bytes < 1e6 ? 1 : bytes < 1e9 ? 2 : 3;
  return `${(bytes / 1000 ** unit).toPrecision(3)} ${['', 'kB', 'MB', 'GB'][unit]}`;
}

/** Progress with rate and time left where standard error is a terminal and `quiet` is off, else nothing. */
export function startProgress(total: number, what: string, quiet: boolean): Progress {
  if (quiet || !process.stderr.isTTY) return SILENT;
  const start = performance.now();
  let drawn = start;
  let width = 0;
  const draw = (text: string): void => {
    process.stderr.write(`\r${text.padEnd(width)}`);
    width = text.length;
  };
  return {
    at(done) {
      const now = performance.now();
      if (now - drawn < EVERY_MS || done === 0) return;
      drawn = now;
      const rate = done / ((now - start) / 1000);
      const left = duration((total - done) / rate);
      draw(`${grouped(done)} of ${grouped(total)} ${what}, ${grouped(Math.round(rate))}/s, ${left} left`);
    },
    end() {
      if (width === 0) return;
      draw('');
      process.stderr.write('\r');
      width = 0;
    },
  };
}
