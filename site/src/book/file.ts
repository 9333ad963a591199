// The file of the Book: jobs with their spots as JSON. What is read from one
// and written again is the same, byte for byte.

import type * as core from "../gen/contract";
import type { Job, NewSpot, Spot } from "../store";

const version = 1;

interface FileSpot {
  id: string;
  changed: string;
  /** what was typed and is no reading yet; absent where there is nothing */
  entry?: string;
  plan?: { n: number; sd: number };
  record: core.Record;
}

interface FileJob {
  id: string;
  name: string;
  created: string;
  spots: FileSpot[];
}

/** A job with its spots. */
export interface Filed {
  job: Job;
  spots: NewSpot[];
}

/** The text of a file that holds jobs with all their spots. */
export function writeBook(filed: Filed[]): string {
  const jobs: FileJob[] = filed.map(({ job: { id, name, created }, spots }) => ({
    id,
    name,
    created,
    spots: spots.map(({ id, changed, kept: { entry, plan, record } }) => ({
      id,
      changed,
      ...(entry ? { entry } : {}),
      ...(plan ? { plan } : {}),
      record,
    })),
  }));
  return JSON.stringify({ strikebook: version, jobs }) + "\n";
}

/** The text of a file for one spot: its record alone. */
export function writeSpot(spot: Spot): string {
  return JSON.stringify(spot.kept.record) + "\n";
}

/** What a JSON text holds: whole jobs, or records by themselves; undefined
 * where it is neither. Whether a record is one is for the core to say. */
export function readBook(text: string): { filed: Filed[]; records: core.Record[] } | undefined {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    return undefined;
  }
  if (isObject(value) && value["strikebook"] === version && Array.isArray(value["jobs"])) {
    const filed = value["jobs"].map(readJob);
    return filed.every((job) => job !== undefined) ? { filed, records: [] } : undefined;
  }
  const list = Array.isArray(value) ? value : [value];
  return list.every((item) => isObject(item) && "readings" in item) ? { filed: [], records: list as core.Record[] } : undefined;
}

function readJob(value: unknown): Filed | undefined {
  if (!isObject(value) || !Array.isArray(value["spots"])) return undefined;
  const { id, name, created } = value;
  if (!isText(id) || !isText(name) || !isText(created)) return undefined;
  const spots = value["spots"].map((spot) => readSpot(spot, id));
  return spots.every((spot) => spot !== undefined) ? { job: { id, name, created }, spots } : undefined;
}

function readSpot(value: unknown, job: string): NewSpot | undefined {
  if (!isObject(value) || !isObject(value["record"])) return undefined;
  const { id, changed, entry = "", plan } = value;
  if (!isText(id) || !isText(changed) || !isText(entry)) return undefined;
  const record = value["record"] as unknown as core.Record;
  if (plan === undefined) return { id, job, changed, kept: { record, entry } };
  if (!isObject(plan) || typeof plan["n"] !== "number" || typeof plan["sd"] !== "number") return undefined;
  return { id, job, changed, kept: { record, entry, plan: { n: plan["n"], sd: plan["sd"] } } };
}

function isObject(value: unknown): value is { [key: string]: unknown } {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}

function isText(value: unknown): value is string {
  return typeof value === "string";
}

/** Hands a file to the user. */
export function download(name: string, type: string, text: string): void {
  const url = URL.createObjectURL(new Blob([text], { type }));
  const link = document.createElement("a");
  link.href = url;
  link.download = name;
  link.click();
  // The browser has its own copy once the download has begun.
  setTimeout(() => URL.revokeObjectURL(url), 60_000);
}

/** A name for a file, of letters that every system takes. */
export function fileName(name: string, ending: string): string {
  const plain = name.replace(/[^\p{L}\p{N}]+/gu, "-").replace(/^-+|-+$/g, "");
  return `${plain || "strikebook"}.${ending}`;
}
