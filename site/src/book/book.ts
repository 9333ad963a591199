// The Book: the jobs, and the spots of one of them.

import { LitElement, css, html } from "lit";
import { customElement, property, query, state } from "lit/decorators.js";
import type { Core } from "../core/client";
import type * as core from "../gen/contract";
import { look } from "../look/look";
import { newId } from "../sheet/draft";
import { fold, foldStyle } from "../sheet/fold";
import * as store from "../store";
import { say } from "../words/words";
import type { Evaluation } from "./evaluation";
import { JobChoice, SpotsGone } from "./events";
import { inOrder, orders, outcomes, select, usualChoice, zones, type Choice } from "./choose";
import "./give";
import "./list";
import type { SpotPick } from "./list";
import { persists } from "./persist";
import "./report";
import "./spot";
import type { SpotDialog } from "./spot";
import "./summary";
import "./take";

@customElement("strike-book")
export class BookElement extends LitElement {
  static override styles = [
    look,
    foldStyle,
    css`
      :host,
      .column {
        display: grid;
        gap: var(--gap);
        align-content: start;
        min-width: 0;
      }
      @media screen and (min-width: 60rem) {
        :host(:not([reporting])) {
          grid-template-columns: 1fr 1fr;
        }
      }
      @media print {
        :host {
          display: block;
        }
      }
      .pair {
        align-items: end;
      }
      progress {
        width: 100%;
        accent-color: var(--accent);
      }
      .remind {
        color: var(--warn);
        font-weight: 600;
      }
      .undo {
        display: flex;
        flex-wrap: wrap;
        align-items: center;
        gap: 0.5rem 0.75rem;
        background: var(--accent-soft);
        border-color: var(--accent);
      }
      .undo p {
        flex: 1 1 12rem;
        margin: 0;
      }
      #search {
        margin-top: 0.25rem;
      }
    `,
  ];
  @property({ attribute: false }) core!: Core;
  @property({ attribute: false }) evaluation!: Evaluation;
  @property({ attribute: false }) job: store.Job | undefined;
  /** the record in work */
  @property({ attribute: false }) like!: core.Record;
  /** the spot that is on the sheet */
  @property({ attribute: false }) opened: string | undefined;
  @state() private jobs: store.Job[] = [];
  @state() private spots: store.Spot[] = [];
  @state() private loaded = false;
  @state() private failed = false;
  @state() private naming = false;
  @state() private choice: Choice = usualChoice;
  @state() private done = 0;
  @state() private running: AbortController | undefined;
  /** what was removed last */
  @state() private gone: { words: string; jobs: store.Job[]; spots: store.Spot[] } | undefined;
  @state() private persisted: "yes" | "no" | "unknown" | undefined;
  @state() private reporting: store.Spot[] | undefined;
  @query("#name") private nameField!: HTMLInputElement | null;
  @query("strike-book-spot") private dialog!: SpotDialog;
  private chosen: store.Spot[] = [];
  /** of all spots; undefined while some are not evaluated */
  private rows: core.BookRow[] | undefined;
  private stopListening: (() => void) | undefined;
  private loading = 0;

  override connectedCallback(): void {
    super.connectedCallback();
    this.stopListening = store.listen(() => void this.load());
    void persists().then((answer) => (this.persisted = answer));
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.stopListening?.();
    this.running?.abort();
  }

  override willUpdate(changed: Map<PropertyKey, unknown>): void {
    if (changed.has("job") && changed.get("job") !== this.job) void this.load();
    if (changed.has("spots") || changed.has("done")) {
      const rows = this.spots.map(this.rowOf);
      this.rows = rows.every((row) => row !== undefined) ? rows : undefined;
    }
    const { order, outcome } = this.choice;
    const judged = changed.has("done") && (order === "worst" || outcome !== "");
    if (changed.has("spots") || changed.has("choice") || judged) this.chosen = this.choose();
  }

  override updated(): void {
    this.toggleAttribute("reporting", this.reporting !== undefined);
  }

  override render() {
    if (this.reporting) {
      return html`<strike-report .core=${this.core} .evaluation=${this.evaluation} .job=${this.job} .spots=${this.reporting} @close=${() => (this.reporting = undefined)}></strike-report>`;
    }
    return html`<div class="column">
        ${this.jobPart()}${this.undoPart()}
        ${fold(
          say("take.title"),
          say("take.state"),
          false,
          html`<strike-take .core=${this.core} .evaluation=${this.evaluation} .like=${this.like} .job=${this.job} @taken=${() => void this.load()}></strike-take>`,
        )}
        ${this.spots.length === 0 ? "" : this.about()}
      </div>
      <div class="column">${this.spots.length > 0 ? this.spotsPart() : this.loaded ? html`<section><p id="empty">${say("book.empty")}</p></section>` : ""}</div>
      <strike-book-spot
        .core=${this.core}
        .jobs=${this.jobs}
        @duplicate=${() => void this.duplicate()}
        @move=${(e: CustomEvent<string>) => void this.move(e.detail)}
        @delete=${() => void this.removeSpot()}
      ></strike-book-spot>`;
  }

