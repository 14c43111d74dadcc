import { describe, expect, it } from 'vitest';
import { createGrower, type GrowSettings, HistoryBatch, resolveSettings } from '../../engine/index.ts';
import { compareClaims, noClaims } from './claims.ts';

/** The worst differences between claims and rows over some events. */
function worstClaims(some: Partial<GrowSettings>, events: number) {
  const grower = createGrower(resolveSettings(some));
  const batch = new HistoryBatch(grower.sample);
  const worst = noClaims();
  for (let event = 0; event < events; event++) {
    batch.clear();
    grower.grow(batch, event);
    compareClaims(worst, batch.view(0));
  }
  return worst;
}

describe.each(['kt', 'virtuality'] as const)('claims in %s ordering', (order) => {
  it('follow from the rows to 1e-12 at everyday energies', () => {
    const { smallestY, steps, ...worst } = worstClaims({ order }, 3000);
    expect(steps).toBeGreaterThan(5000);
    // rows of 91 GeV at kT of 1 GeV keep 1e-16 times 91: angles of some 1e-2, kT ratios likewise
    for (const found of Object.values(worst)) expect(found).toBeLessThan(1e-12);
  });

  it('follow from the rows to 1e-6, in fact 1e-8, where y is down to 1e-10', () => {
    // a weak coupling leaves first branchings at every y down to (cutoff/energy)^2 = 1e-14
    const { smallestY, steps, ...worst } = worstClaims(
      { order, energy: 1e7, cutoff: 1, coupling: { kind: 'fixed', value: 0.02 } },
      1500,
    );
    expect(smallestY).toBeLessThan(1e-10);
    expect(steps).toBeGreaterThan(5000);
    // a row keeps 1e-16 of its energy, the smallest angles are kT/E = 1e-7
    for (const found of Object.values(worst)) expect(found).toBeLessThan(1e-8);
  });

  it('follow from the rows to 1e-6 for heavy quarks, slow and fast', () => {
    for (const energy of [15, 91.1876, 1e5]) {
      const { smallestY, steps, ...worst } = worstClaims(
        { order, energy, masses: true, cutoff: 0.6, flavours: 5 },
        400,
      );
      expect(steps).toBeGreaterThan(400);
      // 1e-16 over the smallest angle kT/E, twice because energy and mass are rounded too
      for (const found of Object.values(worst)) expect(found).toBeLessThan(1e-9);
    }
  });

  it('follow from the rows to 1e-6 in the narrow dipoles of long showers', () => {
    const { smallestY, steps, ...worst } = worstClaims(
      { order, energy: 1e6, cutoff: 1, coupling: { kind: 'fixed', value: 0.12 } },
      40,
    );
    expect(steps).toBeGreaterThan(2000);
    for (const found of Object.values(worst)) expect(found).toBeLessThan(1e-8);
  });
});
