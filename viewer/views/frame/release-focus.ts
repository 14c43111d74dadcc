/**
 * Give the keys back to the workbench after a choice that was made with the pointer; one made with the keyboard keeps the
 * focus where it is.
 */
export function releaseFocus(control: HTMLElement): void {
  if (!control.matches(':focus-visible')) control.blur();
}
