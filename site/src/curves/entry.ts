// Reads pairs that are typed or pasted: one a line, columns parted by spaces,
// tabs or semicolons.

import type * as core from "../gen/contract";

/** A line that is no pair, with its number from 1. */
export interface BadLine {
  line: number;
  text: string;
}

/** Reads lines of a reading, its standard uncertainty, a value and its standard
 * uncertainty. Several readings on the piece, with strokes between them, may
 * stand in the place of the first two; a table has readings and values alone. */
export function readPairs(text: string, table: boolean): { pairs: core.Pair[]; bad: BadLine[] } {
  const pairs: core.Pair[] = [];
  const bad: BadLine[] = [];
  text.split(/\r?\n/).forEach((line, at) => {
    if (line.trim() === "") return;
    const pair = readPair(line.trim().split(/[\s;]+/), table);
    if (pair) pairs.push(pair);
    else bad.push({ line: at + 1, text: line.trim() });
  });
  return { pairs, bad };
}

function readPair(cells: string[], table: boolean): core.Pair | undefined {
  const first = cells[0]!.split("/").map(number);
  const rest = cells.slice(1).map(number);
  const readings = first.length > 1 && !table;
  if (![...first, ...rest].every(Number.isFinite) || rest.length !== (table ? 1 : readings ? 2 : 3)) return undefined;
  if (table) return { hl: first[0]!, u_hl: 0, value: rest[0]!, u_value: 0 };
  if (readings) return { hl: 0, u_hl: 0, readings: first, value: rest[0]!, u_value: rest[1]! };
  return { hl: first[0]!, u_hl: rest[0]!, value: rest[1]!, u_value: rest[2]! };
}

function number(cell: string): number {
  return cell === "" ? NaN : Number(cell.replace(",", "."));
}

/** Writes pairs as readPairs reads them. */
export function writePairs(pairs: core.Pair[], table: boolean): string {
  const cells = (p: core.Pair): (number | string)[] => {
    if (table) return [p.hl, p.value];
    return [...(p.readings ? [p.readings.join("/")] : [p.hl, p.u_hl]), p.value, p.u_value];
  };
  return pairs.map((p) => cells(p).join(" ")).join("\n");
}
