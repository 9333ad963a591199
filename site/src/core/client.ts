// The page's side of the worker: a promise for each question. A worker that
// dies is started again, and what it still owed is asked again, once.

import { catalogue } from "../gen/catalogue";
import type * as core from "../gen/contract";
import type { Call, Question, Report } from "./protocol";

/** How far the core is. */
export type State =
  | { kind: "loading"; share: number }
  | { kind: "ready" }
  | { kind: "failed"; detail: string };

/** What the core refuses, with its sentence and the field that is to blame. */
export class Refusal extends Error {
  constructor(readonly error: core.Error) {
    super(error.message);
  }
}

/** The core cannot answer: it died twice over the same question. */
export class CoreLost extends Error {}

interface Pending extends Question {
  again: boolean;
  resolve(text: string): void;
  reject(reason: Error): void;
}

/** How long an answer may take before the worker counts as dead. An answer
 * takes a millisecond; a phone that was asleep may take long to wake. */
const patience = 15_000;

/** The core, seen from the page. */
export class Core extends EventTarget {
  state: State = { kind: "loading", share: 0 };
  private worker: Worker | undefined;
  private pending = new Map<number, Pending>();
  private lastId = 0;
  private watch: ReturnType<typeof setTimeout> | undefined;

  /** Starts the worker, or starts it anew. */
  start(): void {
    this.worker?.terminate();
    clearTimeout(this.watch);
    this.become({ kind: "loading", share: 0 });
    const worker = new Worker(new URL(__WORKER_URL__, document.baseURI));
    worker.onmessage = (event: MessageEvent<Report>) => this.hear(event.data);
    worker.onerror = (event) => {
      event.preventDefault();
      if (this.state.kind === "loading") this.fail(event.message || "the worker did not start");
      else this.restart();
    };
    this.worker = worker;
  }

  evaluate(record: core.Record): Promise<core.Sheet> {
    return this.ask("evaluate", JSON.stringify(record)).then(parsed<core.Sheet>);
  }

  goNoGo(request: core.GoNoGoRequest): Promise<core.GoNoGo> {
    return this.ask("goNoGo", JSON.stringify(request)).then(parsed<core.GoNoGo>);
  }

  moreReadings(request: core.MoreReadingsRequest): Promise<core.MoreReadings> {
    return this.ask("moreReadings", JSON.stringify(request)).then(parsed<core.MoreReadings>);
  }

  fitCurve(definition: core.Definition): Promise<core.Fitted> {
    return this.ask("fitCurve", JSON.stringify(definition)).then(parsed<core.Fitted>);
  }

  decodeLink(fragment: string): Promise<core.Record> {
    return this.ask("decodeLink", fragment).then(parsed<core.Record>);
  }

  /** The fragment of a record's link, without "#". */
  async encodeLink(record: core.Record): Promise<string> {
    return plain(await this.ask("encodeLink", JSON.stringify(record)));
  }

  /** The rows of a list for some records, in their order. */
  evaluateRows(records: core.Record[]): Promise<core.BookRow[]> {
    const book: core.Book = { v: catalogue.recordVersion, records };
    return this.ask("evaluateRows", JSON.stringify(book)).then((text) => parsed<core.BookRows>(text).rows);
  }

  summarizeRows(rows: core.BookRow[]): Promise<core.Summary> {
    return this.ask("summarizeRows", JSON.stringify({ rows } satisfies core.BookRows)).then(parsed<core.Summary>);
  }

  readTable(request: core.Request): Promise<core.Table> {
    return this.ask("readTable", JSON.stringify(request)).then(parsed<core.Table>);
  }

  /** A table for other programs, as CSV; a part behind the first goes on
   * without headers. */
  writeTable(records: core.Record[], continued: boolean): Promise<string> {
    const book: core.TableBook = { v: catalogue.recordVersion, records, continued };
    return this.ask("writeTable", JSON.stringify(book)).then(plain);
  }

  private ask(call: Call, text: string): Promise<string> {
    return new Promise((resolve, reject) => {
      const question = { id: ++this.lastId, call, text, again: false, resolve, reject };
      this.pending.set(question.id, question);
      if (this.state.kind === "ready") this.send(question);
    });
  }

  private send({ id, call, text }: Question): void {
    this.worker!.postMessage({ id, call, text } satisfies Question);
    this.watch ??= setTimeout(() => this.restart(), patience);
  }

  private hear(report: Report): void {
    switch (report.kind) {
      case "progress":
        this.become({ kind: "loading", share: Math.min(1, report.loaded / __WASM_BYTES__) });
        break;
      case "ready":
        this.become({ kind: "ready" });
        for (const question of this.pending.values()) this.send(question);
        break;
      case "failed":
        this.fail(report.detail);
        break;
      case "ended":
        this.restart();
        break;
      case "answer":
        clearTimeout(this.watch);
        this.watch = undefined;
        this.pending.get(report.id)?.resolve(report.text);
        this.pending.delete(report.id);
        if (this.pending.size > 0) this.watch = setTimeout(() => this.restart(), patience);
        break;
    }
  }

  /** Starts a dead worker again. What it owes is asked again, but not twice: a
   * question that kills the core would do so for ever. */
  private restart(): void {
    this.watch = undefined;
    for (const question of this.pending.values()) {
      if (question.again) {
        this.pending.delete(question.id);
        question.reject(new CoreLost());
      }
      question.again = true;
    }
    this.start();
  }

  private fail(detail: string): void {
    this.worker?.terminate();
    this.become({ kind: "failed", detail });
  }

  private become(state: State): void {
    this.state = state;
    this.dispatchEvent(new Event("state"));
  }
}

/** An answer that is no JSON, unless it is a refusal. */
function plain(text: string): string {
  if (text.startsWith("{")) parsed(text);
  return text;
}

function parsed<T>(text: string): T {
  const value = JSON.parse(text) as T & { error?: core.Error };
  if (value.error) throw new Refusal(value.error);
  return value;
}
