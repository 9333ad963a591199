// What the browser keeps of the page: the sheet in work, the one that was laid
// aside when a link was opened over it, and the Book: jobs and their spots.

import { openDB, type DBSchema, type IDBPDatabase, type IDBPTransaction } from "idb";
import type * as core from "./gen/contract";

/** A sheet as it stands, with what is typed but not yet a reading. */
export interface Kept {
  record: core.Record;
  entry: string;
  /** the readings that are planned; absent in what older versions kept */
  plan?: { n: number; sd: number };
}

/** The moment, to the millisecond, RFC 3339. */
export function now(): string {
  return new Date().toISOString();
}

/** Which spot of the Book a sheet is, and the revision it was made from. */
export interface Ref {
  id: string;
  rev: number;
}

/** The sheet in work. */
export interface Work extends Kept {
  /** absent while it is not in the Book */
  ref?: Ref;
  job?: Job;
  /** the page that wrote it, see Spot */
  by?: string;
  /** it came with a link, and the user has not said to keep it */
  foreign?: boolean;
}

export interface Job {
  id: string;
  name: string;
  /** RFC 3339 */
  created: string;
  /** when all of it was last written to a file, RFC 3339; absent: never */
  exported?: string;
}

/** A spot of the Book. */
export interface Spot {
  id: string;
  job: string;
  /** its place in the job: by this number, ascending */
  order: number;
  /** counts the changes of what is kept */
  rev: number;
  /** the last of them, RFC 3339 */
  changed: string;
  kept: Kept;
  /** a page's name for itself, while it is open: the last that changed it */
  by?: string;
}

/** A curve of the user's own. */
export interface KeptCurve {
  id: string;
  curve: core.Curve;
}

type Place = "current" | "aside";

interface Schema extends DBSchema {
  sheets: { key: Place; value: Work };
  jobs: { key: string; value: Job };
  spots: { key: string; value: Spot; indexes: { order: [string, number] } };
  curves: { key: string; value: KeptCurve };
}

/** One page, one database: several may share an origin. */
export const name = "strikebook " + new URL(".", document.baseURI).pathname;

let database: Promise<IDBPDatabase<Schema>> | undefined;

function open(): Promise<IDBPDatabase<Schema>> {
  database ??= openDB<Schema>(name, 2, {
    upgrade: (db, from) => {
      if (from < 1) db.createObjectStore("sheets");
      if (from < 2) {
        db.createObjectStore("jobs", { keyPath: "id" });
        db.createObjectStore("spots", { keyPath: "id" }).createIndex("order", ["job", "order"]);
        db.createObjectStore("curves", { keyPath: "id" });
      }
    },
    // A newer page in another tab wants to change the layout: it may.
    blocking: (_current, _blocked, event) => {
      (event.target as IDBDatabase).close();
      database = undefined;
    },
    // The browser has closed it (data cleared, out of memory): open it anew.
    terminated: () => (database = undefined),
  }).catch((error: unknown) => {
    database = undefined;
    throw error;
  });
  return database;
}

/** Tells the other tabs that the Book has changed. */
const news = new BroadcastChannel(name);

/** Calls back when another tab has changed the Book, until it is told to stop. */
export function listen(heard: () => void): () => void {
  news.addEventListener("message", heard);
  return () => news.removeEventListener("message", heard);
}

export async function load(place: Place): Promise<Work | undefined> {
  return (await open()).get("sheets", place);
}

/** Writes a sheet in one go, so that it stands even if the page dies at once. */
export async function save(place: Place, work: Work): Promise<void> {
  const tx = (await open()).transaction("sheets", "readwrite");
  const put = tx.store.put(work, place);
  tx.commit();
  await Promise.all([put, tx.done]);
}

export async function remove(place: Place): Promise<void> {
  await (await open()).delete("sheets", place);
}

/** The jobs, the oldest first. */
export async function jobs(): Promise<Job[]> {
  const all = await (await open()).getAll("jobs");
  return all.sort((a, b) => (a.created < b.created ? -1 : a.created > b.created ? 1 : a.id < b.id ? -1 : 1));
}

export async function saveJob(job: Job): Promise<void> {
  await (await open()).put("jobs", job);
  news.postMessage(0);
}

/** The spots of a job in their order. */
export async function spots(job: string): Promise<Spot[]> {
  return (await open()).getAllFromIndex("spots", "order", within(job));
}

export async function spot(id: string): Promise<Spot | undefined> {
  return (await open()).get("spots", id);
}

export async function count(job: string): Promise<number> {
  return (await open()).countFromIndex("spots", "order", within(job));
}

