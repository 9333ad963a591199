// Where spots come from: what a pasted text or a file holds.

import type { Core } from "../core/client";
import { Refusal } from "../core/client";
import type * as core from "../gen/contract";
import { newId } from "../sheet/draft";
import * as store from "../store";
import { say, sayCode } from "../words/words";
import { readBook } from "./file";

/** A text that the user hands in. */
export interface Source {
  /** the file's; "" for pasted text */
  name: string;
  text: string;
  /** how a table is to be read, where the user knows better */
  told?: Told;
}

export type Told = Partial<Pick<core.Request, "delimiter" | "header" | "layout" | "mapping">>;

/** What a table is read with. */
export interface Setting {
  /** the job that spots without one of their own go to */
  job: string;
  /** what stands in a record where its row says nothing */
  defaults: core.Record;
  /** what headers mean, as the user said before */
  known: core.ColumnWord[];
}

/** What cannot be taken, and why. */
export interface Bad {
  where: string;
  why: string;
  /** the line itself, where there is one */
  text?: string;
}

/** What sources hold. */
export interface Offer {
  /** that the spots belong to, where they bring their own */
  jobs: store.Job[];
  spots: store.NewSpot[];
  bad: Bad[];
  /** how many are in the Book already, just as they are */
  there: number;
  /** those of the sources that are tables, with what was read */
  tables: { source: Source; table: core.Table }[];
}

/** Every record a link may carry, wherever in a text it stands. */
const links = /#s\d+\.[\w-]{8,}/g;

/** Finds out what sources hold. */
export async function read(sources: Source[], setting: Setting, ask: Core): Promise<Offer> {
  const offer: Offer = { jobs: [], spots: [], bad: [], there: 0, tables: [] };
  for (const source of sources) {
    if (/^\s*[[{]/.test(source.text)) await readJson(source, setting.job, offer);
    else if (source.text.search(links) >= 0) await readLinks(source, setting.job, offer, ask);
    else await readTable(source, setting, offer, ask);
  }
  return offer;
}

async function readJson(source: Source, job: string, offer: Offer): Promise<void> {
  const found = readBook(source.text);
  if (!found) {
    offer.bad.push({ where: named(source), why: say("take.no-book") });
    return;
  }
  for (const { job: own, spots } of found.filed) {
    if (!offer.jobs.some(({ id }) => id === own.id)) offer.jobs.push(own);
    for (const spot of spots) await addSpot(spot, offer);
  }
  for (const record of found.records) offer.spots.push(fresh(record, job));
}

/** Adds a spot of a file; one that stands otherwise in the Book comes as a copy. */
async function addSpot(spot: store.NewSpot, offer: Offer): Promise<void> {
  const stored = await store.spot(spot.id);
  if (stored && JSON.stringify(stored.kept.record) === JSON.stringify(spot.kept.record)) offer.there++;
  else if (stored || offer.spots.some(({ id }) => id === spot.id)) offer.spots.push({ ...spot, id: newId() });
  else offer.spots.push(spot);
}

async function readLinks(source: Source, job: string, offer: Offer, ask: Core): Promise<void> {
  for (const link of source.text.match(links) ?? []) {
    try {
      offer.spots.push(fresh(await ask.decodeLink(link), job));
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      offer.bad.push({ where: named(source), why: sayCode(error.error.code, error.error.params), text: link });
    }
  }
}

async function readTable(source: Source, { job, defaults, known }: Setting, offer: Offer, ask: Core): Promise<void> {
  try {
    const table = await ask.readTable({ text: source.text, known, defaults, ...source.told });
    offer.tables.push({ source, table });
    for (const record of table.records) offer.spots.push(fresh({ ...record, id: record.id ?? newId() }, job));
    for (const { row, cells, error } of table.bad) {
      const why = error ? sayCode(error.code, error.params) : "";
      offer.bad.push({ where: say("take.bad.line", { where: named(source), line: row }), why, text: cells.join(" | ") });
    }
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    offer.bad.push({ where: named(source), why: sayCode(error.error.code, error.error.params) });
  }
}

/** A record as a new spot of a job. */
export function fresh(record: core.Record, job: string): store.NewSpot {
  return { id: newId(), job, changed: store.now(), kept: { record, entry: "" } };
}

function named({ name }: Source): string {
  return name || say("take.pasted");
}

/** The text of a file, in whichever of the usual codes it is. */
export async function textOf(file: File): Promise<string> {
  const bytes = new Uint8Array(await file.arrayBuffer());
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder("utf-16le").decode(bytes);
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder("windows-1252").decode(bytes);
  }
}
