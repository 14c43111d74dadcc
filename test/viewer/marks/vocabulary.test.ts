import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type Drawing,
  depthFade,
  depthWidth,
  GLUON_LEAST,
  gluonRail,
  lineWidth,
  mix,
  palette,
  runs,
  styleOf,
  svgDocument,
  textOf,
  tickReach,
  widthOf,
} from '../../../viewer/marks/index.ts';
import { allElements, readElements } from './elements.ts';

describe('tints', () => {
  // W3C, Web Content Accessibility Guidelines 2.2, contrast ratio.
  const luminance = (tint: string): number => {
    const [r, g, b] = [1, 3, 5]
      .map((k) => Number.parseInt(tint.slice(k, k + 2), 16) / 255)
      .map((c) => (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4));
    return 0.2126 * r + 0.7152 * g + 0.0722 * b;
  };
  const contrast = (a: string, b: string): number => {
    const [low, high] = [luminance(a), luminance(b)].sort((x, y) => x - y);
    return (high + 0.05) / (low + 0.05);
  };

  it('in which letters are set stand out by 4.5 or more on every paper of their theme', () => {
    for (const [name, tints] of Object.entries(palette)) {
      for (const paper of [tints.ground, tints.lit, tints.shade]) {
        for (const role of ['ink', 'second', 'faint', 'quark', 'antiquark', 'finding'] as const) {
          expect(contrast(tints[role], paper), `${role} on ${paper}, ${name}`).toBeGreaterThan(4.5);
        }
        for (const role of ['hairline', 'gluon'] as const) {
          expect(contrast(tints[role], paper), `${role} on ${paper}, ${name}`).toBeGreaterThan(3);
        }
      }
    }
  });

  it('mix from one end to the other', () => {
    expect(mix('#000000', '#FF8040', 0)).toBe('#000000');
    expect(mix('#000000', '#FF8040', 1)).toBe('#FF8040');
    expect(mix('#000000', '#FF8040', 0.5)).toBe('#804020');
    expect(() => mix('red', '#000000', 0.5)).toThrow(/#RRGGBB/);
  });
});

describe('lines', () => {
  it('are told apart by style, whatever their tint', () => {
    expect([1, 5, -1, -5, 21, 22, 11].map(styleOf)).toEqual([
      'quark',
      'quark',
      'antiquark',
      'antiquark',
      'gluon',
      'other',
      'other',
    ]);
  });

  it('are as wide as the logarithm of their energy says, a gluon never under 3 px', () => {
    expect(lineWidth('quark', Math.E ** 3, 1)).toBeCloseTo(1.1 + 0.74 * 3, 12);
    expect(lineWidth('quark', 100, 1.3)).toBeCloseTo(1.3 * lineWidth('quark', 100, 1), 12);
    fc.assert(
      fc.property(fc.double(), fc.double({ min: 0.85, max: 1.75, noNaN: true }), (energy, size) => {
        const width = lineWidth('gluon', energy, size);
        expect(width).toBeGreaterThanOrEqual(GLUON_LEAST);
        // The core stays open by a pixel.
        expect(width - 2 * gluonRail(width)).toBeGreaterThanOrEqual(1);
        expect(lineWidth('quark', energy, size)).toBeGreaterThanOrEqual(1);
      }),
      { seed: 1 },
    );
  });

  it('fade by 46 % to the far side and widen by a seventh to the near one', () => {
    expect([1, 0, -1].map(depthFade)).toEqual([0, 0.23, 0.46]);
    expect([1, 0, -1].map(depthWidth)).toEqual([8 / 7, 1, 1]);
  });

  it('carry a tick that grows as the root of the energy fraction lost, none under 0.8 %', () => {
    expect(tickReach(0.0079, 1)).toBe(0);
    expect(tickReach(Number.NaN, 1)).toBe(0);
    expect(tickReach(0.36, 1) / tickReach(0.09, 1)).toBeCloseTo(2, 12);
  });
});

describe('lettering', () => {
  it('sets symbols in the serif, lowers and raises what is in braces, and leaves the rest alone', () => {
    expect(runs('*k*_{T} = 2.87')).toEqual([
      { text: 'k', face: 'symbol' },
      { text: 'T', face: 'sans', place: 'sub' },
      { text: ' = 2.87', face: 'sans' },
    ]);
    expect(runs('10^{−2}', true)[1]).toEqual({ text: '−2', face: 'sansBold', place: 'sup' });
    expect(textOf(runs('a * b_c ^'))).toBe('a * b_c ^');
    expect(runs('')).toEqual([]);
  });

  it('grows in width with every character, and scripts take less room', () => {
    expect(widthOf(runs('12'), 10)).toBeCloseTo(9.94, 9);
    expect(widthOf(runs('_{12}'), 10)).toBeCloseTo(0.74 * 9.94, 9);
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme' }), (text) => {
        const line = [{ text, face: 'sans' as const }];
        const longer = [{ text: `${text}n`, face: 'sans' as const }];
        expect(widthOf(longer, 12)).toBeGreaterThan(widthOf(line, 12));
      }),
    );
  });
});

describe('SVG', () => {
  const drawing = (marks: Drawing['marks']): Drawing => ({
    width: 100,
    height: 50,
    ground: '#FFFFFF',
    title: 'a & b',
    description: '',
    marks,
  });

  it('takes every shift of the baseline back', () => {
    const text = {
      kind: 'text',
      x: 1,
      y: 2,
      size: 10,
      tint: '#000000',
      anchor: 'start',
      runs: runs('a_{b}c^{d}e'),
    } as const;
    const shifts = allElements(readElements(svgDocument(drawing([text]))))
      .filter(({ name }) => name === 'tspan')
      .map(({ attributes }) => Number(attributes.dy ?? 0));
    expect(shifts.reduce((sum, shift) => sum + shift, 0)).toBeCloseTo(0, 9);
    expect(shifts).toEqual([2.2, -2.2, -3.6, 3.6]);
  });

  it('gives every curve and every shading a name of its own', () => {
    const arc = {
      kind: 'arcText',
      x: 50,
      y: 25,
      radius: 20,
      angle: 0,
      runs: runs('now'),
      size: 10,
      tint: '#000000',
    } as const;
    const ball = {
      kind: 'circle',
      x: 5,
      y: 5,
      radius: 5,
      fill: { tint: '#FFFFFF' },
      limb: '#000000',
    } as const;
    const svg = svgDocument(drawing([arc, ball, arc, { kind: 'group', name: 'x', marks: [ball] }]));
    const names = allElements(readElements(svg)).flatMap(({ attributes }) =>
      attributes.id ? [attributes.id] : [],
    );
    expect(new Set(names).size).toBe(names.length);
    expect(names.length).toBe(5);
  });

  it('rounds to hundredths and prints no exponent', () => {
    const svg = svgDocument(
      drawing([
        { kind: 'polyline', points: [1e-9, 1 / 3, 12345.678, -1e-3], stroke: { tint: '#000000', width: 1 } },
      ]),
    );
    expect(svg).toContain('d="M0 0.33L12345.68 0"');
  });
});
