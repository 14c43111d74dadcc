import { colourFaults, coloursAlive, type History } from '../../engine/index.ts';

const GLUON = 21;
const FIRST_TAG = 501;

/** Moments at which a colour tag does not join one colour end to one anticolour end. */
export function openColourLines(history: History): string[] {
  const breaches: string[] = [];
  for (let step = -1; step < history.steps.length; step++)
    for (const { tag, colourEnds, anticolourEnds } of colourFaults(history, step))
      breaches.push(
        `after step ${step}: tag ${tag} has ${colourEnds} colour and ${anticolourEnds} anticolour ends`,
      );
  return breaches;
}

/** Rows whose colours do not belong to their identity: quarks carry one tag, gluons two different ones. */
export function wrongColours({ entries }: History): string[] {
  const breaches: string[] = [];
  for (let row = 0; row < entries.length; row++) {
    const { [row]: id } = entries.id;
    const { [row]: colour } = entries.colour;
    const { [row]: anticolour } = entries.anticolour;
    const gluon = id === GLUON;
    const quark = Math.abs(id) <= 6;
    const right =
      (gluon || (quark && id > 0) ? colour >= FIRST_TAG : colour === 0) &&
      (gluon || (quark && id < 0) ? anticolour >= FIRST_TAG : anticolour === 0) &&
      (!gluon || colour !== anticolour);
    if (!right) breaches.push(`row ${row}: particle ${id} has colour ${colour} and anticolour ${anticolour}`);
  }
  return breaches;
}

/**
 * Moments at which the colour lines, walked from end to end, do not pass every parton exactly once.
 *
 * From a quark along its colour to the gluon with that anticolour, on along the gluon's colour, and so to an antiquark;
 * what is left are rings of gluons.
 */
export function brokenColourChains(history: History): string[] {
  const { entries } = history;
  const breaches: string[] = [];
  for (let step = -1; step < history.steps.length; step++) {
    const lines = coloursAlive(history, step);
    const next = new Map<number, number>();
    lines.tag.forEach((tag, n) => {
      const { [n]: colourEnd } = lines.colourEnd;
      const { [n]: anticolourEnd } = lines.anticolourEnd;
      if (colourEnd < 0 || anticolourEnd < 0)
        breaches.push(`after step ${step}: line ${tag} has a loose end`);
      else next.set(colourEnd, anticolourEnd);
    });
    const passed = new Set<number>();
    const walk = (from: number): number => {
      let row = from;
      do {
        if (passed.has(row)) breaches.push(`after step ${step}: row ${row} is passed twice`);
        passed.add(row);
        row = next.get(row) ?? -1;
      } while (row >= 0 && row !== from && !passed.has(row) && entries.colour[row] !== 0);
      if (row >= 0) passed.add(row);
      return row;
    };
    for (const row of next.keys()) {
      if (entries.anticolour[row] !== 0) continue;
      const end = walk(row);
      if (!(end >= 0 && entries.colour[end] === 0))
        breaches.push(
          `after step ${step}: the line from row ${row} ends at row ${end}, which is no antiquark`,
        );
    }
    for (const row of next.keys())
      if (!passed.has(row) && walk(row) !== row)
        breaches.push(`after step ${step}: the ring through row ${row} does not close`);
    if (passed.size !== new Set([...lines.colourEnd, ...lines.anticolourEnd]).size)
      breaches.push(`after step ${step}: some partons are on no line`);
  }
  return breaches;
}

/** Steps that change the colours in another way than their channel says (leading-colour rules of the two ends). */
export function wrongColourFlow({ entries, steps, channels }: History): string[] {
  const { colour, anticolour, id } = entries;
  const breaches: string[] = [];
  let newest = 0;
  for (let row = 0; row < entries.length && entries.madeBy[row] < 0; row++)
    newest = Math.max(newest, colour[row], anticolour[row]);
  for (let step = 0; step < steps.length; step++) {
    const { [step]: from } = steps.emitter;
    const { [step]: partner } = steps.partner;
    const { [step]: i } = steps.i;
    const { [step]: j } = steps.j;
    const channel = channels[steps.channel[step]];
    const fault = (what: string) => breaches.push(`step ${step}, ${channel}: ${what}`);
    const throughColour = colour[from] !== 0 && colour[from] === anticolour[partner];
    const throughAnticolour = anticolour[from] !== 0 && anticolour[from] === colour[partner];
    if (!throughColour && !throughAnticolour)
      fault('the partner is not at the other end of a line of the emitter');
    const recoiled = steps.recoilerAfter[step];
    if (
      colour[recoiled] !== colour[steps.recoiler[step]] ||
      anticolour[recoiled] !== anticolour[steps.recoiler[step]]
    )
      fault('the recoiler changes its colour');
    if (channel === 'g_qq') {
      if (id[from] !== GLUON || !(id[i] >= 1 && id[i] <= 5) || id[j] !== -id[i])
        fault('not a gluon to a quark pair');
      if (colour[i] !== colour[from] || anticolour[j] !== anticolour[from])
        fault('the pair does not take over both tags');
      continue;
    }
    if (id[i] !== id[from] || id[j] !== GLUON) fault('the emission is no gluon, or the emitter changes');
    if ((channel === 'g_gg') !== (id[from] === GLUON)) fault('not the channel of this emitter');
    const fresh = ++newest;
    const viaColour =
      colour[i] === fresh &&
      anticolour[j] === fresh &&
      colour[j] === colour[from] &&
      anticolour[i] === anticolour[from];
    const viaAnticolour =
      anticolour[i] === fresh &&
      colour[j] === fresh &&
      anticolour[j] === anticolour[from] &&
      colour[i] === colour[from];
    if (!((viaColour && throughColour) || (viaAnticolour && throughAnticolour)))
      fault('the gluon does not sit between emitter and partner');
  }
  return breaches;
}
