// The check of the instrument on a test block.

import { LitElement, html } from "lit";
import { customElement, property, query } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { RecordChange } from "../look/events";
import { look } from "../look/look";
import type { QuantityChange } from "../look/quantity";
import "../look/quantity";
import { say } from "../words/words";
import { flows, setPart } from "./draft";
import { splitAll, value } from "./entry";
import { fold, foldStyle } from "./fold";
import { anyProblem, problemAt } from "./problems";

@customElement("strike-block")
export class BlockElement extends LitElement {
  static override styles = [look, foldStyle];
  @property({ attribute: false }) record!: core.Record;
  @property({ attribute: false }) sheet: core.Sheet | undefined;
  @query("#readings") private field!: HTMLInputElement;

  override render() {
    const check = this.sheet?.block;
    const { block } = this.record;
    const unit = this.record.scale ?? "";
    const readings = block?.readings?.map((reading) => reading ?? "").join(" ") ?? "";
    return fold(
      say("block.title"),
      say(`block.status.${check?.status ?? "none"}`),
      anyProblem(this.sheet, "block"),
      html`<div class="pair">
          ${this.quantity("certified", unit)}${this.quantity("expanded_u", unit)}
        </div>
        <label
          >${say("block.readings")}
          <input
            id="readings"
            inputmode="decimal"
            autocomplete="off"
            aria-describedby="readings-problem"
            .value=${readings}
            @change=${() => this.change({ readings: this.read() })}
          />
        </label>
        <p id="readings-problem" class="soft">${problemAt(this.sheet, "block.readings") || say("block.readings.hint")}</p>
        <div class="pair">
          ${this.quantity("tolerance", unit)}
          <label
            >${say("block.taken")}
            <input id="taken" type="datetime-local" .value=${local(block?.taken)} @change=${(e: Event) => this.change({ taken: instant((e.target as HTMLInputElement).value) })} />
          </label>
        </div>
        <label
          >${say("block.use")}
          <select id="use" @change=${(e: Event) => this.change({ use: (e.target as HTMLSelectElement).value as core.BlockUse })}>
            ${["uncertainty", "correction"].map(
              (key) => html`<option value=${key} ?selected=${key === (block?.use ?? "uncertainty")}>${say(`block.use.${key}`)}</option>`,
            )}
          </select>
        </label>
        ${this.outcome(unit)}
        <h3>${say("block.without")}</h3>
        <strike-quantity
          id="permissible"
          .label=${say("block.permissible", { scale: unit })}
          .unit=${unit}
          .value=${this.record.permissible_error}
          .problem=${problemAt(this.sheet, "permissible_error")}
          @quantity-change=${(e: QuantityChange) => this.send({ ...this.record, permissible_error: e.value })}
        ></strike-quantity>
        <p class="soft">${say("block.permissible.hint")}</p>`,
    );
  }

  private quantity(name: "certified" | "expanded_u" | "tolerance", unit: string) {
    return html`<strike-quantity
      id=${name}
      .label=${say(`block.${name}`)}
      .unit=${unit}
      .value=${this.record.block?.[name]}
      .problem=${problemAt(this.sheet, `block.${name}`)}
      @quantity-change=${(e: QuantityChange) => this.change({ [name]: e.value })}
    ></strike-quantity>`;
  }

  private outcome(scale: string) {
    const check = this.sheet?.block;
    if (!check || check.error === null) return "";
    const words = { error: check.error, scale, n: check.n, sd: check.sd ?? 0, tolerance: check.tolerance ?? "" };
    return html`<p id="outcome">${say(check.tolerance === null ? "block.outcome" : "block.outcome.tolerance", words)}</p>`;
  }

  private read(): (number | string)[] | undefined {
    const readings = splitAll(this.field.value, flows(this.record)).map(value);
    return readings.length > 0 ? readings : undefined;
  }

  private change(part: Partial<core.Block>): void {
    // The moment of the check is the moment its readings are written down, until told.
    const taken = part.readings && !this.record.block?.taken ? { taken: instant(local(new Date().toISOString())) } : {};
    const record = setPart(this.record, "block", { ...taken, ...part });
    // What the offset is used for says nothing by itself.
    const rest = Object.entries(record.block ?? {}).filter(([key, v]) => v !== undefined && key !== "use");
    this.send(rest.length > 0 ? record : { ...record, block: undefined });
  }

  private send(record: core.Record): void {
    this.dispatchEvent(new RecordChange(record));
  }
}

/** A time of the record as the field for local times takes it. */
function local(time: string | undefined): string {
  const date = new Date(time ?? "");
  if (Number.isNaN(date.getTime())) return "";
  return new Date(date.getTime() - date.getTimezoneOffset() * 60_000).toISOString().slice(0, 16);
}

/** A local time as the record takes it. */
function instant(text: string): string | undefined {
  const date = new Date(text);
  return Number.isNaN(date.getTime()) ? undefined : date.toISOString().replace(/\.\d+/, "");
}
