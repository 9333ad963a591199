// The Curves place: the user's own reference pieces, curves and tables. Each is
// made from pairs, seen against the built-in model, and taken to the sheet.

import { LitElement, css, html } from "lit";
import { customElement, property, query, state } from "lit/decorators.js";
import { Refusal, type Core } from "../core/client";
import { catalogue } from "../gen/catalogue";
import type * as core from "../gen/contract";
import { RecordChange } from "../look/events";
import { look } from "../look/look";
import type { QuantityChange } from "../look/quantity";
import "../look/quantity";
import { newId } from "../sheet/draft";
import * as store from "../store";
import { say, sayCode, sayFinding } from "../words/words";
import { demo } from "./demo";
import { readPairs, writePairs, type BadLine } from "./entry";
import "./plot";

@customElement("strike-curves")
export class CurvesElement extends LitElement {
  static override styles = [
    look,
    css`
      :host {
        display: grid;
        gap: var(--gap);
      }
      ul {
        margin: 0;
        padding: 0;
        list-style: none;
      }
      li {
        padding: 0.5rem 0;
        border-top: 1px solid var(--line);
      }
      textarea {
        display: block;
        width: 100%;
        min-height: 9rem;
        margin-top: 0.25rem;
        padding: 0.5rem 0.7rem;
        font: inherit;
        font-weight: 400;
        font-variant-numeric: tabular-nums;
        color: var(--ink);
        background: var(--card);
        border: 1px solid var(--edge);
        border-radius: var(--round);
      }
      .pair {
        display: grid;
        grid-template-columns: repeat(auto-fit, minmax(8.5rem, 1fr));
        gap: 0 0.5rem;
        align-items: end;
      }
      .bad {
        color: var(--stop);
      }
      .warn {
        padding: 0.4rem 0.7rem;
        border-left: 0.35rem solid var(--warn);
        background: var(--warn-soft);
      }
      table {
        width: 100%;
        border-collapse: collapse;
        font-size: 0.9rem;
        font-variant-numeric: tabular-nums;
      }
      th,
      td {
        padding: 0.25rem 0.5rem 0.25rem 0;
        text-align: left;
        border-top: 1px solid var(--line);
      }
      .scroll {
        overflow-x: auto;
      }
    `,
  ];
  @property({ attribute: false }) core!: Core;
  @property({ attribute: false }) record!: core.Record;
  @state() private kept: store.KeptCurve[] = [];
  @state() private editing: { id: string; pairs: core.Definition; text: string } | undefined;
  @state() private bad: BadLine[] = [];
  @state() private fit: core.Fitted | undefined;
  @state() private refused = "";
  @state() private removed: store.KeptCurve | undefined;
  @state() private storeFailed = false;
  @query("#pairs") private field!: HTMLTextAreaElement;
  @query("#file") private file!: HTMLInputElement;

  override connectedCallback(): void {
    super.connectedCallback();
    void this.load();
  }

  override render() {
    return html`<section aria-labelledby="title">
        <h2 id="title">${say("curves.title")}</h2>
        <p class="soft">${say("curves.what")}</p>
        ${this.record.curve
          ? html`<p id="in-use">${say("curves.in-use", { name: this.record.curve.name ?? "" })} <button id="unuse" @click=${() => this.use(undefined)}>${say("curves.unuse")}</button></p>`
          : ""}
        ${this.storeFailed ? html`<p role="alert" class="bad">${say("curves.unkept")}</p>` : ""}
        ${this.removed
          ? html`<p role="status">${say("curves.removed", { name: this.removed.curve.name ?? "" })} <button id="undo" @click=${this.undo}>${say("curves.undo")}</button></p>`
          : ""}
        ${this.kept.length === 0 ? html`<p>${say("curves.none")}</p>` : html`<ul id="list">${this.kept.map((kept) => this.item(kept))}</ul>`}
        <div class="row">
          <button id="add" class="main" @click=${() => this.edit(newId(), blankPairs(this.record))}>${say("curves.new")}</button>
          <button id="demo" @click=${() => this.edit(newId(), demo)}>${say("curves.demo")}</button>
          <button id="import" @click=${() => this.file.click()}>${say("curves.import")}</button>
          <input id="file" type="file" accept=".json,application/json" hidden @change=${this.read} />
        </div>
        <p role="alert" class="bad">${this.editing ? "" : this.refused}</p>
      </section>
      ${this.editing ? this.editor(this.editing.pairs, this.editing.text) : ""}`;
  }

