import { type SVGTemplateResult, svg } from 'lit';

/**
 * Mark of an opening angle by its kernel, centred on (0, 0): a ring for g → g g, a ring with a filled core for q → q g, a
 * filled triangle for g → q q̄, a small diamond for kernels that are not ours.
 *
 * @param size Radius [px]; the core is left out where it would close the ring.
 */
export function openingMark(channel: string, size: number): SVGTemplateResult {
  switch (channel) {
    case 'g_gg':
      return svg`<circle class="ring" r=${size} />`;
    case 'q_qg':
      return svg`<circle class="ring" r=${size} />${size >= 2.5 ? svg`<circle class="core" r=${size * 0.44} />` : ''}`;
    case 'g_qq':
      return svg`<path class="triangle" d="M0 ${-size * 1.15}L${size * 1.1} ${size * 0.85}H${-size * 1.1}Z" />`;
    default:
      return svg`<path class="other" d="M0 ${-size}L${size} 0L0 ${size}L${-size} 0Z" />`;
  }
}
