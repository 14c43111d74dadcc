/**
 * How a step is called on the screen: its row number in the file, from 0, as in every table and on the command line.
 *
 * Every view prints steps through this, so that a number read in a terminal is the number seen here.
 */
export function stepNumber(step: number): string {
  return String(step);
}
