// What the core finds wrong with one field of the record.

import type * as core from "../gen/contract";
import { sayFinding } from "../words/words";

/** The sentence to show at a field; "" where nothing is wrong with it. */
export function problemAt(sheet: core.Sheet | undefined, field: string): string {
  const found = sheet?.findings.find((finding) => finding.field === field && finding.level !== "note");
  return found ? sayFinding(found).message : "";
}

/** Whether anything is wrong in a part of the record: "piece", "block", "limit". */
export function anyProblem(sheet: core.Sheet | undefined, part: string): boolean {
  return !!sheet?.findings.some(({ field, level }) => level === "stop" && (field === part || field.startsWith(part + ".")));
}
