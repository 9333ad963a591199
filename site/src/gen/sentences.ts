// Generated from the Go sources by build/contract. Do not edit.

import type { Sentence } from "./contract";

export const sentences: Sentence[] = [
  {
    "code": "bad-quantity",
    "kind": "stop",
    "message": "The field {path} must lie above {lo} and not above {hi}, but it is {got}.",
    "remedy": "Correct it, or leave it empty where it is not known.",
    "source": "Bounds of what can be (common practice, no source)"
  },
  {
    "code": "piece-too-light",
    "kind": "stop",
    "message": "The test piece weighs {have} kg, {by} kg less than the {need} kg that device {device} needs of a piece that lies as this one does.",
    "remedy": "Support it better if that is enough: device {device} needs {free} kg of a free piece, {supported} kg on a solid support, {coupled} kg coupled to a solid plate. Devices for such a piece as it lies: {devices}; if none is named, use a direct portable method.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
  {
    "code": "piece-too-thin",
    "kind": "stop",
    "message": "The test piece is {have} mm thick, {by} mm less than the {need} mm that device {device} needs of a piece that lies as this one does.",
    "remedy": "Couple it to a backing plate if that is enough: device {device} needs {uncoupledThickness} mm uncoupled, {coupledThickness} mm coupled. Devices for such a piece as it lies: {devices}; if none is named, use a direct portable method.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
  {
    "code": "wall-too-thin",
    "kind": "stop",
    "message": "The wall is {have} mm thick, {by} mm less than the {need} mm that device {device} needs, however heavy the whole pipe is: a thin wall springs under the impact.",
    "remedy": "Couple a solid backing to the wall if that is enough: device {device} needs {uncoupledThickness} mm uncoupled, {coupledThickness} mm coupled. Devices for such a wall as it is: {devices}; if none is named, use a direct portable method.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
  {
    "code": "case-too-thin",
    "kind": "stop",
    "message": "The hardened case is {have} mm deep, {by} mm less than the {need} mm that device {device} needs: a reading would show the case and the core in one.",
    "remedy": "Use a device for such a case: {devices}; if none is named, use a direct portable method with a light test force.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
  {
    "code": "surface-too-rough",
    "kind": "warn",
    "message": "The surface has a roughness Ra of {have} µm, {by} µm more than the {need} µm that device {device} allows.",
    "remedy": "Grind the spot to Ra {need} µm or finer, without heating it. Devices that allow it as it is: {devices}.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
  {
    "code": "radius-too-small",
    "kind": "warn",
    "message": "The surface is curved to a radius of {have} mm, {by} mm less than the {need} mm that device {device} needs without a support ring.",
    "remedy": "Use a support ring that fits the curvature. Devices that need none: {devices}.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
  {
    "code": "spacing-too-close",
    "kind": "warn",
    "message": "The impressions lie {have} mm apart, {by} mm closer than the {need} mm that device {device} needs: each hardens the metal around it.",
    "remedy": "Space the impacts {need} mm or more, and strike the readings taken too close to another.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
  {
    "code": "edge-too-near",
    "kind": "warn",
    "message": "The impressions lie {have} mm from an edge, {by} mm nearer than the {need} mm that device {device} needs.",
    "remedy": "Move the spot to {need} mm or more from every edge.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
  {
    "code": "temperature-outside",
    "kind": "warn",
    "message": "The test piece is at {have} °C, {by} °C outside {lo} to {hi} °C, for which readings are good.",
    "remedy": "Let the piece reach {lo} to {hi} °C before testing. The ambient temperature ought to be 10 to 35 °C as well.",
    "source": "ASTM A956 for the piece, ISO 16859-1 for the ambient temperature, from memory: check your edition"
  },
  {
    "code": "piece-not-stated",
    "kind": "note",
    "message": "The test piece is not stated, so that its requirements are not checked: device {device} needs {free} kg ({supported} kg on a solid support, {coupled} kg coupled to a solid plate), {uncoupledThickness} mm of thickness ({coupledThickness} mm coupled), Ra {ra} µm or finer, a radius of {radius} mm, {spacing} mm between impressions and {edge} mm to an edge.",
    "remedy": "State what is known of the piece, at least its mass and thickness.",
    "source": "ISO 16859-1 and ASTM A956, from memory: check your edition"
  },
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
    "code": "block-failed",
    "kind": "stop",
    "message": "The block check fails: the mean on the block is off by {error:1} {scale}, and {tolerance} {scale} is allowed.",
    "remedy": "Do not use the instrument. Clean the ball and the block, check again; if it fails again, have it repaired and calibrated.",
    "source": "ASTM A956, from memory: check your edition"
  },
  {
    "code": "block-incomplete",
    "kind": "warn",
    "message": "The block check is not whole: its field {field} is missing. It needs the certified value, its expanded uncertainty and at least {least} readings. Until then the permissible error stands in.",
    "remedy": "Complete the block check.",
    "source": "Common practice, no source"
  },
  {
    "code": "no-block-check",
    "kind": "warn",
    "message": "No check on a test block stands behind these readings, so the instrument may read wrong by {half} {scale} either way.",
    "remedy": "Take at least three readings on a test block, and write them down with its certificate.",
    "source": "Permissible error: GB/T 17394.2, from memory: check your edition"
  },
  {
    "code": "no-block-check-direct",
    "kind": "warn",
    "message": "No check on a test block stands behind these readings, and nothing is known of how far wrong the instrument may read: the uncertainty given is too small by that much.",
    "remedy": "Enter a block check, or the permissible error of the instrument.",
    "source": "JCGM 100: every known influence belongs into the budget"
  },
  {
    "code": "block-undated",
    "kind": "note",
    "message": "The block check and the readings do not both have a time, so the age of the check is not known.",
    "remedy": "Write down when the check was made; it should be within {hours} hours of the readings.",
    "source": "Common practice, no source"
  },
  {
    "code": "block-old",
    "kind": "warn",
    "message": "The block check and the readings lie {apart:0} hours apart; at most {hours} are usual.",
    "remedy": "Check the instrument again on the block.",
    "source": "Common practice, no source"
  },
  {
    "code": "wrong-curve",
    "kind": "stop",
    "message": "The curve {name} was made with device {curveDevice} on {curveMetal}, but these readings are of {device} on {metal}.",
    "remedy": "Choose a curve of this device and metal, or remove it from the record.",
    "source": "ISO 18265: a conversion holds for the metal it was made for; ISO 16859-1: readings of different devices differ"
  },
  {
    "code": "curve-altered",
    "kind": "stop",
    "message": "The figures stored with the curve {name} do not follow from its pairs.",
    "remedy": "Fit the curve anew from its pairs, or ask the sender for the record as it was.",
    "source": "An own curve is computed again wherever it arrives"
  },
  {
    "code": "curve-unusable",
    "kind": "stop",
    "message": "No curve of this edition goes through the pairs of {name}.",
    "remedy": "Correct its pairs under Curves, or remove it from the record.",
    "source": "An own curve is computed again wherever it arrives"
  },
  {
    "code": "outside-curve-range",
    "kind": "stop",
    "message": "The mean {mean:1} {scale} lies outside the curve {name}, which is given from {lo:1} to {hi:1} {scale}.",
    "remedy": "Add a pair beyond this reading, or remove the curve and convert without.",
    "source": "An own curve says nothing outside its pairs"
  },
  {
    "code": "outside-pairs",
    "kind": "note",
    "message": "The mean {mean:1} {scale} lies {percent:0} % outside the pairs of the anchor {name}, {lo:1} to {hi:1} {scale}, so its uncertainty is wider.",
    "remedy": "Add a pair near this hardness.",
    "source": "Engineering estimate"
  },
  {
    "code": "offset-in-curve",
    "kind": "note",
    "message": "The curve {name} was made with this very instrument, serial {serial}, so that the instrument's offset is in the curve, and neither a block check nor a permissible error enters the converted values.",
    "remedy": "Check the instrument on a block all the same: the curve does not know what has changed since.",
    "source": "JCGM 100: no influence is counted twice"
  },
  {
    "code": "curve-old",
    "kind": "warn",
    "message": "The oldest pair of the curve {name} was taken {days:0} days before these readings.",
    "remedy": "Measure one of its pieces again, and make the curve anew if it differs.",
    "source": "Common practice, no source: a year"
  },
  {
    "code": "pairs-bunched",
    "kind": "warn",
    "message": "The pairs bunch together: from {from:1} to {to:1} {scale} there is none, {percent:0} % of what they span.",
    "remedy": "Add a pair in the gap.",
    "source": "Common practice, no source"
  },
  {
    "code": "pairs-narrow",
    "kind": "warn",
    "message": "The pairs span only {span:1} {scale}, from {lo:1} to {hi:1}, so that little is known of how the curve rises.",
    "remedy": "Add pairs on softer and on harder pieces.",
    "source": "Common practice, no source"
  },
  {
    "code": "pair-far-off",
    "kind": "warn",
    "message": "Pair {pair} ({hl:1}, {value} {scale}) lies {times:1} uncertainties off the curve through the others, and moves the curve by {influence:1} of its own.",
    "remedy": "Measure that piece again. Remove the pair only for a cause you can see.",
    "source": "Leave-one-out residual beyond 3 (common practice, no source)"
  },
  {
    "code": "pairs-disagree",
    "kind": "warn",
    "message": "The pairs scatter {times:1} times as far about the curve as their uncertainties say, which is beyond chance, so the curve is widened.",
    "remedy": "Look whether the uncertainties are too small, or the pieces not of one metal and condition.",
    "source": "Chi-square beyond its 95 % point; R. T. Birge, Phys. Rev. 40 (1932) 207"
  },
  {
    "code": "curve-far-from-model",
    "kind": "warn",
    "message": "At {hl:0} {reading} the curve gives {value} {scale}, the built-in model for {metal} {model}: farther apart than both uncertainties explain.",
    "remedy": "Check the device, the metal and the scale of the pairs.",
    "source": "Rebound model, engineering estimate"
  },
  {
    "code": "bad-limit",
    "kind": "warn",
    "message": "The field {path} must be a number above 0 and at most {hi}, but it is {got}.",
    "remedy": "Correct the limit, or leave the side open.",
    "source": "Common practice, no source"
  },
  {
    "code": "limit-no-scale",
    "kind": "warn",
    "message": "The limit has no scale.",
    "remedy": "Choose the scale that the limit is given in.",
    "source": "A hardness has no meaning without its scale"
  },
  {
    "code": "limit-empty",
    "kind": "warn",
    "message": "The limit has neither a least nor a greatest value.",
    "remedy": "Enter at least one of the two, or remove the limit.",
    "source": "A limit bounds something"
  },
  {
    "code": "limit-reversed",
    "kind": "warn",
    "message": "The least value of the limit, {min}, is above its greatest, {max}.",
    "remedy": "Exchange or correct them.",
    "source": "A limit bounds something"
  },
  {
    "code": "form-few-pairs",
    "kind": "reason",
    "message": "Pairs: {n}; it takes at least {least}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "form-no-fit",
    "kind": "reason",
    "message": "The pairs do not determine it.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "form-not-rising",
    "kind": "reason",
    "message": "It does not rise over the whole range.",
    "remedy": "",
    "source": ""
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
    "code": "verdict-no-limit",
    "kind": "ruling",
    "message": "No limit is set.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-no-readings",
    "kind": "ruling",
    "message": "No verdict yet: no reading counts.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-bad-limit",
    "kind": "ruling",
    "message": "No verdict: the limit is not whole.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-stopped",
    "kind": "ruling",
    "message": "No verdict: a finding stops it.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-no-way",
    "kind": "ruling",
    "message": "No verdict: nothing leads from {own} to {scale} on this metal.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-limit-outside",
    "kind": "ruling",
    "message": "No verdict: the spot has no value in {scale}, and the limit {limit} {scale} lies outside {lo} to {hi} {scale}, where it could be led to HV.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-conforms-max",
    "kind": "ruling",
    "message": "It conforms: {shown} ± {guard} lies wholly at or below {max}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-conforms-min",
    "kind": "ruling",
    "message": "It conforms: {shown} ± {guard} lies wholly at or above {min}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-conforms-both",
    "kind": "ruling",
    "message": "It conforms: {shown} ± {guard} lies wholly within {min} to {max}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-does-not-conform-max",
    "kind": "ruling",
    "message": "It does not conform: even less {guard}, {shown} lies above {max}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-does-not-conform-min",
    "kind": "ruling",
    "message": "It does not conform: even with {guard} more, {shown} lies below {min}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-not-proven-max",
    "kind": "ruling",
    "message": "Not proven either way: {shown} ± {guard} reaches across {max}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-not-proven-min",
    "kind": "ruling",
    "message": "Not proven either way: {shown} ± {guard} reaches across {min}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-not-proven-both",
    "kind": "ruling",
    "message": "Not proven either way: {shown} ± {guard} reaches across both {min} and {max}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-conforms-max-simple",
    "kind": "ruling",
    "message": "By its mean alone it conforms: {shown} is at or below {max}. Its uncertainty is left out of account.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-conforms-min-simple",
    "kind": "ruling",
    "message": "By its mean alone it conforms: {shown} is at or above {min}. Its uncertainty is left out of account.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-conforms-both-simple",
    "kind": "ruling",
    "message": "By its mean alone it conforms: {shown} is within {min} to {max}. Its uncertainty is left out of account.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-does-not-conform-max-simple",
    "kind": "ruling",
    "message": "By its mean alone it does not conform: {shown} is above {max}. Its uncertainty is left out of account.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-does-not-conform-min-simple",
    "kind": "ruling",
    "message": "By its mean alone it does not conform: {shown} is below {min}. Its uncertainty is left out of account.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "verdict-through-hv",
    "kind": "ruling",
    "message": "The spot has no valid value in {scale}, so the comparison is made in HV: {limit} answers to {hv}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "advice-conforms",
    "kind": "advice",
    "message": "File the record with its readings; acceptance belongs to the governing code.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "advice-fails",
    "kind": "advice",
    "message": "Confirm it by the direct method the code names before anything is rejected or repaired.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "advice-stopped",
    "kind": "advice",
    "message": "Clear the finding that stops it; its remedy stands beside it.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "advice-direct",
    "kind": "advice",
    "message": "Measure in {scale} by the direct method the code names.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "advice-more-readings",
    "kind": "advice",
    "message": "More readings would settle it if mean and scatter stay: {more} more, {n} in all.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "advice-not-readings",
    "kind": "advice",
    "message": "More readings would not settle it: {percent:0} % of the doubt is the {term}. Use the direct method the code names.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "more-no-value",
    "kind": "ruling",
    "message": "The spot has no value in {scale}, so its uncertainty is not known.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "more-enough",
    "kind": "ruling",
    "message": "It is reached: {scale} is known within ± {expanded}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "more-needed",
    "kind": "ruling",
    "message": "It takes {more} more readings, {n} in all, if mean and scatter stay: {scale} is then known within ± {best}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "more-never",
    "kind": "ruling",
    "message": "No number of readings reaches it: even {most} leave ± {best} {scale}, for {percent} % of the doubt is the {term}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "spots-even",
    "kind": "ruling",
    "message": "Even: the {spots} spots, with means from {lo} to {hi}, differ by no more than the readings at each of them scatter (F = {f}, p {p}), so nothing here speaks against one hardness for the whole part.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "spots-uneven",
    "kind": "ruling",
    "message": "Uneven: the {spots} spots, with means from {lo} to {hi}, differ by more than the readings at each of them scatter (F = {f}, p {p}), so no single value stands for the whole part: judge each spot by itself.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "spots-too-few",
    "kind": "ruling",
    "message": "The spots cannot be compared: it takes at least two, with readings in the same scale on the same metal.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "spots-single",
    "kind": "ruling",
    "message": "The spots cannot be compared: none has two readings, so that their scatter is not known.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "spots-no-scatter",
    "kind": "ruling",
    "message": "The spots cannot be compared: at each of them all readings are alike, so that their scatter is not known.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "spots-left-out",
    "kind": "ruling",
    "message": "Left out of the comparison, because they are read in another scale or on another metal: {n} of {all} spots.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "traverse-peak",
    "kind": "ruling",
    "message": "The heat-affected zone is hardest at {spot}: {shown} ± {expanded}.",
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
    "message": "The field {path} holds {n} readings; it takes at most {limit}. Split them over several spots.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "too-many-records",
    "kind": "error",
    "message": "The field {path} holds {n} records; it takes at most {limit}. Split the book.",
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
    "code": "curve-too-large",
    "kind": "error",
    "message": "The curve is larger than {limit} bytes. Leave out what it does not need.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "curve-not-json",
    "kind": "error",
    "message": "The curve is not valid JSON: at {path}, {want} is expected, but there is {got}. Open a curve that this program wrote.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "curve-unknown-field",
    "kind": "error",
    "message": "The field {path} is unknown in a curve. Remove it, or open the curve with a newer edition.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "curve-scale",
    "kind": "error",
    "message": "The field {path} holds {scale}, which nothing leads on from for {metal}. Give the values in one of: {choices}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "not-a-date",
    "kind": "error",
    "message": "The field {path} must be a date such as 2026-12-01, but it holds {got}. Correct it.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "pairs-none",
    "kind": "error",
    "message": "The field {path} holds no pair. Enter at least one.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "pairs-too-many",
    "kind": "error",
    "message": "The field {path} holds {n} pairs; it takes at most {most}. Leave some out.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "anchor-many-pairs",
    "kind": "error",
    "message": "An anchor takes at most {most} pairs, and there are {n}. Make it an own curve.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "own-few-pairs",
    "kind": "error",
    "message": "An own curve takes at least {least} pairs, and there are fewer ({n}). Add pairs, or make it an anchor.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "table-few-points",
    "kind": "error",
    "message": "A table takes at least {least} points, and there are fewer ({n}). Add points.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "pair-readings",
    "kind": "error",
    "message": "The field {path} holds {n} readings; it takes {least} to {most}. Add readings, or give their mean and its uncertainty.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "pair-certain",
    "kind": "error",
    "message": "Neither side of pair {pair} has an uncertainty. Enter that of the reading, of the value, or of both.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "pairs-one-value",
    "kind": "error",
    "message": "All pairs have the same value, {value} {scale}, so that no curve rises through them. Add pieces of other hardness, or keep up to four as an anchor.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "pairs-few-places",
    "kind": "error",
    "message": "The pairs stand at fewer than {least} different readings. Add pieces of other hardness.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "anchor-no-model",
    "kind": "error",
    "message": "Device {device} has no built-in model that could be anchored. Make an own curve of at least {least} pairs.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "anchor-outside-model",
    "kind": "error",
    "message": "The field {path} is {got}, but the model of {metal} is given from {lo:1} to {hi:1} {scale}. Correct the reading or the metal, or make an own curve.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "anchor-outside-table",
    "kind": "error",
    "message": "The field {path} is {got}, but for {metal} {scale} leads to HV only from {lo:1} to {hi:1}. Give the value in another scale, or make an own curve.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "table-no-source",
    "kind": "error",
    "message": "The field {path} is empty. Name the standard or report that the table is taken from.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "table-not-rising",
    "kind": "error",
    "message": "The table does not rise: at {hl} it gives {value} {scale}, and at {beforeHL} {before}. Correct the field {path}.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "table-outside-device",
    "kind": "error",
    "message": "The table covers nothing of {lo} to {hi} {scale}, the application range of device {device}. Correct the device or the points.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "curve-not-rising",
    "kind": "error",
    "message": "No form of curve through the pairs gives a {scale} that rises with the reading. Look for a pair that is entered wrong, or add pieces of other hardness.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "table-too-large",
    "kind": "error",
    "message": "The text is larger than {limit} bytes. Split it into several.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "table-too-long",
    "kind": "error",
    "message": "The table has more than {limit} rows. Split it into several.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "table-too-wide",
    "kind": "error",
    "message": "Row {row} has {n} cells, and at most {limit} are read. Check the delimiter.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "row-empty",
    "kind": "error",
    "message": "The row has neither a reading nor a label. Add one, or leave the row out.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "row-cell",
    "kind": "error",
    "message": "The column {column} must hold {want}, but it holds {got}. Correct the cell, or leave the column out.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "row-limit",
    "kind": "error",
    "message": "The limit {got} cannot be read. Write it as max 225 HBW, min 180 HBW or 180 to 225 HBW.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "row-no-reading",
    "kind": "error",
    "message": "The row holds no reading. Enter it, or leave the row out.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "row-no-label",
    "kind": "error",
    "message": "The row has no label, and no row before it has one either. Name its spot.",
    "remedy": "",
    "source": ""
  },
  {
    "code": "row-differs",
    "kind": "error",
    "message": "The column {column} holds {got}, but row {first} of the same spot holds {want}. Make them agree, or give the spot another label.",
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
