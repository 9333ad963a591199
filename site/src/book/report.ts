// The report: the spots of a job on paper, one to a page or in a table. No value
// stands without its uncertainty and what it rests on.

import { LitElement, css, html, type TemplateResult } from "lit";
import { customElement, property, state } from "lit/decorators.js";
import { catalogue } from "../gen/catalogue";
import type { Core } from "../core/client";
import type * as core from "../gen/contract";
import { look } from "../look/look";
import { budgetBars, budgetStyle, budgetTable } from "../sheet/budget";
import { sayLimit } from "../sheet/limit";
import { marks } from "../sheet/verdict";
import type { Job, Spot } from "../store";
import { say, sayCode, sayFinding } from "../words/words";
import type { Evaluation } from "./evaluation";
import { valueOf } from "./row";
import "./summary";

/** The most spots that are written one to a page. */
const mostPages = 200;

@customElement("strike-report")
export class ReportElement extends LitElement {
  static override styles = [
    look,
    budgetStyle,
    css`
      article {
        margin-top: var(--gap);
        padding: var(--gap);
        background: var(--card);
        border: 1px solid var(--line);
        border-radius: var(--round);
        overflow-wrap: anywhere;
      }
      dl {
        display: grid;
        grid-template-columns: repeat(auto-fit, minmax(11rem, 1fr));
        gap: 0.3rem 1rem;
        margin: 0.5rem 0;
      }
      dt {
        color: var(--soft);
        font-size: 0.85rem;
      }
      dd {
        margin: 0;
        font-weight: 600;
      }
      h2 small {
        color: var(--soft);
        font-weight: 400;
      }
      .outcome {
        padding: 0.4rem 0.6rem;
        border: 2px solid currentColor;
        border-radius: var(--round);
        font-size: 1.15rem;
        font-weight: 700;
      }
      .number {
        white-space: nowrap;
      }
      .sign {
        display: grid;
        grid-template-columns: 1fr 1fr 2fr;
        gap: 1rem;
        margin-top: 3rem;
      }
      .sign span {
        border-top: 1px solid var(--ink);
        font-size: 0.85rem;
      }
      @media print {
        .tools {
          display: none;
        }
        article {
          margin: 0;
          padding: 0;
          border: 0;
          border-radius: 0;
        }
        article + article {
          break-before: page;
        }
        h2,
        h3 {
          break-after: avoid;
        }
        tr,
        li,
        .sign {
          break-inside: avoid;
        }
        thead {
          display: table-header-group;
        }
        .scroll {
          overflow: visible;
        }
      }
    `,
  ];
  @property({ attribute: false }) core!: Core;
  @property({ attribute: false }) evaluation!: Evaluation;
  @property({ attribute: false }) job!: Job;
  @property({ attribute: false }) spots: Spot[] = [];
  @state() private form: "table" | "pages" = "table";
  @state() private sheets: core.Sheet[] = [];
  @state() private ready = false;
  private turn = 0;

  override connectedCallback(): void {
    super.connectedCallback();
    void this.prepare();
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.turn++;
  }

  override render() {
    const tooMany = this.spots.length > mostPages;
    return html`<section class="tools" aria-labelledby="title">
        <h2 id="title">${say("report.title")}</h2>
        <p class="soft">${say("report.what", { n: this.spots.length })}</p>
        <label
          >${say("report.form")}
          <select id="form" @change=${(e: Event) => this.write((e.target as HTMLSelectElement).value as "table" | "pages")}>
            <option value="table">${say("report.form.table")}</option>
            <option value="pages" ?disabled=${tooMany}>${say(tooMany ? "report.form.too-many" : "report.form.pages", { most: mostPages })}</option>
          </select>
        </label>
        <p role="status" id="state">${this.ready ? "" : say("report.preparing")}</p>
        <div class="row">
          <button id="print" class="main" ?disabled=${!this.ready} @click=${() => print()}>${say("report.print")}</button>
          <button id="back" @click=${() => this.dispatchEvent(new Event("close"))}>${say("report.back")}</button>
        </div>
      </section>
      <div id="paper">${this.ready ? (this.form === "table" ? this.table() : this.pages()) : ""}</div>`;
  }

  private write(form: "table" | "pages"): void {
    this.form = form;
    void this.prepare();
  }

  /** Has evaluated what the form shows. */
  private async prepare(): Promise<void> {
    const turn = ++this.turn;
    this.ready = false;
    try {
      await this.evaluation.run(this.spots, () => undefined);
      const sheets: core.Sheet[] = [];
      if (this.form === "pages") {
        for (const spot of this.spots) {
          sheets.push(await this.core.evaluate(spot.kept.record));
          if (turn !== this.turn) return;
        }
      }
      if (turn !== this.turn) return;
      this.sheets = sheets;
      this.ready = true;
    } catch {
      // The core is lost: the page says so.
    }
  }

