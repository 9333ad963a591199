// What the Book tells the page.

import type { Job, Spot } from "../store";

/** The user wants a spot on the sheet. */
export class SpotOpen extends Event {
  static readonly type = "spot-open";
  constructor(readonly spot: Spot) {
    super(SpotOpen.type, { bubbles: true, composed: true });
  }
}

/** Spots have been removed from the Book. */
export class SpotsGone extends Event {
  static readonly type = "spots-gone";
  constructor(readonly ids: string[]) {
    super(SpotsGone.type, { bubbles: true, composed: true });
  }
}

/** The user works on another job; undefined where none is left. */
export class JobChoice extends Event {
  static readonly type = "job-choice";
  constructor(readonly job: Job | undefined) {
    super(JobChoice.type, { bubbles: true, composed: true });
  }
}
