export type { Grower } from './dipole-shower.ts';
export { createGrower, growEvent } from './grow.ts';
export { RegrowError } from './resume.ts';
export {
  DEFAULT_SETTINGS,
  describeSettings,
  type GrowSettings,
  makeCoupling,
  resolveSettings,
  SettingError,
} from './settings.ts';
