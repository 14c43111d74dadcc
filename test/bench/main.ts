import { type EngineFigures, engineTable } from './engine.ts';
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

const parts: Record<string, () => void | Promise<void>> = {
  engine: () => printEngine(engineTable()),
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
