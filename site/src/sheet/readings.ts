// The readings: they flow in as they are typed, and can be struck for a reason.

import { LitElement, css, html } from "lit";
import { customElement, property, query, state } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { EntryChange, RecordChange } from "../look/events";
import { look } from "../look/look";
import { say } from "../words/words";
import { add, flows, strike, takeBack } from "./draft";
import { split, splitAll, value } from "./entry";

type Mark = "" | "suspect" | "bad" | "struck";

@customElement("strike-readings")
export class ReadingsElement extends LitElement {
  static override styles = [
    look,
    css`
      #entry {
        font-size: 1.6rem;
        font-variant-numeric: tabular-nums;
      }
      ol {
        display: flex;
        flex-wrap: wrap;
        gap: 0.5rem;
        margin: var(--gap) 0 0;
        padding: 0;
        list-style: none;
      }
      ol button {
        min-width: 4rem;
        padding: 0.3rem 0.6rem;
        color: var(--ink);
        border-color: var(--edge);
        font-size: 1.1rem;
        font-variant-numeric: tabular-nums;
        overflow-wrap: anywhere;
      }
      ol small {
        display: block;
        font-size: 0.75rem;
        font-weight: 600;
      }
      .struck span {
        text-decoration: line-through;
      }
      button.struck {
        border-style: dashed;
        color: var(--soft);
      }
      button.suspect {
        border: 2px solid var(--warn);
        background: var(--warn-soft);
      }
      button.bad {
        border: 2px solid var(--stop);
        background: var(--stop-soft);
      }
      button[aria-expanded="true"] {
        outline: 3px solid var(--accent);
      }
      .panel {
        margin-top: var(--gap);
        padding: var(--gap);
        background: var(--accent-soft);
        border-radius: var(--round);
      }
      .panel h3 {
        margin-top: 0;
      }
    `,
  ];
  @property({ attribute: false }) record!: core.Record;
  @property({ attribute: false }) entry = "";
  @property({ attribute: false }) sheet: core.Sheet | undefined;
  /** position of the reading whose panel is open */
  @state() private opened: number | undefined;
  @state() private reasonMissing = false;
  @query("#entry") private field!: HTMLInputElement;
  @query("#reason") private reason!: HTMLInputElement | null;

  override render() {
    const flow = flows(this.record);
    const scale = this.record.scale;
    return html`<section aria-labelledby="title">
      <h2 id="title">${say("readings.title")}</h2>
      <label
        >${scale ? say("readings.entry", { scale }) : say("readings.entry.any")}
        <input
          id="entry"
          inputmode="decimal"
          autocomplete="off"
          enterkeyhint="done"
          aria-describedby="hint"
          .value=${this.entry}
          @input=${() => this.typed(this.field.value)}
          @keydown=${this.key}
          @paste=${this.paste}
        />
      </label>
      <p class="soft" id="hint">${say(flow ? "readings.hint.flow" : "readings.hint.plain")}</p>
      ${this.record.readings.length === 0 ? html`<p>${say("readings.none")}</p>` : this.list()} ${this.panel()}
    </section>`;
  }

  private list() {
    return html`<ol aria-label=${say("readings.list")}>
        ${this.record.readings.map((reading, at) => {
          const mark = this.mark(reading, at);
          const words = { number: at + 1, value: shown(reading) };
          return html`<li>
            <button
              class=${mark}
              data-at=${at}
              aria-expanded=${this.opened === at}
              aria-label=${say(mark ? `readings.item.${mark}` : "readings.item", words)}
              @click=${() => this.open(this.opened === at ? undefined : at)}
            >
              <span>${shown(reading)}</span>${mark ? html`<small>${say(`readings.${mark}`)}</small>` : ""}
            </button>
          </li>`;
        })}
      </ol>
      <div class="row"><button id="back" @click=${this.back}>${say("readings.back")}</button></div>`;
  }

  private mark(reading: core.Reading, at: number): Mark {
    if (reading.struck) return "struck";
    const found = (code: string): boolean =>
      !!this.sheet?.findings.some((f) => f.code === code && f.field === `readings[${at}]`);
    if (found("not-a-reading")) return "bad";
    return found("suspect-reading") ? "suspect" : "";
  }

