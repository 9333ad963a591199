// Generated from the Go types by build/contract. Do not edit.

/** Book is a job of many spots. */
export interface Book {
  /** version of this layout, 1 */
  v: number;
  /** at most MaxRecords */
  records: RecordText[];
}

/**
 * RecordText is a record as JSON, not read yet: one that cannot be read spoils
 * none of the others in its book.
 */
export type RecordText = Record;

/** BookSheet is a book evaluated. */
export interface BookSheet {
  /** one for each record, in their order */
  sheets: SheetText[];
  summary: Summary;
}

/**
 * SheetText is the JSON of a record's sheet: what Evaluate answers, or {"error":
 * ...} in the place of a record that could not be evaluated. Ten thousand sheets
 * fit into memory as text, but hardly as what they are read into.
 */
export type SheetText = Sheet | { error: Error };

/** BookRows are rows of a book. */
export interface BookRows {
  /** at most MaxRecords */
  rows: BookRow[];
}

/**
 * BookRow is a record and its sheet as far as a list of spots shows them, and as
 * a summary needs them. A number that does not exist is null.
 */
export interface BookRow {
  id: string;
  label: string;
  job: string;
  /** left out where it is not stated */
  zone?: Zone;
  /** along a traverse, mm */
  position: number | null;
  device: string;
  /** what the readings are in */
  scale: Key;
  group: string;
  /** readings that count */
  n: number;
  /** readings that were struck */
  struck: number;
  /** of the readings, in Scale */
  mean: number | null;
  sd: number | null;
  /** the mean corrected; null also where a finding says that nothing was measured */
  corrected: number | null;
  shownMean: string;
  /** in the limit's scale, then in HV, as far as the sheet has them; in Scale where it has neither; the first is the one to show */
  values: BookValue[];
  /** "cannot-say" where Error stands */
  outcome: Outcome;
  /** of conformity */
  probability: number | null;
  /** in percent */
  shownChance: string;
  /** from the nearer bound of the limit to the value, in expanded uncertainties; less than nothing outside */
  margin: number | null;
  /** of the limit as it was written down, "" without one, and so are the next two */
  limitScale: Key;
  limitMin: number | null;
  limitMax: number | null;
  /** their codes, in the order of the job */
  findings: string[];
  /** the gravest of them: stop, warn or note; left out without findings */
  level?: Kind;
  /** why the record could not be evaluated; null if it could */
  error: Error | null;
}

/** BookValue is a value of a spot in one scale. */
export interface BookValue {
  scale: Key;
  value: number;
  /** expanded uncertainty */
  expanded: number;
  low: number;
  high: number;
  /** "326 HBW (HLD)" */
  shown: string;
  /** "24" */
  shownExpanded: string;
  shownLow: string;
  shownHigh: string;
}

/** TableBook is a book to write as a table. */
export interface TableBook {
  /** version of this layout, 1 */
  v: number;
  /** at most MaxRecords */
  records: RecordText[];
  /** whether it goes on from a part before, and has no row of headers */
  continued?: boolean;
}

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
  /** along a traverse, from any point that the whole traverse is measured from */
  position_mm?: number;
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
  /** own curve or anchor as fitCurve gave it, or only what it is made of */
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
  /** along a traverse, from any point that the whole traverse is measured from */
  position_mm?: number;
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
  /** own curve or anchor as fitCurve gave it, or only what it is made of */
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

/**
 * Summary is what the rows of a book come to. Rows are named by their position,
 * from 0.
 */
export interface Summary {
  /** records */
  n: number;
  /** by outcome */
  counts: Counts;
  /** the rows that could not be evaluated, which count as cannot-say */
  invalid: number[];
  /** in which the spots are compared: the limit's where every spot with a value has one in it, else HV, else the one of most readings; "" where there is no value at all */
  scale: Key;
  /** how many rows have no value in it */
  without: number;
  /** the row least likely to conform; null where no row was set against a limit */
  worst: number | null;
  /** in the order base, haz, weld, other, not stated; those with a value */
  byZone: ZoneSummary[];
  uniformity: Uniformity;
  traverse: Traverse;
}

/** Counts says how many rows have an outcome. */
export interface Counts {
  conforms: number;
  "does-not-conform": number;
  "not-proven": number;
  "cannot-say": number;
  "no-limit": number;
}

