// The evaluation of many spots: in chunks, so that the page and the sheet in
// work get their answers between them. What is evaluated once is remembered.

import type { Core } from "../core/client";
import type * as core from "../gen/contract";
import { firstRev, type Spot } from "../store";

/** How many spots are evaluated at a time: about a tenth of a second's work. */
const chunk = 100;

export class Evaluation {
  private readonly rows = new Map<string, { rev: number; row: core.BookRow }>();

  constructor(private readonly core: Core) {}

  /** The row of a spot as it stands; undefined while it is not evaluated. */
  of(spot: Spot): core.BookRow | undefined {
    const found = this.rows.get(spot.id);
    return found?.rev === spot.rev ? found.row : undefined;
  }

  /** Takes the row of a spot that was evaluated before it was in the Book. */
  learn(id: string, row: core.BookRow): void {
    this.rows.set(id, { rev: firstRev, row });
  }

  /** Evaluates what is not evaluated yet, and says after each chunk how many of
   * the spots are done. It stops when the signal says so. */
  async run(spots: Spot[], done: (n: number) => void, signal?: AbortSignal): Promise<void> {
    const open = spots.filter((spot) => !this.of(spot));
    let at = 0;
    for await (const rows of this.inChunks(open.map(({ kept }) => kept.record))) {
      for (const row of rows) {
        const { id, rev } = open[at++]!;
        this.rows.set(id, { rev, row });
      }
      if (signal?.aborted) return;
      done(spots.length - open.length + at);
    }
  }

  /** Evaluates records, a chunk at a time. */
  async *inChunks(records: core.Record[]): AsyncGenerator<core.BookRow[]> {
    for (let at = 0; at < records.length; at += chunk) yield await this.core.evaluateRows(records.slice(at, at + chunk));
  }
}
