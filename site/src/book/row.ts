// A spot in one line: its value never stands without its uncertainty.

import type * as core from "../gen/contract";
import { say, sayCode } from "../words/words";

export function valueOf(row: core.BookRow): string {
  if (row.error) return sayCode(row.error.code, row.error.params);
  const value = row.values[0];
  return value ? say("book.row.value", { value: value.shown, expanded: value.shownExpanded }) : say("book.row.none");
}
