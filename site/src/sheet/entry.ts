// Reads what is typed or pasted into the readings field.

/** What typed text comes to: whole readings, and a rest still being typed. */
export interface Split {
  readings: string[];
  rest: string;
}

/** Splits typed text. Readings are ended by a space, a new line, a semicolon, or
 * a comma that is no decimal one; where they flow, the third digit ends one too. */
export function split(text: string, flows: boolean): Split {
  const pieces = text.split(/[\s;]+|,(?=\s)/);
  const rest = pieces.pop() ?? "";
  const readings = pieces.flatMap(unlist).flatMap((piece) => (flows ? unflow(piece) : [piece]));
  const last = unlist(rest);
  if (flows) {
    const digits = unflow(last.at(-1) ?? "");
    const open = digits.at(-1) ?? "";
    const done = /^\d{3}$/.test(open) && !text.endsWith(",");
    last.splice(-1, 1, ...(done ? [...digits, ""] : digits));
  }
  const open = last.pop() ?? "";
  return { readings: [...readings, ...last].filter((piece) => piece !== ""), rest: open };
}

/** Splits text that is complete: nothing is left as a rest. */
export function splitAll(text: string, flows: boolean): string[] {
  return split(text + "\n", flows).readings;
}

/** A comma with one or two digits behind it is a decimal one ("612,5"); with
 * more, or among several, it stands between readings ("612,655,640"). */
function unlist(piece: string): string[] {
  const parts = piece.split(",");
  if (parts.length === 2 && parts[1]!.length <= 2) return [piece];
  return parts;
}

/** Digits without end are readings of three: "612655" is two. */
function unflow(piece: string): string[] {
  return /^\d{4,}$/.test(piece) ? (piece.match(/\d{1,3}/g) ?? []) : [piece];
}

/** The value of a reading: a number, or the text where it is none. */
export function value(text: string): number | string {
  const number = Number(text.replace(",", "."));
  return /\d/.test(text) && Number.isFinite(number) ? number : text;
}
