// What the browser keeps of the page: the sheet in work, and the one that was
// laid aside when a link was opened over it.

import { openDB, type DBSchema, type IDBPDatabase } from "idb";
import type * as core from "./gen/contract";

/** A sheet as it stands, with what is typed but not yet a reading. */
export interface Kept {
  record: core.Record;
  entry: string;
  /** the readings that are planned; absent in what older versions kept */
  plan?: { n: number; sd: number };
}

type Place = "current" | "aside";

interface Schema extends DBSchema {
  sheets: { key: Place; value: Kept };
}

/** One page, one database: several may share an origin. */
const name = "strikebook " + new URL(".", document.baseURI).pathname;

let database: Promise<IDBPDatabase<Schema>> | undefined;

function open(): Promise<IDBPDatabase<Schema>> {
  database ??= openDB<Schema>(name, 1, {
    upgrade: (db) => void db.createObjectStore("sheets"),
    // The browser has closed it (data cleared, out of memory): open it anew.
    terminated: () => (database = undefined),
  });
  return database;
}

export async function load(place: Place): Promise<Kept | undefined> {
  return (await open()).get("sheets", place);
}

export async function save(place: Place, kept: Kept): Promise<void> {
  await (await open()).put("sheets", kept, place);
}

export async function remove(place: Place): Promise<void> {
  await (await open()).delete("sheets", place);
}