  private item({ id, curve }: store.KeptCurve) {
    const words = { device: curve.device, metal: say(`metal.${curve.group}`), scale: curve.scale, n: curve.pairs.length };
    return html`<li data-id=${id}>
      <b>${curve.name}</b>
      <div class="soft">${say(`curves.kind.${curve.kind}`)}. ${say("curves.about", words)} ${curve.source ?? ""}</div>
      <div class="row">
        <button class="use" @click=${() => this.use(curve)}>${say("curves.use")}</button>
        <button class="edit" @click=${() => this.edit(id, curve)}>${say("curves.edit")}</button>
        <button class="copy" @click=${() => this.edit(newId(), { ...curve, name: say("curves.copied", { name: curve.name ?? "" }) })}>${say("curves.copy")}</button>
        <button class="export" @click=${() => download(curve)}>${say("curves.export")}</button>
        <button class="delete" @click=${() => void this.discard(id)}>${say("curves.delete")}</button>
      </div>
    </li>`;
  }

  private editor(pairs: core.Definition, text: string) {
    const table = pairs.kind === "table";
    return html`<section aria-labelledby="editor">
      <h2 id="editor">${say("curves.editor")}</h2>
      ${this.text("name", pairs.name ?? "")}
      <div class="pair">
        ${this.select("kind", pairs.kind, ["own", "table"], (key) => say(`curves.kind.${key}`))}
        ${this.select("device", pairs.device, catalogue.devices.map(({ key }) => key), (key) => key)}
        ${this.select("scale", pairs.scale, catalogue.scales.filter(({ leeb }) => !leeb).map(({ key }) => key), (key) => key)}
      </div>
      ${this.select("group", pairs.group, catalogue.groups.map(({ key }) => key), (key) => say(`metal.${key}`))}
      ${this.text("source", pairs.source ?? "")}
      <div class="pair">
        ${this.text("serial", pairs.serial ?? "")}
        <label>${say("curves.date")} <input id="date" type="date" .value=${pairs.date ?? ""} @change=${(e: Event) => this.change({ date: (e.target as HTMLInputElement).value || undefined })} /></label>
        ${table
          ? html`<strike-quantity id="u_percent" .label=${say("curves.u_percent")} unit="%" .value=${pairs.u_percent} @quantity-change=${(e: QuantityChange) => this.change({ u_percent: e.value })}></strike-quantity>`
          : ""}
      </div>
      <label
        >${say("curves.pairs")}
        <textarea id="pairs" inputmode="text" spellcheck="false" aria-describedby="pairs-hint" .value=${text} @input=${this.typed}></textarea>
      </label>
      <p class="soft" id="pairs-hint">${say(table ? "curves.pairs.table" : "curves.pairs.hint")}</p>
      <ul>${this.bad.map(({ line, text: bad }) => html`<li class="bad">${say(table ? "curves.bad.table" : "curves.bad", { line, text: bad })}</li>`)}</ul>
      <p role="alert" class="bad" id="refused">${this.refused}</p>
      ${this.fit ? this.result(this.fit) : ""}
      <div class="row">
        <button id="keep" class="main" ?disabled=${!this.fit} @click=${() => void this.keep()}>${say("curves.keep")}</button>
        <button id="use" ?disabled=${!this.fit} @click=${() => this.use(definition(this.fit!))}>${say("curves.use")}</button>
        <button id="close" @click=${() => (this.editing = undefined)}>${say("curves.close")}</button>
      </div>
    </section>`;
  }

  private result(fit: core.Fitted) {
    return html`<strike-plot .fit=${fit}></strike-plot>
      <p id="form"><b>${fit.equation || say("curves.form.table")}</b></p>
      <p>${say("curves.range", { lo: fit.shownRange[0]!, hi: fit.shownRange[1]! })}
        ${fit.chiSquare === null ? "" : say("curves.chi", { chi: fit.chiSquare, birge: fit.birge })}
        ${fit.leaveOneOut === null ? "" : say("curves.loo", { loo: fit.leaveOneOut, scale: fit.scale })}</p>
      ${fit.candidates.length === 0
        ? ""
        : html`<div class="scroll" tabindex="0" role="region" aria-label=${say("curves.candidates")}>
            <table>
              <thead><tr>${["form", "aicc", "loo"].map((key) => html`<th scope="col">${say(`curves.column.${key}`)}</th>`)}</tr></thead>
              <tbody>
                ${fit.candidates.map(
                  (c) => html`<tr>
                    <th scope="row">${say(`curves.form.${c.form}`)}${c.form === fit.form ? `, ${say("curves.chosen")}` : ""}</th>
                    ${c.refused
                      ? html`<td colspan="2">${c.reason}</td>`
                      : html`<td>${say("curves.number", { value: c.aicc! })}</td><td>${say("curves.number", { value: c.leaveOneOut ?? 0 })}</td>`}
                  </tr>`,
                )}
              </tbody>
            </table>
          </div>`}
      ${fit.warnings.map((warning) => {
        const { message, remedy } = sayFinding(warning);
        return html`<p class="warn" data-code=${warning.code}>${message} ${remedy}</p>`;
      })}`;
  }

