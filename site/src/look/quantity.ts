// A field for one number with its unit. What is typed stays, number or not; a
// decimal comma is as good as a point.

import { LitElement, css, html } from "lit";
import { customElement, property, query, state } from "lit/decorators.js";
import { say } from "../words/words";
import { look } from "./look";

/** The number of a field has changed; undefined where there is none. */
export class QuantityChange extends Event {
  static readonly type = "quantity-change";
  constructor(readonly value: number | undefined) {
    super(QuantityChange.type);
  }
}

@customElement("strike-quantity")
export class QuantityElement extends LitElement {
  static override shadowRootOptions = { ...LitElement.shadowRootOptions, delegatesFocus: true };
  static override styles = [
    look,
    css`
      div {
        position: relative;
      }
      span {
        position: absolute;
        right: 0.7rem;
        top: 50%;
        transform: translateY(-50%);
        color: var(--soft);
        pointer-events: none;
      }
      .unit input {
        padding-right: 3.6rem;
      }
      input {
        font-variant-numeric: tabular-nums;
      }
      input[aria-invalid="true"] {
        border: 2px solid var(--stop);
      }
      p:empty {
        display: none;
      }
      p {
        color: var(--stop);
        font-size: 0.9rem;
      }
    `,
  ];
  @property() label = "";
  @property() unit = "";
  @property({ attribute: false }) value: number | undefined;
  /** what is wrong with the number, in one sentence; "" for nothing */
  @property() problem = "";
  @state() private text = "";
  @query("input") private field!: HTMLInputElement;

  override willUpdate(changed: Map<PropertyKey, unknown>): void {
    if (changed.has("value") && this.value !== read(this.text)) this.text = this.value === undefined ? "" : String(this.value);
  }

  override render() {
    const noNumber = this.text.trim() !== "" && read(this.text) === undefined;
    const problem = noNumber ? say("field.no-number", { text: this.text }) : this.problem;
    return html`<label
        >${this.label}
        <div class=${this.unit ? "unit" : ""}>
          <input
            inputmode="decimal"
            autocomplete="off"
            aria-invalid=${problem !== ""}
            aria-describedby="problem"
            .value=${this.text}
            @input=${this.typed}
          /><span>${this.unit}</span>
        </div>
      </label>
      <p id="problem">${problem}</p>`;
  }

  private typed(): void {
    this.text = this.field.value;
    this.dispatchEvent(new QuantityChange(read(this.text)));
  }
}

/** The number that a text says, if it says one. */
function read(text: string): number | undefined {
  const plain = text.trim().replace(",", ".");
  const number = Number(plain);
  return plain !== "" && /^[-+.\deE]+$/.test(plain) && Number.isFinite(number) ? number : undefined;
}
