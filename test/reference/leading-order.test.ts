import { describe, expect, it } from 'vitest';
import { CF } from './independent/index.ts';
import {
  ABOVE_TAU,
  firstEmissions,
  leadingOrderPull,
  THREE_JETS,
  thrustPValue,
  UNIT,
} from './leading-order.ts';

const EVENTS = 60000;

describe.each(['kt', 'virtuality'] as const)('the first emission in %s ordering', (order) => {
  const emissions = firstEmissions(order, 401, EVENTS);

  it('has the leading-order thrust distribution of the kernels', () => {
    for (const [tau, coefficient] of ABOVE_TAU) {
      const pull = leadingOrderPull(emissions, EVENTS, (e) => (e.tau > tau ? 1 : 0), UNIT * coefficient);
      expect(Math.abs(pull), `1-T > ${tau}`).toBeLessThan(4);
    }
    expect(thrustPValue(emissions, EVENTS)).toBeGreaterThan(1e-4);
  });

  it('has the leading-order Durham three-jet rate of the kernels', () => {
    for (const [yCut, coefficient] of THREE_JETS) {
      const pull = leadingOrderPull(
        emissions,
        EVENTS,
        (e) => (e.y23 > yCut ? 1 : 0),
        UNIT * CF * coefficient,
      );
      expect(Math.abs(pull), `y23 > ${yCut}`).toBeLessThan(4);
    }
  });

  it('has the leading-order means of 1-T and y23 of the kernels', () => {
    expect(Math.abs(leadingOrderPull(emissions, EVENTS, (e) => e.tau, UNIT * 2.1775441564496))).toBeLessThan(
      4,
    );
    expect(Math.abs(leadingOrderPull(emissions, EVENTS, (e) => e.y23, UNIT * 0.94385534943198))).toBeLessThan(
      4,
    );
  });
});
