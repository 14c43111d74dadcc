import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
  type GrowSettings,
  growEvent,
  resolveSettings,
  SettingError,
  VERSION,
} from '../../../engine/index.ts';

const refusal = (some: Partial<GrowSettings>): SettingError => {
  try {
    resolveSettings(some);
  } catch (error) {
    if (error instanceof SettingError) return error;
    throw error;
  }
  throw new Error('accepted');
};

describe('settings', () => {
  it('are those of the command line unless told otherwise', () => {
    expect(resolveSettings()).toMatchObject({
      process: 'ee',
      energy: 91.1876,
      seed: 1,
      order: 'kt',
      cutoff: 1,
      flavours: 5,
      quark: null,
    });
  });

  it('that make no sense are refused by name, with what was found and what would do', () => {
    expect(refusal({ cutoff: 0.1 })).toMatchObject({ option: 'cutoff', found: '0.1' });
    expect(refusal({ cutoff: 0.1 }).expected).toMatch(/0\.1458 GeV, the Landau pole/);
    expect(refusal({ cutoff: 0.4, coupling: { kind: 'two-loop' } }).expected).toMatch(/0\.4028 GeV/);
    expect(refusal({ cutoff: 46 }).expected).toMatch(/45\.5938 GeV/);
    expect(refusal({ energy: 2 }).option).toBe('cutoff');
    expect(refusal({ energy: -5 }).option).toBe('energy');
    expect(refusal({ energy: Number.NaN }).option).toBe('energy');
    expect(refusal({ flavours: 6 }).option).toBe('flavours');
    expect(refusal({ flavours: 0 }).option).toBe('flavours');
    expect(refusal({ quark: 6 }).option).toBe('quark');
    expect(refusal({ seed: 2 ** 53 }).option).toBe('seed');
    expect(refusal({ seed: 1.5 }).option).toBe('seed');
    expect(refusal({ alphasMz: 0 }).option).toBe('alphas-mz');
    expect(refusal({ coupling: { kind: 'fixed', value: 0 } }).option).toBe('coupling');
    expect(refusal({ energy: 9, quark: 5, masses: true }).expected).toMatch(/9\.6 GeV, the threshold/);
    expect(refusal({ quark: 5, masses: true, firstEmission: 'matched' }).option).toBe('first-emission');
    expect(refusal({ process: 'scalar-gg', quark: 1 }).option).toBe('quark');
  });

  it('at the edges of what makes sense grow events', () => {
    expect(growEvent(resolveSettings({ flavours: 0, quark: 2 }), 0).entries.id[3]).toBe(2);
    const tiny = resolveSettings({ energy: 2.001, coupling: { kind: 'fixed', value: 2 } });
    expect(growEvent(tiny, 0).head.status).toBe('complete');
    const small = resolveSettings({ cutoff: 1e-4, coupling: { kind: 'fixed', value: 0.02 }, energy: 1e4 });
    expect(growEvent(small, 0).steps.length).toBeGreaterThan(0);
  });

  it('name the version of the package', () => {
    const manifest = JSON.parse(readFileSync(new URL('../../../package.json', import.meta.url), 'utf8'));
    expect(VERSION).toBe(manifest.version);
    expect(growEvent(resolveSettings(), 0).head.producer).toEqual({ name: 'branchlight', version: VERSION });
  });
});
