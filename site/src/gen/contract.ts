// Generated from the Go types by build/contract. Do not edit.

/** Catalogue is what a record can choose from, each with its source. */
export interface Catalogue {
  edition: string;
  recordVersion: number;
  devices: DeviceChoice[];
  directions: DirectionChoice[];
  groups: GroupChoice[];
  scales: ScaleChoice[];
}

/** DeviceChoice is an impact device. */
export interface DeviceChoice {
  key: string;
  scale: Key;
  /** application range, in its scale */
  range: number[];
  /** in which it can be used here */
  directions: Direction[];
  /** whether it has a built-in conversion */
  curve: boolean;
  source: string;
}

/** DirectionChoice is a direction of impact. */
export interface DirectionChoice {
  key: Direction;
  /** of its correction; "" where none is needed */
  source: string;
}

/** GroupChoice is a metal group. */
export interface GroupChoice {
  key: string;
  /** English */
  name: string;
  /** of the rebound model, HV */
  range: number[];
  scales: Key[];
  source: string;
}

/** ScaleChoice is a scale, of a device or converted to. */
export interface ScaleChoice {
  key: Key;
  /** English */
  name: string;
  /** null where the conversion sets it */
  min: number | null;
  /** null where the conversion sets it */
  max: number | null;
  /** places of a quoted value */
  decimals: number;
  /** a quoted value is a multiple of it */
  step: number;
  /** whether it is a rebound scale */
  leeb: boolean;
  /** whether readings of a direct method can be entered in it */
  direct: boolean;
  source: string;
}

/**
 * Sheet is everything there is to say about one record. Numbers are unrounded;
 * the fields whose names begin with "shown" hold the quotable forms. A number
 * that does not exist is null, a list is never null.
 */
export interface Sheet {
  /** of the data: the same record and edition give the same sheet */
  edition: string;
  /** what the readings are in; "" while it is not chosen */
  scale: Key;
  /** the readings that count, as they were taken */
  readings: Readings;
  /** their mean, corrected */
  corrected: Corrected;
  /** of the mean as a measure of the metal's hardness, in Scale: the readings and the first leg; null without readings */
  uncertainty: Uncertainty | null;
  /** the reading's own scale first, then every other */
  scales: Row[];
  /** in the order of the job */
  findings: Finding[];
}

/** Readings describes the readings that count. */
export interface Readings {
  /** how many count */
  n: number;
  /** how many were struck */
  struck: number;
  /** in the sheet's scale */
  mean: number | null;
  /** sample standard deviation */
  sd: number | null;
  /** least */
  min: number | null;
  /** greatest */
  max: number | null;
  /** max - min */
  range: number | null;
  /** of the mean */
  rangePercent: number | null;
  /** positions in the record's readings, from 0 */
  suspect: number[];
  /** "611 HLD"; "" without readings */
  shownMean: string;
  /** "4.1"; "" for fewer than two readings */
  shownSD: string;
}

/** Corrected is the mean after the corrections. */
export interface Corrected {
  /** in the sheet's scale; null where it could not be corrected */
  mean: number | null;
  /** what the direction of impact added */
  direction: number;
  /** what the block check added */
  block: number;
}

/** Status says whether a scale has a value. */
export type Status = "ok" | "below" | "above" | "none";

/** Row is one scale of a sheet. */
export interface Row {
  scale: Key;
  /** English */
  name: string;
  /** whose rebound scale it is; "" for any other scale */
  device: string;
  /** the scale with its test force, where one is known: "HBW 10/3000" */
  method: string;
  status: Status;
  /** null unless ok, and so are the next five */
  value: number | null;
  /** standard uncertainty */
  standard: number | null;
  /** expanded uncertainty */
  expanded: number | null;
  /** coverage factor */
  k: number | null;
  /** value - expanded, but never outside the range */
  low: number | null;
  /** value + expanded, but never outside the range */
  high: number | null;
  /** effective degrees of freedom; null: infinite */
  dof: DoF;
  /** the budget */
  terms: Term[];
  /** whether low was cut off at the range */
  lowCut: boolean;
  /** whether high was cut off at the range */
  highCut: boolean;
  /** least and greatest value this device gives on this metal; [] where none */
  range: number[];
  /** places of a quoted value */
  decimals: number;
  /** "326 HBW (HLD)"; "" unless ok, and so are the next four */
  shown: string;
  /** "326" */
  shownValue: string;
  /** "24", rounded up */
  shownExpanded: string;
  /** rounded down */
  shownLow: string;
  /** rounded up */
  shownHigh: string;
  /** the range, rounded inwards; [] where none */
  shownRange: string[];
  /** one sentence, only where status is not ok */
  reason: string;
  /** its code */
  reasonCode: string;
  /** and its parameters */
  reasonParams: Params;
  /** how the value came about */
  path: Step[];
}

/** Finding is something the inspector has to know about the record. */
export interface Finding {
  code: string;
  /** stop: no converted value is given */
  level: Kind;
  /** path in the record */
  field: string;
  message: string;
  remedy: string;
  params: Params;
  source: string;
}

/** Direction is the direction of impact. */
export type Direction = "down" | "down45" | "level" | "up45" | "up" | "compensated";

/**
 * Record is what was written down about one spot. Only V and Readings must be
 * there; a record may be evaluated while it is still being filled in.
 */