function within(job: string): IDBKeyRange {
  return IDBKeyRange.bound([job, -Infinity], [job, Infinity]);
}

/** Keeps a spot. Where its revision is no longer the one that it was made from,
 * somebody else has changed it: nothing is written, and theirs is returned. A
 * job that has gone meanwhile comes back. */
export async function keep(ref: Ref, job: Job, kept: Kept, by: string): Promise<{ spot: Spot; theirs: boolean }> {
  const tx = (await open()).transaction(["jobs", "spots"], "readwrite");
  const spots = tx.objectStore("spots");
  const stored = await spots.get(ref.id);
  if (stored && stored.rev !== ref.rev) {
    await tx.done;
    return { spot: stored, theirs: JSON.stringify(stored.kept) !== JSON.stringify(kept) };
  }
  const { job: home = job.id, order = (await lastOrder(tx, job.id)) + 1 } = stored ?? {};
  const spot: Spot = { id: ref.id, job: home, order, rev: ref.rev + 1, changed: now(), kept, by };
  const writes: Promise<unknown>[] = [spots.put(spot), tx.done];
  if (!stored && !(await tx.objectStore("jobs").get(job.id))) writes.push(tx.objectStore("jobs").put(job));
  await Promise.all(writes);
  news.postMessage(0);
  return { spot, theirs: false };
}

async function lastOrder(tx: IDBPTransaction<Schema, ("jobs" | "spots")[], "readwrite">, job: string): Promise<number> {
  const cursor = await tx.objectStore("spots").index("order").openKeyCursor(within(job), "prev");
  return cursor?.key[1] ?? 0;
}

/** The revision of a spot that has just come into the Book. */
export const firstRev = 1;

/** What a spot is put into the Book with; its place is the last of the job. */
export type NewSpot = Omit<Spot, "order" | "rev" | "by">;

/** Puts spots at the end of their jobs, and the jobs that are not there yet. All
 * of it is written, or nothing. */
export async function addAll(jobs: Job[], added: NewSpot[]): Promise<void> {
  const tx = (await open()).transaction(["jobs", "spots"], "readwrite");
  const writes: Promise<unknown>[] = [];
  for (const job of jobs) if (!(await tx.objectStore("jobs").get(job.id))) writes.push(tx.objectStore("jobs").put(job));
  const last = new Map<string, number>();
  for (const spot of added) {
    const order = (last.get(spot.job) ?? (await lastOrder(tx, spot.job))) + 1;
    last.set(spot.job, order);
    writes.push(tx.objectStore("spots").put({ ...spot, order, rev: firstRev }));
  }
  await Promise.all([...writes, tx.done]);
  news.postMessage(0);
}

/** Puts back what was removed, as it was. */
export async function putBack(jobs: Job[], spots: Spot[]): Promise<void> {
  const tx = (await open()).transaction(["jobs", "spots"], "readwrite");
  await Promise.all([
    ...jobs.map((job) => tx.objectStore("jobs").put(job)),
    ...spots.map((spot) => tx.objectStore("spots").put(spot)),
    tx.done,
  ]);
  news.postMessage(0);
}

/** Moves a spot to the end of another job. */
export async function move(id: string, job: string): Promise<void> {
  const tx = (await open()).transaction(["jobs", "spots"], "readwrite");
  const spot = await tx.objectStore("spots").get(id);
  const order = (await lastOrder(tx, job)) + 1;
  const put = spot ? tx.objectStore("spots").put({ ...spot, job, order, changed: now() }) : undefined;
  await Promise.all([put, tx.done]);
  news.postMessage(0);
}

/** Removes a spot and returns it. */
export async function removeSpot(id: string): Promise<Spot | undefined> {
  const tx = (await open()).transaction("spots", "readwrite");
  const spot = await tx.store.get(id);
  await Promise.all([tx.store.delete(id), tx.done]);
  news.postMessage(0);
  return spot;
}

/** Removes a job with its spots and returns them. */
export async function removeJob(id: string): Promise<Spot[]> {
  const tx = (await open()).transaction(["jobs", "spots"], "readwrite");
  const store = tx.objectStore("spots");
  const spots = await store.index("order").getAll(within(id));
  await Promise.all([tx.objectStore("jobs").delete(id), ...spots.map((spot) => store.delete(spot.id)), tx.done]);
  news.postMessage(0);
  return spots;
}

export async function curves(): Promise<KeptCurve[]> {
  return (await open()).getAll("curves");
}

export async function saveCurve(kept: KeptCurve): Promise<void> {
  await (await open()).put("curves", kept);
}

export async function removeCurve(id: string): Promise<void> {
  await (await open()).delete("curves", id);
}