/** ZoneSummary describes the spots of one zone that have a value in Scale. */
export interface ZoneSummary {
  /** left out where it is not stated */
  zone?: Zone;
  scale: Key;
  /** spots */
  n: number;
  mean: number;
  /**
   * Expanded is the expanded uncertainty of the mean, as if every spot were wrong
   * to the same side: they share the instrument and the conversion, so that it is
   * the mean of theirs.
   */
  expanded: number;
  /** the least value, */
  min: number;
  minRow: number;
  /** and what it may be as low as */
  low: number;
  /** the greatest value, */
  max: number;
  maxRow: number;
  /** and what it may be as high as */
  high: number;
  /** the mean, "231 HBW (HLD)" */
  shown: string;
  /** "14" */
  shownExpanded: string;
  /** "218" */
  shownMin: string;
  shownLow: string;
  shownMax: string;
  shownHigh: string;
}

/**
 * Traverse is the hardness along a weld. Of a book with several welds, summarize
 * the rows of each by themselves.
 */
export interface Traverse {
  /** the rows that state a position, in its order */
  points: TraversePoint[];
  /** the limit in the summary's scale, where all points have the same; null: none */
  min: number | null;
  max: number | null;
  /** the row of the hardest spot in the heat-affected zone, with or without a position; null without one */
  peak: number | null;
  /** names the peak; "" without one */
  sentence: string;
  code: string;
  params: Params;
}

/** TraversePoint is a spot on a traverse. */
export interface TraversePoint {
  /** of its row */
  index: number;
  /** mm */
  position: number;
  /** left out where it is not stated */
  zone?: Zone;
  outcome: Outcome;
  /** in the summary's scale; null where the spot has none, and so are the next two */
  value: number | null;
  low: number | null;
  high: number | null;
  /** "12.5" */
  shownPosition: string;
  /** "" where there is no value */
  shown: string;
  shownExpanded: string;
}

/**
 * Uniformity says whether the spots differ by more than the readings at a spot
 * scatter: a one-way analysis of variance of the corrected readings.
 */
export interface Uniformity {
  outcome: UniformityOutcome;
  /** null where the spots could not be compared */
  F: number | null;
  /** between the spots, and within them; [] where they could not be compared */
  df: number[];
  /** the probability of so great an F if all spots were alike */
  p: number | null;
  /** how many were compared: the largest set in one scale and metal */
  spots: number;
  /** how many others have readings */
  leftOut: number;
  /** of the readings compared */
  scale: Key;
  /** their metal; "" where it is not chosen */
  group: string;
  /** mean square between the spots, and */
  between: number | null;
  /** within them; null where there is none */
  within: number | null;
  /** of all readings compared */
  mean: number | null;
  /** the least and */
  min: number | null;
  /** the greatest mean of a spot */
  max: number | null;
  /** "1.18" */
  shownF: string;
  /** "0.35", "< 0.001" */
  shownP: string;
  /** with its meaning for the part, or why the spots cannot be compared */
  sentence: string;
  /** what was left out; "" where nothing was */
  note: string;
  /** both by their codes; the parts are "sentence" and "note" */
  said: Saying[];
}

/** UniformityOutcome is what a comparison of spots comes to. */
export type UniformityOutcome = "even" | "uneven" | "not-known";

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
 * Curve is a conversion that the user owns, as it travels inside a record: what
 * it is made of, and what came of it. The second part is only ever compared with
 * what comes of it here, see Altered; it may be missing.
 */
