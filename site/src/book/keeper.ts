// Keeps the sheet in work and its spot in the Book, at each change. What the
// browser cannot keep is held here, and tried again with the next change.

import { newId } from "../sheet/draft";
import * as store from "../store";

/** Two tabs have changed one spot: theirs stands, ours is kept as a copy. */
export interface Conflict {
  theirs: store.Spot;
  copy: string;
}

/** What the keeper tells the page. */
export interface Heard {
  kept(spot: store.Spot): void;
  conflict(conflict: Conflict): void;
  /** whether the browser keeps nothing at present */
  failed(yes: boolean): void;
}

/** A sheet that is a spot of the Book. */
type Filed = store.Work & { ref: store.Ref; job: store.Job };

export class Keeper {
  /** what is not in the Book yet, by its spot */
  private readonly owed = new Map<string, Filed>();
  /** the revision of each spot that this page has seen or made last */
  private readonly revs = new Map<string, number>();
  /** this page's name for itself */
  private readonly by = newId();
  private busy: Promise<void> | undefined;

  constructor(private readonly page: Heard) {}

  /** Says which revision of a spot is being looked at. */
  seen(ref: store.Ref): void {
    this.revs.set(ref.id, ref.rev);
  }

  /** Keeps the sheet in work, and where it is a spot, the spot. */
  async save(work: store.Work): Promise<void> {
    const { ref, job } = work;
    if (ref && job) {
      if (!this.revs.has(ref.id)) this.seen(ref);
      this.owed.set(ref.id, { ...work, ref, job });
    }
    const base = ref && { id: ref.id, rev: this.revs.get(ref.id) ?? ref.rev };
    const saved = store.save("current", { ...work, ref: base, by: this.by });
    try {
      await Promise.all([saved, this.settled()]);
      this.page.failed(false);
    } catch {
      this.page.failed(true);
    }
  }

  /** What the browser has not kept. */
  unkept(): store.NewSpot[] {
    return [...this.owed.values()].map((work) => this.spot(work));
  }

  /** Leaves a spot alone that was removed from the Book. */
  forget(id: string): void {
    this.owed.delete(id);
    this.revs.delete(id);
  }

  private spot({ ref, job, record, entry, plan }: Filed): store.NewSpot {
    return { id: ref.id, job: job.id, changed: store.now(), kept: { record, entry, plan } };
  }

  /** Waits until nothing is owed. */
  private async settled(): Promise<void> {
    while (this.owed.size > 0) {
      this.busy ??= this.settle().finally(() => (this.busy = undefined));
      await this.busy;
    }
  }

  /** Writes what is owed, the latest of each spot, one after another. */
  private async settle(): Promise<void> {
    for (let next = this.next(); next; next = this.next()) {
      const [id, work] = next;
      const { record, entry, plan } = work;
      const { spot, theirs } = await store.keep({ id, rev: this.revs.get(id) ?? 0 }, work.job, { record, entry, plan }, this.by);
      if (theirs) {
        this.part(id, spot);
        continue;
      }
      this.revs.set(id, spot.rev);
      if (this.owed.get(id) === work) this.owed.delete(id);
      this.page.kept(spot);
    }
  }

  private next(): [string, Filed] | undefined {
    return this.owed.entries().next().value;
  }

  /** Makes ours another spot, at once, so that neither is lost. */
  private part(id: string, theirs: store.Spot): void {
    const copy = { id: newId(), rev: 0 };
    this.owed.set(copy.id, { ...this.owed.get(id)!, ref: copy });
    this.owed.delete(id);
    this.revs.set(copy.id, 0);
    this.revs.set(id, theirs.rev);
    this.page.conflict({ theirs, copy: copy.id });
  }
}
