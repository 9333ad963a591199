// Before the readings: what their mean will decide. A card that can be kept on
// the screen while they are taken.

import { LitElement, css, html } from "lit";
import { customElement, property, state } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { PlanChange } from "../look/events";
import { look } from "../look/look";
import type { QuantityChange } from "../look/quantity";
import "../look/quantity";
import { say, sayCode } from "../words/words";
import { sayLimit } from "./limit";

@customElement("strike-gonogo")
export class GoNoGoElement extends LitElement {
  static override styles = [
    look,
    css`
      :host([pinned]) {
        position: sticky;
        top: 0;
        z-index: 1;
      }
      :host([pinned]) section {
        border: 2px solid var(--accent);
      }
      ul {
        margin: 0;
        padding: 0;
        list-style: none;
        font-variant-numeric: tabular-nums;
      }
      li {
        padding: 0.15rem 0;
      }
      li b {
        font-size: 1.1rem;
      }
      .go b {
        color: var(--go);
      }
      .no b {
        color: var(--stop);
      }
      .pair {
        display: grid;
        grid-template-columns: 1fr 1fr;
        gap: 0 0.5rem;
      }
    `,
  ];
  @property({ attribute: false }) record!: core.Record;
  @property({ attribute: false }) answer: core.GoNoGo | undefined;
  @property({ attribute: false }) plan!: { n: number; sd: number };
  @property({ type: Boolean, reflect: true }) pinned = false;
  @state() private open = false;
  @state() private wrong: "" | "n" | "sd" = "";

  override render() {
    const { answer } = this;
    if (!answer) return "";
    return html`<section aria-labelledby="title">
      <h2 id="title">${say("gonogo.title", { limit: sayLimit(this.record.limit) })}</h2>
      ${answer.reason ? html`<p>${sayCode(answer.reasonCode, answer.reasonParams)}</p>` : this.spans(answer)}
      <p class="soft">${say("gonogo.assumed", { n: this.plan.n, sd: this.plan.sd, scale: answer.scale })}</p>
      <div class="row">
        <button id="pin" aria-pressed=${this.pinned} @click=${() => (this.pinned = !this.pinned)}>${say(this.pinned ? "gonogo.unpin" : "gonogo.pin")}</button>
        <button id="assume" aria-expanded=${this.open} @click=${() => (this.open = !this.open)}>${say("gonogo.change")}</button>
      </div>
      ${this.open ? this.assumptions(answer.scale) : ""}
    </section>`;
  }

  private spans(answer: core.GoNoGo) {
    const { scale } = answer;
    const words = (span: string[]) => ({ lo: span[0]!, hi: span[1]!, scale });
    return html`<ul id="spans">
      ${answer.shownConforms.length === 0
        ? html`<li class="go"><b>${say("gonogo.none")}</b></li>`
        : html`<li class="go"><b>${say("gonogo.span", words(answer.shownConforms))}</b> ${say("outcome.conforms")}</li>`}
      ${answer.shownDoesNotConform.map((span) => html`<li class="no"><b>${say("gonogo.span", words(span))}</b> ${say("outcome.does-not-conform")}</li>`)}
      <li>${say("gonogo.between")}</li>
    </ul>`;
  }

  private assumptions(scale: string) {
    return html`<div class="pair">
      <strike-quantity id="n" .label=${say("gonogo.n")} .value=${this.plan.n} .problem=${this.wrong === "n" ? say("gonogo.n.wrong") : ""} @quantity-change=${(e: QuantityChange) => this.assume({ n: e.value })}></strike-quantity>
      <strike-quantity id="sd" .label=${say("gonogo.sd")} .unit=${scale} .value=${this.plan.sd} .problem=${this.wrong === "sd" ? say("gonogo.sd.wrong") : ""} @quantity-change=${(e: QuantityChange) => this.assume({ sd: e.value })}></strike-quantity>
    </div>`;
  }

  private assume(part: { n?: number | undefined; sd?: number | undefined }): void {
    const n = part.n ?? this.plan.n;
    const sd = part.sd ?? this.plan.sd;
    this.wrong = !Number.isInteger(n) || n < 1 || n > 1000 ? "n" : sd < 0 || sd > 1000 ? "sd" : "";
    if (this.wrong) return;
    this.dispatchEvent(new PlanChange({ n, sd }));
  }
}
