// Holds the output of `branchlight show FILE --event N --json` against itself, by a program that shares no code with
// the project: four-momentum after every step, and t, y, z, azimuth, kT, opening angle and partner of every step
// recomputed from the rows of massless final-final steps with local recoil.
//
//   node check-show.mjs [event.json]      standard input without a file; one object, or one object a line
//
// Prints a JSON report of the largest deviations. Exit status: 0 all within limits, 1 not, 2 not readable.
import { readFileSync } from 'node:fs';

const LIMITS = {
  momentum: 1e-10, // of sqrt(s), any component, every step and the whole event
  t: 1e-6, // relative
  tStart: 1e-12, // relative, against the step before or the hard scale
  y: 1e-6, // relative
  z: 1e-6, // absolute
  kT: 1e-6, // relative
  openingAngle: 1e-6, // relative
  azimuth: 1e-6, // rad
  partnerTurn: 1e-6, // rad: the partner keeps its direction
  partnerEnergy: 1e-6, // relative: and keeps 1 - y of its energy
  massShell: 1e-10, // (e - |p|) / sqrt(s)
};

const dot3 = (a, b) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross3 = (a, b) => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
const length3 = (a) => Math.hypot(a[0], a[1], a[2]);
const angle = (a, b) => Math.atan2(length3(cross3(a, b)), dot3(a, b));
const combine = (fa, a, fb, b, fc, c) => a.map((x, n) => fa * x + fb * b[n] + fc * c[n]);

// Product of two massless momenta from their angle: keeps its digits however close they are.
function massless(a, b) {
  const s = Math.sin(angle(a, b) / 2);
  return 2 * length3(a) * length3(b) * s * s;
}

// The part of the emission's momentum orthogonal to both ends of the dipole, without any use of y or z:
// pj = a pij + b pk - k with pj.pj = 0 gives kT^2 = 2 a b pij.pk = 2 (pj.pk)(pj.pij)/(pij.pk).
function transverse(emission, emitter, partner) {
  const product = massless(emitter, partner);
  const a = massless(emission, partner) / product;
  const b = massless(emission, emitter) / product;
  return { k: combine(-1, emission, a, emitter, b, partner), kT: Math.sqrt(2 * a * b * product), product };
}

// Azimuths that the rows allow: one, or more where two space axes tie within rounding. For the space axis r,
// -n.n = 1 + 2 pij_r pk_r/(pij.pk), and k.n = k.r because k is orthogonal to the dipole, so that
// cos phi = k_r/(kT sqrt(-n.n)). The sine is the determinant of r, pij, pk and pj, which for massless momenta is the
// area spanned by their directions as seen along r: differences of unit vectors keep their digits in narrow dipoles.
function azimuths(emission, emitter, partner) {
  const { k, kT, product } = transverse(emission, emitter, partner);
  const direction = (p) => [p[0] / p[3], p[1] / p[3], p[2] / p[3]];
  const [a, b, j] = [emitter, partner, emission].map(direction);
  const away = (from) => from.map((x, n) => x - j[n]);
  const area = cross3(away(a), away(b));
  const sizes = [0, 1, 2].map((r) => 1 + (2 * emitter[r] * partner[r]) / product);
  const largest = Math.max(...sizes);
  return [0, 1, 2]
    .filter((r) => sizes[r] > largest * (1 - 1e-9))
    .map((r) => {
      const norm = kT * Math.sqrt(sizes[r]);
      const sine = (-emitter[3] * partner[3] * emission[3] * area[r]) / (product * norm);
      const phi = Math.atan2(sine, k[r] / norm);
      return phi < 0 ? phi + 2 * Math.PI : phi;
    });
}

const apart = (a, b) => {
  const d = Math.abs(a - b) % (2 * Math.PI);
  return Math.min(d, 2 * Math.PI - d);
};

class Report {
  constructor(event, steps) {
    this.event = event;
    this.steps = steps;
    this.worst = Object.fromEntries(Object.keys(LIMITS).map((name) => [name, 0]));
    this.faults = [];
  }

