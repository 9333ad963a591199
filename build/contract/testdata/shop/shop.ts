// Generated from the Go types by build/contract. Do not edit.

/**
 * Order is what a customer asked for.
 *
 * It has a comment of more than one line.
 */
export interface Order {
  /** When it was written. */
  date: string;
  /** never empty */
  id: string;
  state: State;
  lines: Line[];
  notes?: { [key: string]: string[] };
  gift: Line | null;
  rebate?: number;
  checks: (boolean | null)[];
  total: Money;
  extra: unknown;
  raw: unknown;
  sum: string;
  range: number[];
  place: { X: number; Y: number };
  "odd-name": number;
  parent?: Order;
}

/** Line is a line of an order. */
export interface Line {
  percent?: number;
  Weight: Weight;
  reading: Reading;
}

/** State says how far an order has come. */
export type State = "open" | "closed" | "lost";

/** Reading is a number or a gap. */
export type Reading = number | null;

/** Money is in cents. */
export type Money = number;

/** Weight in kilograms, by part. */
export type Weight = number[];
