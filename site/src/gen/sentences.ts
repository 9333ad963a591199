// Generated from the Go sources by build/contract. Do not edit.

import type { Sentence } from "./contract";

export const sentences: Sentence[] = [
  {
    "code": "too-few-readings",
    "kind": "warn",
    "message": "Readings that count: {n}. A mean that stands needs at least {least}; until then its scatter is assumed, not known.",
    "remedy": "Take {more} more at this spot, spaced as the device requires.",
    "source": "ISO 16859-1, from memory: check your edition"
  },
  {
    "code": "spread-too-wide",
    "kind": "warn",
    "message": "The readings spread over {percent:1} % of their mean; beyond {limit} % a mean needs at least {least} readings, and {n} count.",
    "remedy": "Look for the cause (surface, tilt, spacing, uneven metal), then take {more} more.",
    "source": "ISO 16859-1, from memory: check your edition"
  },
  {
    "code": "suspect-reading",
    "kind": "warn",
    "message": "Reading {number} ({value}) lies far from the others: Grubbs G = {g:2}, critical {critical:2} at 5 %, two-sided.",
    "remedy": "Look at its impact mark. Strike it only for a cause you can see, and write that cause down; otherwise keep it.",
    "source": "F. E. Grubbs, Technometrics 11 (1969); ASTM E178, from memory"
  },
  {
    "code": "not-a-reading",
    "kind": "stop",
    "message": "Reading {number} ({text}) is no reading: it must be a number above 0 and at most {highest}.",
    "remedy": "Correct it, or strike it with a reason.",
    "source": "ISO 16859-1 defines the scale from 0 to 1000 by HL = 1000 v_R/v_I"
  },
  {
    "code": "outside-device-range",
    "kind": "stop",
    "message": "The mean {mean:0} {scale} lies outside the application range of device {device}, {lo:0} to {hi:0} {scale}.",
    "remedy": "Use a device whose range holds the metal, or a direct method.",
    "source": "ISO 16859-1, from memory: check your edition"
  },
  {
    "code": "outside-metal-range",
    "kind": "stop",
    "message": "The mean {mean:0} {scale} answers to a hardness outside {lo:0} to {hi:0} HV, the range this metal's conversion is given for.",
    "remedy": "Check the metal and the readings. If both are right, use a direct method.",
    "source": "Range of the metal group, an engineering estimate"
  },
  {
    "code": "outside-scale-range",
    "kind": "stop",
    "message": "The mean {mean:1} {scale} lies outside the range in which {scale} is converted for this metal, {lo:1} to {hi:1} {scale}.",
    "remedy": "Measure in a scale whose range holds this metal.",
    "source": "Range of the scale and of its conversion table"
  },
  {
    "code": "no-curve",
    "kind": "stop",
    "message": "Device {device} has no built-in conversion.",
    "remedy": "Quote the mean in {scale} as measured, or use a device with a built-in curve.",
    "source": "The front rod of this device is no ball on a compact body, so the rebound model does not describe it"
  },
  {
    "code": "no-table",
    "kind": "stop",
    "message": "No published table leads from {scale} to other scales for {metal}.",
    "remedy": "Quote the mean in {scale} as measured.",
    "source": "ASTM E140 and ISO 18265, from memory"
  },
  {
    "code": "no-metal",
    "kind": "stop",
    "message": "The metal is not chosen, and every conversion depends on it.",
    "remedy": "Choose the metal of the spot.",
    "source": "ISO 18265: a conversion holds for the metal it was made for"
  },
  {
    "code": "no-device",
    "kind": "stop",
    "message": "The impact device is not chosen, and every conversion depends on it.",
    "remedy": "Choose the device, or the scale of a direct method.",
    "source": "ISO 16859-1: readings of different devices differ"
  },
  {
    "code": "no-direction-correction",
    "kind": "stop",
    "message": "For device {device} no correction for the direction of impact is published here.",
    "remedy": "Test vertically down, or use an instrument that compensates the direction itself.",
    "source": "GB/T 17394.1 tabulates devices D and DC only, from memory: check your copy"
  },
  {
    "code": "direction-outside-table",
    "kind": "stop",
    "message": "The direction correction is tabulated for means from {lo:0} to {hi:0} {scale}; {mean:0} lies outside, and the table is not extended.",
    "remedy": "Test vertically down, or use an instrument that compensates the direction itself.",
    "source": "GB/T 17394.1 annex, from memory: check your copy"
  },
  {
    "code": "scale-below",
    "kind": "reason",
    "message": "Below {lo} {scale}, the least value the conversion gives for this metal.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "scale-above",
    "kind": "reason",
    "message": "Above {hi} {scale}, the greatest value the conversion gives for this metal.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "scale-outside",
    "kind": "reason",
    "message": "No hardness reading of this device on this metal falls into {scale}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "scale-no-table",
    "kind": "reason",
    "message": "No published table carries {scale} for this metal.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "scale-no-readings",
    "kind": "reason",
    "message": "No reading counts yet.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "scale-withheld",
    "kind": "reason",
    "message": "Withheld: a finding above stops the conversion.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "record-not-json",
    "kind": "error",
    "message": "The record is not valid JSON: at {path}, {want} is expected, but there is {got}. Open a record that this program wrote.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "record-too-large",
    "kind": "error",
    "message": "The record is larger than {limit} bytes. Split it into several.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "record-version",
    "kind": "error",
    "message": "The record is of version {version}, and this edition reads version {known}. Open it with the edition that wrote it, or a newer one.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "unknown-field",
    "kind": "error",
    "message": "The field {path} is unknown in a record of version {version}. Remove it, or open the record with a newer edition.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "duplicate-field",
    "kind": "error",
    "message": "The field {path} stands twice. Keep one of the two.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "wrong-type",
    "kind": "error",
    "message": "The field {path} must be {want}, but it holds {got}. Correct it.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "unknown-choice",
    "kind": "error",
    "message": "The field {path} holds {got}, which is none of: {choices}. Choose one of these.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "scale-mismatch",
    "kind": "error",
    "message": "The field scale holds {scale}, but device {device} reads in {want}. Correct the scale or the device.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "not-a-time",
    "kind": "error",
    "message": "The field {path} must be a time such as 2026-12-01T09:30:00Z, but it holds {got}. Correct it.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "out-of-bounds",
    "kind": "error",
    "message": "The field {path} must lie between {lo} and {hi}, but it is {got}. Correct it.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "too-many-readings",
    "kind": "error",
    "message": "The field readings holds {n} readings; a spot takes at most {limit}. Split them over several spots.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "text-too-long",
    "kind": "error",
    "message": "The field {path} holds {n} characters; at most {limit} are kept. Shorten it.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "curve-not-served",
    "kind": "error",
    "message": "The field curve must be null: this edition converts without own curves. Remove the curve.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "link-foreign",
    "kind": "error",
    "message": "This is no link to a record. Ask the sender for the whole link.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "link-version",
    "kind": "error",
    "message": "The link is of version {version}, and this edition reads version {known}. Open it with a newer edition.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "link-damaged",
    "kind": "error",
    "message": "The link is damaged: a part of it is missing or changed. Ask the sender for the whole link.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "bad-call",
    "kind": "error",
    "message": "The call {call} takes {want}. Correct the call.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "internal",
    "kind": "error",
    "message": "The core met an internal fault in {call}: {detail}. The record is unchanged; report the fault with its link.",
    "remedy": "",
    "source": ""
  }
];
