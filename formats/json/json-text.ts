/**
 * JSON text of a plain value on one line; reading it back gives the same bits of every number.
 *
 * Unlike JSON.stringify it keeps the sign of -0, writes infinities as 1e999 and -1e999, which every reader turns into infinities
 * again, and big integers as digits. NaN becomes null, bytes an array of numbers.
 */
export function jsonText(value: unknown): string {
  switch (typeof value) {
    case 'number':
      return numberText(value);
    case 'bigint':
      return value.toString();
    case 'object':
      break;
    default:
      return JSON.stringify(value) ?? 'null';
  }
  if (value === null) return 'null';
  if (Array.isArray(value)) return `[${value.map(jsonText).join(',')}]`;
  if (value instanceof Uint8Array) return `[${value.join(',')}]`;
  const members: string[] = [];
  for (const [key, member] of Object.entries(value)) {
    if (member !== undefined) members.push(`${JSON.stringify(key)}:${jsonText(member)}`);
  }
  return `{${members.join(',')}}`;
}

function numberText(value: number): string {
  if (value === 0) return Object.is(value, -0) ? '-0' : '0';
  if (Number.isFinite(value)) return String(value);
  return Number.isNaN(value) ? 'null' : value > 0 ? '1e999' : '-1e999';
}
