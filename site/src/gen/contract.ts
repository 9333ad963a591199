// Generated from the Go types by build/contract. Do not edit.

/** Catalogue is what a record can choose from, each with its source. */
export interface Catalogue {
  edition: string;
  recordVersion: number;
  devices: DeviceChoice[];
  directions: DirectionChoice[];
  groups: GroupChoice[];
  scales: ScaleChoice[];
  /** of decision, the default first */
  rules: Rule[];
  /** that published codes name */
  limits: LimitChoice[];
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

/** LimitChoice is a limit that a published code names. */
export interface LimitChoice {
  key: string;
  /** English */
  text: string;
  scale: Key;
  /** null: none */
  min: number | null;
  /** null: none */
  max: number | null;
  source: string;
}

/**
 * GoNoGoRequest is a record before its readings are taken, with what is assumed
 * of them. Readings it has are left out of account.
 */
export interface GoNoGoRequest {
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
  /**
   * PermissibleError is how far the instrument may read wrong to either side, in
   * the record's scale, where no block check says how far it does; 12 HL unless told.
   */
  permissible_error?: number;
  /** of the expanded uncertainty, 0.5 to 0.999; 0.95 unless told */
  confidence?: number;
  /** how many readings will be taken, 1 to record.MaxReadings */
  n: number;
  /** the standard deviation they are assumed to have, in the record's scale */
  sd: number;
}

/**
 * GoNoGo is what the mean of the readings decides, in the record's scale and as
 * the instrument shows it, before any correction.
 */
export interface GoNoGo {
  scale: Key;
  /** the means, least and greatest, that conform; [] where none does */
  conforms: number[];
  /** the spans of means that do not */
  doesNotConform: number[][];
  /** the spans of means that prove nothing either way */
  notProven: number[][];
  /** rounded inwards, to be safe */
  shownConforms: string[];
  /** rounded inwards */
  shownDoesNotConform: string[][];
  /** one sentence where there is no span at all; else "" */
  reason: string;
  reasonCode: string;
  reasonParams: Params;
}

/**
 * MoreReadingsRequest is a record with the expanded uncertainty that is wanted
 * of one of its scales.
 */
export interface MoreReadingsRequest {
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
  /**
   * PermissibleError is how far the instrument may read wrong to either side, in
   * the record's scale, where no block check says how far it does; 12 HL unless told.
   */
  permissible_error?: number;
  /** of the expanded uncertainty, 0.5 to 0.999; 0.95 unless told */
  confidence?: number;
  wanted: Wanted;
}

/** Wanted is the expanded uncertainty that is wanted in a scale. */
export interface Wanted {
  scale: Key;
  /** in the scale */
  expanded: number;
}

/**
 * MoreReadings says how many readings a wanted uncertainty takes, if their mean
 * and scatter stay.
 */
export interface MoreReadings {
  /** whether any number of readings would do */
  reachable: boolean;
  /** how many in all; 0 unless reachable */
  n: number;
  /** how many of them are still to be taken */
  more: number;
  /** what it is now; null where the scale has no value */
  expanded: number | null;
  /** what N readings reach, or verdict.MostReadings if that is not enough */
  best: number | null;
  sentence: string;
  code: string;
  params: Params;
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
  /** the test piece */
  piece: TestPiece;
  /** every device there is against the test piece */
  devices: DeviceFit[];
  /** the check on a test block */
  block: BlockCheck;
  /** the readings that count, as they were taken */
  readings: Readings;
  /** their mean, corrected */
  corrected: Corrected;
  /** of the mean as a measure of the metal's hardness, in Scale: the readings and the first leg; null without readings */
  uncertainty: Uncertainty | null;
  /** the reading's own scale first, then every other */
  scales: Row[];
  /** against the limit */
  verdict: Verdict;
  /** in the order of the job */
  findings: Finding[];
}

/** BlockCheck is what a check on a test block says of the instrument. */
export interface BlockCheck {
  status: BlockStatus;
  /** readings on the block */
  n: number;
  /** in the sheet's scale */
  mean: number | null;
  /** their sample standard deviation */
  sd: number | null;
  /** mean less certified value; null unless the check is complete */
  error: number | null;
  /** what it may be; null where nothing says */
  tolerance: number | null;
}

/** BlockStatus is what a check on a block comes to. */
export type BlockStatus = "passed" | "failed" | "used" | "incomplete" | "none";

/** TestPiece is what is known of the test piece's size, null where it is not. */
export interface TestPiece {
  /** as stated, else computed from shape and density */
  massKg: number | null;
  /** whether it was computed */
  massComputed: boolean;
  /** under the spot: as stated, a pipe's wall if that is less, a bar's diameter if nothing is stated */
  thicknessMm: number | null;
  /** of a curved surface: as stated, else half the outer diameter of a pipe or bar */
  radiusMm: number | null;
}

/**
 * DeviceFit says how an impact device and the test piece go together. What is
 * not known of the piece does not count against the device.
 */
export interface DeviceFit {
  /** its key */
  device: string;
  /** whether the piece falls short in nothing */
  suits: boolean;
  /** what it falls short in, if the device is used; the codes of the findings there would be */
  shortfalls: ShortfallKind[];
  /** whether the device has a built-in conversion, which is then for every metal */
  curve: boolean;
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
  /** where k comes from; "" unless ok */
  coverage: Coverage;
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

/** Verdict is the spot against its limit. */
export interface Verdict {
  outcome: Outcome;
  /** by which it was decided */
  rule: Rule;
  /** in which it was decided: the limit's own, or HV; "" where nothing was compared */
  scale: Key;
  /** in Scale; null where nothing was compared, and so are the next five */
  value: number | null;
  /** of the limit, in Scale; null also where there is none */
  min: number | null;
  /** of the limit, in Scale; null also where there is none */
  max: number | null;
  /** what the rule asks for between value and limit */
  guard: number | null;
  /** uncertainty of the comparison */
  expanded: number | null;
  /** of conformity, JCGM 106 */
  probability: number | null;
  /** the probability in percent, never 0 and never 100: "97", "> 99"; "" where there is none */
  shownChance: string;
  /** for a foreman */
  sentence: string;
  /** how the comparison was made, where not in the limit's own scale; else "" */
  basis: string;
  /** what to do now; "" where there is nothing to do */
  advice: string;
  /** the three by their codes, those that are not "" */
  said: Saying[];
}

/** Saying is a sentence by its code. */
export interface Saying {
  /** "sentence", "basis" or "advice" */
  part: string;
  code: string;
  params: Params;
}

/** Direction is the direction of impact. */
export type Direction = "down" | "down45" | "level" | "up45" | "up" | "compensated";

/** Piece is what was written down about the test piece. Nothing of it must be there. */
export interface Piece {
  /** computed from the shape unless told */
  mass_kg?: number;
  thickness_mm?: number;
  /** of a curved surface, at the spot */
  radius_mm?: number;
  /** roughness Ra */
  ra_um?: number;
  /** of the piece */
  temperature_c?: number;
  /** free unless told */
  support?: Support;
  /** depth of a hardened case */
  case_mm?: number;
  /** least distance from one impression to the next */
  spacing_mm?: number;
  /** least distance from an impression to an edge */
  edge_mm?: number;
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

/** ShortfallKind is what a test piece falls short in, the code of its finding. */
export type ShortfallKind = "piece-too-light" | "piece-too-thin" | "wall-too-thin" | "case-too-thin" | "surface-too-rough" | "radius-too-small" | "spacing-too-close" | "edge-too-near" | "temperature-outside";

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
  /**
   * PermissibleError is how far the instrument may read wrong to either side, in
   * the record's scale, where no block check says how far it does; 12 HL unless told.
   */
  permissible_error?: number;
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

/** Block is a check on a hardness test block. */
export interface Block {
  /** in the record's scale */
  certified?: number;
  /** of the certified value, with a coverage factor of 2 */
  expanded_u?: number;
  /** on the block, in the record's scale */
  readings?: Number[];
  /** of their mean, to either side of the certified value; 6 HL unless told */
  tolerance?: number;
  /** when, RFC 3339 */
  taken?: string;
  /** what the offset is used for; uncertainty unless told */
  use?: BlockUse;
}

/**
 * BlockUse says what the offset that a block check finds is used for. It is
 * never both.
 */
export type BlockUse = "uncertainty" | "correction";

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
  distribution: Distribution;
  /** change of the result per unit of Scale */
  sensitivity: number;
  /** to the result's standard uncertainty: |Sensitivity| Standard, set by Combine */
  contribution: number;
  /** of the result's variance, 0 to 1, set by Combine */
  share: number;
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
  /** where K comes from */
  coverage: Coverage;
  terms: Term[];
}

/** Coverage says where a coverage factor comes from. */
export type Coverage = "degrees-of-freedom" | "distributions";

/** Distribution is what is known of the values a term can take. */
export type Distribution = "normal" | "rectangular" | "student";

/** Limit is what a spot has to meet, as it was written down. */
export interface Limit {
  scale: Key;
  /** null: none */
  min?: number;
  /** null: none */
  max?: number;
  rule?: Rule;
}

/** Rule is a decision rule. */
export type Rule = "guarded" | "simple" | "one-sided-95";

/** Outcome is what a comparison comes to. */
export type Outcome = "conforms" | "does-not-conform" | "not-proven" | "cannot-say" | "no-limit";

/** Kind says what a sentence is for. */
export type Kind = "stop" | "warn" | "note" | "reason" | "ruling" | "advice" | "error";

/**
 * Sentence is one sentence with its place-holders: {name} stands for a
 * parameter, {name:1} for a number with that many decimals.
 */
export interface Sentence {
  code: string;
  kind: Kind;
  message: string;
  /** "" but for a finding: an error's message holds the remedy */
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
