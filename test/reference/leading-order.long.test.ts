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

const EVENTS = 2_000_000;

describe.each(['kt', 'virtuality'] as const)(
  'the first emissions of two million events in %s ordering',
  (order) => {
    const emissions = firstEmissions(order, 402, EVENTS);

    it('have the leading-order thrust distribution and three-jet rate of the kernels', () => {
      for (const [tau, coefficient] of ABOVE_TAU) {
        const pull = leadingOrderPull(emissions, EVENTS, (e) => (e.tau > tau ? 1 : 0), UNIT * coefficient);
        expect(Math.abs(pull), `1-T > ${tau}`).toBeLessThan(4);
      }
      for (const [yCut, coefficient] of THREE_JETS) {
        const pull = leadingOrderPull(
          emissions,
          EVENTS,
          (e) => (e.y23 > yCut ? 1 : 0),
          UNIT * CF * coefficient,
        );
        expect(Math.abs(pull), `y23 > ${yCut}`).toBeLessThan(4);
      }
      expect(thrustPValue(emissions, EVENTS)).toBeGreaterThan(1e-4);
    });

    it('differ from the matrix element where the kernels do', () => {
      // 1-T > 0.1: 4.91667 for the matrix element, 5.24334 for the kernels: eight standard errors here.
      const pull = leadingOrderPull(emissions, EVENTS, (e) => (e.tau > 0.1 ? 1 : 0), UNIT * 4.91667290758);
      expect(pull).toBeGreaterThan(4);
    });
  },
);
