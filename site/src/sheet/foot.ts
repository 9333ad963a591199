// The result at a glance, kept in view at the foot of the screen.

import { LitElement, css, html } from "lit";
import { customElement, property } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { look } from "../look/look";
import { say, sayFinding } from "../words/words";

/** The scales worth a place in one line, the first that have a value. */
const glance = ["HBW", "HRC", "HRB", "HV"];
const places = 3;

@customElement("strike-foot")
export class FootElement extends LitElement {
  static override styles = [
    look,
    css`
      :host {
        position: sticky;
        bottom: 0;
        z-index: 1;
      }
      div {
        display: flex;
        flex-wrap: wrap;
        align-items: baseline;
        gap: 0 1rem;
        padding: 0.5rem 1rem calc(0.5rem + env(safe-area-inset-bottom));
        background: var(--card);
        border-top: 2px solid var(--accent);
        font-variant-numeric: tabular-nums;
      }
      strong {
        font-size: 1.2rem;
      }
      b {
        color: var(--stop);
      }
      .conforms {
        color: var(--go);
      }
      .does-not-conform {
        color: var(--stop);
      }
      .not-proven {
        color: var(--warn);
      }
      .stop {
        overflow: hidden;
        display: -webkit-box;
        -webkit-box-orient: vertical;
        -webkit-line-clamp: 2;
      }
    `,
  ];
  @property({ attribute: false }) sheet: core.Sheet | undefined;

  override render() {
    const sheet = this.sheet;
    if (!sheet || sheet.readings.n === 0) return html`<div class="soft">${say("result.empty")}</div>`;
    const stop = sheet.findings.find((finding) => finding.level === "stop");
    return html`<div id="glance" role="status" aria-label=${say("result.foot")}>
      <strong>${sheet.readings.shownMean}</strong>
      <span class="soft">n ${sheet.readings.n}</span>
      ${sheet.verdict.outcome === "no-limit" ? "" : html`<strong id="outcome" class=${sheet.verdict.outcome}>${say(`outcome.${sheet.verdict.outcome}`)}</strong>`}
      ${stop
        ? html`<span class="stop"><b>${say("result.none")}.</b> ${sayFinding(stop).message}</span>`
        : glance
            .flatMap((key) => sheet.scales.filter((row) => row.scale === key && row.status === "ok" && key !== sheet.scale))
            .slice(0, places)
            .map((row) => html`<span data-scale=${row.scale}><strong>${row.shownValue}</strong> ± ${row.shownExpanded} ${row.scale}</span>`)}
    </div>`;
  }
}
