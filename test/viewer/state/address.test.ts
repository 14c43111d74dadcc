import fc from 'fast-check';
import { expect, test } from 'vitest';
import { placeFragment, readPlace } from '../../../viewer/state/index.ts';

test('an address reopens the event and step that it was made of', () => {
  fc.assert(
    fc.property(fc.nat(), fc.integer({ min: -1 }), (event, step) => {
      expect(readPlace(placeFragment({ event, step }))).toEqual({ event, step });
    }),
  );
});

test.each([
  '',
  '#',
  '#event=',
  '#event=-3&step=x',
  '#event=1e3',
  '#event=NaN&step=1.5',
  '#event=99999999999999999999',
])('%s says nothing', (fragment) => {
  expect(readPlace(fragment)).toEqual({ event: -1, step: -1 });
});

test('other fields of an address do no harm', () => {
  expect(readPlace('#theme=dark&step=4&event=17')).toEqual({ event: 17, step: 4 });
});
