// The spot and its metal: what the readings are taken on, and with.

import { LitElement, css, html } from "lit";
import { customElement, property } from "lit/decorators.js";
import { catalogue } from "../gen/catalogue";
import type * as core from "../gen/contract";
import { RecordChange } from "../look/events";
import { look } from "../look/look";
import type { QuantityChange } from "../look/quantity";
import "../look/quantity";
import { say } from "../words/words";
import { measureWith } from "./draft";

@customElement("strike-spot")
export class SpotElement extends LitElement {
  static override styles = [
    look,
    css`
      .pair {
        display: grid;
        grid-template-columns: repeat(auto-fit, minmax(9rem, 1fr));
        gap: 0 0.5rem;
      }
    `,
  ];
  @property({ attribute: false }) record!: core.Record;

  override render() {
    return html`<section aria-labelledby="title">
      <h2 id="title">${say("spot.title")}</h2>
      <label
        >${say("spot.label")}
        <input
          id="label"
          maxlength="200"
          autocomplete="off"
          placeholder=${say("spot.label.hint")}
          .value=${this.record.label ?? ""}
          @input=${(e: InputEvent) => this.change({ label: (e.target as HTMLInputElement).value || undefined })}
        />
      </label>
      <label
        >${say("spot.metal")}
        <select id="metal" @change=${(e: Event) => this.change({ group: chosen(e) || undefined })}>
          <option value="" ?selected=${!this.record.group}>${say("spot.metal.choose")}</option>
          ${catalogue.groups.map(
            ({ key }) => html`<option value=${key} ?selected=${key === this.record.group}>${say(`metal.${key}`)}</option>`,
          )}
        </select>
      </label>
      <div class="pair"><label
        >${say("spot.measured")}
        <select id="measured" @change=${(e: Event) => this.send(measureWith(this.record, chosen(e)))}>
          <optgroup label=${say("spot.measured.device")}>
            ${catalogue.devices.map((device) =>
              this.option(device.scale, say(device.curve ? "spot.device" : "spot.device.no-curve", { key: device.key, scale: device.scale })),
            )}
          </optgroup>
          <optgroup label=${say("spot.measured.direct")}>
            ${catalogue.scales.filter((scale) => scale.direct).map(({ key }) => this.option(key, `${key}, ${say(`scale.name.${key}`)}`))}
          </optgroup>
        </select>
      </label>
      ${this.direction()}</div>
      <div class="pair">
        <label
          >${say("spot.zone")}
          <select id="zone" @change=${(e: Event) => this.change({ zone: (chosen(e) || undefined) as core.Zone | undefined })}>
            ${["", "base", "haz", "weld", "other"].map(
              (key) => html`<option value=${key} ?selected=${key === (this.record.zone ?? "")}>${say(`zone.${key || "unsaid"}`)}</option>`,
            )}
          </select>
        </label>
        <strike-quantity
          id="position"
          .label=${say("spot.position")}
          .unit=${"mm"}
          .value=${this.record.position_mm}
          @quantity-change=${(e: QuantityChange) => this.change({ position_mm: e.value })}
        ></strike-quantity>
      </div>
    </section>`;
  }

  private option(scale: string, text: string) {
    return html`<option value=${scale} ?selected=${scale === this.record.scale}>${text}</option>`;
  }

  private direction() {
    const device = catalogue.devices.find(({ key, scale }) => key === this.record.device && scale === this.record.scale);
    if (!device) return "";
    return html`<label
      >${say("spot.direction")}
      <select id="direction" @change=${(e: Event) => this.change({ direction: chosen(e) as core.Direction })}>
        ${device.directions.map(
          (key) => html`<option value=${key} ?selected=${key === this.record.direction}>${say(`direction.${key}`)}</option>`,
        )}
      </select>
    </label>`;
  }

  private change(part: Partial<core.Record>): void {
    this.send({ ...this.record, ...part });
  }

  private send(record: core.Record): void {
    this.dispatchEvent(new RecordChange(record));
  }
}

function chosen(event: Event): string {
  return (event.target as HTMLSelectElement).value;
}
