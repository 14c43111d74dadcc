import { DEFAULT_SETTINGS, describeSettings, type Head, type SettingValue } from '../../../engine/index.ts';

const DEFAULTS: Readonly<Record<string, SettingValue>> = describeSettings(DEFAULT_SETTINGS);

/** The command line's words for a setting; none where it is the default, which never changes. */
function optionWords(name: string, value: SettingValue): string[] {
  if (value === null || value === DEFAULTS[name]) return [];
  if (typeof value === 'boolean') return value ? [`--${name}`] : [];
  return [`--${name}`, String(value)];
}

/**
 * The command that makes an event again: its author's own words, for an event of ours the `grow` whose last event it is; null
 * where neither is known.
 */
export function rerunCommand(
  head: Pick<Head, 'rerun' | 'producer' | 'seed' | 'stream' | 'shower'>,
): string | null {
  const { rerun, producer, seed, stream, shower } = head;
  if (rerun !== null) return rerun;
  if (producer.name !== 'branchlight' || seed === null || stream === null) return null;
  const settings = Object.entries(shower).flatMap(([name, value]) => optionWords(name, value));
  const words = [
    'branchlight',
    'grow',
    ...settings,
    '--seed',
    seed,
    '--events',
    stream + 1,
    '--out',
    'again.shower',
  ];
  return words.join(' ');
}
