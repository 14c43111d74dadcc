import { describe, expect, it } from 'vitest';
import { type GrowSettings, growEvent, resolveSettings, SettingError } from '../../../../engine/index.ts';

const refusal = (some: Partial<GrowSettings>): SettingError => {
  try {
    resolveSettings({ shower: 'coherent', ...some });
  } catch (error) {
    if (error instanceof SettingError) return error;
    throw error;
  }
  throw new Error('accepted');
};

describe('settings of the coherent shower', () => {
  it('refuse what belongs to the dipole shower, and the other way round', () => {
    expect(refusal({ order: 'virtuality' }).option).toBe('order');
    expect(refusal({ recoil: 'global' }).option).toBe('recoil');
    expect(refusal({ velocityFactors: 'published', masses: true }).option).toBe('velocity-factors');
    expect(refusal({ firstEmission: 'matched' }).option).toBe('first-emission');
    expect(refusal({ shower: 'dipole', coherence: false }).message).toMatch(/^--coherence off: expected on/);
  });

  it('refuse a cutoff above which no branching lies', () => {
    expect(refusal({ cutoff: 23 })).toMatchObject({ option: 'cutoff', found: '23' });
    expect(growEvent(resolveSettings({ shower: 'coherent', cutoff: 22 }), 0).head.status).toBe('complete');
  });

  it('stand in the head, with scales and meanings of their own', () => {
    const { head } = growEvent(resolveSettings({ shower: 'coherent', cutoff: 0.8, energy: 100 }), 3);
    expect(head).toMatchObject({
      hardScale: 10000,
      evolutionVariable: 'angle',
      ordering: 'line',
      shower: { shower: 'coherent', coherence: 'on', cutoff: 0.8 },
      meaning: { t: 'angle^2', tUnit: 'GeV^2', z: 'own', azimuth: 'own' },
      regrown: 0,
    });
    expect(head.cutoff).toBeCloseTo(0.64, 14);
    expect(head.tLow).toBeCloseTo(16 * 0.64, 13);
    expect(head.shower).not.toHaveProperty('order');
    expect(head.columns.steps).not.toContain('recoiler');
    const incoherent = growEvent(resolveSettings({ shower: 'coherent', coherence: false }), 3).head;
    expect(incoherent).toMatchObject({
      tLow: 4,
      evolutionVariable: 'virtuality',
      ordering: 'line',
      shower: { coherence: 'off' },
      meaning: { t: 'virtuality^2' },
    });
  });
});
