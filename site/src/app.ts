// The page: its places, and the record in work. It has the record evaluated
// after each change, keeps it in the Book, and carries it in the address.

import { LitElement, css, html, nothing } from "lit";
import { customElement, state } from "lit/decorators.js";
import { Evaluation } from "./book/evaluation";
import { JobChoice, SpotOpen, SpotsGone } from "./book/events";
import { download, fileName, writeBook } from "./book/file";
import { Keeper, type Conflict } from "./book/keeper";
import { askToPersist } from "./book/persist";
import { everything } from "./book/shelf";
import { Core, CoreLost, Refusal } from "./core/client";
import type * as core from "./gen/contract";
import { EntryChange, PlanChange, RecordChange } from "./look/events";
import { look } from "./look/look";
import { register } from "./offline";
import { add, blank, newId, spotOf, untouched, usualPlan } from "./sheet/draft";
import * as store from "./store";
import { say, sayCode } from "./words/words";
import "./book/book";
import "./curves/curves";
import "./sheet/block";
import "./sheet/cautions";
import "./sheet/foot";
import "./sheet/gonogo";
import "./sheet/limit";
import "./sheet/piece";
import "./sheet/readings";
import "./sheet/result";
import "./sheet/share";
import "./sheet/spot";
import "./sheet/verdict";

/** The places of the page, in the order of the work. */
const places = ["sheet", "book", "curves"] as const;

type Place = (typeof places)[number];

@customElement("strike-app")
export class AppElement extends LitElement {
  static override styles = [
    look,
    css`
      :host {
        min-height: 100dvh;
        display: flex;
        flex-direction: column;
      }
      header {
        display: flex;
        align-items: center;
        gap: 0.75rem;
        width: 100%;
        max-width: 72rem;
        margin: 0 auto;
        padding: 0.6rem 0.75rem 0;
      }
      header img {
        width: 2.5rem;
        height: 2.5rem;
      }
      h1 {
        margin: 0;
        font-size: 1.4rem;
        line-height: 1.2;
      }
      header p {
        margin: 0;
      }
      nav {
        display: flex;
        gap: 0.5rem;
        width: 100%;
        max-width: 72rem;
        margin: 0 auto;
        padding: 0.5rem 0.5rem 0;
      }
      nav button {
        flex: 1;
        border-color: var(--edge);
      }
      nav button[aria-current] {
        color: var(--on-accent);
        background: var(--accent);
        border-color: var(--accent);
      }
      main {
        flex: 1;
        width: 100%;
        max-width: 72rem;
        margin: 0 auto;
        padding: 0.5rem;
      }
      .columns {
        display: grid;
        gap: var(--gap);
        align-content: start;
      }
      [hidden] {
        display: none;
      }
      .notice {
        display: flex;
        flex-wrap: wrap;
        align-items: center;
        gap: 0.5rem 0.75rem;
        padding: 0.6rem 0.75rem;
        background: var(--accent-soft);
        border: 1px solid var(--accent);
        border-radius: var(--round);
      }
      .notice p {
        flex: 1 1 14rem;
        margin: 0;
      }
      .notice.bad {
        background: var(--stop-soft);
        border-color: var(--stop);
      }
      progress {
        width: 100%;
        accent-color: var(--accent);
      }
      @media (min-width: 60rem) {
        main {
          padding: 0.75rem 1rem 1rem;
        }
        .columns {
          grid-template-columns: 1fr 1fr;
        }
        header,
        nav {
          padding-inline: 1rem;
        }
        nav button {
          flex: 0 1 10rem;
        }
      }
      .column {
        display: grid;
        gap: var(--gap);
        align-content: start;
      }
      #notices {
        display: grid;
        gap: 0.5rem;
        margin-bottom: var(--gap);
      }
      #notices:empty {
        display: none;
      }
      #filed {
        margin: 0 0.25rem;
      }
      @media print {
        :host {
          min-height: 0;
          display: block;
        }
        header,
        nav,
        #notices,
        strike-foot {
          display: none;
        }
        main {
          max-width: none;
          padding: 0;
        }
      }
    `,
  ];

