package convert

import (
	"math"
	"time"

	"strikebook/convert/record"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

const (
	// permissibleError is how far an instrument may read wrong to either side, in
	// HL, where no block check says how far it does. GB/T 17394.2, from memory.
	permissibleError = 12.0
	// blockTolerance is how far the mean on a block may lie from its certified
	// value, in HL. ASTM A956, from memory.
	blockTolerance = 6.0
	// blockReadings is how many readings make a check on a block (common practice,
	// no source).
	blockReadings = 3
	// blockAge is how far a check on a block and the readings may lie apart
	// (common practice, no source: before and after each day's work).
	blockAge = 24 * time.Hour
	// certifiedK is the coverage factor of a certified value's expanded uncertainty
	// (common practice, no source).
	certifiedK = 2.0
)

// checkBlock judges the instrument by its check on a test block. What the check
// leaves in doubt, or the permissible error where there is none, becomes terms
// of the uncertainty.
func (e *evaluation) checkBlock() {
	b := e.record.Block
	if b == nil {
		b = &record.Block{}
	}
	var values []float64
	for _, n := range b.Readings {
		if n.Valid() {
			values = append(values, n.Value)
		}
	}
	check := &e.sheet.Block
	s := stats.Summarize(values)
	check.N, check.Mean, check.SD = s.N, number(s.Mean), number(s.SD)
	if e.record.Block == nil || !e.completeBlock(b, s.N) {
		e.budgetWithoutBlock()
		return
	}
	offset := s.Mean - *b.Certified
	check.Error = &offset
	check.Tolerance = e.tolerance(b)
	check.Status = BlockUsed
	if check.Tolerance != nil {
		check.Status = BlockPassed
		if math.Abs(offset) > *check.Tolerance {
			check.Status = BlockFailed
			e.find("block-failed", "block", wording.Params{
				"error": offset, "tolerance": *check.Tolerance, "scale": string(e.own.Key)})
		}
	}
	e.judgeBlockAge()
	e.budgetBlock(b, s, offset)
}

// completeBlock reports whether a block check is one, and says at its field what
// is missing or wrong.
func (e *evaluation) completeBlock(b *record.Block, n int) bool {
	missing := ""
	for _, q := range []struct {
		field  string
		value  *float64
		needed bool
	}{{"certified", b.Certified, true}, {"expanded_u", b.ExpandedU, true}, {"tolerance", b.Tolerance, false}} {
		switch {
		case q.value == nil && q.needed && missing == "":
			missing = q.field
		case q.value != nil && e.badQuantity("block."+q.field, *q.value):
			return false
		}
	}
	if missing == "" && (n < blockReadings || n < len(b.Readings)) {
		missing = "readings"
	}
	if missing == "" {
		return true
	}
	e.find("block-incomplete", "block."+missing, wording.Params{"field": missing, "least": float64(blockReadings)})
	return false
}

// badQuantity finds a number in the readings' scale that cannot be one.
func (e *evaluation) badQuantity(path string, value float64) bool {
	if record.Num(value).Valid() {
		return false
	}
	e.find("bad-quantity", path, wording.Params{
		"path": path, "got": asTyped(value), "lo": 0.0, "hi": float64(record.GreatestReading)})
	return true
}

// tolerance is what the mean on the block may be off by; nil where neither the
// record nor a standard says.
func (e *evaluation) tolerance(b *record.Block) *float64 {
	if b.Tolerance == nil && e.own.Leeb {
		return number(blockTolerance)
	}
	return b.Tolerance
}

func (e *evaluation) judgeBlockAge() {
	since, ok := e.record.SinceBlock()
	if !ok {
		e.find("block-undated", "block.taken", wording.Params{"hours": blockAge.Hours()})
		return
	}
	if since.Abs() > blockAge {
		e.find("block-old", "block.taken", wording.Params{"apart": since.Abs().Hours(), "hours": blockAge.Hours()})
	}
}

// budgetBlock sets up what a check leaves in doubt: the certified value, the
// scatter of the readings on it, and the offset unless the mean is corrected
// for it.
func (e *evaluation) budgetBlock(b *record.Block, s stats.Summary, offset float64) {
	scatter := stats.RepeatabilityTerm(s.N, s.SD)
	scatter.Name, scatter.Source = "block readings", "Standard deviation of the mean of the readings on the block, JCGM 100, 4.2"
	e.addTerms(
		stats.Term{
			Name: "block certificate", Standard: *b.ExpandedU / certifiedK, DoF: stats.Infinite, Distribution: stats.Normal,
			Source: "Expanded uncertainty of the block's certified value, with k = 2",
		},
		scatter)
	if b.Use == record.AsCorrection {
		e.sheet.Corrected.Block = -offset
		return
	}
	e.addTerms(stats.Term{
		Name: "block offset", Standard: math.Abs(offset), DoF: stats.Infinite, Distribution: stats.Normal,
		Source: "Mean error on the test block, not corrected for: JCGM 100, F.2.4.5",
	})
}

// budgetWithoutBlock sets up the permissible error of an instrument that no
// block check speaks for.
func (e *evaluation) budgetWithoutBlock() {
	e.sheet.Block.Status = BlockNone
	if e.record.Block != nil {
		e.sheet.Block.Status = BlockIncomplete
	}
	half := e.record.PermissibleError
	source := "Permissible error as stated in the record, rectangular"
	if half != nil && e.badQuantity("permissible_error", *half) {
		half = nil
	}
	if half == nil && e.own.Leeb {
		half = number(permissibleError)
		source = "Permissible error of the instrument, rectangular: GB/T 17394.2, from memory, check your edition"
	}
	switch {
	case e.own.Key == "":
		return
	case half == nil:
		e.find("no-block-check-direct", "block", wording.Params{"scale": string(e.own.Key)})
		return
	case e.record.Block == nil && !e.offsetInCurve():
		e.find("no-block-check", "block", wording.Params{"half": *half, "scale": string(e.own.Key)})
	}
	e.addTerms(stats.Term{
		Name: "permissible error", Standard: stats.Rectangular(*half), DoF: stats.Infinite, Distribution: stats.Uniform,
		Source: source,
	})
}
