// The page: it keeps the record in work, has it evaluated after each change,
// stores it, and carries it in the address.

import { LitElement, css, html } from "lit";
import { customElement, state } from "lit/decorators.js";
import { Core, CoreLost, Refusal } from "./core/client";
import type * as core from "./gen/contract";
import { EntryChange, PlanChange, RecordChange } from "./look/events";
import { look } from "./look/look";
import { register } from "./offline";
import { add, blank, spotOf, untouched, usualPlan } from "./sheet/draft";
import * as store from "./store";
import { say, sayCode } from "./words/words";
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
      main {
        flex: 1;
        width: 100%;
        max-width: 72rem;
        margin: 0 auto;
        padding: 0.5rem;
        display: grid;
        gap: var(--gap);
        align-content: start;
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
          grid-template-columns: 1fr 1fr;
          padding: 0.75rem 1rem 1rem;
        }
        header {
          padding-inline: 1rem;
        }
        #notices {
          grid-column: 1 / -1;
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
      }
      #notices:empty {
        display: none;
      }
    `,
  ];

  @state() private record = blank();
  @state() private entry = "";
  @state() private sheet: core.Sheet | undefined;
  @state() private goNoGo: core.GoNoGo | undefined;
  @state() private plan = usualPlan;
  @state() private link = "";
  /** the sheet that the user left for this one: a link's, or a new spot's */
  @state() private aside: { kept: store.Kept; why: "link" | "new" } | undefined;
  @state() private refused = "";
  @state() private fault: "" | "lost" | "invalid" = "";
  @state() private invalid = "";
  @state() private storeFailed = false;
  @state() private kept = false;
  @state() private switchNow: (() => void) | undefined;
  @state() private calculation: Core["state"];
  private readonly core = new Core();
  private asked: { key: string; answer: Promise<core.GoNoGo> } | undefined;
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
    this.addEventListener("new-spot", () => this.newSpot());
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
      <main>
        <div id="notices">${this.notices()}</div>
        <div class="column">
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
      </main>
      <strike-foot .sheet=${this.sheet}></strike-foot>`;
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
            ["keep", say("link.keep"), () => this.forgetAside()],
          ])
        : "",
      this.aside?.why === "new"
        ? notice("aside", say("sheet.new.done"), [["back", say("sheet.new.undo"), () => this.bringBack()]])
        : "",
      this.switchNow ? notice("update", say("update.waiting"), [["switch", say("update.switch"), this.switchNow]]) : "",
      this.storeFailed ? notice("unkept", say("store.failed"), [], true) : "",
    ].filter((part) => part !== "");
  }

  /** Opens what there was: the kept sheet, then a link over it. */
  private async open(): Promise<void> {
    const atStart = this.change;
    try {
      const [kept, aside] = [await store.load("current"), await store.load("aside")];
      if (aside) this.aside = { kept: aside, why: "link" };
      if (kept) {
        // What was typed while the store opened belongs to the kept sheet.
        const typed = this.change === atStart ? [] : this.record.readings.map(({ value }) => value ?? "");
        this.record = add(kept.record, typed);
        this.entry ||= kept.entry;
        this.plan = kept.plan ?? usualPlan;
      }
    } catch {
      this.storeFailed = true;
    }
    // An address that this page wrote itself says nothing new, unless nothing was kept.
    if (history.state !== ours || untouched(this.record)) await this.openLink();
    await this.evaluate();
  }

  /** Opens the link in the address, if there is one, and lays the own sheet aside. */
  private async openLink(): Promise<void> {
    const fragment = location.hash.slice(1);
    if (!fragment) return;
    try {
      const record = await this.core.decodeLink(fragment);
      if (JSON.stringify(record) === JSON.stringify(this.record)) return;
      const own = this.current();
      if (!untouched(own.record) && !this.aside) {
        this.aside = { kept: own, why: "link" };
        await this.attempt(store.save("aside", own));
      }
      this.refused = "";
      this.entry = "";
      this.replace(record);
    } catch (error) {
      if (error instanceof Refusal) this.refused = sayCode(error.error.code, error.error.params);
    }
  }

  private replace(record: core.Record): void {
    if (this.aside?.why === "new" && !untouched(record)) this.forgetAside();
    this.record = record;
    this.change++;
    void this.save();
    void this.evaluate();
  }

  private newSpot(): void {
    const kept = this.current();
    this.entry = "";
    this.replace(blank(this.record));
    if (!untouched(kept.record)) this.aside = { kept, why: "new" };
  }

  private bringBack(): void {
    const { record, entry } = this.aside!.kept;
    this.forgetAside();
    this.entry = entry;
    this.replace(record);
  }

  private forgetAside(): void {
    this.aside = undefined;
    void this.attempt(store.remove("aside"));
  }

  private current(): store.Kept {
    return { record: this.record, entry: this.entry, plan: this.plan };
  }

  private save(): Promise<void> {
    return this.attempt(store.save("current", this.current()));
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
