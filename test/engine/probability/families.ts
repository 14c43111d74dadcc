import type { EndMasses } from '../../../engine/probability/end-phase-space.ts';
import type { KernelSettings } from '../../../engine/probability/kernel-settings.ts';

/** Settings of kernels, those of the command line's defaults unless given. */
export function settingsOf(some: Partial<KernelSettings>): KernelSettings {
  return {
    order: 'kt',
    energy: 91.1876,
    cutoff: 1,
    coupling: { kind: 'one-loop' },
    alphasMz: 0.118,
    cmw: false,
    flavours: 5,
    masses: false,
    velocityFactors: 'unit',
    firstEmission: null,
    ...some,
  };
}

const [C, B] = [1.5, 4.8];

/** Kinds of massive ends: name, masses [GeV], channels as codes into CHANNELS. */
export const MASSES: readonly (readonly [string, EndMasses, readonly number[]])[] = [
  ['light beside b', { emitter: 0, partner: B, i: 0, j: 0 }, [0, 1, 2]],
  ['b beside light', { emitter: B, partner: 0, i: B, j: 0 }, [0]],
  ['b beside b', { emitter: B, partner: B, i: B, j: 0 }, [0]],
  ['c beside b', { emitter: C, partner: B, i: C, j: 0 }, [0]],
  ['g -> b bbar beside light', { emitter: 0, partner: 0, i: B, j: B }, [2]],
  ['g -> c cbar beside b', { emitter: 0, partner: B, i: C, j: C }, [2]],
  ['g -> b bbar beside b', { emitter: 0, partner: B, i: B, j: B }, [2]],
];