  private table() {
    const rows = this.spots.map((spot) => this.evaluation.of(spot)!);
    return html`<article>
      <h2>${this.job.name} <small>${say("report.table.title", { n: this.spots.length })}</small></h2>
      <strike-summary .rows=${rows} .spots=${this.spots} .summarize=${this.summarize}></strike-summary>
      <div class="scroll" tabindex="0" role="group" aria-label=${say("book.spots")}>
        <table id="table">
          <thead>
            <tr>
              ${["label", "zone", "metal", "readings", "value", "limit", "verdict"].map((key) => html`<th scope="col">${say(`report.${key}`)}</th>`)}
            </tr>
          </thead>
          <tbody>
            ${this.spots.map(({ kept: { record } }, i) => {
              const { outcome } = rows[i]!;
              return html`<tr>
                <th scope="row">${record.label || say("book.unlabelled")}</th>
                <td>${record.zone ? say(`zone.${record.zone}`) : ""}</td>
                <td>${record.group ? say(`metal.${record.group}`) : ""}</td>
                <td>${record.readings.map((reading) => (reading.struck ? say("report.struck.short", { value: text(reading) }) : text(reading))).join(" ")}</td>
                <td>${valueOf(rows[i]!)}</td>
                <td>${record.limit ? sayLimit(record.limit) : ""}</td>
                <td>${outcome === "no-limit" ? "" : html`${marks[outcome]} ${say(`outcome.${outcome}`)}`}</td>
              </tr>`;
            })}
          </tbody>
        </table>
      </div>
      <p class="soft">${confidences(this.spots).join(" ")}</p>
      ${this.struck()} ${cautions()} ${signature()}
    </article>`;
  }

  /** The readings that were struck, with their reasons: a table has no room for them. */
  private struck() {
    const found = this.spots.flatMap(({ kept: { record } }) =>
      record.readings.filter(({ struck }) => struck).map((reading) => ({ label: record.label || say("book.unlabelled"), value: text(reading), reason: reading.struck! })),
    );
    if (found.length === 0) return "";
    return html`<h3>${say("report.struck")}</h3>
      <ul>${found.map((words) => html`<li>${say("report.struck.of", words)}</li>`)}</ul>`;
  }

  private readonly summarize = (rows: core.BookRow[]) => this.core.summarizeRows(rows);

  private pages() {
    return this.spots.map((spot, i) => this.page(spot.kept.record, this.sheets[i]!, i));
  }

  private page(record: core.Record, sheet: core.Sheet, at: number) {
    const device = catalogue.devices.find(({ key, scale }) => key === record.device && scale === record.scale);
    const facts: [string, string | undefined][] = [
      ["job", record.job || this.job.name],
      ["zone", record.zone && say(`zone.${record.zone}`)],
      ["position", record.position_mm === undefined ? undefined : say("report.mm", { value: record.position_mm })],
      ["metal", record.group && say(`metal.${record.group}`)],
      ["measured", device ? say("spot.device", { key: device.key, scale: device.scale }) : sheet.scale],
      ["direction", device && say(`direction.${record.direction ?? "down"}`)],
      ["serial", record.serial],
      ["taken", record.taken && new Date(record.taken).toLocaleString()],
      ["by", record.by],
      ["limit", record.limit && sayLimit(record.limit)],
      ["notes", record.notes],
    ];
    const given = sheet.scales.filter(({ status }) => status === "ok");
    const judged = given.find(({ scale }) => scale === sheet.verdict.scale) ?? given.find(({ scale }) => scale === "HV") ?? given[0];
    return html`<article>
      <h2>${record.label || say("book.unlabelled")} <small>${say("report.page", { number: at + 1, all: this.spots.length })}</small></h2>
      <dl>${facts.map(([key, value]) => (value ? html`<div><dt>${say(`report.${key}`)}</dt><dd>${value}</dd></div>` : ""))}</dl>
      ${verdict(sheet)}
      <h3>${say("readings.title")}</h3>
      ${readings(record, sheet)} ${block(record, sheet)} ${values(record, given)}
      ${sheet.findings.length === 0
        ? ""
        : html`<h3>${say("findings.stop")}</h3>
            <ul>
              ${sheet.findings.map((finding) => {
                const { message, remedy } = sayFinding(finding);
                return html`<li><b>${say(`level.${finding.level}`)}.</b> ${message} ${remedy} <span class="soft">${finding.source}</span></li>`;
              })}
            </ul>`}
      ${judged ? html`<h3>${say("scale.budget", { scale: judged.scale })}</h3><p class="soft">${say(`scale.factor.${judged.coverage}`, { k: judged.k!, dof: judged.dof ?? "∞" })}</p>${budgetBars(judged)}${wide(say("scale.budget", { scale: judged.scale }), budgetTable(judged))}` : ""}
      ${cautions()} ${signature()}
    </article>`;
  }
}

