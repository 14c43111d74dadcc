import { expect, test } from 'vitest';
import { nearest } from '../../../viewer/terminal/nearest.ts';

const NAMES = ['energy', 'events', 'seed', 'shower', 'order'];

test('finds the name that was probably meant', () => {
  expect(nearest('enegry', NAMES)).toBe('energy');
  expect(nearest('event', NAMES)).toBe('events');
  expect(nearest('sed', NAMES)).toBe('seed');
  expect(nearest('show', NAMES)).toBe('shower');
});

test('offers nothing where nothing is near', () => {
  expect(nearest('x', NAMES)).toBeNull();
  expect(nearest('velocity', NAMES)).toBeNull();
});
