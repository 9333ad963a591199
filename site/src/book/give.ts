// Taking a job out of the page: files for other programs and for keeping, and
// the report.

import { LitElement, html } from "lit";
import { customElement, property, state } from "lit/decorators.js";
import type { Core } from "../core/client";
import { look } from "../look/look";
import * as store from "../store";
import { say } from "../words/words";
import { download, fileName, writeBook } from "./file";
import { withSpots } from "./shelf";

/** How many spots are written at a time: about a fifth of a second's work. */
const chunk = 100;

@customElement("strike-give")
export class GiveElement extends LitElement {
  static override styles = look;
  @property({ attribute: false }) core!: Core;
  @property({ attribute: false }) job!: store.Job;
  @property({ attribute: false }) jobs: store.Job[] = [];
  @property({ attribute: false }) spots: store.Spot[] = [];
  @state() private said = "";

  override render() {
    return html`<p class="soft">${say("give.what")}</p>
      <div class="row">
        <button id="json" class="main" @click=${() => this.give(() => this.json([this.job], this.job.name))}>${say("give.json")}</button>
        ${this.jobs.length > 1
          ? html`<button id="json-all" @click=${() => this.give(() => this.json(this.jobs, say("app.name")))}>${say("give.json.all")}</button>`
          : ""}
        <button id="csv" @click=${() => this.give(() => this.csv())}>${say("give.csv")}</button>
        <button id="report" @click=${() => this.dispatchEvent(new Event("report"))}>${say("give.report")}</button>
      </div>
      <p role="status" id="given">${this.said}</p>`;
  }

  private async give(write: () => Promise<void>): Promise<void> {
    try {
      await write();
      this.said = say("give.done");
    } catch {
      this.said = say("give.failed");
    }
  }

  /** Writes the file that restores everything, and notes that it was written. */
  private async json(jobs: store.Job[], name: string): Promise<void> {
    const exported = store.now();
    const filed = await withSpots(jobs);
    download(fileName(name, "json"), "application/json", writeBook(filed));
    for (const { job } of filed) await store.saveJob({ ...job, exported });
    this.dispatchEvent(new Event("exported"));
  }

  private async csv(): Promise<void> {
    const records = this.spots.map(({ kept: { record } }) => ({ ...record, job: record.job ?? this.job.name }));
    const parts: string[] = [];
    for (let at = 0; at < records.length; at += chunk) {
      this.said = say("give.writing", { done: at, all: records.length });
      parts.push(await this.core.writeTable(records.slice(at, at + chunk), at > 0));
    }
    download(fileName(this.job.name, "csv"), "text/csv", parts.join(""));
  }
}
