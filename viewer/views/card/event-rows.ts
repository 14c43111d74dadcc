import type { History } from '../../../engine/index.ts';
import { countText, numberText, processNotation, shortNumber } from '../type/index.ts';

/** A line about the event: name, and its value as notation. */
export interface EventRow {
  readonly name: string;
  readonly value: string;
}

const ORDER: Readonly<Record<string, string>> = {
  kt: '*k*_{T}',
  virtuality: 'virtuality',
  angle: 'angle',
  own: 'own variable',
};

/** Settings that are energies. */
const IN_GEV = new Set(['energy', 'cutoff']);

/** A setting under its command-line name as its value would be typed there. */
export function settingText(value: string | number | boolean | null): string {
  if (value === null) return '—';
  if (typeof value === 'boolean') return value ? 'on' : 'off';
  return typeof value === 'number' ? shortNumber(value) : value;
}

/** The shower of an event in one line: `*k*_{T} ordered dipoles, local recoil, *α*_{s}(*M*_{Z}) = 0.118, cutoff 1 GeV`. */
export function showerNotation({ head }: Pick<History, 'head'>): string {
  const { shower } = head;
  const parts: string[] = [];
  const kind =
    shower.shower === 'dipole'
      ? 'dipoles'
      : shower.shower === 'coherent'
        ? 'coherent branching'
        : String(shower.shower ?? 'shower');
  parts.push(`${ORDER[head.evolutionVariable] ?? head.evolutionVariable} ordered ${kind}`);
  if (shower.recoil) parts.push(`${shower.recoil} recoil`);
  const coupling = String(shower.coupling ?? '');
  const [, fixed] = coupling.split(':');
  if (fixed) parts.push(`*α*_{s} = ${fixed} fixed`);
  else if (typeof shower['alphas-mz'] === 'number')
    parts.push(`*α*_{s}(*M*_{Z}) = ${shortNumber(shower['alphas-mz'])}`);
  if (head.cutoff >= 0) parts.push(`cutoff ${shortNumber(Math.sqrt(head.cutoff))} GeV`);
  return parts.join(', ');
}

/** What the head of an event says, in groups that are set apart. */
export function eventRows(history: History, finalPartons: number): EventRow[][] {
  const { head, steps } = history;
  const unit = head.meaning.tUnit === 'GeV^2' ? 'GeV^{2}' : (head.meaning.tUnit ?? '');
  const about: EventRow[] = [
    { name: 'process', value: processNotation(head.process.incoming, head.process.outgoing) },
    { name: 'centre-of-mass energy', value: `√*s* = ${shortNumber(head.sqrtS)} GeV` },
    { name: 'steps', value: countText(steps.length) },
    { name: 'partons at the end', value: countText(finalPartons) },
    { name: 'weight', value: shortNumber(head.weight) },
    { name: 'status', value: head.statusReason ? `${head.status}: ${head.statusReason}` : head.status },
  ];
  if (head.label !== null) about.unshift({ name: 'label', value: head.label });
  const evolution: EventRow[] = [
    {
      name: 'evolution variable',
      value: `*t*, ${head.meaning.t === 'kT^2' ? '*k*_{T}^{2}' : (head.meaning.t ?? 'not declared')}`,
    },
    { name: 'hard scale', value: `*t*_{0} = ${numberText(head.hardScale)} ${unit}` },
    { name: 'end of the clock', value: `*t*_{low} = ${shortNumber(head.tLow)} ${unit}` },
    { name: 'resolution', value: `*k*_{T}^{2} ≥ ${shortNumber(head.cutoff)} GeV^{2}` },
    { name: 'ordering', value: head.ordering },
  ];
  const settings = Object.entries(head.shower).map(([name, value]) => {
    if (name === 'quark' && value === null) return { name, value: 'electroweak mix' };
    const energy = typeof value === 'number' && IN_GEV.has(name);
    return { name, value: energy ? `${settingText(value)} GeV` : settingText(value) };
  });
  const origin: EventRow[] = [
    { name: 'producer', value: `${head.producer.name} ${head.producer.version}` },
    { name: 'seed', value: head.seed === null ? '—' : String(head.seed) },
    { name: 'stream', value: head.stream === null ? '—' : String(head.stream) },
  ];
  return [[...about, ...origin], evolution, settings];
}
