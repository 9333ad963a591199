// How a table is read: what each column holds, said by hand where the core has
// not guessed it. What was said once is remembered by the column's name.

import { html } from "lit";
import type * as core from "../gen/contract";
import { name } from "../store";
import { say } from "../words/words";
import { remember, remembered } from "./persist";
import type { Told } from "./sources";

/** What a column can hold, the commonest first. */
const roles = [
  "label",
  "readings",
  "zone",
  "position_mm",
  "group",
  "device",
  "scale",
  "direction",
  "limit",
  "struck",
  "taken",
  "by",
  "serial",
  "job",
  "notes",
  "piece.thickness_mm",
  "piece.mass_kg",
  "piece.ra_um",
  "piece.radius_mm",
];

const delimiters = ["\t", ";", ",", "|"];

/** The choices for a table, and what each of its columns holds. */
export function columns(table: core.Table, at: number, tell: (told: Told) => void) {
  const chosen = (event: Event): string => (event.target as HTMLSelectElement).value;
  const header: core.Header = table.header ? "yes" : "no";
  return html`<fieldset>
    <legend>${say("columns.title", { rows: table.rows })}</legend>
    <div class="pair">
      ${choice(`header-${at}`, say("columns.header"), ["yes", "no"], header, (key) => say(`columns.header.${key}`), (e) => tell({ header: chosen(e) as core.Header }))}
      ${choice(`layout-${at}`, say("columns.layout"), ["spot", "reading"], table.layout, (key) => say(`columns.layout.${key}`), (e) => tell({ layout: chosen(e) as core.Layout }))}
      ${table.delimiter
        ? choice(`delimiter-${at}`, say("columns.delimiter"), delimiters, table.delimiter, (key) => (key === "\t" ? say("columns.tab") : key), (e) => tell({ delimiter: chosen(e) }))
        : ""}
      ${table.columns.map((column, i) => {
        const own = roles.includes(column.role) || column.role === "" ? [] : [column.role];
        const label = say(column.name ? "columns.named" : "columns.numbered", { name: column.name, n: i + 1 });
        return html`<div>
          ${choice(`column-${at}-${i}`, label, ["", ...roles, ...own], column.role, role, (e) => tell({ mapping: table.mapping.map((r, j) => (j === i ? chosen(e) : r)) }))}
          <p class="soft samples">${column.samples.join(", ")}</p>
        </div>`;
      })}
    </div>
  </fieldset>`;
}

function choice(id: string, label: string, keys: string[], picked: string, words: (key: string) => string, change: (event: Event) => void) {
  return html`<label
    >${label}
    <select id=${id} @change=${change}>
      ${keys.map((key) => html`<option value=${key} ?selected=${key === picked}>${words(key)}</option>`)}
    </select>
  </label>`;
}

function role(key: string): string {
  return key === "" || roles.includes(key) ? say(`role.${key || "none"}`) : key;
}

const place = `${name}columns`;

/** What the user has said before of columns, by their names. */
export function knownColumns(): core.ColumnWord[] {
  try {
    return JSON.parse(remembered(place) || "[]") as core.ColumnWord[];
  } catch {
    return [];
  }
}

/** Remembers what the user said of a table's columns. */
export function learnColumns(table: core.Table): void {
  const said = table.columns.filter((column) => column.name !== "").map((column) => ({ name: column.name, role: column.role }));
  const before = knownColumns().filter((known) => !said.some((word) => word.name === known.name));
  remember(place, JSON.stringify([...said, ...before].slice(0, 200)));
}
