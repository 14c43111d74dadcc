import { css, html, LitElement } from 'lit';
import { customElement } from 'lit/decorators.js';
import { controlStyles } from '../type/index.ts';
import { KEY_GROUPS } from './keys.ts';

const styles = css`
  dialog {
    border: 1px solid var(--ink);
    background: var(--ground);
    color: var(--ink);
    padding: 20px 28px 24px;
    max-width: min(760px, calc(100vw - 32px));
    box-sizing: border-box;
    font-size: var(--text);
    line-height: 21px;
  }
  dialog::backdrop {
    background: color-mix(in srgb, var(--ground) 72%, transparent);
  }
  header {
    display: flex;
    align-items: baseline;
    justify-content: space-between;
    border-bottom: 1px solid var(--ink);
    padding-bottom: 4px;
  }
  h2 {
    font-size: var(--title);
    font-weight: 600;
    margin: 0;
  }
  h3 {
    font-size: var(--text);
    font-weight: 600;
    margin: 14px 0 2px;
  }
  .groups {
    display: flex;
    flex-wrap: wrap;
    gap: 0 44px;
  }
  dl {
    display: grid;
    grid-template-columns: max-content 1fr;
    gap: 0 18px;
    margin: 0;
  }
  dt {
    min-width: 5em;
  }
  dd {
    margin: 0;
    color: var(--second);
  }
`;

/** The list of keys, over the workbench until it is closed. */
@customElement('bl-help')
export class HelpElement extends LitElement {
  static override styles = [controlStyles, styles];

  get #dialog(): HTMLDialogElement {
    return this.renderRoot.querySelector('dialog')!;
  }

  /** Whether the list is on the screen. */
  get open(): boolean {
    return this.#dialog?.open ?? false;
  }

  /** Show the list, or close it. */
  toggle(): void {
    if (this.open) this.#dialog.close();
    else this.#dialog.showModal();
  }

  override render() {
    return html`<dialog aria-labelledby="title">
      <header>
        <h2 id="title">Keys</h2>
        <button type="button" @click=${() => this.#dialog.close()}>close</button>
      </header>
      <div class="groups">
        ${KEY_GROUPS.map(
          ({ name, lines }) => html`<section>
            <h3>${name}</h3>
            <dl>${lines.map(({ keys, does }) => html`<dt>${keys.join(' or ')}</dt><dd>${does}</dd>`)}</dl>
          </section>`,
        )}
      </div>
    </dialog>`;
  }
}

declare global {
  interface HTMLElementTagNameMap {
    'bl-help': HelpElement;
  }
}
