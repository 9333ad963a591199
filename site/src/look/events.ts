// What components tell the one above them.

import type * as core from "../gen/contract";

/** The user has changed the record. */
export class RecordChange extends Event {
  static readonly type = "record-change";
  constructor(readonly record: core.Record) {
    super(RecordChange.type, { bubbles: true, composed: true });
  }
}

/** The user has typed something that is no reading yet. */
export class EntryChange extends Event {
  static readonly type = "entry-change";
  constructor(readonly entry: string) {
    super(EntryChange.type, { bubbles: true, composed: true });
  }
}

/** The user plans other readings: how many, and with what scatter. */
export class PlanChange extends Event {
  static readonly type = "plan-change";
  constructor(readonly plan: { n: number; sd: number }) {
    super(PlanChange.type, { bubbles: true, composed: true });
  }
}