  @state() private place: Place = "sheet";
  @state() private record = blank();
  @state() private entry = "";
  @state() private sheet: core.Sheet | undefined;
  /** which spot of the Book the sheet is; undefined while it is none */
  @state() private ref: store.Ref | undefined;
  /** the job that the next spot goes to; undefined until there is one */
  @state() private job: store.Job | undefined;
  /** the sheet came with a link and is not the user's own */
  @state() private foreign = false;
  @state() private conflict: Conflict | undefined;
  @state() private goNoGo: core.GoNoGo | undefined;
  @state() private plan = usualPlan;
  @state() private link = "";
  /** the sheet that the user left for this one: a link's, or a new spot's */
  @state() private aside: { kept: store.Work; why: "link" | "new" } | undefined;
  @state() private refused = "";
  @state() private fault: "" | "lost" | "invalid" = "";
  @state() private invalid = "";
  @state() private storeFailed = false;
  @state() private kept = false;
  @state() private switchNow: (() => void) | undefined;
  @state() private calculation: Core["state"];
  private readonly core = new Core();
  private readonly evaluation = new Evaluation(this.core);
  private readonly keeper = new Keeper({
    kept: (spot) => this.inBook(spot),
    conflict: (conflict) => this.parted(conflict),
    failed: (yes) => (this.storeFailed = yes),
  });
  private asked: { key: string; answer: Promise<core.GoNoGo> } | undefined;
  /** whether what was kept has been read */
  private opened = false;
  /** counts the changes, so that an answer that came too late is dropped */
  private change = 0;

  constructor() {
    super();
    this.calculation = this.core.state;
    this.core.addEventListener("state", () => (this.calculation = this.core.state));
    this.addEventListener(RecordChange.type, (event) => this.replace((event as RecordChange).record));
    this.addEventListener(EntryChange.type, (event) => {
      this.entry = (event as EntryChange).entry;
      void this.save();
    });
    this.addEventListener(PlanChange.type, (event) => {
      this.plan = (event as PlanChange).plan;
      void this.save();
      void this.evaluate();
    });
    this.addEventListener("new-spot", () => {
      this.newSpot();
      this.go("sheet");
    });
    this.addEventListener(SpotOpen.type, (event) => this.openSpot((event as SpotOpen).spot));
    this.addEventListener(SpotsGone.type, (event) => this.leave((event as SpotsGone).ids));
    this.addEventListener(JobChoice.type, (event) => {
      this.job = (event as JobChoice).job;
      void this.save();
    });
  }

  override connectedCallback(): void {
    super.connectedCallback();
    this.core.start();
    void this.open();
    addEventListener("hashchange", () => void this.openLink());
    void register({
      ready: () => (this.kept = true),
      waiting: (switchNow) => (this.switchNow = switchNow),
    }).catch(() => undefined); // without it the page works, but only with a network
  }

  override render() {
    return html`<header>
        <img src="icon.svg" alt="" />
        <div>
          <h1>${say("app.name")}</h1>
          <p class="soft" id=${this.kept ? "offline" : "purpose"}>${say(this.kept ? "offline.ready" : "app.purpose")}</p>
        </div>
      </header>
      <nav aria-label=${say("places")}>
        ${places.map(
          (place) => html`<button id="place-${place}" aria-current=${place === this.place ? "page" : nothing} @click=${() => this.go(place)}>${say(`place.${place}`)}</button>`,
        )}
      </nav>
      <main>
        <div id="notices">${this.notices()}</div>
        ${this.sheetPlace()} ${this.place === "book" ? this.bookPlace() : ""}
        ${this.place === "curves" ? html`<strike-curves .core=${this.core} .record=${this.record}></strike-curves>` : ""}
      </main>
      <strike-foot ?hidden=${this.place !== "sheet"} .sheet=${this.sheet}></strike-foot>`;
  }

