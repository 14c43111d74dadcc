import { type CoherentSettings, coherentEvents } from './coherent-sample.ts';
import { measuredSteps } from './engine-sample.ts';
import { type Estimate, StepFraction } from './independent/index.ts';

/** Of the steps whose emitter came from a step: the share that opens wider than that one did, by the momenta. */
export function wideFraction(settings: CoherentSettings, seed: number, events: number): Estimate {
  const fraction = new StepFraction();
  for (const history of coherentEvents(settings, seed, events)) {
    const { previous } = history.steps;
    let [wide, steps] = [0, 0];
    measuredSteps(history).forEach(({ openingAngle, birthAngle }, step) => {
      if (previous[step] < 0) return;
      steps++;
      if (openingAngle > birthAngle) wide++;
    });
    fraction.add(wide, steps);
  }
  return fraction.estimate();
}
