const NAMES: Readonly<Record<number, string>> = {
  11: 'e-',
  12: 'nu_e',
  13: 'mu-',
  14: 'nu_mu',
  15: 'tau-',
  16: 'nu_tau',
  21: 'g',
  22: 'gamma',
  23: 'gamma*/Z',
  24: 'W+',
  25: 'H',
};
const QUARKS = ['', 'd', 'u', 's', 'c', 'b', 't'];

/** Name of a PDG number in plain letters, the number itself where none is known here. */
export function partonName(id: number): string {
  const size = Math.abs(id);
  const quark = QUARKS[size];
  if (quark) return id < 0 ? `${quark}bar` : quark;
  const name = NAMES[size];
  if (!name) return String(id);
  if (id > 0) return name;
  if (name.endsWith('-')) return name.replace('-', '+');
  return name.startsWith('nu') ? `${name}bar` : name.replace('+', '-');
}
