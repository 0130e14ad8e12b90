package numap

import (
	"math"

	"glassthread/materials/domain"
)

// Core is a multimode core with the profile n^2(r) = n1^2 - NA^2 (r/Radius)^Alpha up
// to its radius and the cladding's index beyond (Gloge and Marcatili 1973). Its
// methods are those of the ray picture. The zero Core gives errors.
type Core struct {
	Radius float64 // m, above 0
	NA     float64 // on the axis, above 0
	Alpha  float64 // profile exponent, above 0: 2 the parabola, +Inf the step
}

func (c Core) check(function string) error {
	if err := domain.Positive(function, "Core.Radius", c.Radius, "m"); err != nil {
		return err
	}
	if err := domain.Positive(function, "Core.NA", c.NA, ""); err != nil {
		return err
	}
	if c.Alpha > 0 {
		return nil
	}
	return &domain.Error{Func: function, Argument: "Core.Alpha", Value: c.Alpha, Allowed: alphaAllowed}
}

func (c Core) step() bool { return c.Alpha > math.MaxFloat64 }

// LocalNA returns the numerical aperture sqrt(n^2(r) - n2^2) = NA sqrt(1 - (r/a)^alpha)
// at a distance r (m), at least 0, from the axis (Gloge and Marcatili 1973). A step
// has its NA up to the edge and on it; outside the core the local NA is 0. With
// AcceptanceAngle it gives the cone that the core guides from a point of its face.
func (c Core) LocalNA(r float64) (float64, error) {
	const name = "numap.Core.LocalNA"
	if err := c.check(name); err != nil {
		return 0, err
	}
	if err := domain.NonNegative(name, "r", r, "m"); err != nil {
		return 0, err
	}
	return c.localNA(r), nil
}

func (c Core) localNA(r float64) float64 {
	switch {
	case r > c.Radius:
		return 0
	case c.step() || r == 0:
		return c.NA
	case c.Alpha == 2: // the parabola, without logarithms
		return c.NA * (leg(c.Radius, r) / c.Radius)
	}
	return c.NA * math.Sqrt(-math.Expm1(c.Alpha*lnRatio(r, c.Radius)))
}
