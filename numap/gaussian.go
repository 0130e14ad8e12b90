package numap

import (
	"math"

	"glassthread/materials/domain"
)

// GaussianSpatialShare returns the share of a Gaussian beam's power that falls within
// a radius (m) about its axis, 1 - exp(-2 a^2/w^2), where its radius w (m) is that at
// which the intensity is 1/e^2 of the axial one; both above 0 (A. E. Siegman, Lasers,
// 1986, section 17.1).
func GaussianSpatialShare(radius, waist float64) (float64, error) {
	const name = "numap.GaussianSpatialShare"
	if err := domain.Positive(name, "radius", radius, "m"); err != nil {
		return 0, err
	}
	if err := domain.Positive(name, "waist", waist, "m"); err != nil {
		return 0, err
	}
	q := radius / waist
	return -math.Expm1(-2 * q * q), nil
}

// GaussianAngularShare returns the share of a Gaussian beam's power that travels
// within the acceptance cone of a given NA: 1 - exp(-2 (NA/NA_b)^2), where the beam,
// of waist radius w (m) to 1/e^2 of the intensity and vacuum wavelength (m), has the
// numerical aperture NA_b = wavelength/(pi w) to 1/e^2 of its far field; all above 0
// (Siegman 1986, section 17.1, in terms of the sine of the angle, that is the plane
// waves which the field at the waist is made of). No index enters: like the NA, the
// beam's n sin(theta) is the same in every outer medium. For a waist of several
// wavelengths.
func GaussianAngularShare(na, waist, wavelength float64) (float64, error) {
	const name = "numap.GaussianAngularShare"
	if err := positive3(name, "na", na, "", "waist", waist, "m", "wavelength", wavelength, "m"); err != nil {
		return 0, err
	}
	q := mulDiv(math.Pi, na, waist, wavelength)
	return -math.Expm1(-2 * q * q), nil
}

// GaussianShare returns the share, from 0 to 1, of the power of a Gaussian beam that
// the core guides as bound rays, when the beam runs along the axis with its waist, of
// radius w (m) to 1/e^2 of the intensity, on the end face, at a vacuum wavelength (m).
//
// A Gaussian beam is a bundle of rays with a Gaussian spread of place and, independent
// of it, of direction (its Wigner distribution; M. J. Bastiaans, J. Opt. Soc. Am. 69,
// 1710 (1979)). At a distance r the core keeps the directions within LocalNA(r), so
// that the share is
//
//	integral over r < a of (4 r/w^2) exp(-2 r^2/w^2) (1 - exp(-2 (LocalNA(r)/NA_b)^2)),
//
// NA_b = wavelength/(pi w). For a step this is GaussianSpatialShare times
// GaussianAngularShare; for other profiles it is integrated, to rounding error. This
// is the multimode picture: it does not tell how much one mode takes. Skew tunnelling
// rays and Fresnel loss are left out.
func (c Core) GaussianShare(waist, wavelength float64) (float64, error) {
	const name = "numap.Core.GaussianShare"
	if err := c.check(name); err != nil {
		return 0, err
	}
	if err := domain.Positive(name, "waist", waist, "m"); err != nil {
		return 0, err
	}
	if err := domain.Positive(name, "wavelength", wavelength, "m"); err != nil {
		return 0, err
	}
	place := c.Radius / waist
	direction := mulDiv(math.Pi, c.NA, waist, wavelength)
	// Finite, so that 0 times one of them is 0.
	a := math.Min(2*place*place, math.MaxFloat64)
	b := math.Min(2*direction*direction, math.MaxFloat64)
	switch {
	case c.step():
		return math.Expm1(-a) * math.Expm1(-b), nil
	case c.Alpha == 2 && math.Max(a, b) > 1:
		return gaussianParabola(math.Min(a, b), math.Max(a, b)), nil
	}
	return c.gaussianIntegral(a, b, math.Log(waist)-math.Log(c.Radius)), nil
}

// gaussianParabola is the integral for alpha = 2 with A = 2 (a/w)^2 and
// B = 2 (NA/NA_b)^2, 1 - exp(-A) - A (exp(-A) - exp(-B))/(B - A). It is alike in A and
// B, and with A <= B and B above 1 it has no cancellation to speak of.
func gaussianParabola(a, b float64) float64 {
	mean := 1.0 // of exp(-y) for y from 0 to b - a
	if d := b - a; d > 0 {
		mean = -math.Expm1(-d) / d
	}
	return -math.Expm1(-a) - a*math.Exp(-a)*mean
}

// gaussianIntegral integrates A exp(-A x) [1 - exp(-B (1 - x^(alpha/2)))] over
// x = (r/a)^2 from 0 to 1 by the double-exponential rule of H. Takahasi and M. Mori,
// Publ. RIMS Kyoto Univ. 9, 721 (1974), which is blind to the branch points that a
// power law has at both ends.
func (c Core) gaussianIntegral(a, b, lnWaist float64) float64 {
	const (
		reach = 40.0 // exp(-reach) is nothing
		limit = 3.25 // of u, where a weight is below 1e-17
	)
	step, last := 1.0/16, 16*limit
	if b > 10 {
		step, last = 1.0/32, 32*limit // the edge is a layer of width 1/b
	}
	// The beam may end long before the core: x = end t with 0 < t < 1.
	scale, lnEnd := a, 0.0
	if a > reach {
		scale, lnEnd = reach, math.Log(reach/2)+2*lnWaist
	}
	sum := 0.0
	for i := -last; i <= last; i++ {
		p := math.Exp(i * step)
		e := math.Exp(-math.Pi / 2 * (p - 1/p))
		t := 1 / (1 + e)
		rest := e * t // 1 - t
		accepted := -math.Expm1(b * math.Expm1(0.5*c.Alpha*(lnEnd-math.Log1p(e))))
		sum += (p + 1/p) * t * rest * math.Exp(-scale*t) * accepted
	}
	return math.Min(1, math.Pi/2*step*scale*sum)
}
