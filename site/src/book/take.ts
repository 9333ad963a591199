// Bringing spots in: what a pasted text or files hold is shown first, and taken
// only when the user agrees.

import { LitElement, css, html } from "lit";
import { customElement, property, query, state } from "lit/decorators.js";
import type { Core } from "../core/client";
import type * as core from "../gen/contract";
import { look } from "../look/look";
import { newId } from "../sheet/draft";
import { foldStyle } from "../sheet/fold";
import { sayLimit } from "../sheet/limit";
import * as store from "../store";
import { say, sayCode } from "../words/words";
import type { Evaluation } from "./evaluation";
import { JobChoice } from "./events";
import { columns, knownColumns, learnColumns } from "./columns";
import { read, textOf, type Bad, type Offer, type Source, type Told } from "./sources";

/** How many bad rows are shown at once. */
const badAtOnce = 100;

@customElement("strike-take")
export class TakeElement extends LitElement {
  static override styles = [
    look,
    foldStyle,
    css`
      fieldset {
        margin: var(--gap) 0 0;
        padding: 0 var(--gap) var(--gap);
        border: 1px solid var(--edge);
        border-radius: var(--round);
      }
      .samples {
        overflow: hidden;
        text-overflow: ellipsis;
        white-space: nowrap;
      }
      textarea {
        display: block;
        width: 100%;
        min-height: 6rem;
        margin-top: 0.25rem;
        padding: 0.5rem 0.7rem;
        font: inherit;
        font-weight: 400;
        color: var(--ink);
        background: var(--card);
        border: 1px solid var(--edge);
        border-radius: var(--round);
      }
      progress {
        width: 100%;
        accent-color: var(--accent);
      }
      #offer {
        margin-top: var(--gap);
        padding: var(--gap);
        background: var(--accent-soft);
        border-radius: var(--round);
      }
      .bad {
        color: var(--stop);
      }
      ol {
        margin: 0.4rem 0;
        padding: 0;
        list-style: none;
        overflow-wrap: anywhere;
      }
      li {
        padding: 0.2rem 0;
      }
      code {
        display: block;
        font-size: 0.85rem;
        white-space: pre-wrap;
      }
    `,
  ];
  @property({ attribute: false }) core!: Core;
  @property({ attribute: false }) evaluation!: Evaluation;
  @property({ attribute: false }) job: store.Job | undefined;
  /** the record in work: what a table does not say is as there */
  @property({ attribute: false }) like!: core.Record;
  @state() private offer: Offer | undefined;
  @state() private shownBad = badAtOnce;
  /** while what was found is being evaluated */
  @state() private progress: { done: number; all: number } | undefined;
  @state() private said = "";
  @query("#text") private field!: HTMLTextAreaElement;
  @query("#files") private files!: HTMLInputElement;
  private sources: Source[] = [];
  private rows: core.BookRow[] = [];
  private running: AbortController | undefined;

  override render() {
    const { progress } = this;
    return html`<p class="soft">${say("take.what")}</p>
      <label>${say("take.text")} <textarea id="text" autocomplete="off" spellcheck="false"></textarea></label>
      <label>${say("take.files")} <input id="files" type="file" multiple @change=${() => void this.lookAtFiles()} /></label>
      <div class="row"><button id="look" @click=${() => void this.lookAt([{ name: "", text: this.field.value }])}>${say("take.look")}</button></div>
      ${progress
        ? html`<label>${say("book.evaluating", progress)}<progress max=${progress.all} .value=${progress.done}></progress></label>
            <div class="row"><button id="take-cancel" @click=${() => this.drop()}>${say("book.cancel")}</button></div>`
        : ""}
      ${this.offer && !progress ? this.preview(this.offer) : ""}
      <p role="status" id="taken">${this.said}</p>`;
  }

  private preview({ spots, jobs, bad, there, tables }: Offer) {
    const names = jobs.map(({ name }) => name).join(", ");
    return html`<div id="offer" role="group" aria-label=${say("take.title")}>
      <p id="good"><b>${say(jobs.length > 0 ? "take.good.jobs" : "take.good", { n: spots.length, jobs: names })}</b></p>
      ${there > 0 ? html`<p id="there">${say("take.there", { n: there })}</p>` : ""}
      ${bad.length > 0 ? this.badPart(bad) : ""}
      ${tables.map(({ source, table }, at) => columns(table, at, (told) => void this.tell(source, told)))}
      ${tables.length > 0 ? this.defaults() : ""}
      <div class="row">
        ${spots.length > 0 ? html`<button id="take" class="main" @click=${() => void this.take()}>${say("take.do", { n: spots.length })}</button>` : ""}
        <button id="drop" @click=${() => this.drop()}>${say("take.drop")}</button>
      </div>
    </div>`;
  }

