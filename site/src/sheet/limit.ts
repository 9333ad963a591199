// The limit that the spot has to meet.

import { LitElement, css, html } from "lit";
import { customElement, property } from "lit/decorators.js";
import { catalogue } from "../gen/catalogue";
import type * as core from "../gen/contract";
import { RecordChange } from "../look/events";
import { look } from "../look/look";
import type { QuantityChange } from "../look/quantity";
import "../look/quantity";
import { say } from "../words/words";
import { setPart } from "./draft";
import { fold, foldStyle } from "./fold";
import { anyProblem, problemAt } from "./problems";

@customElement("strike-limit")
export class LimitElement extends LitElement {
  static override styles = [
    look,
    foldStyle,
    css`
      .triple {
        display: grid;
        grid-template-columns: 1fr 1fr 1fr;
        gap: 0 0.5rem;
        align-items: start;
      }
    `,
  ];
  @property({ attribute: false }) record!: core.Record;
  @property({ attribute: false }) sheet: core.Sheet | undefined;

  override render() {
    const { limit } = this.record;
    const picked = catalogue.limits.find((l) => limit && l.scale === limit.scale && l.min === (limit.min ?? null) && l.max === (limit.max ?? null));
    return fold(
      say("limit.title"),
      sayLimit(limit),
      anyProblem(this.sheet, "limit"),
      html`<label
          >${say("limit.pick")}
          <select id="pick" @change=${(e: Event) => this.pick((e.target as HTMLSelectElement).value)}>
            <option value="">${say(limit ? "limit.pick.own" : "limit.pick.none")}</option>
            ${catalogue.limits.map(
              (l) => html`<option value=${l.key} ?selected=${l.key === picked?.key}>${say(`limit.${l.key}`)}: ${sayLimit(l)}</option>`,
            )}
          </select>
        </label>
        ${picked ? html`<p class="soft" id="limit-source">${picked.source}</p>` : ""}
        <div class="triple">
          <label
            >${say("limit.scale")}
            <select id="scale" @change=${(e: Event) => this.change({ scale: (e.target as HTMLSelectElement).value })}>
              <option value="" ?selected=${!limit?.scale}>${say("limit.scale.choose")}</option>
              ${this.scales().map((key) => html`<option value=${key} ?selected=${key === limit?.scale}>${key}</option>`)}
            </select>
          </label>
          ${this.bound("min")}${this.bound("max")}
        </div>
        <label
          >${say("limit.rule")}
          <select id="rule" @change=${(e: Event) => this.change({ rule: (e.target as HTMLSelectElement).value as core.Rule })}>
            ${catalogue.rules.map(
              (key) => html`<option value=${key} ?selected=${key === (limit?.rule ?? catalogue.rules[0])}>${say(`rule.${key}`)}</option>`,
            )}
          </select>
        </label>
        <p class="soft">${problemAt(this.sheet, "limit") || problemAt(this.sheet, "limit.scale") || say("limit.hint")}</p>
        ${limit ? html`<div class="row"><button id="remove" @click=${() => this.send({ ...this.record, limit: undefined })}>${say("limit.remove")}</button></div>` : ""}`,
    );
  }

  /** The scales that a limit can be given in: the reading's own first. */
  private scales(): string[] {
    const own = this.record.scale ? [this.record.scale] : [];
    const others = catalogue.scales.filter(({ leeb, key }) => !leeb && key !== this.record.scale).map(({ key }) => key);
    return [...own, ...others];
  }

  private bound(name: "min" | "max") {
    return html`<strike-quantity
      id=${name}
      .label=${say(`limit.${name}`)}
      .value=${this.record.limit?.[name]}
      .problem=${problemAt(this.sheet, `limit.${name}`)}
      @quantity-change=${(e: QuantityChange) => this.change({ [name]: e.value })}
    ></strike-quantity>`;
  }

  private pick(key: string): void {
    const picked = catalogue.limits.find((l) => l.key === key);
    if (!picked) return;
    const { scale, min, max } = picked;
    this.change({ scale, min: min ?? undefined, max: max ?? undefined });
  }

  private change(part: Partial<core.Limit>): void {
    this.send(setPart(this.record, "limit", { scale: "", ...this.record.limit, ...part }));
  }

  private send(record: core.Record): void {
    this.dispatchEvent(new RecordChange(record));
  }
}

/** A limit in a few words: "at most 225 HBW". */
export function sayLimit(limit: { scale: string; min?: number | null; max?: number | null } | undefined): string {
  if (!limit) return say("limit.none");
  const { scale } = limit;
  const min = limit.min ?? undefined;
  const max = limit.max ?? undefined;
  if (min !== undefined && max !== undefined) return say("limit.between", { min, max, scale });
  if (max !== undefined) return say("limit.at-most", { max, scale });
  return min === undefined ? say("limit.unfinished") : say("limit.at-least", { min, scale });
}
