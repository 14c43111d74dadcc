import { type EngineFigures, engineTable } from './engine.ts';
import { type FileFigures, fileBench } from './file.ts';
import { type GapFigures, gapTable } from './gaps.ts';
import { type SceneFigures, sceneTable } from './scene.ts';
import { type StartFigures, startTable } from './start-up.ts';

function printEngine(rows: readonly EngineFigures[]): void {
  console.log('engine, one thread, all columns recorded, fastest of eight rounds');
  console.log(
    ['steps/event', 'events/s', 'ns/step', 'ns/trial', 'bytes/event', 'step/calibration']
      .map((head) => head.padStart(17))
      .join(''),
  );
  for (const row of rows) {
    const figures = [
      row.stepsPerEvent.toFixed(2),
      row.eventsPerSecond.toFixed(0),
      row.nsPerStep.toFixed(0),
      row.nsPerTrial.toFixed(0),
      row.bytesPerEvent.toFixed(0),
      row.stepRatio.toFixed(0),
    ];
    console.log(`${figures.map((figure) => figure.padStart(17)).join('')}   ${row.label}`);
  }
}

function printStart(rows: readonly StartFigures[]): void {
  console.log('start-up, median of nine, and over a bare node');
  for (const { words, ms, ratio } of rows)
    console.log(`${ms.toFixed(0).padStart(6)} ms ${ratio.toFixed(2).padStart(6)}   ${words}`);
}

function printFile(rows: readonly FileFigures[]): void {
  console.log('native file in memory, one thread, fastest round');
  const heads = ['written/s', 'read/s', 'mended/s', 'write/grow', 'bytes/event', 'open ms', 'event ms'];
  console.log(heads.map((head) => head.padStart(13)).join(''));
  for (const row of rows) {
    const figures = [
      row.writtenPerSecond.toFixed(0),
      row.readPerSecond.toFixed(0),
      row.recoveredPerSecond.toFixed(0),
      row.writeOverGrow.toFixed(2),
      row.fileBytesPerEvent.toFixed(0),
      row.openMs.toFixed(2),
      row.eventMs.toFixed(2),
    ];
    console.log(`${figures.map((figure) => figure.padStart(13)).join('')}   ${row.label}`);
  }
}

function printScene(rows: readonly SceneFigures[]): void {
  console.log('ball at 1280 x 720 on the software renderer');
  console.log(
    ['steps', 'frames/s', 'cpu ms/frame', 'cpu/kilocalib'].map((head) => head.padStart(14)).join(''),
  );
  for (const { words, steps, framesPerSecond, cpuMs, ratio } of rows) {
    const figures = [String(steps), framesPerSecond.toFixed(1), cpuMs.toFixed(1), ratio.toFixed(1)];
    console.log(`${figures.map((figure) => figure.padStart(14)).join('')}   ${words}`);
  }
}

function printGaps(rows: readonly GapFigures[]): void {
  console.log('no-emission probabilities of events in memory, one thread, fastest of seven rounds');
  const heads = ['gaps/event', 'us/gap', 'gap/calib.', 'us/step', 'step/calib.', 'tables ms'];
  console.log(heads.map((head) => head.padStart(12)).join(''));
  for (const row of rows) {
    const figures = [
      row.gapsPerEvent.toFixed(1),
      row.microsecondsPerGap.toFixed(2),
      row.gapRatio.toFixed(0),
      row.microsecondsPerStep.toFixed(2),
      row.stepRatio.toFixed(0),
      row.tablesMs.toFixed(0),
    ];
    console.log(`${figures.map((figure) => figure.padStart(12)).join('')}   ${row.label}`);
  }
}

const parts: Record<string, () => void | Promise<void>> = {
  engine: () => printEngine(engineTable()),
  file: async () =>
    printFile([
      await fileBench('91.1876 GeV', {}, 6400),
      await fileBench('1000 GeV, trials', { energy: 1000, trials: true }, 1280),
    ]),
  gaps: () => printGaps(gapTable()),
  scene: async () => printScene(await sceneTable()),
  'start-up': () => printStart(startTable()),
};

const asked = process.argv.slice(2);
for (const name of asked.length > 0 ? asked : Object.keys(parts)) {
  const part = parts[name];
  if (!part) {
    console.error(`bench ${name}: expected ${Object.keys(parts).join(' or ')}`);
    process.exitCode = 2;
    break;
  }
  await part();
}