  private sheetPlace() {
    return html`<div class="columns" ?hidden=${this.place !== "sheet"}>
      <div class="column">
        <p class="soft" id="filed">${this.ref && this.job ? say("book.filed", { job: this.job.name }) : say("book.unfiled")}</p>
        <strike-spot .record=${this.record}></strike-spot>
        <strike-piece .record=${this.record} .sheet=${this.sheet}></strike-piece>
        <strike-block .record=${this.record} .sheet=${this.sheet}></strike-block>
        <strike-limit .record=${this.record} .sheet=${this.sheet}></strike-limit>
        ${this.goNoGo ? html`<strike-gonogo .record=${this.record} .answer=${this.goNoGo} .plan=${this.plan}></strike-gonogo>` : ""}
        <strike-readings .record=${this.record} .entry=${this.entry} .sheet=${this.sheet}></strike-readings>
      </div>
      <div class="column">
        <strike-verdict .sheet=${this.sheet}></strike-verdict>
        <strike-result .record=${this.record} .sheet=${this.sheet} .askMore=${this.askMore}></strike-result>
        <strike-share .link=${this.link} .label=${this.record.label ?? ""}></strike-share>
        <strike-cautions></strike-cautions>
      </div>
    </div>`;
  }

  private bookPlace() {
    return html`<strike-book .core=${this.core} .evaluation=${this.evaluation} .job=${this.job} .like=${this.record} .opened=${this.ref?.id}></strike-book>`;
  }

  private notices() {
    const { calculation } = this;
    return [
      calculation.kind === "loading"
        ? html`<label class="soft" id="loading"
            >${say("core.loading", { percent: calculation.share * 100 })}<progress max="1" .value=${calculation.share}></progress
          ></label>`
        : "",
      calculation.kind === "failed"
        ? notice("failed", say("core.failed", { detail: calculation.detail }), [["retry", say("core.retry"), () => this.core.start()]], true)
        : "",
      this.fault === "lost"
        ? notice("lost", say("core.lost"), [["retry", say("core.retry"), () => void this.evaluate()]], true)
        : "",
      this.fault === "invalid" ? notice("invalid", this.invalid, [], true) : "",
      this.refused
        ? notice("refused", say("link.refused", { reason: this.refused }), [["dismiss", say("link.dismiss"), () => (this.refused = "")]], true)
        : "",
      this.aside?.why === "link"
        ? notice("aside", say("link.opened"), [
            ["back", say("link.back"), () => this.bringBack()],
            ["keep", say("link.keep"), () => this.keepForeign()],
          ])
        : "",
      this.foreign && !this.aside && !untouched(this.record)
        ? notice("foreign", say("link.foreign"), [["keep", say("link.foreign.keep"), () => this.keepForeign()]])
        : "",
      this.conflict
        ? notice("conflict", say("book.conflict", { label: this.conflict.theirs.kept.record.label ?? "" }), [
            ["theirs", say("book.conflict.theirs"), () => void this.takeTheirs()],
            ["copy", say("book.conflict.copy"), () => (this.conflict = undefined)],
          ], true)
        : "",
      this.aside?.why === "new"
        ? notice("aside", say("sheet.new.done"), [["back", say("sheet.new.undo"), () => this.bringBack()]])
        : "",
      this.switchNow ? notice("update", say("update.waiting"), [["switch", say("update.switch"), this.switchNow]]) : "",
      this.storeFailed ? notice("unkept", say("store.failed"), [["export", say("store.failed.export"), () => void this.rescue()]], true) : "",
    ].filter((part) => part !== "");
  }

  /** Opens what there was: the kept sheet, then a link over it. */
  private async open(): Promise<void> {
    const atStart = this.change;
    let unsaved = false;
    try {
      const [kept, aside] = [await store.load("current"), await store.load("aside")];
      if (aside) this.aside = { kept: aside, why: "link" };
      if (kept) {
        // What was typed while the store opened belongs to the kept sheet.
        const typed = this.change === atStart ? [] : this.record.readings.map(({ value }) => value ?? "");
        this.record = add(kept.record, typed);
        this.entry ||= kept.entry;
        this.plan = kept.plan ?? usualPlan;
        this.ref = kept.ref;
        this.job = kept.job;
        this.foreign = kept.foreign ?? !!aside;
        unsaved = await this.behind(typed.length > 0, kept.by);
      }
      const last = (await store.jobs()).at(-1);
      this.job ??= last;
    } catch {
      this.storeFailed = true;
    }
    this.opened = true;
    if (unsaved || this.change !== atStart) void this.save();
    // An address that this page wrote itself says nothing new, unless nothing was kept.
    if (history.state !== ours || untouched(this.record)) await this.openLink();
    await this.evaluate();
  }

