/**
 * Blend two tints, each #RRGGBB, in the display's own encoding.
 *
 * @param share 0: `from`, 1: `to`.
 * @throws TypeError for anything but #RRGGBB.
 */
export function mix(from: string, to: string, share: number): string {
  const a = channels(from);
  const b = channels(to);
  const f = Math.max(0, Math.min(1, share));
  return `#${a.map((value, k) => hex(Math.round(value + (b[k] - value) * f))).join('')}`;
}

/** Red, green and blue of a tint, 0 to 255. @throws TypeError for anything but #RRGGBB. */
export function channels(tint: string): [number, number, number] {
  if (!/^#[0-9a-f]{6}$/i.test(tint)) throw new TypeError(`tint ${tint}, expected #RRGGBB`);
  return [1, 3, 5].map((k) => Number.parseInt(tint.slice(k, k + 2), 16)) as [number, number, number];
}

const hex = (value: number): string => value.toString(16).padStart(2, '0').toUpperCase();