  private text(name: "name" | "source" | "serial", value: string) {
    return html`<label>${say(`curves.${name}`)} <input id=${name} maxlength="200" autocomplete="off" .value=${value} @input=${(e: InputEvent) => this.change({ [name]: (e.target as HTMLInputElement).value })} /></label>`;
  }

  private select(name: "kind" | "device" | "scale" | "group", value: string, keys: string[], words: (key: string) => string) {
    return html`<label
      >${say(`curves.${name}`)}
      <select id=${name} @change=${(e: Event) => this.change({ [name]: (e.target as HTMLSelectElement).value })}>
        ${keys.map((key) => html`<option value=${key} ?selected=${key === value}>${words(key)}</option>`)}
      </select>
    </label>`;
  }

  private typed(): void {
    this.change({}, this.field.value);
  }

  private edit(id: string, pairs: core.Definition): void {
    this.editing = { id, pairs, text: writePairs(pairs.pairs, pairs.kind === "table") };
    void this.refit();
  }

  /** Takes in a change of the curve being edited, and fits it anew. */
  private change(part: Partial<core.Definition>, text = this.editing!.text): void {
    this.editing = { ...this.editing!, pairs: { ...this.editing!.pairs, ...part }, text };
    void this.refit();
  }

  private async refit(): Promise<void> {
    const editing = this.editing!;
    const { pairs, bad } = readPairs(editing.text, editing.pairs.kind === "table");
    this.bad = bad;
    // Four pairs or fewer anchor the model; more make a curve of their own.
    const kind = editing.pairs.kind === "table" ? "table" : pairs.length < 5 ? "anchor" : "own";
    if (pairs.length === 0) {
      this.fit = undefined;
      this.refused = "";
      return;
    }
    try {
      const fit = await this.core.fitCurve({ ...editing.pairs, kind, pairs });
      if (editing !== this.editing) return; // the user has typed on
      this.fit = fit;
      this.refused = "";
    } catch (error) {
      if (editing !== this.editing) return;
      this.fit = undefined;
      if (error instanceof Refusal) this.refused = sayCode(error.error.code, error.error.params);
    }
  }

  private use(curve: core.Curve | undefined): void {
    const { record } = this;
    this.dispatchEvent(new RecordChange({ ...record, curve }));
  }

  private async keep(): Promise<void> {
    const kept = { id: this.editing!.id, curve: definition(this.fit!) };
    await this.attempt(store.saveCurve(kept));
    this.editing = undefined;
    await this.load();
  }

  private async discard(id: string): Promise<void> {
    this.removed = this.kept.find((kept) => kept.id === id);
    await this.attempt(store.removeCurve(id));
    await this.load();
  }

  private readonly undo = async (): Promise<void> => {
    await this.attempt(store.saveCurve(this.removed!));
    this.removed = undefined;
    await this.load();
  };

  private async read(): Promise<void> {
    const file = this.file.files?.[0];
    this.file.value = "";
    if (!file) return;
    try {
      const curve = JSON.parse(await file.text()) as core.Definition;
      this.edit(newId(), { ...curve, name: String(curve.name), pairs: [...curve.pairs] });
    } catch {
      this.refused = say("curves.import.failed", { name: file.name });
    }
  }

  private async load(): Promise<void> {
    try {
      this.kept = await store.curves();
    } catch {
      this.storeFailed = true;
    }
  }

  private async attempt(work: Promise<void>): Promise<void> {
    try {
      await work;
      this.storeFailed = false;
    } catch {
      this.storeFailed = true;
    }
  }
}

/** What a curve is made of: what came of it is computed anew wherever it is used. */
function definition(fit: core.Fitted): core.Curve {
  const { name, device, group, scale, kind, pairs, source, serial, date, u_percent, edition } = fit;
  return { name, device, group, scale, kind, pairs, source, serial, date, u_percent, edition } as core.Curve;
}

/** The pairs of a new curve, for the device and the metal of the sheet. */
function blankPairs(record: core.Record): core.Definition {
  return {
    name: say("curves.unnamed"),
    kind: "own",
    device: record.device ?? "D",
    group: record.group ?? catalogue.groups[0]!.key,
    scale: "HBW",
    source: "",
    serial: record.serial ?? "",
    pairs: [],
  };
}

/** Hands a curve over as a file. */
function download(curve: core.Curve): void {
  const url = URL.createObjectURL(new Blob([JSON.stringify(curve, null, 2)], { type: "application/json" }));
  const link = document.createElement("a");
  link.href = url;
  link.download = `${(curve.name ?? "curve").replace(/[^\p{L}\p{N}]+/gu, "-")}.json`;
  link.click();
  URL.revokeObjectURL(url);
}