  /** Whether the Book is behind the sheet: the page may have been ended between
   * the two, and a page before this one kept no Book. */
  private async behind(typed: boolean, by: string | undefined): Promise<boolean> {
    const { ref } = this;
    if (!ref) return !untouched(this.record);
    const spot = await store.spot(ref.id);
    const { record, entry, plan } = this.current();
    const same = !typed && JSON.stringify(spot?.kept) === JSON.stringify({ record, entry, plan });
    if (spot && (same || (by && spot.by === by))) this.ref = { id: ref.id, rev: spot.rev };
    this.keeper.seen(this.ref!);
    return spot ? !same : ref.rev === 0;
  }

  /** Opens the link in the address, if there is one, and lays the own sheet aside. */
  private async openLink(): Promise<void> {
    const fragment = location.hash.slice(1);
    if (!fragment) return;
    try {
      const record = await this.core.decodeLink(fragment);
      if (JSON.stringify(record) === JSON.stringify(this.record)) return;
      const own = this.current();
      if (!untouched(own.record) && !own.foreign && this.aside?.why !== "link") {
        this.aside = { kept: own, why: "link" };
        await this.attempt(store.save("aside", own));
      }
      this.refused = "";
      this.place = "sheet";
      this.show({ record, entry: "", foreign: true });
    } catch (error) {
      if (error instanceof Refusal) this.refused = sayCode(error.error.code, error.error.params);
    }
  }

  private go(place: Place): void {
    if (place === this.place) return;
    this.place = place;
    scrollTo(0, 0);
  }

  private replace(record: core.Record): void {
    if (this.aside?.why === "new" && !untouched(record)) this.forgetAside();
    this.record = record;
    this.change++;
    void this.save();
    void this.evaluate();
  }

  /** Puts another sheet in the place of this one. */
  private show(work: store.Work): void {
    this.entry = work.entry;
    this.plan = work.plan ?? this.plan;
    this.ref = work.ref;
    this.foreign = work.foreign ?? false;
    this.replace(work.record);
  }

  private newSpot(): void {
    const kept = this.current();
    this.show({ record: blank(this.record), entry: "" });
    if (!untouched(kept.record) && this.aside?.why !== "link") this.aside = { kept, why: "new" };
  }

  private openSpot(spot: store.Spot): void {
    if (this.aside?.why === "new") this.forgetAside();
    const ref = { id: spot.id, rev: spot.rev };
    this.keeper.seen(ref);
    this.show({ ...spot.kept, ref });
    this.go("sheet");
    void this.updateComplete.then(() => this.renderRoot.querySelector<HTMLElement>("#place-sheet")?.focus());
  }

  /** Leaves spots that are no longer in the Book. */
  private leave(ids: string[]): void {
    for (const id of ids) this.keeper.forget(id);
    const kept = this.aside?.kept.ref;
    if (this.aside?.why === "new" && kept && ids.includes(kept.id)) this.forgetAside();
    if (this.ref && ids.includes(this.ref.id)) this.show({ record: blank(this.record), entry: "" });
  }

  private bringBack(): void {
    const { kept } = this.aside!;
    this.forgetAside();
    this.show(kept);
  }

  private keepForeign(): void {
    this.foreign = false;
    this.forgetAside();
    void this.save();
  }

  private forgetAside(): void {
    this.aside = undefined;
    void this.attempt(store.remove("aside"));
  }

  private current(): store.Work {
    const { record, entry, plan, ref, job, foreign } = this;
    return { record, entry, plan, ref, job, foreign };
  }