export interface Record {
  /** version of this layout, 1 */
  v: number;
  /** told apart from other records by it; the core does not read it */
  id?: string;
  /** the spot: "Shell course 2, 3 o'clock" */
  label?: string;
  /** the job it belongs to */
  job?: string;
  /** when, RFC 3339 */
  taken?: string;
  /** who */
  by?: string;
  /** anything else */
  notes?: string;
  /** the part of a weld */
  zone?: Zone;
  /** key of the impact device; "" for a direct method */
  device?: string;
  /** of the instrument */
  serial?: string;
  /** of impact; down unless told */
  direction?: Direction;
  /** what the readings are in; the device's unless told */
  scale?: Key;
  /** key of the metal group; "" while it is not chosen */
  group?: string;
  /** in the order they were taken, struck ones too */
  readings: Reading[];
  /** the test piece */
  piece?: Piece;
  /** the check on a test block */
  block?: Block;
  /** what the spot has to meet */
  limit?: Limit;
  /** must be null, see Curve */
  curve?: Curve;
  /** of the expanded uncertainty, 0.5 to 0.999; 0.95 unless told */
  confidence?: number;
}

/** Zone is the part of a weld a spot lies in. */
export type Zone = "base" | "haz" | "weld" | "other";

/** Reading is one reading. A struck one stays in the record and out of the mean. */
export interface Reading {
  /** in the record's scale */
  value: Number;
  /** why it was struck; "" if it counts */
  struck?: string;
}

/** Piece is the test piece. */
export interface Piece {
  mass_kg?: number;
  thickness_mm?: number;
  /** of a curved surface, at the spot */
  radius_mm?: number;
  /** roughness Ra */
  ra_um?: number;
  temperature_c?: number;
  support?: Support;
  /** depth of a hardened case */
  case_mm?: number;
  shape?: Shape;
}

/** Support is how the test piece lies. */
export type Support = "free" | "supported" | "coupled";

/** Shape is the test piece's shape and size. */
export interface Shape {
  kind: ShapeKind;
  length_mm?: number;
  width_mm?: number;
  outer_diameter_mm?: number;
  wall_mm?: number;
}

/** ShapeKind is the kind of a shape. */
export type ShapeKind = "plate" | "pipe" | "bar" | "none";

/** Block is a check on a hardness test block. */
export interface Block {
  /** in the record's scale */
  certified?: number;
  /** of the certified value */
  expanded_u?: number;
  readings?: Number[];
  tolerance?: number;
}

/** Limit is what the spot has to meet. */
export interface Limit {
  scale: Key;
  min?: number;
  max?: number;
  rule?: Rule;
}

/** Rule is a decision rule. */
export type Rule = "guarded" | "simple" | "one-sided-95";

/**
 * Curve stands where a record would carry a curve of its own. This edition
 * converts without, and refuses one rather than leave it out of account.
 */
export interface Curve {
}

/**
 * Number is a number as it was typed. Text that is no number is kept, so that
 * nothing typed is lost; Value is NaN then.
 */
export type Number = number | string | null;

/** Basis says what a step of a conversion rests on. */
export type Basis = "measured" | "model" | "standard" | "similar";

/** Step is one step of a conversion. */
export interface Step {
  /** what leads to what: "HLD to HV" */
  step: string;
  /** what it rests on */
  basis: Basis;
  /** where that comes from */
  source: string;
}

/** Key names a scale as it is written behind a value: "HLD", "HV", "HBW", ... */
export type Key = string;

/**
 * DoF is a number of degrees of freedom. An infinite one (a term that is known
 * beforehand, not estimated from readings) is null in JSON.
 */
export type DoF = number | null;

/** Term is one contribution to an uncertainty. */
export interface Term {
  /** "repeatability", "resolution", "model", "second leg", ... */
  name: string;
  /** standard uncertainty, in Scale */
  standard: number;
  /** what Standard is in */
  scale: string;
  /** degrees of freedom; null: infinite */
  dof: DoF;
  /** change of the result per unit of Scale */
  sensitivity: number;
  /** to the result's standard uncertainty: |Sensitivity| Standard, set by Combine */
  contribution: number;
  /** where it comes from */
  source: string;
}

/** Uncertainty is a combined uncertainty with the budget it comes from. */
export interface Uncertainty {
  /** combined standard uncertainty */
  standard: number;
  /** K times Standard */
  expanded: number;
  /** coverage factor for the confidence asked */
  k: number;
  /** effective degrees of freedom; null: infinite */
  dof: DoF;
  terms: Term[];
}

/** Kind says what a sentence is for. */
export type Kind = "stop" | "warn" | "note" | "reason" | "error";

/**
 * Sentence is one sentence with its place-holders: {name} stands for a
 * parameter, {name:1} for a number with that many decimals.
 */
export interface Sentence {
  code: string;
  kind: Kind;
  message: string;
  /** "" for a reason and an error, whose message holds the remedy */
  remedy: string;
  /** "" where nothing is cited */
  source: string;
}

/** Params are the values of a sentence's place-holders: numbers and strings. */
export type Params = { [name: string]: number | string };

/**
 * Error refuses what was handed in, in one plain sentence that names the field
 * and the remedy.
 */
export interface Error {
  code: string;
  message: string;
  /** path in the record, "readings[2].value"; "" where no field is to blame */
  field: string;
  params: Params;
}
