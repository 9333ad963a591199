package convert

import (
	"errors"

	"strikebook/convert/curve"
	"strikebook/convert/rebound"
	"strikebook/convert/scale"
	"strikebook/convert/stats"
	"strikebook/convert/wording"
)

// firstLeg leads from the readings to HV.
type firstLeg struct {
	curve.Curve // from the reading's scale to HV, or to the scale of a curve of the user's own
	// steps says how hv comes about; not set for a curve of the user's own.
	steps func(hv float64) []scale.Step
	// terms is the leg's own uncertainty, in the reading's scale, at a reading
	// that stands for hv; not set for a curve of the user's own.
	terms func(reading, hv float64) []stats.Term
}

// findFirstLeg finds what leads from the readings to HV on the metal. Where
// nothing does, it adds the finding that says so and answers nil.
func (e *evaluation) findFirstLeg() *firstLeg {
	switch {
	case e.record.Curve != nil:
		return e.byOwnCurve()
	case e.own.Leeb:
		return e.byModel()
	case e.own.Key == scale.HV:
		return e.asMeasured()
	}
	return e.backToHV()
}

// byModel leads from a rebound reading to HV.
func (e *evaluation) byModel() *firstLeg {
	leg, err := rebound.For(e.device, e.group)
	if errors.Is(err, rebound.ErrNoCurve) {
		e.find("no-curve", "device", wording.Params{"device": e.device.Key, "scale": e.device.Scale})
		return nil
	}
	if err != nil {
		panic(err) // a test solves the model for every device and group there is
	}
	within, err := curve.Narrow(leg, e.device.Lo, e.device.Hi)
	if err != nil {
		panic(err) // a test holds that every group meets every device's range
	}
	return &firstLeg{
		Curve: within,
		steps: func(float64) []scale.Step {
			return []scale.Step{{Step: string(e.own.Key) + " to HV", Basis: scale.Model, Source: rebound.Source}}
		},
		terms: func(reading, hv float64) []stats.Term {
			return []stats.Term{{
				Name: "model", Standard: leg.StandardUncertainty(reading, hv), Scale: string(e.own.Key),
				DoF: stats.Infinite, Distribution: stats.Normal, Sensitivity: 1,
				Source: "Rebound model on " + e.group.Name + ", engineering estimate",
			}}
		},
	}
}

// asMeasured is the first leg of readings taken in HV: there is nothing to convert.
func (e *evaluation) asMeasured() *firstLeg {
	same, err := scale.ToItself(e.own, e.group.Lo, e.group.Hi).Back(e.group.Lo, e.group.Hi)
	if err != nil {
		panic(err) // a test holds that every group has a range
	}
	return &firstLeg{
		Curve: same,
		steps: func(float64) []scale.Step { return []scale.Step{measuredStep(scale.HV)} },
		terms: func(float64, float64) []stats.Term { return nil },
	}
}

// backToHV leads from the scale of a direct method to HV, by the table that
// leads the other way.
func (e *evaluation) backToHV() *firstLeg {
	for _, leg := range e.legs {
		if leg.Scale.Key != e.own.Key {
			continue
		}
		back, err := leg.Back(e.group.Lo, e.group.Hi)
		if err != nil {
			break // the table covers nothing of the metal's range
		}
		return &firstLeg{
			Curve: back,
			steps: back.Steps,
			terms: func(_, hv float64) []stats.Term { return []stats.Term{secondLegTerm(leg, hv)} },
		}
	}
	e.find("no-table", "scale", wording.Params{"scale": string(e.own.Key), "metal": e.group.Name})
	return nil
}

func measuredStep(s scale.Key) scale.Step {
	return scale.Step{Step: string(s), Basis: scale.Measured, Source: "Read in this scale"}
}

// secondLegTerm is the uncertainty of a published conversion at hv.
func secondLegTerm(leg scale.Leg, hv float64) stats.Term {
	v, err := leg.At(hv)
	if err != nil {
		panic(err) // the caller has placed hv inside the leg
	}
	return stats.Term{
		Name: "second leg", Standard: v.Standard, Scale: string(leg.Scale.Key),
		DoF: stats.Infinite, Distribution: stats.Normal, Sensitivity: 1, Source: scale.LegSource,
	}
}
