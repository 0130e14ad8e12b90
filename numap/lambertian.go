package numap

import (
	"math"

	"glassthread/materials/domain"
)

// LambertianShare returns the share, from 0 to 1, of the power of a Lambertian disc
// (radiance alike in all directions) that the core guides as bound rays. The disc lies
// on the end face and on the axis, has the given radius (m), 0 being a point, and
// shines through a medium of index n0 = outside > 0.
//
// A point of the face at r keeps the exact share sin^2 of its acceptance angle,
// (LocalNA(r)/n0)^2, at most 1, and this is the mean over the disc. Where NA <= n0 and
// the disc of radius s is no larger than the core, it is
//
//	(NA/n0)^2 [1 - 2/(alpha + 2) (s/a)^alpha]
//
// (G. Keiser, Optical Fiber Communications, chapter 5); a disc larger than the core
// loses by the ratio of the areas. Where NA > n0 the middle of the core takes all,
// and the same integral is evaluated with that limit. Skew tunnelling rays and Fresnel
// loss are left out.
func (c Core) LambertianShare(source, outside float64) (float64, error) {
	const name = "numap.Core.LambertianShare"
	if err := c.check(name); err != nil {
		return 0, err
	}
	if err := domain.NonNegative(name, "source", source, "m"); err != nil {
		return 0, err
	}
	if err := domain.Positive(name, "outside", outside, ""); err != nil {
		return 0, err
	}
	area := 1.0 // the part of the disc that faces the core
	if source > c.Radius {
		area = c.Radius / source
		area *= area
		source = c.Radius
	}
	sin2 := c.NA / outside
	sin2 *= sin2
	switch {
	case c.step() || source == 0:
		return area * math.Min(1, sin2), nil
	case c.NA <= outside:
		// 1 - 2/(alpha + 2) x^alpha in terms that are not below 0.
		grow := -2 * math.Expm1(c.Alpha*lnRatio(source, c.Radius))
		return area * sin2 * ((c.Alpha + grow) / (c.Alpha + 2)), nil
	}
	return area * c.clippedShare(source, outside), nil
}

// clippedShare is LambertianShare where NA > n0 and the source is within the core.
//
// With x = r/a and S = NA/n0 a point loses 1 - S^2 (1 - x^alpha) = S^2 (x^alpha -
// q^alpha) of its power from x = q on, where S^2 (1 - q^alpha) = 1. The mean loss over
// x up to X is, with d = ln(X/q),
//
//	(S^2 - 1) [2/(alpha + 2) (e^(alpha d) - 1) - alpha/(alpha + 2) (1 - e^(-2 d))].
func (c Core) clippedShare(source, outside float64) float64 {
	s := c.NA / outside
	excess := (c.NA - outside) / outside * (s + 1) // S^2 - 1
	keep := -math.Log1p(1 / excess)                // ln q^alpha
	lnX := c.Alpha * lnRatio(source, c.Radius)
	alphaD := lnX - keep
	if !(alphaD > 0) {
		return 1 // the disc lies where all is taken, or S^2 overflows
	}
	gain := excess * math.Expm1(alphaD)
	if excess < 1 { // e^(alpha d) = x^alpha (1 + 1/excess) is large and would lose digits
		gain = excess*math.Expm1(lnX) + math.Exp(lnX)
	}
	d := alphaD / c.Alpha
	w := 1 / (c.Alpha + 2)
	loss := 2*w*gain + c.Alpha*w*excess*math.Expm1(-2*d)
	return math.Max(0, math.Min(1, 1-loss))
}

// CosineShare returns the share, from 0 to 1, of the power of a small source with
// intensity proportional to cos^order of the angle from the axis that falls inside
// the acceptance cone of a given NA, at least 0, in a medium of index outside > 0:
// 1 - (1 - (NA/n0)^2)^((order + 1)/2), by integrating over the cone. Order 1 is
// Lambertian, order 0 the same in all directions of the half-space, larger orders
// narrower lobes (see CosineOrder). An NA at or above n0 takes all. Fresnel loss is
// left out.
func CosineShare(na, order, outside float64) (float64, error) {
	const name = "numap.CosineShare"
	if err := aperture(name, na, outside); err != nil {
		return 0, err
	}
	if err := domain.NonNegative(name, "order", order, ""); err != nil {
		return 0, err
	}
	if na >= outside {
		return 1, nil
	}
	// The squared cosine, by whichever form keeps its digits.
	s := na / outside
	lnCos2 := math.Log1p(-s * s)
	if s > 0.7 {
		lnCos2 = math.Log((outside-na)/outside) + math.Log1p(s)
	}
	return -math.Expm1(0.5 * (order + 1) * lnCos2), nil
}

// CosineOrder returns the order m of a source with intensity proportional to cos^m
// that has half its axial intensity at the given angle (rad) from the axis, above 0
// and below pi/2: -ln 2 / ln cos(halfAngle) (Keiser, chapter 5, where a lateral
// coefficient describes a laser diode). 60 degrees gives 1, the Lambertian source.
func CosineOrder(halfAngle float64) (float64, error) {
	const name = "numap.CosineOrder"
	if !(halfAngle > 0 && halfAngle < math.Pi/2) {
		return 0, &domain.Error{Func: name, Argument: "halfAngle", Value: halfAngle,
			Allowed: "above 0 and below pi/2 (rad)"}
	}
	lnCos := math.Log(math.Cos(halfAngle))
	if halfAngle < 0.8 {
		sin := math.Sin(halfAngle)
		lnCos = 0.5 * math.Log1p(-sin*sin)
	}
	order := -math.Ln2 / lnCos
	return order, domain.Result(name, "order", order)
}
