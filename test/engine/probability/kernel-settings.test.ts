import { describe, expect, it } from 'vitest';
import type { SampleHead, SettingValue } from '../../../engine/history/index.ts';
import { createGrower, type GrowSettings, resolveSettings } from '../../../engine/index.ts';
import { openKernels } from '../../../engine/probability/dipole-ends.ts';
import { DipoleKernels } from '../../../engine/probability/dipole-kernels.ts';
import { readKernelSettings } from '../../../engine/probability/kernel-settings.ts';

const headOf = (some: Partial<GrowSettings> = {}): SampleHead => createGrower(resolveSettings(some)).sample;

/** A head with one setting replaced, undefined: not recorded. */
function headWith(name: string, value: SettingValue | undefined): SampleHead {
  const head = headOf();
  const shower: Record<string, SettingValue> = { ...head.shower };
  if (value === undefined) delete shower[name];
  else shower[name] = value;
  return { ...head, shower };
}

const reasonOf = (head: SampleHead): string | null => {
  const found = readKernelSettings(head);
  return 'assessable' in found ? found.reason : null;
};

const NEEDED =
  'shower order recoil energy cutoff coupling alphas-mz cmw flavours masses velocity-factors first-emission'.split(
    ' ',
  );

describe('the kernels that a head names', () => {
  it('are read from every setting that the shower has', () => {
    const some: Partial<GrowSettings> = {
      order: 'virtuality',
      energy: 300,
      cutoff: 0.7,
      coupling: { kind: 'fixed', value: 0.125 },
      cmw: true,
      flavours: 4,
      masses: true,
      velocityFactors: 'published',
    };
    expect(readKernelSettings(headOf(some))).toMatchObject({ ...some, alphasMz: 0.118, firstEmission: null });
    expect(readKernelSettings(headOf({ coupling: { kind: 'two-loop' } }))).toMatchObject({
      coupling: { kind: 'two-loop' },
    });
    for (const process of ['ee', 'scalar-gg', 'scalar-bb'] as const) {
      const found = readKernelSettings(headOf({ process, firstEmission: 'matched' }));
      expect('assessable' in found ? null : found.firstEmission).not.toBeNull();
    }
    expect(openKernels(headOf())).toBeInstanceOf(DipoleKernels);
  });

  it.each(NEEDED)('are not guessed where %s is not recorded', (name) => {
    expect(reasonOf(headWith(name, undefined))).toBe(`setting ${name} is not recorded`);
  });

  it.each<[string, SettingValue]>([
    ['shower', 'coherent'],
    ['shower', 'another'],
    ['order', 'angle'],
    ['recoil', 'antenna'],
    ['energy', '91.2'],
    ['cutoff', 0],
    ['coupling', 'three-loop'],
    ['coupling', 'fixed:'],
    ['coupling', 'fixed:x'],
    ['coupling', 0.118],
    ['alphas-mz', null],
    ['cmw', true],
    ['flavours', 6],
    ['flavours', 2.5],
    ['masses', 'some'],
    ['velocity-factors', 'other'],
    ['first-emission', 'exact'],
  ])('are not guessed where %s is %s', (name, value) => {
    expect(reasonOf(headWith(name, value))).toContain(`setting ${name} ${value}: expected`);
  });

  it('are not taken from a head whose scales or words mean something else', () => {
    const head = headOf();
    expect(reasonOf({ ...head, hardScale: head.hardScale * 4 })).toContain('hard scale');
    expect(reasonOf({ ...head, tLow: head.tLow * 4 })).toContain('lowest t');
    expect(reasonOf({ ...head, evolutionVariable: 'virtuality' })).toContain('evolution');
    expect(reasonOf({ ...head, ordering: 'line' })).toContain('ordering');
    expect(reasonOf({ ...head, meaning: { ...head.meaning, t: null } })).toContain('t meaning');
    expect(reasonOf({ ...head, meaning: { ...head.meaning, tUnit: 'GeV' } })).toContain('t in GeV');
  });

  it('do not exist below the Landau pole', () => {
    const low = headWith('cutoff', 0.1);
    const found = openKernels({ ...low, tLow: 0.1 * 0.1 });
    expect(found).toMatchObject({ assessable: false });
    expect(found).toHaveProperty('reason', expect.stringContaining('Landau pole'));
  });
});
