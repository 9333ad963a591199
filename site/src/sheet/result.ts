// The result: findings first, then every scale of the metal with its
// uncertainty, and how each value comes about.

import { LitElement, css, html } from "lit";
import { customElement, property } from "lit/decorators.js";
import type * as core from "../gen/contract";
import { look } from "../look/look";
import { say, sayCode, sayFinding } from "../words/words";
import { budget, budgetStyle } from "./budget";
import "./more";

@customElement("strike-result")
export class ResultElement extends LitElement {
  static override styles = [
    look,
    budgetStyle,
    css`
      ul {
        margin: 0;
        padding: 0;
        list-style: none;
      }
      .finding {
        margin-top: 0.5rem;
        padding: 0.6rem 0.75rem;
        border-left: 0.35rem solid;
        border-radius: 0.25rem;
        color: var(--ink);
      }
      .finding.stop {
        border-color: var(--stop);
        background: var(--stop-soft);
      }
      .finding.warn {
        border-color: var(--warn);
        background: var(--warn-soft);
      }
      .finding.note {
        border-color: var(--note);
        background: var(--note-soft);
      }
      .stop b {
        color: var(--stop);
      }
      .warn b {
        color: var(--warn);
      }
      .note b {
        color: var(--note);
      }
      .mean {
        font-size: 1.5rem;
        font-weight: 700;
      }
      .scale {
        padding: 0.6rem 0 0;
        border-top: 1px solid var(--line);
      }
      .value {
        display: flex;
        flex-wrap: wrap;
        align-items: baseline;
        justify-content: space-between;
        gap: 0 0.75rem;
        font-variant-numeric: tabular-nums;
      }
      .value strong {
        font-size: 1.25rem;
      }
      .value span {
        font-size: 1.1rem;
      }
      .not {
        margin-top: 0.4rem;
      }
    `,
  ];
  @property({ attribute: false }) record!: core.Record;
  @property({ attribute: false }) sheet: core.Sheet | undefined;
  @property({ attribute: false }) askMore!: (wanted: core.Wanted) => Promise<core.MoreReadings>;

  override render() {
    const sheet = this.sheet;
    const nothing = !sheet || this.record.readings.length === 0;
    return html`<section aria-labelledby="title">
      <h2 id="title">${say("result.title")}</h2>
      ${nothing ? html`<p>${say("result.empty")}</p>` : html`${findings(sheet, ["stop", "warn"])}${summary(sheet, this.record)}${scales(sheet)}${findings(sheet, ["note"])}<strike-more .sheet=${sheet} .ask=${this.askMore}></strike-more>`}
    </section>`;
  }
}

/** The findings of some levels, the gravest first. */
function findings(sheet: core.Sheet, levels: string[]) {
  const found = levels.flatMap((level) => sheet.findings.filter((finding) => finding.level === level));
  if (found.length === 0) return "";
  return html`<h3 class="hidden">${say(`findings.${levels[0]!}`)}</h3>
    <ul class="findings">
      ${found.map((finding) => {
        const { message, remedy } = sayFinding(finding);
        return html`<li class="finding ${finding.level}" data-code=${finding.code}>
          <b>${say(`level.${finding.level}`)}.</b> ${message} ${remedy}
          <div class="soft">${finding.source}</div>
        </li>`;
      })}
    </ul>`;
}

function summary(sheet: core.Sheet, record: core.Record) {
  const { readings, corrected } = sheet;
  if (readings.n === 0) return "";
  const parts = [say(readings.struck ? "result.count.struck" : "result.count", { n: readings.n, struck: readings.struck })];
  if (readings.shownSD) parts.push(say("result.sd", { sd: readings.shownSD }));
  if (readings.n > 1 && readings.rangePercent !== null) parts.push(say("result.spread", { percent: readings.rangePercent }));
  if (corrected.direction) parts.push(say("result.corrected", { direction: corrected.direction, scale: sheet.scale }));
  return html`<p class="mean" id="mean">${say("result.mean")} ${readings.shownMean}</p>
    <p class="soft">${parts.join(". ")}.</p>
    <p class="soft">${say("result.confidence", { percent: (record.confidence ?? 0.95) * 100 })}</p>`;
}

function scales(sheet: core.Sheet) {
  const given = sheet.scales.filter((row) => row.status === "ok");
  const others = sheet.scales.filter((row) => row.status !== "ok");
  return html`<h3>${say("scales.title")}</h3>
    <ul id="scales">
      ${given.map(scale)}
    </ul>
    ${others.length === 0
      ? ""
      : html`<details class="scale">
          <summary>${say("scales.not")}: ${others.map((row) => row.scale).join(", ")}</summary>
          <ul id="others">
            ${others.map(
              (row) =>
                html`<li class="not" data-scale=${row.scale}>
                  <strong>${row.scale}</strong>, ${scaleName(row)}. ${sayCode(row.reasonCode, row.reasonParams)}
                  ${row.shownRange.length === 2 ? range(row) : ""}
                </li>`,
            )}
          </ul>
        </details>`}`;
}

function scale(row: core.Row) {
  return html`<li class="scale" data-scale=${row.scale}>
    <div class="value"><strong>${row.shown}</strong><span>± ${row.shownExpanded}</span></div>
    <div class="soft">
      ${say(`scale.interval${cut(row)}`, { low: row.shownLow, high: row.shownHigh })}. ${scaleName(row)}${row.method === row.scale ? "" : `, ${row.method}`}.
      ${range(row)}
    </div>
    <details>
      <summary>${say("scale.how")}<span class="hidden"> ${row.scale}</span></summary>
      <ul>
        ${row.path.map(
          (step) => html`<li><b>${step.step}</b>, ${say(`basis.${step.basis}`)}. <span class="soft">${step.source}</span></li>`,
        )}
      </ul>
      <p class="soft">${say(`scale.factor.${row.coverage}`, { k: row.k!, dof: row.dof ?? "∞" })}</p>
      ${budget(row)}
    </details>
  </li>`;
}

function range(row: core.Row): string {
  return say("scale.range", { low: row.shownRange[0]!, high: row.shownRange[1]! }) + ".";
}

function cut(row: core.Row): string {
  if (row.lowCut && row.highCut) return ".bothCut";
  return row.lowCut ? ".lowCut" : row.highCut ? ".highCut" : "";
}

function scaleName(row: core.Row): string {
  return row.device ? say("scale.name.leeb", { device: row.device }) : say(`scale.name.${row.scale}`);
}
