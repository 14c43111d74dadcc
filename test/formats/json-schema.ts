import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const VALIDATOR = fileURLToPath(new URL('validate.py', import.meta.url));

/** What in JSON texts is not as a schema in `formats/` says, in words; empty where all is. Needs Debian's python3-jsonschema. */
export function schemaFaults(schema: string, documents: readonly string[]): string[] {
  const path = fileURLToPath(new URL(`../../formats/${schema}`, import.meta.url));
  const input = documents.map((text) => `${text.trim()}\n`).join('');
  const output = execFileSync('/usr/bin/python3', [VALIDATOR, path], {
    input,
    encoding: 'utf8',
    maxBuffer: 1 << 28,
  });
  return output.split('\n').filter((line) => line !== '');
}