  measure(name, step, deviation) {
    if (!(deviation <= this.worst[name])) this.worst[name] = deviation;
    if (!(deviation <= LIMITS[name])) this.faults.push({ step, what: name, deviation, limit: LIMITS[name] });
  }

  demand(what, step, holds) {
    if (!holds) this.faults.push({ step, what, deviation: null, limit: null });
  }
}

const isParton = (role) => role !== 'incoming' && role !== 'resonance';

function checkState(history, step, report) {
  const { head, entries } = history;
  const sum = [0, 0, 0, 0];
  const colours = new Map();
  entries.id.forEach((_, row) => {
    if (!isParton(entries.role[row]) || entries.madeBy[row] > step) return;
    if (entries.endedBy[row] !== -1 && entries.endedBy[row] <= step) return;
    const p = momentum(entries, row);
    p.forEach((x, n) => {
      sum[n] += x;
    });
    report.measure('massShell', step, Math.abs(p[3] - length3(p)) / head.sqrtS);
    for (const [tag, end] of [
      [entries.colour[row], 1],
      [entries.anticolour[row], 1000],
    ]) {
      if (tag !== 0) colours.set(tag, (colours.get(tag) ?? 0) + end);
    }
  });
  const beams = [0, 0, 0, 0];
  for (const b of head.beams) {
    [b.px, b.py, b.pz, b.e].forEach((x, n) => {
      beams[n] += x;
    });
  }
  sum.forEach((x, n) => {
    report.measure('momentum', step, Math.abs(x - beams[n]) / head.sqrtS);
  });
  report.demand(
    'every colour tag has one colour and one anticolour end',
    step,
    [...colours.values()].every((ends) => ends === 1001),
  );
}

const momentum = (entries, row) => [entries.px[row], entries.py[row], entries.pz[row], entries.e[row]];

// The partner that the tags of the rows imply: the only candidates are the parton that holds the emitter's colour as
// anticolour and the one that holds its anticolour as colour, and of a gluon emission the new gluon carries the tag
// through which it was radiated.
function checkPartner(history, s, report) {
  const { entries, steps } = history;
  const [emitter, partner, i, j] = ['emitter', 'partner', 'i', 'j'].map((name) => steps[name][s]);
  const live = entries.id
    .map((_, row) => row)
    .filter(
      (row) =>
        isParton(entries.role[row]) &&
        entries.madeBy[row] < s &&
        (entries.endedBy[row] === -1 || entries.endedBy[row] >= s),
    );
  const [c, a] = [entries.colour[emitter], entries.anticolour[emitter]];
  const byColour = live.filter((row) => c !== 0 && entries.anticolour[row] === c);
  const byAnticolour = live.filter((row) => a !== 0 && entries.colour[row] === a);
  if (steps.channel[s] === 'g_qq') {
    report.demand('partner shares a tag', s, [...byColour, ...byAnticolour].includes(partner));
    report.demand('quark takes the colour', s, entries.colour[i] === c && entries.anticolour[i] === 0);
    report.demand(
      'antiquark takes the anticolour',
      s,
      entries.colour[j] === 0 && entries.anticolour[j] === a,
    );
    report.demand(
      'flavours match',
      s,
      entries.id[i] > 0 && entries.id[i] < 7 && entries.id[j] === -entries.id[i],
    );
  } else {
    const throughColour = entries.colour[j] === c && c !== 0;
    const throughAnticolour = entries.anticolour[j] === a && a !== 0;
    report.demand('emission carries exactly one old tag', s, throughColour !== throughAnticolour);
    const implied = throughColour ? byColour : byAnticolour;
    report.demand('partner is the other end of the tag', s, implied.length === 1 && implied[0] === partner);
    const fresh = throughColour ? entries.anticolour[j] : entries.colour[j];
    const handed = throughColour ? entries.colour[i] : entries.anticolour[i];
    const kept = throughColour ? entries.anticolour[i] === a : entries.colour[i] === c;
    const isNew = entries.colour.every(
      (tag, row) => entries.madeBy[row] >= s || (tag !== fresh && entries.anticolour[row] !== fresh),
    );
    report.demand(
      'emitter keeps one tag and shares a new one with the emission',
      s,
      fresh === handed && kept && isNew,
    );
    report.demand('flavours match', s, entries.id[j] === 21 && entries.id[i] === entries.id[emitter]);
  }
  report.demand('recoiler is the partner', s, steps.recoiler[s] === partner);
  const after = steps.recoilerAfter[s];
  report.demand('rows are linked', s, entries.from[after] === partner && entries.from[i] === emitter);
  for (const row of [i, j, after]) report.demand('rows were made by the step', s, entries.madeBy[row] === s);
  for (const row of [emitter, partner])
    report.demand('rows were ended by the step', s, entries.endedBy[row] === s);
}