export interface Curve {
  /** the user's own: "P22 header, lab HBW" */
  name?: string;
  /** key of the impact device that took the readings */
  device: string;
  /** key of the metal group */
  group: string;
  /** what the pairs' values are in */
  scale: Key;
  /** an anchor for up to four pairs, else own, unless told */
  kind: CurveKind;
  /** in any order */
  pairs: Pair[];
  /** where the values come from; of a table it must be there */
  source?: string;
  /** of the instrument that took the readings */
  serial?: string;
  /** when they were taken: 2026-12-01 */
  date?: string;
  /** of a table: standard uncertainty of its values, percent */
  u_percent?: number;
  /** of the data and methods it was fitted with */
  edition?: string;
  form?: Form;
  /** for reading, rounded: "HBW = -212.3 + 0.8741 HLD"; "" for a table */
  equation?: string;
  /** least and greatest reading that it is given for */
  range?: number[];
  /** the same, rounded inwards */
  shownRange?: string[];
  /** see Form; [] for a table */
  parameters?: number[];
  /** of the parameters, widened by birge^2; [] for a table */
  covariance?: number[][];
  /** pairs less parameters */
  dof?: number;
  /** standard deviation of the pairs about the curve, in its scale; null without degrees of freedom */
  residual?: number | null;
  /** per degree of freedom, of an anchor with the 3 % of the model's shape; null like it */
  chiSquare?: number | null;
  /** what the uncertainty was widened by because of it, 1 or more */
  birge?: number;
  /** standard deviation of pieces about the curve that the pairs' uncertainties do not explain, in its scale; 0 unless chi-square is beyond chance (5 %) */
  scatter?: number;
  /** root mean square of what each pair differs by from the curve through the others; null but for an own curve */
  leaveOneOut?: number | null;
  /** of the form chosen; null but for an own curve */
  aicc?: number | null;
  /** the forms that were tried; [] but for an own curve */
  candidates?: Candidate[];
  /** of each pair, in their order */
  residuals?: Residual[];
  warnings?: Warning[];
  /** evenly over the range */
  plot?: PlotPoint[];
}

/** Fitted is a curve with what came of it. */
export interface Fitted {
  /** the user's own: "P22 header, lab HBW" */
  name?: string;
  /** key of the impact device that took the readings */
  device: string;
  /** key of the metal group */
  group: string;
  /** what the pairs' values are in */
  scale: Key;
  /** an anchor for up to four pairs, else own, unless told */
  kind: CurveKind;
  /** in any order */
  pairs: Pair[];
  /** where the values come from; of a table it must be there */
  source?: string;
  /** of the instrument that took the readings */
  serial?: string;
  /** when they were taken: 2026-12-01 */
  date?: string;
  /** of a table: standard uncertainty of its values, percent */
  u_percent?: number;
  /** of the data and methods it was fitted with */
  edition?: string;
  form: Form;
  /** for reading, rounded: "HBW = -212.3 + 0.8741 HLD"; "" for a table */
  equation: string;
  /** least and greatest reading that it is given for */
  range: number[];
  /** the same, rounded inwards */
  shownRange: string[];
  /** see Form; [] for a table */
  parameters: number[];
  /** of the parameters, widened by birge^2; [] for a table */
  covariance: number[][];
  /** pairs less parameters */
  dof: number;
  /** standard deviation of the pairs about the curve, in its scale; null without degrees of freedom */
  residual: number | null;
  /** per degree of freedom, of an anchor with the 3 % of the model's shape; null like it */
  chiSquare: number | null;
  /** what the uncertainty was widened by because of it, 1 or more */
  birge: number;
  /** standard deviation of pieces about the curve that the pairs' uncertainties do not explain, in its scale; 0 unless chi-square is beyond chance (5 %) */
  scatter: number;
  /** root mean square of what each pair differs by from the curve through the others; null but for an own curve */
  leaveOneOut: number | null;
  /** of the form chosen; null but for an own curve */
  aicc: number | null;
  /** the forms that were tried; [] but for an own curve */
  candidates: Candidate[];
  /** of each pair, in their order */
  residuals: Residual[];
  warnings: Warning[];
  /** evenly over the range */
  plot: PlotPoint[];
}

/** Definition is what a curve is made of. */
export interface Definition {
  /** the user's own: "P22 header, lab HBW" */
  name?: string;
  /** key of the impact device that took the readings */
  device: string;
  /** key of the metal group */
  group: string;
  /** what the pairs' values are in */
  scale: Key;
  /** an anchor for up to four pairs, else own, unless told */
  kind: CurveKind;
  /** in any order */
  pairs: Pair[];
  /** where the values come from; of a table it must be there */
  source?: string;
  /** of the instrument that took the readings */
  serial?: string;
  /** when they were taken: 2026-12-01 */
  date?: string;
  /** of a table: standard uncertainty of its values, percent */
  u_percent?: number;
  /** of the data and methods it was fitted with */
  edition?: string;
}

/** CurveKind is the kind of a curve. */
export type CurveKind = "anchor" | "own" | "table";

/**
 * Pair is a reading and what it stands for. Of a table, the uncertainties are
 * not looked at.
 */
export interface Pair {
  /** mean reading, in the device's scale, as if struck vertically down */
  hl: number;
  /** its standard uncertainty */
  u_hl: number;
  /** in the curve's scale */
  value: number;
  /** its standard uncertainty */
  u_value: number;
  /** three or more, which hl and u_hl are then computed from */
  readings?: number[];
  /** of the piece */
  label?: string;
  /** when the reading was taken, unless as the curve's: 2026-12-01 */
  date?: string;
}

