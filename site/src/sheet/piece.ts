// The test piece, and which devices it can be tested with.

import { LitElement, css, html } from "lit";
import { customElement, property } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { RecordChange } from "../look/events";
import { look } from "../look/look";
import type { QuantityChange } from "../look/quantity";
import "../look/quantity";
import { say } from "../words/words";
import { setPart } from "./draft";
import { fold, foldStyle } from "./fold";
import { anyProblem, problemAt } from "./problems";

type Quantity = "mass_kg" | "thickness_mm" | "radius_mm" | "ra_um" | "temperature_c" | "case_mm" | "spacing_mm" | "edge_mm";
type Length = "length_mm" | "width_mm" | "outer_diameter_mm" | "wall_mm";

/** What each kind of shape is measured by. */
const lengths: { [kind in core.ShapeKind]: Length[] } = {
  none: [],
  plate: ["length_mm", "width_mm"],
  pipe: ["outer_diameter_mm", "wall_mm", "length_mm"],
  bar: ["outer_diameter_mm", "length_mm"],
};

const units: { [name in Quantity | Length]: string } = {
  mass_kg: "kg",
  thickness_mm: "mm",
  radius_mm: "mm",
  ra_um: "µm",
  temperature_c: "°C",
  case_mm: "mm",
  spacing_mm: "mm",
  edge_mm: "mm",
  length_mm: "mm",
  width_mm: "mm",
  outer_diameter_mm: "mm",
  wall_mm: "mm",
};

@customElement("strike-piece")
export class PieceElement extends LitElement {
  static override styles = [
    look,
    foldStyle,
    css`
      ul {
        display: grid;
        gap: 0.3rem;
        margin: 0.4rem 0 0;
        padding: 0;
        list-style: none;
      }
      li b {
        display: inline-block;
        min-width: 3.2rem;
      }
      .no {
        color: var(--soft);
      }
    `,
  ];
  @property({ attribute: false }) record!: core.Record;
  @property({ attribute: false }) sheet: core.Sheet | undefined;

  override render() {
    const { piece } = this.record;
    const bad = anyProblem(this.sheet, "piece");
    const state = bad ? "piece.bad" : piece ? "piece.stated" : "piece.unstated";
    const kind = piece?.shape?.kind ?? "none";
    return fold(
      say("piece.title"),
      say(state),
      bad,
      html`<div class="pair">
          <label
            >${say("piece.shape")}
            <select id="shape" @change=${(e: Event) => this.shape({ kind: (e.target as HTMLSelectElement).value as core.ShapeKind })}>
              ${(Object.keys(lengths) as core.ShapeKind[]).map(
                (key) => html`<option value=${key} ?selected=${key === kind}>${say(`piece.shape.${key}`)}</option>`,
              )}
            </select>
          </label>
          <label
            >${say("piece.support")}
            <select id="support" @change=${(e: Event) => this.change({ support: ((e.target as HTMLSelectElement).value || undefined) as core.Support })}>
              ${["", "free", "supported", "coupled"].map(
                (key) => html`<option value=${key} ?selected=${key === (piece?.support ?? "")}>${say(`piece.support.${key || "unsaid"}`)}</option>`,
              )}
            </select>
          </label>
        </div>
        <div class="pair">
          ${lengths[kind].map((name) => this.length(name))}${this.quantity("thickness_mm")}${this.quantity("mass_kg")}
          ${this.quantity("ra_um")}${this.quantity("radius_mm")}${this.quantity("temperature_c")}${this.quantity("case_mm")}
          ${this.quantity("spacing_mm")}${this.quantity("edge_mm")}
        </div>
        ${this.computed()} ${this.devices()}`,
    );
  }

  private quantity(name: Quantity) {
    return html`<strike-quantity
      id=${name}
      .label=${say(`piece.${name}`)}
      .unit=${units[name]}
      .value=${this.record.piece?.[name]}
      .problem=${problemAt(this.sheet, `piece.${name}`)}
      @quantity-change=${(e: QuantityChange) => this.change({ [name]: e.value })}
    ></strike-quantity>`;
  }

  private length(name: Length) {
    return html`<strike-quantity
      id=${name}
      .label=${say(`piece.${name}`)}
      .unit=${units[name]}
      .value=${this.record.piece?.shape?.[name]}
      .problem=${problemAt(this.sheet, `piece.shape.${name}`)}
      @quantity-change=${(e: QuantityChange) => this.shape({ [name]: e.value })}
    ></strike-quantity>`;
  }

  private computed() {
    const { piece } = this.sheet ?? {};
    if (!piece?.massComputed || piece.massKg === null) return "";
    return html`<p class="soft" id="mass">${say("piece.mass.computed", { mass: piece.massKg })}</p>`;
  }

  /** Before the first reading: which of the devices suit this spot. */
  private devices() {
    if (!this.sheet || !this.record.piece) return "";
    return html`<h3>${say("piece.devices")}</h3>
      <ul id="devices">
        ${this.sheet.devices.map(
          (fit) => html`<li class=${fit.suits ? "" : "no"} data-device=${fit.device}>
            <b>${fit.device}</b> ${fit.suits ? say("piece.suits") : fit.shortfalls.map((kind) => say(`shortfall.${kind}`)).join(", ")}${fit.curve
              ? ""
              : `. ${say("piece.no-curve")}`}
          </li>`,
        )}
      </ul>
      <p class="soft">${say("piece.unknown")}</p>`;
  }

  private change(part: Partial<core.Piece>): void {
    this.dispatchEvent(new RecordChange(setPart(this.record, "piece", part)));
  }

  private shape(part: Partial<core.Shape>): void {
    const shape: core.Shape = { kind: "none", ...this.record.piece?.shape, ...part };
    this.change({ shape: shape.kind === "none" ? undefined : shape });
  }
}
