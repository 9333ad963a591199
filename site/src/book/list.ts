// The list of spots. All rows are equally high, and only those in view are
// drawn: ten thousand cost no more than twenty.

import type * as core from "../gen/contract";
import { LitElement, css, html } from "lit";
import { customElement, property, query, state } from "lit/decorators.js";
import { repeat } from "lit/directives/repeat.js";
import { look } from "../look/look";
import { marks } from "../sheet/verdict";
import type { Spot } from "../store";
import { say } from "../words/words";
import { SpotOpen } from "./events";
import { valueOf } from "./row";

/** Height of a row, in the root's font size. */
const rem = 6;

/** How many rows beyond the view are drawn, so that none is missing while it
 * scrolls and the next one can take the focus. */
const spare = 4;

/** How far a page key goes. */
const leap = 10;

/** The user wants to do something with a spot other than to open it. */
export class SpotPick extends Event {
  static readonly type = "spot-pick";
  constructor(readonly spot: Spot) {
    super(SpotPick.type);
  }
}

@customElement("strike-spots")
export class SpotsElement extends LitElement {
  static override styles = [
    look,
    css`
      #list {
        position: relative;
        contain: layout;
      }
      .item {
        position: absolute;
        inset: 0 0 auto 0;
        height: ${rem}rem;
        padding-bottom: 0.4rem;
        display: grid;
        grid-template-columns: 1fr auto;
        gap: 0.4rem;
      }
      .open {
        min-width: 0;
        padding: 0.3rem 0.6rem;
        display: grid;
        grid-template-columns: 2.2rem 1fr;
        align-items: center;
        gap: 0.6rem;
        text-align: left;
        font-weight: 400;
        line-height: 1.3;
        color: var(--ink);
        border-color: var(--line);
      }
      .open[aria-current="true"] {
        border: 2px solid var(--accent);
      }
      .mark {
        width: 2.2rem;
        height: 2.2rem;
        display: grid;
        place-items: center;
        border: 2px solid currentColor;
        border-radius: 50%;
        font-weight: 800;
        color: var(--soft);
      }
      .not-proven .mark {
        border-style: dashed;
      }
      .cannot-say .mark,
      .no-limit .mark {
        border-style: dotted;
      }
      .conforms :is(.mark, b) {
        color: var(--go);
      }
      .does-not-conform :is(.mark, b) {
        color: var(--stop);
      }
      .not-proven :is(.mark, b) {
        color: var(--warn);
      }
      .text {
        min-width: 0;
        font-variant-numeric: tabular-nums;
      }
      .text > span {
        display: block;
        white-space: nowrap;
        overflow: hidden;
        text-overflow: ellipsis;
      }
      .name {
        font-weight: 600;
      }
      b {
        font-size: 1rem;
      }
      .more {
        padding: 0;
        font-size: 1.4rem;
        border-color: var(--line);
      }
    `,
  ];
  @property({ attribute: false }) spots: Spot[] = [];
  @property({ attribute: false }) rowOf!: (spot: Spot) => core.BookRow | undefined;
  /** the spot that is on the sheet */
  @property({ attribute: false }) opened: string | undefined;
  /** changes whenever more spots are evaluated */
  @property({ attribute: false }) done = 0;
  @state() private first = 0;
  @state() private last = 2 * spare;
  /** the row that the keyboard is on */
  @state() private active = 0;
  @query("#list") private list!: HTMLElement | null;
  private readonly moved = () => this.measure();

  override connectedCallback(): void {
    super.connectedCallback();
    addEventListener("scroll", this.moved, { passive: true });
    addEventListener("resize", this.moved);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    removeEventListener("scroll", this.moved);
    removeEventListener("resize", this.moved);
  }

  override willUpdate(changed: Map<PropertyKey, unknown>): void {
    if (changed.has("spots")) this.active = Math.max(0, Math.min(this.active, this.spots.length - 1));
  }

  override render() {
    if (this.spots.length === 0) return "";
    const seen: number[] = [];
    for (let at = this.first; at <= Math.min(this.last, this.spots.length - 1); at++) seen.push(at);
    if (this.active < this.first) seen.unshift(this.active);
    if (this.active > this.last) seen.push(this.active);
    return html`<div id="list" role="list" aria-label=${say("book.spots.list")} @keydown=${this.key}>
      ${repeat(
        seen,
        (at) => this.spots[at]!.id,
        (at) => this.item(at),
      )}
    </div>`;
  }

  private item(at: number) {
    const spot = this.spots[at]!;
    const { record } = spot.kept;
    const row = this.rowOf(spot);
    const outcome = row?.outcome ?? "no-limit";
    const tab = at === this.active ? 0 : -1;
    const label = record.label || say("book.unlabelled");
    return html`<div class="item ${outcome}" role="listitem" aria-setsize=${this.spots.length} aria-posinset=${at + 1} data-at=${at}>
      <button class="open" tabindex=${tab} aria-current=${spot.id === this.opened ? "true" : "false"} @focus=${() => (this.active = at)} @click=${() => this.dispatchEvent(new SpotOpen(spot))}>
        <span class="mark" aria-hidden="true">${marks[outcome]}</span>
        <span class="text">
          <span class="name">${label}</span>
          <span>${row ? valueOf(row) : say("book.row.waiting")}</span>
          <span class="soft"><b>${row ? say(`outcome.${outcome}`) : ""}</b>${record.zone ? html` ${say(`zone.${record.zone}`)}` : ""}</span>
        </span>
      </button>
      <button class="more" tabindex=${tab} aria-haspopup="dialog" aria-label=${say("book.spot.more", { label })} @focus=${() => (this.active = at)} @click=${() => this.dispatchEvent(new SpotPick(spot))}>⋯</button>
    </div>`;
  }

  override updated(): void {
    // Where a row stands cannot be said in the template: the page's policy
    // takes no style attributes.
    if (!this.list) return;
    const height = rowHeight();
    this.list.style.height = `${this.spots.length * height}px`;
    for (const item of this.list.querySelectorAll<HTMLElement>(".item")) {
      item.style.transform = `translateY(${Number(item.dataset["at"]) * height}px)`;
    }
    this.measure();
  }

  /** Finds out which rows are in view. */
  private measure(): void {
    if (!this.list) return;
    const height = rowHeight();
    const top = -this.list.getBoundingClientRect().top;
    this.first = Math.max(0, Math.floor(top / height) - spare);
    this.last = Math.max(this.first + 2 * spare, Math.ceil((top + innerHeight) / height) + spare);
  }

  private key(event: KeyboardEvent): void {
    const steps: { [key: string]: number } = { ArrowDown: 1, ArrowUp: -1, PageDown: leap, PageUp: -leap, Home: -Infinity, End: Infinity };
    const step = steps[event.key];
    if (step === undefined) return;
    event.preventDefault();
    const kind = (event.target as HTMLElement).classList.contains("more") ? ".more" : ".open";
    this.active = Math.max(0, Math.min(this.active + step, this.spots.length - 1));
    void this.focusActive(kind);
  }

  private async focusActive(kind: string): Promise<void> {
    await this.updateComplete;
    const button = this.list?.querySelector<HTMLElement>(`[data-at="${this.active}"] ${kind}`);
    button?.focus({ preventScroll: true });
    button?.scrollIntoView({ block: "nearest" });
  }
}

function rowHeight(): number {
  return rem * parseFloat(getComputedStyle(document.documentElement).fontSize);
}
