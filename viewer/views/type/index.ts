export { parseNotation, plainNotation, type Run } from './notation.ts';
export { notation, notationStyles } from './notation-html.ts';
export { notationSpans } from './notation-svg.ts';
export {
  ABSENT,
  countText,
  decimalText,
  momentumDecimals,
  numberText,
  residualText,
  shortNumber,
} from './number-text.ts';
export { branchingNotation, channelNotation, partonSymbol, processNotation } from './parton-symbol.ts';
export { controlStyles, drawingStyles, panelStyles } from './type-styles.ts';
