import type { Beam, SampleHead, SettingValue } from '../../engine/index.ts';
import type { Unpacked } from '../message-pack/index.ts';
import { asNumber, asText, FieldError, Fields } from './fields.ts';

/**
 * The head of a sample from its decoded map.
 *
 * What its author left out is absent: NaN, null, an empty list or `own`. Keys that this version does not know stay.
 *
 * @throws FieldError for a value of another type than its key asks for.
 */
export function readSampleHead(fields: Fields): SampleHead {
  const columns = fields.fields('columns');
  const process = fields.fields('process');
  const head: SampleHead = {
    seed: fields.integerOrNull('seed'),
    process: {
      name: process.text('name', 'own'),
      incoming: process.list('incoming', asNumber),
      ...process.unknown(),
    },
    beams: fields.list('beams', readBeam),
    sqrtS: fields.number('sqrtS'),
    hardScale: fields.number('hardScale'),
    cutoff: fields.number('cutoff'),
    tLow: fields.number('tLow'),
    evolutionVariable: fields.word('evolutionVariable', ['kt', 'virtuality', 'angle', 'own'], 'own'),
    ordering: fields.word('ordering', ['global', 'line', 'none'], 'none'),
    meaning: readMeaning(fields.fields('meaning')),
    shower: readSettings(fields.fields('shower')),
    producer: readProducer(fields.fields('producer')),
    columns: {
      entries: columns.list('entries', asText),
      steps: columns.list('steps', asText),
      trials: (columns.optional('trials') ?? null) === null ? null : columns.list('trials', asText),
      ...columns.unknown(),
    },
  };
  return { ...head, ...fields.unknown() };
}

function readBeam(value: Unpacked, place: string): Beam {
  const beam = new Fields(value, place);
  const known = {
    id: beam.number('id', 0),
    px: beam.number('px'),
    py: beam.number('py'),
    pz: beam.number('pz'),
    e: beam.number('e'),
  };
  return { ...known, ...beam.unknown() };
}

const FRACTIONS = [
  'emitter light-cone',
  'emission light-cone',
  'emitter energy',
  'emission energy',
  'own',
] as const;

function readMeaning(meaning: Fields): SampleHead['meaning'] {
  const known = {
    t: meaning.word('t', ['kT^2', 'virtuality^2', 'angle^2', 'own'], null),
    tUnit: meaning.word('tUnit', ['GeV^2', 'GeV', '1'], null),
    z: meaning.word('z', FRACTIONS, null),
    kT: meaning.word('kT', ['dipole frame', 'own'], null),
    azimuth: meaning.word('azimuth', ['dipole axis', 'own'], null),
    openingAngle: meaning.word('openingAngle', ['daughters after the step', 'own'], null),
    angleFrame: meaning.word('angleFrame', ['event', 'own'], null),
  };
  return { ...known, ...meaning.unknown() };
}

function readSettings(settings: Fields): Record<string, SettingValue> {
  const read: Record<string, SettingValue> = {};
  for (const key of settings.keys()) {
    const value = settings.value(key);
    if (value !== null && typeof value === 'object') {
      throw new FieldError(
        `${settings.place}.${key}`,
        'more than one value',
        'a string, number, flag or nil',
      );
    }
    read[key] = typeof value === 'bigint' ? Number(value) : value;
  }
  return read;
}

function readProducer(producer: Fields): SampleHead['producer'] {
  return { name: producer.text('name', ''), version: producer.text('version', ''), ...producer.unknown() };
}