/** Form is the form of a curve. */
export type Form = "straight" | "power" | "quadratic" | "anchored" | "table";

/** Candidate is a form that was tried. */
export interface Candidate {
  form: Form;
  /** Akaike's criterion, corrected: the least is chosen; null where refused, and so are the next two */
  aicc: number | null;
  /** per degree of freedom */
  chiSquare: number | null;
  /** as the fit's */
  leaveOneOut: number | null;
  /** code of the reason why it cannot be chosen; "" if it can */
  refused: string;
  /** the reason, one sentence */
  reason: string;
}

/** Residual is what one pair says of the curve. */
export interface Residual {
  /** interval of the reading at 95 % */
  hlBar: number[];
  /** interval of the value at 95 % */
  valueBar: number[];
  /** the curve at the reading; null where the curve gives none, and so are the next two */
  fitted: number | null;
  /** value - fitted */
  residual: number | null;
  /** standard uncertainty of the residual from both sides of the pair */
  standard: number | null;
  /** value less the curve through the other pairs, in units of its uncertainty; null but for an own curve */
  leftOut: number | null;
  /** by how much the pair moves the curve at its reading, in units of the curve's standard uncertainty; null like it */
  influence: number | null;
}

/**
 * Warning is something the user has to know about a curve. It is a finding of
 * every sheet that the curve is used for.
 */
export interface Warning {
  code: string;
  /** warn or note */
  level: Kind;
  /** path in the curve */
  field: string;
  message: string;
  remedy: string;
  params: Params;
  source: string;
}

/** PlotPoint is a point of the curve. */
export interface PlotPoint {
  hl: number;
  value: number;
  /** of the band at 95 % */
  low: number;
  /** of the band at 95 % */
  high: number;
  /** what the built-in model gives there; null where it gives nothing */
  model: number | null;
}

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
  /** along a traverse, from any point that the whole traverse is measured from */
  position_mm?: number;
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
  /** own curve or anchor as fitCurve gave it, or only what it is made of */
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
 * Number is a number as it was typed. Text that is no number is kept, so that
 * nothing typed is lost; Value is NaN then.
 */
export type Number = number | string | null;

/** Basis says what a step of a conversion rests on. */
export type Basis = "measured" | "model" | "standard" | "similar" | "anchored" | "own" | "table";

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

/** Request is a table to read, and what is known of it. */
export interface Request {
  /** as pasted, or the whole file */
  text: string;
  /** between cells: a tab, ";", "|" or ","; found unless told */
  delimiter?: string;
  /** found unless told */
  header?: Header;
  /** found unless told */
  layout?: Layout;
  /** for each column the path of the field that it holds, "limit", "struck", or "" for a column to leave out; guessed unless told */
  mapping?: string[];
  /** what headers mean, before the words that are known anyway */
  known?: ColumnWord[];
  /** what stands in a record where its row says nothing; id and readings are left out of it */
  defaults: Record;
}

/** Header says whether the first row names the columns. */
export type Header = "yes" | "no";

/** Layout says what a row is. */
export type Layout = "spot" | "reading";

/** ColumnWord is what a header means. */
export interface ColumnWord {
  /** case, spaces and signs do not count */
  name: string;
  /** as in a mapping */
  role: string;
}

/**
 * Table is what was read. Every row that is not blank is either in a record or
 * among the bad ones.
 */
export interface Table {
  /** "" where there is one column */
  delimiter: string;
  header: boolean;
  layout: Layout;
  columns: Column[];
  /** the roles of the columns: what to hand in again, changed */
  mapping: string[];
  /** that are not blank, without the header */
  rows: number;
  records: Record[];
  /** for each record the number of its row, or of its first; counted from 1, with header and blank rows */
  at: number[];
  /** in their order */
  bad: BadRow[];
}

/** Column is one column of a table. */
export interface Column {
  /** its header; "" without one */
  name: string;
  /** "" where it is left out */
  role: string;
  /** its first few cells that hold something */
  samples: string[];
}

/** BadRow is a row that is in no record. */
export interface BadRow {
  /** its number */
  row: number;
  cells: string[];
  /** the field is the role of the column, where one is to blame */
  error: Error | null;
}

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
