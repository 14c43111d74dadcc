/** What an address reopens: event and selected step, each −1 where it says nothing. */
export interface Place {
  readonly event: number;
  readonly step: number;
}

const wholeNumber = (text: string | null): number => (text && /^\d{1,15}$/.test(text) ? Number(text) : -1);

/** Event and step of an address's fragment such as `#event=17&step=4`; what is no whole number counts as not said. */
export function readPlace(fragment: string): Place {
  const fields = new URLSearchParams(fragment.replace(/^#/, ''));
  return { event: wholeNumber(fields.get('event')), step: wholeNumber(fields.get('step')) };
}

/** The fragment that reopens a place; empty where there is no event. */
export function placeFragment({ event, step }: Place): string {
  if (event < 0) return '';
  return step < 0 ? `#event=${event}` : `#event=${event}&step=${step}`;
}