function checkStep(history, s, report) {
  const { head, entries, steps } = history;
  const [before, partner, pi, pj, pk] = ['emitter', 'partner', 'i', 'j', 'recoilerAfter'].map((name) =>
    momentum(entries, steps[name][s]),
  );
  const step = combine(1, pi, 1, pj, 1, pk);
  step.forEach((x, n) => {
    report.measure('momentum', s, Math.abs(x - before[n] - partner[n]) / head.sqrtS);
  });
  const [ij, ik, jk] = [massless(pi, pj), massless(pi, pk), massless(pj, pk)];
  const y = ij / (ij + ik + jk);
  const z = ik / (ik + jk);
  const q2 = 2 * massless(before, partner);
  const t = head.evolutionVariable === 'kt' ? z * (1 - z) * y * q2 : y * q2;
  report.measure('y', s, Math.abs(y / steps.y[s] - 1));
  report.measure('z', s, Math.abs(z - steps.z[s]));
  report.measure('t', s, Math.abs(t / steps.t[s] - 1));
  report.measure('kT', s, Math.abs(transverse(pj, before, partner).kT / steps.kT[s] - 1));
  const phis = azimuths(pj, before, partner);
  report.measure('azimuth', s, Math.min(...phis.map((phi) => apart(phi, steps.azimuth[s]))));
  report.demand('azimuth lies in [0, 2 pi)', s, steps.azimuth[s] >= 0 && steps.azimuth[s] < 2 * Math.PI);
  report.measure('openingAngle', s, Math.abs(angle(pi, pj) / steps.openingAngle[s] - 1));
  report.measure('partnerTurn', s, angle(partner, pk));
  report.measure('partnerEnergy', s, Math.abs(pk[3] / ((1 - steps.y[s]) * partner[3]) - 1));
  const previous = s === 0 ? head.hardScale : steps.t[s - 1];
  report.measure('tStart', s, Math.abs(steps.tStart[s] / previous - 1));
  report.demand('t falls', s, steps.t[s] <= previous);
  report.demand(
    't and kT stay above the cutoff',
    s,
    steps.t[s] >= head.tLow && steps.kT[s] ** 2 >= head.cutoff * (1 - 1e-12),
  );
}

function check(history) {
  const count = history.steps.t.length;
  const report = new Report(history.head.event, count);
  for (let s = -1; s < count; s++) {
    checkState(history, s, report);
    if (s < 0) continue;
    checkPartner(history, s, report);
    checkStep(history, s, report);
  }
  return report;
}

function parse(text) {
  try {
    return [JSON.parse(text)];
  } catch {
    return text
      .split('\n')
      .filter((line) => line.trim() !== '')
      .map((line) => JSON.parse(line));
  }
}

let reports;
try {
  const text = readFileSync(process.argv[2] ?? 0, 'utf8');
  reports = parse(text).map(check);
} catch (error) {
  console.error(`not readable: ${error.message}`);
  process.exit(2);
}
console.log(JSON.stringify(reports.length === 1 ? reports[0] : reports));
process.exitCode = reports.every((r) => r.faults.length === 0) ? 0 : 1;
