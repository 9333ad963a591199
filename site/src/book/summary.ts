// What the spots of a job come to.

import type * as core from "../gen/contract";
import { LitElement, css, html } from "lit";
import { customElement, property, state } from "lit/decorators.js";
import { look } from "../look/look";
import { budgetStyle } from "../sheet/budget";
import { marks } from "../sheet/verdict";
import type { Spot } from "../store";
import { say, sayCode } from "../words/words";
import { outcomes } from "./choose";
import { SpotOpen } from "./events";
import { valueOf } from "./row";
import { traverse, traverseStyle, traverseTable } from "./traverse";

@customElement("strike-summary")
export class SummaryElement extends LitElement {
  static override styles = [
    look,
    budgetStyle,
    traverseStyle,
    css`
      #counts {
        display: grid;
        grid-template-columns: repeat(auto-fit, minmax(9rem, 1fr));
        gap: 0.5rem;
        margin: 0;
        padding: 0;
        list-style: none;
      }
      #counts li {
        padding: 0.4rem 0.6rem;
        border: 1px solid var(--line);
        border-left: 0.35rem solid var(--edge);
        border-radius: 0.25rem;
      }
      #counts b {
        display: block;
        font-size: 1.3rem;
      }
      #counts .conforms {
        border-left-color: var(--go);
      }
      #counts .does-not-conform {
        border-left-color: var(--stop);
      }
      #counts .not-proven {
        border-left-color: var(--warn);
      }
      #worst {
        width: 100%;
        margin-top: var(--gap);
        text-align: left;
      }
      @media print {
        #worst {
          border: 0;
          padding: 0;
          color: inherit;
        }
        details {
          display: none;
        }
      }
    `,
  ];
  /** of the spots, in their order; undefined while they are not evaluated */
  @property({ attribute: false }) rows: core.BookRow[] | undefined;
  @property({ attribute: false }) spots: Spot[] = [];
  @property({ attribute: false }) summarize!: (rows: core.BookRow[]) => Promise<core.Summary>;
  @state() private summary: core.Summary | undefined;
  /** what the summary is of */
  private of: { spots: Spot[]; rows: core.BookRow[] } = { spots: [], rows: [] };

  override willUpdate(changed: Map<PropertyKey, unknown>): void {
    if (changed.has("rows")) void this.find();
  }

  override render() {
    const { summary } = this;
    return html`<section aria-labelledby="title">
      <h2 id="title">${say("summary.title")}</h2>
      ${summary ? this.found(summary) : html`<p>${say("summary.waiting")}</p>`}
    </section>`;
  }

  private found(summary: core.Summary) {
    const { worst, byZone, uniformity } = summary;
    return html`<ul id="counts" aria-label=${say("summary.counts")}>
        ${outcomes.map((outcome) => {
          const n = summary.counts[outcome];
          return n === 0 ? "" : html`<li class=${outcome}><b>${n}</b> <span aria-hidden="true">${marks[outcome]}</span> ${say(`outcome.${outcome}`)}</li>`;
        })}
      </ul>
      ${worst === null
        ? ""
        : html`<button id="worst" @click=${() => this.dispatchEvent(new SpotOpen(this.of.spots[worst]!))}>
            ${say("summary.worst", { label: this.label(worst), value: valueOf(this.of.rows[worst]!) })}
          </button>`}
      ${byZone.length === 0 ? "" : zoneTable(byZone, (row) => this.label(row))}
      <h3>${say("summary.uniformity")}</h3>
      ${uniformity.said.map(({ part, code, params }) => html`<p id=${`uniformity-${part}`}>${sayCode(code, params)}</p>`)}
      ${this.traversePart(summary)}`;
  }

  private traversePart(summary: core.Summary) {
    const { points, code, params } = summary.traverse;
    if (points.length < 2 && !code) return "";
    return html`<h3>${say("traverse.title")}</h3>
      ${traverse(summary)}${code ? html`<p id="peak">${sayCode(code, params)}</p>` : ""}
      ${points.length < 2 ? "" : html`<details><summary>${say("traverse.table")}</summary>${traverseTable(summary, (row) => this.label(row))}</details>`}`;
  }

  private label(row: number): string {
    return this.of.spots[row]?.kept.record.label || say("book.unlabelled");
  }

  private async find(): Promise<void> {
    const { rows, spots } = this;
    if (!rows) return;
    try {
      const summary = await this.summarize(rows);
      if (rows !== this.rows) return;
      this.of = { spots, rows };
      this.summary = summary;
    } catch {
      // The core is lost: the page says so.
    }
  }
}

function zoneTable(zones: core.ZoneSummary[], label: (row: number) => string) {
  return html`<h3>${say("summary.zones")}</h3>
    <div class="scroll" tabindex="0" role="region" aria-label=${say("summary.zones")}>
      <table id="zones">
        <thead>
          <tr>
            <th scope="col">${say("book.zone")}</th>
            <th scope="col">${say("summary.spots")}</th>
            <th scope="col">${say("summary.mean")}</th>
            <th scope="col">${say("summary.min")}</th>
            <th scope="col">${say("summary.max")}</th>
          </tr>
        </thead>
        <tbody>
          ${zones.map(
            (z) => html`<tr>
              <th scope="row">${say(z.zone ? `zone.${z.zone}` : "zone.unsaid")}</th>
              <td>${z.n}</td>
              <td>${say("book.row.value", { value: z.shown, expanded: z.shownExpanded })}</td>
              <td>${say("summary.least", { value: z.shownMin, bound: z.shownLow, label: label(z.minRow) })}</td>
              <td>${say("summary.most", { value: z.shownMax, bound: z.shownHigh, label: label(z.maxRow) })}</td>
            </tr>`,
          )}
        </tbody>
      </table>
    </div>`;
}
