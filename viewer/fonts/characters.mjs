const range = (from, to) =>
  Array.from({ length: to - from + 1 }, (_, k) => String.fromCodePoint(from + k)).join('');

/**
 * Every character that the workbench and its figures can set: Latin with its accents, Greek, and the signs of the
 * trade. A font that lacks one of the signs is given the rest; the tests hold the list against what is asked for.
 */
export const CHARACTERS = [
  range(0x20, 0x7e),
  range(0xa0, 0x17f),
  range(0x391, 0x3c9),
  '\u03d1\u03d5',
  // Accents that are set on symbols: q with a bar, a tilde, a hat.
  '\u0302\u0303\u0304\u0305',
  // Spaces of fixed width, dashes, quotation marks, dots.
  '\u2009\u200a\u202f\u2013\u2014\u2018\u2019\u201c\u201d\u2020\u2022\u2026\u2032\u2033\u2044',
  // Raised and lowered figures.
  '\u2070\u2074\u2075\u2076\u2077\u2078\u2079\u207a\u207b\u2080\u2081\u2082\u2083\u2084\u2085\u2086\u2087\u2088\u2089',
  // Arrows, then operators and relations with the true minus.
  '\u2190\u2191\u2192\u2193\u2194\u21d2',
  '\u2202\u2206\u220f\u2211\u2212\u2215\u221a\u221e\u222b\u2248\u2260\u2264\u2265\u2113\u210f\u0127',
  // Marks used as letters.
  '\u25a0\u25a1\u25b2\u25b3\u25b6\u25b7\u25bc\u25bd\u25c0\u25c1\u25c6\u25cb\u25cf\u2713\u2717',
].join('');