  /** What concerns all spots of the job. */
  private about() {
    return html`${fold(
        say("give.title"),
        say(this.unsaved() ? "give.state.open" : "give.state.done"),
        false,
        html`<strike-give .core=${this.core} .job=${this.job} .jobs=${this.jobs} .spots=${this.spots} @report=${this.report} @exported=${() => void this.load()}></strike-give>`,
      )}
      ${this.progress()}
      <strike-summary .rows=${this.rows} .spots=${this.spots} .summarize=${this.summarize}></strike-summary>`;
  }

  private jobPart() {
    const { job } = this;
    return html`<section aria-labelledby="title">
      <h2 id="title">${say("book.title")}</h2>
      ${this.failed ? html`<p role="alert">${say("book.unreadable")}</p>` : ""}
      ${this.jobs.length === 0
        ? html`<p>${say("book.no-job")}</p>`
        : html`<label
            >${say("book.job")}
            <select id="job" @change=${(e: Event) => this.work((e.target as HTMLSelectElement).value)}>
              ${this.jobs.map(({ id, name }) => html`<option value=${id} ?selected=${id === job?.id}>${name}</option>`)}
            </select>
          </label>`}
      ${this.naming
        ? html`<label
            >${say("book.job.name")}
            <input id="name" maxlength="200" autocomplete="off" .value=${job?.name ?? ""} @keydown=${(e: KeyboardEvent) => e.key === "Enter" && void this.rename()} />
          </label>`
        : ""}
      <div class="row">
        ${this.naming
          ? html`<button id="rename-done" class="main" @click=${() => void this.rename()}>${say("book.job.rename.done")}</button>`
          : html`<button id="job-new" @click=${() => void this.newJob()}>${say("book.job.new")}</button>
              ${job
                ? html`<button id="job-rename" @click=${this.startNaming}>${say("book.job.rename")}</button>
                    <button id="job-delete" @click=${() => void this.removeJob()}>${say("book.job.delete")}</button>`
                : ""}`}
        <button id="spot-new" class="main" @click=${() => this.dispatchEvent(new Event("new-spot", { bubbles: true, composed: true }))}>${say("sheet.new")}</button>
      </div>
      ${this.unsaved() ? html`<p class="remind" id="remind">${say(job?.exported ? "book.remind.changed" : "book.remind.never")}</p>` : ""}
      ${this.persisted ? html`<p class="soft" id="persisted">${say(`book.persisted.${this.persisted}`)}</p>` : ""}
    </section>`;
  }

  private undoPart() {
    if (!this.gone) return "";
    return html`<section class="undo" role="status">
      <p>${this.gone.words}</p>
      <button id="undo" @click=${() => void this.undo()}>${say("book.undo")}</button>
      <button id="undo-close" @click=${() => (this.gone = undefined)}>${say("book.undo.close")}</button>
    </section>`;
  }

  private progress() {
    const done = this.done;
    const all = this.spots.length;
    if (done === all) return "";
    return html`<section>
      <label id="evaluating">${say("book.evaluating", { done, all })}<progress max=${all} .value=${done}></progress></label>
      <div class="row">
        ${this.running
          ? html`<button id="cancel" @click=${() => this.running?.abort()}>${say("book.cancel")}</button>`
          : html`<button id="resume" @click=${() => void this.run()}>${say("book.resume")}</button>`}
      </div>
    </section>`;
  }

  private spotsPart() {
    const { choice, chosen, spots } = this;
    return html`<section aria-labelledby="spots-title">
      <h2 id="spots-title">${say("book.spots")}</h2>
      <label
        >${say("book.search")}
        <input id="search" type="search" autocomplete="off" .value=${choice.text} @input=${(e: Event) => this.narrow({ text: (e.target as HTMLInputElement).value })} />
      </label>
      <div class="pair">
        ${this.choiceOf("zone", ["", ...zones], (key) => say(key ? `zone.${key}` : "book.zone.all"))}
        ${this.choiceOf("outcome", ["", ...outcomes], (key) => say(key ? `outcome.${key}` : "book.outcome.all"))}
        ${this.choiceOf("order", [...orders], (key) => say(`book.order.${key}`))}
      </div>
      <p class="soft" role="status" id="count">${say("book.count", { shown: chosen.length, all: spots.length })}</p>
      <strike-spots
        .spots=${chosen}
        .rowOf=${this.rowOf}
        .opened=${this.opened}
        .done=${this.done}
        @spot-pick=${(e: SpotPick) => this.dialog.show(e.spot)}
      ></strike-spots>
    </section>`;
  }

  private choiceOf(name: "zone" | "outcome" | "order", keys: string[], words: (key: string) => string) {
    return html`<label
      >${say(`book.${name}`)}
      <select id=${name} @change=${(e: Event) => this.narrow({ [name]: (e.target as HTMLSelectElement).value })}>
        ${keys.map((key) => html`<option value=${key} ?selected=${key === this.choice[name]}>${words(key)}</option>`)}
      </select>
    </label>`;
  }

