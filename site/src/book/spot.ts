// What can be done with a spot of the Book: a dialog over the list.

import { LitElement, css, html } from "lit";
import { customElement, property, query, state } from "lit/decorators.js";
import type { Core } from "../core/client";
import { look } from "../look/look";
import type { Job, Spot } from "../store";
import { say } from "../words/words";
import { SpotOpen } from "./events";
import { download, fileName, writeSpot } from "./file";
import { qr } from "./qr";

@customElement("strike-book-spot")
export class SpotDialog extends LitElement {
  static override styles = [
    look,
    css`
      dialog {
        width: min(32rem, calc(100vw - 1.5rem));
        max-height: calc(100dvh - 1.5rem);
        padding: var(--gap);
        color: var(--ink);
        background: var(--card);
        border: 1px solid var(--edge);
        border-radius: var(--round);
      }
      dialog::backdrop {
        background: rgb(0 0 0 / 50%);
      }
      h2 {
        overflow-wrap: anywhere;
      }
      .move {
        display: grid;
        grid-template-columns: 1fr auto;
        gap: 0.5rem;
        align-items: end;
      }
      .qr {
        display: block;
        width: min(100%, 18rem);
        margin-top: 0.6rem;
      }
    `,
  ];
  @property({ attribute: false }) core!: Core;
  @property({ attribute: false }) jobs: Job[] = [];
  @state() spot: Spot | undefined;
  @state() private link = "";
  @state() private said = "";
  @query("dialog") private dialog!: HTMLDialogElement;
  @query("#to") private to!: HTMLSelectElement;
  @query("#link") private field!: HTMLInputElement;

  /** Opens the dialog for a spot. */
  show(spot: Spot): void {
    this.spot = spot;
    this.link = this.said = "";
    void this.updateComplete.then(() => this.dialog.showModal());
    void this.core
      .encodeLink(spot.kept.record)
      .then((fragment) => {
        const address = new URL(location.href);
        address.hash = fragment;
        if (spot === this.spot) this.link = address.href;
      })
      .catch(() => undefined); // without the core there is no link, and all else works
  }

  override render() {
    const { spot } = this;
    const others = this.jobs.filter(({ id }) => id !== spot?.job);
    return html`<dialog aria-labelledby="title">
      <h2 id="title">${spot?.kept.record.label || say("book.unlabelled")}</h2>
      <div class="row">
        <button id="open" class="main" @click=${() => this.open()}>${say("book.spot.open")}</button>
        <button id="duplicate" @click=${() => this.act("duplicate")}>${say("book.spot.duplicate")}</button>
        <button id="delete" @click=${() => this.act("delete")}>${say("book.spot.delete")}</button>
      </div>
      ${others.length === 0
        ? ""
        : html`<div class="move">
            <label
              >${say("book.spot.to")}
              <select id="to">
                ${others.map(({ id, name }) => html`<option value=${id}>${name}</option>`)}
              </select>
            </label>
            <button id="move" @click=${() => this.act("move", this.to.value)}>${say("book.spot.move")}</button>
          </div>`}
      ${this.link ? this.linked() : ""}
      <div class="row">
        <button id="json" @click=${this.json}>${say("book.spot.json")}</button>
        <button id="close" @click=${() => this.dialog.close()}>${say("book.spot.close")}</button>
      </div>
    </dialog>`;
  }

  private linked() {
    return html`<label>${say("book.spot.link")} <input id="link" readonly .value=${this.link} @focus=${() => this.field.select()} /></label>
      <div class="row"><button id="copy" @click=${this.copy}>${say("share.copy")}</button></div>
      <p role="status">${this.said}</p>
      ${qr(this.link) ?? html`<p class="soft" id="no-qr">${say("qr.too-long")}</p>`}`;
  }

  private open(): void {
    this.dialog.close();
    this.dispatchEvent(new SpotOpen(this.spot!));
  }

  private act(what: string, detail?: string): void {
    this.dialog.close();
    this.dispatchEvent(new CustomEvent(what, { detail }));
  }

  private json(): void {
    download(fileName(this.spot!.kept.record.label ?? "", "json"), "application/json", writeSpot(this.spot!));
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
