import { beforeInstallBreaches } from './before-install.ts';
import { cycleBreaches } from './cycles.ts';
import { doorBreaches } from './doors.ts';
import { layerBreaches } from './layers.ts';
import { numericsBreaches } from './numerics.ts';
import type { Breach, SourceSet } from './source-set.ts';
import { topLevelBreaches } from './top-level.ts';

/** Everything in which these files break the rules of the house. */
export function breachesOf(files: SourceSet): Breach[] {
  return [
    ...layerBreaches(files),
    ...doorBreaches(files),
    ...cycleBreaches(files),
    ...topLevelBreaches(files),
    ...numericsBreaches(files),
    ...beforeInstallBreaches(files),
  ];
}

/** As a person reads it. */
export const sentence = ({ rule, file, line, message }: Breach): string =>
  `${file}${line ? `:${line}` : ''} [${rule}] ${message}`;