  private readonly report = (): void => {
    this.reporting = this.chosen;
    scrollTo(0, 0);
  };

  private readonly rowOf = (spot: store.Spot) => this.evaluation.of(spot);

  private readonly summarize = (rows: core.BookRow[]) => this.core.summarizeRows(rows);

  private narrow(part: Partial<Choice>): void {
    this.choice = { ...this.choice, ...part };
  }

  private choose(): store.Spot[] {
    return inOrder(select(this.spots, this.choice, this.rowOf), this.choice.order, this.rowOf);
  }

  /** Whether the job holds what no file does. */
  private unsaved(): boolean {
    const { exported = "" } = this.jobs.find(({ id }) => id === this.job?.id) ?? {};
    return this.spots.some(({ changed }) => changed > exported);
  }

  /** Reads the jobs, and the spots of the one in work, and evaluates them. */
  private async load(): Promise<void> {
    const turn = ++this.loading;
    try {
      const jobs = await store.jobs();
      const job = jobs.find(({ id }) => id === this.job?.id) ?? jobs.at(-1);
      const spots = job ? await store.spots(job.id) : [];
      if (turn !== this.loading) return;
      this.jobs = jobs;
      this.spots = spots;
      this.loaded = true;
      this.failed = false;
      if (job?.id !== this.job?.id) this.dispatchEvent(new JobChoice(job));
      void this.run();
    } catch {
      this.failed = true;
    }
  }

  private async run(): Promise<void> {
    this.running?.abort();
    const running = new AbortController();
    this.running = running;
    const spots = this.spots;
    this.done = spots.filter((spot) => this.evaluation.of(spot)).length;
    try {
      await this.evaluation.run(spots, (done) => running === this.running && (this.done = done), running.signal);
    } catch {
      // The core is lost: the page says so, and the spots wait.
    }
    if (running === this.running) this.running = undefined;
  }

  private work(id: string): void {
    const job = this.jobs.find((j) => j.id === id);
    this.dispatchEvent(new JobChoice(job));
  }

  private async newJob(): Promise<void> {
    const job = { id: newId(), name: say("book.job.unnamed", { n: this.jobs.length + 1 }), created: store.now() };
    if (!(await this.managed(store.saveJob(job)))) return;
    this.dispatchEvent(new JobChoice(job));
    this.startNaming();
  }

  private startNaming(): void {
    this.naming = true;
    void this.updateComplete.then(() => this.updateComplete).then(() => this.nameField?.select());
  }

  private async rename(): Promise<void> {
    const name = this.nameField?.value.trim();
    this.naming = false;
    const job = this.jobs.find(({ id }) => id === this.job?.id) ?? this.job;
    if (!name || !job) return;
    const renamed = { ...job, name };
    if (await this.managed(store.saveJob(renamed))) this.dispatchEvent(new JobChoice(renamed));
  }

  private async removeJob(): Promise<void> {
    const { job } = this;
    if (!job) return;
    const spots = await this.attempt(store.removeJob(job.id));
    if (!spots) return;
    this.dispatchEvent(new SpotsGone(spots.map(({ id }) => id)));
    this.gone = { words: say("book.job.deleted", { job: job.name, n: spots.length }), jobs: [job], spots };
    this.dispatchEvent(new JobChoice(this.jobs.filter(({ id }) => id !== job.id).at(-1)));
    await this.load();
  }

  private async duplicate(): Promise<void> {
    const { job, kept } = this.dialog.spot!;
    const copy = { id: newId(), job, changed: store.now(), kept: { ...kept, record: { ...kept.record, id: newId() } } };
    if (await this.managed(store.addAll([], [copy]))) await this.load();
  }

  private async move(job: string): Promise<void> {
    if (await this.managed(store.move(this.dialog.spot!.id, job))) await this.load();
  }

  private async removeSpot(): Promise<void> {
    const spot = await this.attempt(store.removeSpot(this.dialog.spot!.id));
    if (!spot) return;
    this.dispatchEvent(new SpotsGone([spot.id]));
    this.gone = { words: say("book.spot.deleted", { label: spot.kept.record.label || say("book.unlabelled") }), jobs: [], spots: [spot] };
    await this.load();
    await this.updateComplete;
    this.renderRoot.querySelector<HTMLElement>("#undo")?.focus();
  }

  private async undo(): Promise<void> {
    const { jobs, spots } = this.gone!;
    if (!(await this.managed(store.putBack(jobs, spots)))) return;
    this.gone = undefined;
    if (jobs[0]) this.dispatchEvent(new JobChoice(jobs[0]));
    await this.load();
  }

  private async managed(work: Promise<void>): Promise<boolean> {
    return (await this.attempt(work.then(() => true))) ?? false;
  }

  /** Does something in the store; undefined where it fails. */
  private async attempt<T>(work: Promise<T>): Promise<T | undefined> {
    try {
      return await work;
    } catch {
      this.failed = true;
      return undefined;
    }
  }
}