  private panel() {
    const at = this.opened;
    const reading = at === undefined ? undefined : this.record.readings[at];
    if (at === undefined || !reading) return "";
    const words = { number: at + 1, value: shown(reading), reason: reading.struck ?? "" };
    if (reading.struck) {
      return html`<div class="panel" role="group" aria-labelledby="panel">
        <h3 id="panel">${say("readings.struck.title", words)}</h3>
        <div class="row">
          <button id="restore" class="main" @click=${() => this.finish(strike(this.record, at))}>${say("readings.restore")}</button>
          <button @click=${() => this.open(undefined)}>${say("readings.close")}</button>
        </div>
      </div>`;
    }
    return html`<div class="panel" role="group" aria-labelledby="panel">
      <h3 id="panel">${say("readings.strike.title", words)}</h3>
      <label
        >${say("readings.strike.reason")}
        <input
          id="reason"
          list="reasons"
          maxlength="200"
          autocomplete="off"
          aria-invalid=${this.reasonMissing}
          aria-describedby="missing"
          @keydown=${(e: KeyboardEvent) => e.key === "Enter" && this.strike(at)}
        />
      </label>
      <p id="missing" role="alert">${this.reasonMissing ? say("readings.strike.missing") : ""}</p>
      <datalist id="reasons">
        ${["tilted", "spacing", "surface", "typing"].map((key) => html`<option>${say(`reason.${key}`)}</option>`)}
      </datalist>
      <div class="row">
        <button id="strike" class="main" @click=${() => this.strike(at)}>${say("readings.strike.do")}</button>
        <button @click=${() => this.open(undefined)}>${say("readings.close")}</button>
      </div>
    </div>`;
  }

  /** Takes typed text in: whole readings join the list, the rest stays. */
  private typed(text: string): void {
    if (/^[.,]$/.test(text) && this.record.readings.length > 0 && flows(this.record)) {
      // The reading that three digits have just made goes on behind its point.
      this.reopen((last) => last + text);
      return;
    }
    const { readings, rest } = split(text, flows(this.record));
    this.take(readings, rest);
  }

  private take(readings: string[], rest: string): void {
    if (this.field.value !== rest) this.field.value = rest;
    this.dispatchEvent(new EntryChange(rest));
    if (readings.length > 0) this.send(add(this.record, readings.map(value)));
  }

  private key(event: KeyboardEvent): void {
    if (event.key === "Enter") {
      this.take(splitAll(this.field.value, flows(this.record)), "");
    } else if (event.key === "Backspace" && this.field.value === "" && this.record.readings.length > 0) {
      event.preventDefault();
      this.back();
    }
  }

  private paste(event: ClipboardEvent): void {
    const text = event.clipboardData?.getData("text") ?? "";
    event.preventDefault();
    this.take(splitAll(this.field.value + text, flows(this.record)), "");
  }

  /** Takes the last reading back into the field, less its last digit. */
  private back(): void {
    this.reopen((text) => text.slice(0, -1));
    this.field.focus();
  }

  private reopen(change: (text: string) => string): void {
    const { record, text } = takeBack(this.record);
    this.field.value = change(text);
    this.dispatchEvent(new EntryChange(this.field.value));
    this.finish(record);
  }

  private strike(at: number): void {
    const reason = this.reason?.value.trim();
    this.reasonMissing = !reason;
    if (reason) this.finish(strike(this.record, at, reason));
    else this.reason?.focus();
  }

  private open(at: number | undefined): void {
    this.opened = at;
    this.reasonMissing = false;
    void this.updateComplete.then(() => this.reason?.focus());
  }

  private finish(record: core.Record): void {
    this.opened = undefined;
    this.reasonMissing = false;
    this.send(record);
  }

  private send(record: core.Record): void {
    this.dispatchEvent(new RecordChange(record));
  }
}

function shown(reading: core.Reading): string {
  if (reading.value === null || reading.value === "") return say("readings.empty");
  return typeof reading.value === "number"
    ? say("readings.value", { value: reading.value })
    : reading.value;
}