function verdict({ verdict: { outcome, said, probability, shownChance, rule } }: core.Sheet) {
  if (outcome === "no-limit") return "";
  return html`<p class="outcome">${marks[outcome]} ${say(`outcome.${outcome}`)}</p>
    ${said.map(({ code, params }) => html`<p>${sayCode(code, params)}</p>`)}
    ${probability === null ? "" : html`<p class="soft">${say("verdict.probability", { percent: shownChance })} ${say(`rule.${rule}`)}.</p>`}`;
}

function readings(record: core.Record, sheet: core.Sheet) {
  const { n, struck, shownMean, shownSD } = sheet.readings;
  return html`<p>${record.readings.filter((reading) => !reading.struck).map(text).join(", ")}</p>
    ${struck === 0
      ? ""
      : html`<ul>
          ${record.readings.map((reading, i) => (reading.struck ? html`<li>${say("readings.struck.title", { number: i + 1, value: text(reading), reason: reading.struck })}</li>` : ""))}
        </ul>`}
    ${n === 0 ? "" : html`<p>${say("result.mean")} <b>${shownMean}</b>. ${say(struck ? "result.count.struck" : "result.count", { n, struck })}.${shownSD ? ` ${say("result.sd", { sd: shownSD })}.` : ""}</p>`}`;
}

function block(record: core.Record, sheet: core.Sheet) {
  const { status, error, n, sd, tolerance } = sheet.block;
  const scale = sheet.scale;
  return html`<h3>${say("block.title")}</h3>
    <p>
      ${say("report.block", { status: say(`block.status.${status}`) })}
      ${error === null ? "" : say(tolerance === null ? "block.outcome" : "block.outcome.tolerance", { error, scale, n, sd: sd ?? 0, tolerance: tolerance ?? "" })}
      ${record.block?.readings ? say("report.block.readings", { readings: record.block.readings.join(", ") }) : ""}
    </p>`;
}

/** Each scale with its uncertainty and what it rests on. */
function values(record: core.Record, given: core.Row[]) {
  if (given.length === 0) return html`<p><b>${say("result.none")}.</b></p>`;
  return html`<h3>${say("result.title")}</h3>
    <p class="soft">${confidence(record)}</p>
    ${wide(say("result.title"), html`<table>
      <thead>
        <tr>${["value", "interval", "basis"].map((key) => html`<th scope="col">${say(`report.${key}`)}</th>`)}</tr>
      </thead>
      <tbody>
        ${given.map(
          (row) => html`<tr>
            <th scope="row" class="number">${say("book.row.value", { value: row.shown, expanded: row.shownExpanded })}</th>
            <td class="number">${row.shownLow} – ${row.shownHigh}</td>
            <td>${row.path.map((step) => html`<div>${step.step}, ${say(`basis.${step.basis}`)}. <span class="soft">${step.source}</span></div>`)}</td>
          </tr>`,
        )}
      </tbody>
    </table>`)}`;
}

/** What ± stands for, in one sentence. */
function confidence(record: core.Record): string {
  return say("result.confidence", { percent: (record.confidence ?? 0.95) * 100 });
}

/** The same for many spots: each sentence once. */
function confidences(spots: Spot[]): string[] {
  return [...new Set(spots.map(({ kept }) => confidence(kept.record)))];
}

/** What may be wider than a phone: it scrolls by itself. */
function wide(label: string, content: TemplateResult) {
  return html`<div class="scroll" tabindex="0" role="group" aria-label=${label}>${content}</div>`;
}

function cautions() {
  return html`<h3>${say("cautions.title")}</h3>
    <ul class="soft">
      ${["estimate", "authority", "surface", "memory"].map((key) => html`<li>${say(`cautions.${key}`)}</li>`)}
    </ul>
    <p class="soft">${say("app.edition", { edition: catalogue.edition, build: __BUILD__ })}</p>`;
}

function signature() {
  return html`<div class="sign">${["name", "date", "signature"].map((key) => html`<span>${say(`report.sign.${key}`)}</span>`)}</div>`;
}

function text({ value }: core.Reading): string {
  if (value === null || value === "") return say("readings.empty");
  return typeof value === "number" ? say("readings.value", { value }) : value;
}