  /** What stands in a record where its row says nothing. */
  private defaults() {
    const { group, scale, limit } = this.like;
    const metal = group ? say(`metal.${group}`) : say("zone.unsaid");
    return html`<p class="soft" id="defaults">${say("take.defaults", { metal, scale: scale ?? "", limit: sayLimit(limit) })}</p>`;
  }

  private badPart(bad: Bad[]) {
    const rest = bad.length - this.shownBad;
    return html`<p class="bad" id="bad"><b>${say("take.bad", { n: bad.length })}</b></p>
      <ol id="bad-rows">
        ${bad.slice(0, this.shownBad).map(({ where, why, text }) => html`<li>${say("take.bad.of", { where, why })}${text ? html`<code>${text}</code>` : ""}</li>`)}
      </ol>
      ${rest > 0 ? html`<button id="more-bad" @click=${() => (this.shownBad += badAtOnce)}>${say("take.bad.more", { n: rest })}</button>` : ""}`;
  }

  private async lookAtFiles(): Promise<void> {
    const files = [...(this.files.files ?? [])];
    await this.lookAt(await Promise.all(files.map(async (file) => ({ name: file.name, text: await textOf(file) }))));
  }

  /** Reads a table as the user says. */
  private async tell(source: Source, told: Told): Promise<void> {
    const { mapping, ...before } = source.told ?? {};
    // With another delimiter or header the columns are others.
    source.told = { ...before, ...(mapping && told.mapping === undefined && told.layout ? { mapping } : {}), ...told };
    await this.lookAt(this.sources);
  }

  /** Finds out what there is, and which of it the core can read. */
  private async lookAt(sources: Source[]): Promise<void> {
    this.drop();
    const running = (this.running = new AbortController());
    this.sources = sources;
    this.said = say("take.reading");
    const { id, label, notes, taken, zone, position_mm, ...defaults } = this.like;
    const setting = { job: this.job?.id ?? "", defaults: { ...defaults, readings: [] }, known: knownColumns() };
    try {
      const offer = await read(sources.filter(({ text }) => text.trim() !== ""), setting, this.core);
      const rows: core.BookRow[] = [];
      this.progress = { done: 0, all: offer.spots.length };
      for await (const part of this.evaluation.inChunks(offer.spots.map(({ kept }) => kept.record))) {
        if (running.signal.aborted) return;
        rows.push(...part);
        this.progress = { done: rows.length, all: offer.spots.length };
      }
      if (running.signal.aborted) return;
      this.offer = sorted(offer, rows);
      this.rows = rows.filter(({ error }) => !error);
      this.said = "";
    } catch {
      this.said = say("take.lost");
    } finally {
      if (running === this.running) this.progress = undefined;
    }
  }

  private drop(): void {
    this.running?.abort();
    this.offer = undefined;
    this.progress = undefined;
    this.shownBad = badAtOnce;
    this.rows = [];
    this.said = "";
  }

  private async take(): Promise<void> {
    const { spots, jobs, bad, tables } = this.offer!;
    const home = this.job ?? { id: newId(), name: say("book.job.first"), created: store.now() };
    const placed = spots.map((spot) => (spot.job ? spot : { ...spot, job: home.id }));
    // A job that was restored whole stands in its file.
    const exported = bad.length === 0 ? { exported: store.now() } : {};
    const homes = [...jobs.map((job) => ({ ...job, ...exported })), ...(placed.some(({ job }) => job === home.id) ? [home] : [])];
    try {
      await store.addAll(homes, placed);
    } catch {
      this.said = say("take.failed");
      return;
    }
    for (const { source, table } of tables) if (source.told?.mapping) learnColumns(table);
    placed.forEach(({ id }, i) => this.evaluation.learn(id, this.rows[i]!));
    this.drop();
    this.field.value = "";
    this.files.value = "";
    this.said = say("take.done", { n: placed.length });
    const shown = homes[0];
    if (shown && shown.id !== this.job?.id) this.dispatchEvent(new JobChoice(shown));
    this.dispatchEvent(new Event("taken"));
  }
}

/** Sorts out what the core refuses. */
function sorted(offer: Offer, rows: core.BookRow[]): Offer {
  const bad = rows.flatMap(({ error }, i) => {
    if (!error) return [];
    const { label } = offer.spots[i]!.kept.record;
    return [{ where: label || say("book.unlabelled"), why: sayCode(error.code, error.params) }];
  });
  return { ...offer, spots: offer.spots.filter((_, i) => !rows[i]!.error), bad: [...offer.bad, ...bad] };
}
