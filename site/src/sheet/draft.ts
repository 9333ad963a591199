// The record in work: how it begins, and what each action of the user makes of
// it. A record is never changed, but replaced.

import { catalogue } from "../gen/catalogue";
import type * as core from "../gen/contract";

export function blank(like?: core.Record): core.Record {
  // The next spot of a job is measured as the last one was; nothing else is kept.
  const { device = "D", scale = "HLD", direction = "down", readings, id, label, notes, taken, zone, position_mm, v, ...setUp } = like ?? {};
  return { ...setUp, v: catalogue.recordVersion, id: newId(), device, scale, direction, readings: [] };
}

export function newId(): string {
  const letters = crypto.getRandomValues(new Uint8Array(8));
  return Array.from(letters, (n) => (n % 36).toString(36)).join("");
}

/** The readings that are planned until the user says otherwise: five, with a
 * scatter that a fair surface gives (common practice, no source). */
export const usualPlan = { n: 5, sd: 6 };

/** The spot as it is before any reading, without what nothing depends on. */
export function spotOf(record: core.Record): core.Record {
  const { id, label, notes, by, job, zone, position_mm, taken, ...spot } = record;
  return { ...spot, readings: [] };
}

/** Whether the user has put anything into a record yet. */
export function untouched(record: core.Record): boolean {
  return record.readings.length === 0 && !record.label;
}

export function add(record: core.Record, values: (number | string)[]): core.Record {
  if (values.length === 0) return record;
  const taken = record.taken ?? new Date().toISOString().replace(/\.\d+/, "");
  return { ...record, taken, readings: [...record.readings, ...values.map((value) => ({ value }))] };
}

/** Takes the last reading back. Its text returns to the field. */
export function takeBack(record: core.Record): { record: core.Record; text: string } {
  const last = record.readings.at(-1);
  return { record: { ...record, readings: record.readings.slice(0, -1) }, text: String(last?.value ?? "") };
}

/** Strikes a reading for a reason; without one, it counts again. */
export function strike(record: core.Record, at: number, reason?: string): core.Record {
  const readings = record.readings.map((reading, i) =>
    i === at ? { value: reading.value, ...(reason ? { struck: reason } : {}) } : reading,
  );
  return { ...record, readings };
}

/** Chooses what the readings are taken with: a device, or a direct method's scale. */
export function measureWith(record: core.Record, scale: string): core.Record {
  const device = catalogue.devices.find((d) => d.scale === scale);
  const direction = device?.directions.find((d) => d === record.direction) ?? "down";
  return { ...record, device: device?.key, scale, direction };
}

/** Whether three digits make a reading: in a Leeb scale they do. */
export function flows(record: core.Record): boolean {
  return catalogue.scales.some((scale) => scale.key === record.scale && scale.leeb);
}

/** Writes a part of the record: what is undefined goes out of it, and a part
 * with nothing in it goes out of the record. */
export function setPart<K extends "piece" | "block" | "limit">(
  record: core.Record,
  part: K,
  change: Partial<NonNullable<core.Record[K]>>,
): core.Record {
  const next = { ...record[part], ...change };
  const empty = Object.values(next).every((value) => value === undefined || value === "");
  return { ...record, [part]: empty ? undefined : next };
}
