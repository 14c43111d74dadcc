import type { Breach, SourceSet } from './source-set.ts';

const FOLDERS = new Set(['engine', 'formats', 'viewer', 'public', 'test', '.ci', '.github', '.gitlab']);
const FILES = [
  /^package(-lock)?\.json$/,
  /^(LICENSE|(README|CHANGELOG|DEVELOPERS|FORMATS)\.md|index\.html|biome\.json|\.npmrc|\.editorconfig)$/,
  /^tsconfig[\w.-]*\.json$/,
  /^(vite|vitest)[\w.-]*\.ts$/,
  /^\.git[\w-]+$/,
];

/** Files and folders at top level, or vague names anywhere, that the house does not know. */
export function topLevelBreaches(files: SourceSet): Breach[] {
  const breaches: Breach[] = [];
  const refused = new Set<string>();
  for (const path of files.keys()) {
    const names = path.split('/');
    const vague = names.find((name) => /^(utils?|helpers?|misc)(\.|$)/i.test(name));
    if (vague !== undefined)
      breaches.push({ rule: 'name', file: path, line: 0, message: `'${vague}' names no concept` });
    const allowed = names.length > 1 ? FOLDERS.has(names[0]) : FILES.some((pattern) => pattern.test(path));
    if (allowed || refused.has(names[0])) continue;
    refused.add(names[0]);
    breaches.push({ rule: 'top-level', file: names[0], line: 0, message: 'does not belong at top level' });
  }
  return breaches;
}
