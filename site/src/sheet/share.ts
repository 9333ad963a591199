// Handing the sheet over: its link, to share or to copy; and the next spot.

import { LitElement, html } from "lit";
import { customElement, property, query, state } from "lit/decorators.js";
import { look } from "../look/look";
import { say } from "../words/words";

@customElement("strike-share")
export class ShareElement extends LitElement {
  static override styles = look;
  /** the link of the sheet; "" while there is none */
  @property({ attribute: false }) link = "";
  @property({ attribute: false }) label = "";
  @state() private said = "";
  @query("#link") private field!: HTMLInputElement;

  override willUpdate(changed: Map<PropertyKey, unknown>): void {
    if (changed.has("link")) this.said = "";
  }

  override render() {
    return html`<section aria-labelledby="title">
      <h2 id="title">${say("share.title")}</h2>
      ${this.link ? this.shared() : html`<p>${say("share.none")}</p>`}
      <div class="row">
        <button id="new" @click=${() => this.dispatchEvent(new Event("new-spot", { bubbles: true, composed: true }))}>${say("sheet.new")}</button>
      </div>
    </section>`;
  }

  private shared() {
    return html`<p class="soft">${say("share.what")}</p>
      <label>${say("share.link")} <input id="link" readonly .value=${this.link} @focus=${() => this.field.select()} /></label>
      <div class="row">
        ${"share" in navigator ? html`<button id="share" class="main" @click=${this.share}>${say("share.share")}</button>` : ""}
        <button id="copy" @click=${this.copy}>${say("share.copy")}</button>
      </div>
      <p role="status">${this.said}</p>`;
  }

  private async share(): Promise<void> {
    try {
      await navigator.share({ title: this.label || say("app.name"), url: this.link });
    } catch (error) {
      // Closing the share sheet is no fault.
      if ((error as Error).name !== "AbortError") await this.copy();
    }
  }

  private async copy(): Promise<void> {
    try {
      await navigator.clipboard.writeText(this.link);
      this.said = say("share.copied");
    } catch {
      this.said = say("share.copy.failed");
      this.field.focus();
    }
  }
}
