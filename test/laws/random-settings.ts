import fc from 'fast-check';
import {
  type GrowSettings,
  growEvent,
  type History,
  resolveSettings,
  SettingError,
} from '../../engine/index.ts';

/** A number even in its logarithm between two powers of ten. */
const spread = (from: number, to: number): fc.Arbitrary<number> =>
  fc.noBias(fc.integer({ min: 0, max: 1_000_000 })).map((n) => 10 ** (from + ((to - from) * n) / 1_000_000));

const coupling: fc.Arbitrary<GrowSettings['coupling']> = fc.oneof(
  spread(-2, -0.7).map((value) => ({ kind: 'fixed' as const, value })),
  fc.constant({ kind: 'one-loop' as const }),
  fc.constant({ kind: 'two-loop' as const }),
);

const some: fc.Arbitrary<Partial<GrowSettings>> = fc.record({
  process: fc.constantFrom('ee' as const, 'ee' as const, 'scalar-gg' as const, 'scalar-bb' as const),
  energy: spread(0.7, 5),
  seed: fc.oneof(fc.nat(), fc.maxSafeNat()),
  order: fc.constantFrom('kt' as const, 'virtuality' as const),
  coupling,
  alphasMz: spread(-1.1, -0.85),
  cmw: fc.boolean(),
  cutoff: spread(-0.3, 1),
  flavours: fc.integer({ min: 0, max: 5 }),
  quark: fc.constantFrom(null, 1, 2, 3, 4, 5),
  masses: fc.boolean(),
  velocityFactors: fc.constantFrom('unit' as const, 'published' as const),
  firstEmission: fc.constantFrom('kernel' as const, 'matched' as const),
  trials: fc.boolean(),
});

/** Settings of every kind that the shower takes; energies from 5 to 1e5 GeV. */
export const settings: fc.Arbitrary<GrowSettings> = some
  .map((choice) => {
    try {
      return resolveSettings(choice);
    } catch (error) {
      // below the Landau pole, no phase space, no flavour: refused, and that is somebody else's claim
      if (error instanceof SettingError) return null;
      throw error;
    }
  })
  .filter((resolved) => resolved !== null);

/** Number of an event in its sample. */
export const stream: fc.Arbitrary<number> = fc.oneof(fc.nat(1000), fc.maxSafeNat());

/** One event of random settings. */
export const history: fc.Arbitrary<History> = fc
  .tuple(settings, stream)
  .map(([choice, number]) => growEvent(choice, number));
