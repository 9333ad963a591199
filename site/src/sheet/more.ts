// How many readings a wanted uncertainty would take.

import { LitElement, html } from "lit";
import { customElement, property, state } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { look } from "../look/look";
import type { QuantityChange } from "../look/quantity";
import "../look/quantity";
import { say, sayCode } from "../words/words";

@customElement("strike-more")
export class MoreElement extends LitElement {
  static override styles = look;
  @property({ attribute: false }) sheet: core.Sheet | undefined;
  @property({ attribute: false }) ask!: (wanted: core.Wanted) => Promise<core.MoreReadings>;
  @state() private scale = "";
  @state() private expanded: number | undefined;
  @state() private answer: core.MoreReadings | undefined;

  override willUpdate(changed: Map<PropertyKey, unknown>): void {
    if (changed.has("sheet") || changed.has("scale") || changed.has("expanded")) void this.find();
  }

  override render() {
    const rows = this.sheet?.scales.filter((row) => row.status === "ok") ?? [];
    if (rows.length === 0) return "";
    return html`<details>
      <summary>${say("more.title")}</summary>
      <label
        >${say("more.scale")}
        <select id="scale" @change=${(e: Event) => (this.scale = (e.target as HTMLSelectElement).value)}>
          ${rows.map((row) => html`<option value=${row.scale} ?selected=${row.scale === this.chosen(rows)}>${row.scale}</option>`)}
        </select>
      </label>
      <strike-quantity
        id="expanded"
        .label=${say("more.expanded")}
        .unit=${this.chosen(rows)}
        .value=${this.expanded}
        @quantity-change=${(e: QuantityChange) => (this.expanded = e.value)}
      ></strike-quantity>
      <p role="status" id="answer">${this.answer ? sayCode(this.answer.code, this.answer.params) : ""}</p>
    </details>`;
  }

  /** The scale that is asked for: the verdict's unless the user chose another. */
  private chosen(rows: core.Row[]): string {
    const wanted = [this.scale, this.sheet?.verdict.scale, "HBW", "HV"];
    return wanted.find((key) => rows.some((row) => row.scale === key)) ?? rows[0]!.scale;
  }

  private async find(): Promise<void> {
    this.answer = undefined;
    const { sheet, expanded } = this;
    if (!sheet || expanded === undefined || !(expanded > 0)) return;
    const scale = this.chosen(sheet.scales.filter((row) => row.status === "ok"));
    try {
      const answer = await this.ask({ scale, expanded });
      if (sheet === this.sheet && expanded === this.expanded) this.answer = answer;
    } catch {
      // A refusal is the sheet's own: it says so above.
    }
  }
}
