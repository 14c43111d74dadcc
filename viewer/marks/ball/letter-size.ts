/** Size of the lettering [px] on a plate of this size factor: 12 at 1, 12.5 at 1.3; never below 12. */
export const letterSize = (size: number): number => Math.max(12, 12 + (size - 1) / 0.6);

/** Height of a capital above the baseline, in ems. */
export const CAPITAL = 0.67;
