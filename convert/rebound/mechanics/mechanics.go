// Package mechanics is the rebound model: what a body that strikes a metal of
// known Vickers hardness reads (Leeb), by the mechanics of the impact. It is
// solved when the tables of package rebound are made, not while the core runs.
//
// The body of mass m, velocity v and ball radius R brings the energy
//
//	W = m v^2 / 2
//
// The metal of hardness H meets the impact with the dynamic yield stress
//
//	Y = (rate_factor H + overstress) 9.80665e6 Pa / 3
//
// and presses back, at a contact radius a, with the mean pressure of an
// expanding cavity, smoothly capped at full plasticity:
//
//	x(a) = (2/3) (1.7 + ln(E* a / (Y R)))
//	C(a) = max(1.1, 3 - w ln(1 + exp((3 - x)/w))),  w = 0.25
//	p(a) = Y C(a)
//
// The work of the way in and the elastic energy given back on the way out
// settle the contact radius a and the coefficient of restitution e = v_R/v_I:
//
//	integral from 0 to a of p(s) pi s^3 / R ds = W (1 - (3/8) e^2)
//	e^2 W = eta return_rel (3 pi^2 / 10) p(a)^2 a^3 / E*
//
// and ISO 16859-1 defines the reading as HL = 1000 e.
//
// Sources, all from memory: D. Tabor, Proc. R. Soc. A 192 (1948) and "The
// Hardness of Metals" (1951), for the energy balance and the dynamic pressure;
// K. L. Johnson, "Contact Mechanics" (1985), ch. 6 and 11, for the pressure of
// the cavity; H. Hertz (1882) for the energy stored under a ball; G. R. Johnson
// and W. H. Cook (1983), F. J. Zerilli and R. W. Armstrong (1987) for the rate
// terms: bcc metals add an overstress, fcc metals multiply.
package mechanics

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/integrate/quad"

	"strikebook/convert/curve"
	"strikebook/convert/device"
	"strikebook/convert/metal"
)

const (
	// capWidth is w, the width in x of the passage to full plasticity.
	capWidth = 0.25
	// fullPlasticity is the pressure of a fully developed impression, in Y.
	fullPlasticity = 3.0
	// leastPressure is the pressure at which the metal begins to yield, in Y.
	leastPressure = 1.1
	// returnShare is eta, the share of the elastic energy that reaches the
	// rebound of device D. It is calibrated: carbon steel of 330 HBW (348 HV by
	// ASTM E140) reads 610 HLD (common practice, no source).
	returnShare = 0.863
	// pascalPerHV turns a Vickers number (kgf/mm^2) into a pressure.
	pascalPerHV = 9.80665e6
)

// Body is what strikes the metal.
type Body struct {
	Mass     float64 // kg
	Velocity float64 // m/s, at impact
	Radius   float64 // m, of the ball
	E, Nu    float64 // the ball's Young's modulus in Pa and Poisson's ratio
}

// ballMaterials are handbook values, from memory: Young's modulus in Pa, Poisson's ratio.
var ballMaterials = map[string]struct{ e, nu float64 }{
	"WC-Co": {630e9, 0.22},
	"Si3N4": {310e9, 0.27},
	"PCD":   {1000e9, 0.07},
}

// BodyOf returns the impact body of a device.
func BodyOf(d device.Device) Body {
	ball := ballMaterials[d.BallMaterial]
	return Body{Mass: d.BodyMass, Velocity: d.ImpactVelocity, Radius: d.BallRadius, E: ball.e, Nu: ball.nu}
}

// Impact is the outcome of one impact.
type Impact struct {
	HL       float64 // 1000 times the coefficient of restitution
	Diameter float64 // of the impression at full load, m
}

// Strike solves the model for a body on a metal of Vickers hardness hv. It
// answers an error when no impression within the ball meets the balance.
func Strike(b Body, g metal.Group, hv float64) (Impact, error) {
	m := newMechanics(b, g, hv)
	if !(m.yield > 0) {
		return Impact{}, fmt.Errorf("the hardness %g HV must be above 0", hv)
	}
	// What the way in still lacks at the radius a rises strictly with a.
	missing := func(a float64) float64 {
		return m.workIn(a) - m.energy*(1-3.0/8*m.restitutionSquared(a))
	}
	a, err := curve.Root(missing, b.Radius*1e-6, b.Radius)
	if err != nil {
		return Impact{}, fmt.Errorf("no impression smaller than the ball answers to %g HV on %s: %w", hv, g.Key, err)
	}
	return Impact{HL: 1000 * math.Sqrt(m.restitutionSquared(a)), Diameter: 2 * a}, nil
}

// mechanics holds what does not change during one impact.
type mechanics struct {
	energy  float64 // W, J
	yield   float64 // Y, Pa
	reduced float64 // E*, Pa
	radius  float64 // R, m
	share   float64 // eta return_rel
	onset   float64 // the radius at which p leaves its least value, m
}

func newMechanics(b Body, g metal.Group, hv float64) mechanics {
	m := mechanics{
		energy:  b.Mass * b.Velocity * b.Velocity / 2,
		yield:   (g.RateFactor*hv + g.OverstressH) * pascalPerHV / 3,
		reduced: 1 / ((1-g.Nu*g.Nu)/g.E + (1-b.Nu*b.Nu)/b.E),
		radius:  b.Radius,
		share:   returnShare * g.ReturnShare,
	}
	// C(a) = leastPressure, solved for a.
	x := fullPlasticity - capWidth*math.Log(math.Expm1((fullPlasticity-leastPressure)/capWidth))
	m.onset = math.Exp(1.5*x-1.7) * m.yield * m.radius / m.reduced
	return m
}

// pressure is p(a), Pa.
func (m mechanics) pressure(a float64) float64 {
	if a <= m.onset {
		return m.yield * leastPressure
	}
	x := 2.0 / 3 * (1.7 + math.Log(m.reduced*a/(m.yield*m.radius)))
	return m.yield * (fullPlasticity - capWidth*math.Log1p(math.Exp((fullPlasticity-x)/capWidth)))
}

// workNodes is how many points the integral of the way in is taken at: enough
// for 1e-9 of its value.
const workNodes = 24

// workIn is the integral of the way in, J. Below the onset the pressure is
// constant and the integral known.
func (m mechanics) workIn(a float64) float64 {
	flat := min(a, m.onset)
	work := m.yield * leastPressure * math.Pi * flat * flat * flat * flat / (4 * m.radius)
	if a <= m.onset {
		return work
	}
	return work + quad.Fixed(func(s float64) float64 {
		return m.pressure(s) * math.Pi * s * s * s / m.radius
	}, m.onset, a, workNodes, quad.Legendre{}, 0)
}

// restitutionSquared is e^2 for a contact radius a.
func (m mechanics) restitutionSquared(a float64) float64 {
	p := m.pressure(a)
	return m.share * 3 * math.Pi * math.Pi / 10 * p * p * a * a * a / (m.reduced * m.energy)
}