  /** Keeps the sheet; with a label or a reading, and unless it is somebody
   * else's, as a spot of the Book. */
  private async save(): Promise<void> {
    if (!this.opened) return; // what is kept is not known yet, and must not be written over
    if (!this.foreign && !untouched(this.record)) {
      this.job ??= { id: newId(), name: say("book.job.first"), created: store.now() };
      this.ref ??= { id: newId(), rev: 0 };
    }
    await this.keeper.save(this.current());
  }

  private inBook(spot: store.Spot): void {
    if (this.ref?.id === spot.id) this.ref = { id: spot.id, rev: spot.rev };
    void askToPersist();
  }

  /** Another tab has changed the spot: ours goes on as a copy, until told. */
  private parted(conflict: Conflict): void {
    this.conflict = conflict;
    if (this.ref?.id === conflict.theirs.id) this.ref = { id: conflict.copy, rev: 0 };
  }

  private async takeTheirs(): Promise<void> {
    const { theirs, copy } = this.conflict!;
    this.conflict = undefined;
    const ours = this.ref?.id === copy;
    this.keeper.forget(copy);
    await this.attempt(store.removeSpot(copy).then(() => undefined));
    if (ours) this.openSpot((await store.spot(theirs.id)) ?? theirs);
  }

  /** Writes a file of all there is, kept by the browser or not. */
  private async rescue(): Promise<void> {
    const work = this.current();
    const unkept = this.keeper.unkept();
    if (!work.ref) unkept.push({ id: newId(), job: work.job?.id ?? "", changed: store.now(), kept: work });
    download(fileName(say("app.name"), "json"), "application/json", writeBook(await everything(unkept, this.job)));
  }

  private async attempt(work: Promise<void>): Promise<void> {
    try {
      await work;
      this.storeFailed = false;
    } catch {
      this.storeFailed = true;
    }
  }

  private async evaluate(): Promise<void> {
    const { record, change } = this;
    try {
      const [sheet, fragment, goNoGo] = await Promise.all([
        this.core.evaluate(record),
        this.core.encodeLink(record),
        this.askGoNoGo(record),
      ]);
      if (change !== this.change) return; // the user has typed on
      this.sheet = sheet;
      this.goNoGo = goNoGo;
      this.fault = "";
      this.carry(untouched(record) ? "" : fragment);
    } catch (error) {
      if (change !== this.change) return;
      this.sheet = undefined;
      if (error instanceof CoreLost) this.fault = "lost";
      if (error instanceof Refusal) {
        this.fault = "invalid";
        this.invalid = sayCode(error.error.code, error.error.params);
      }
    }
  }

  /** What the readings will decide depends on all but them: it is asked for only
   * when something else has changed. Without a limit there is nothing to decide. */
  private askGoNoGo(record: core.Record): Promise<core.GoNoGo> | undefined {
    const request = { ...spotOf(record), ...this.plan };
    const key = JSON.stringify(request);
    if (key !== this.asked?.key) this.asked = record.limit ? { key, answer: this.core.goNoGo(request) } : undefined;
    return this.asked?.answer;
  }

  private readonly askMore = (wanted: core.Wanted): Promise<core.MoreReadings> =>
    this.core.moreReadings({ ...this.record, wanted });

  /** Puts the record into the address, and its link on the sheet. */
  private carry(fragment: string): void {
    const address = new URL(location.href);
    address.hash = fragment;
    this.link = fragment ? address.href : "";
    if (!this.refused) history.replaceState(ours, "", fragment ? address : address.href.replace(/#$/, ""));
  }
}

/** Marks an address that the page itself wrote. */
const ours = "own";

function notice(id: string, text: string, actions: [string, string, () => void][], bad = false) {
  return html`<div class="notice ${bad ? "bad" : ""}" id=${id} role=${bad ? "alert" : "status"}>
    <p>${text}</p>
    ${actions.map(([key, words, act]) => html`<button id="${id}-${key}" @click=${act}>${words}</button>`)}
  </div>`;
}
