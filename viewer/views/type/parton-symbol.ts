import type { History } from '../../../engine/index.ts';

const QUARKS = ['', 'd', 'u', 's', 'c', 'b', 't'];
const OTHERS: Readonly<Record<number, string>> = {
  11: '*e*^{−}',
  [-11]: '*e*^{+}',
  12: '*ν*_{e}',
  [-12]: '*ν̄*_{e}',
  13: '*μ*^{−}',
  [-13]: '*μ*^{+}',
  21: '*g*',
  22: '*γ*',
  23: '*Z*',
  24: '*W*^{+}',
  [-24]: '*W*^{−}',
  25: '*H*',
  2212: '*p*',
  [-2212]: '*p̄*',
};

/** Symbol of a PDG number as notation: `*d*`, `*d̄*`, `*g*`; the number itself where it has none here. */
export function partonSymbol(id: number): string {
  if (id >= 1 && id <= 6) return `*${QUARKS[id]}*`;
  if (id <= -1 && id >= -6) return `*${QUARKS[-id]}\u0304*`;
  return OTHERS[id] ?? String(id).replace('-', '−');
}

/**
 * A process as notation: `*e*^{+} *e*^{−} → *d* *d̄*`. The order is the author's, but that a positron stands before its
 * electron, as the trade writes it.
 */
export function processNotation(incoming: readonly number[], outgoing: readonly number[]): string {
  const side = (ids: readonly number[]): string => ids.map(partonSymbol).join('\u2009');
  const beams = incoming.length === 2 && incoming[0] === 11 && incoming[1] === -11 ? [-11, 11] : incoming;
  return outgoing.length > 0 ? `${side(beams)} → ${side(outgoing)}` : side(beams);
}

const CHANNEL_NOTATION: Readonly<Record<string, string>> = {
  q_qg: '*q* → *q*\u2009*g*',
  g_gg: '*g* → *g*\u2009*g*',
  g_qq: '*g* → *q*\u2009*q\u0304*',
};

/** A splitting kernel as notation; a word that is not ours stands as its author wrote it. */
export function channelNotation(channel: string): string {
  return CHANNEL_NOTATION[channel] ?? channel;
}

/** What a step did, as notation: with its own flavours where the step names rows that are there, else its kernel. */
export function branchingNotation({ steps, entries, channels }: History, step: number): string {
  const rows = [steps.emitter[step], steps.i[step], steps.j[step]];
  if (!rows.every((row) => row >= 0 && row < entries.length)) {
    return channelNotation(channels[steps.channel[step]] ?? '');
  }
  const [before, i, j] = rows.map((row) => partonSymbol(entries.id[row]));
  return `${before} → ${i}\u2009${j}`;
}
