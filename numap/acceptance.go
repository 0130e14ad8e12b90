package numap

import (
	"math"

	"glassthread/materials/domain"
)

// AcceptanceAngle returns the half-angle (rad) of the cone of meridional rays, in an
// outer medium of index n0 > 0, that a core of the given NA, at least 0, guides:
// asin(NA/n0) (Senior, eq. 2.8). An NA at or above n0 takes the whole half-space,
// pi/2, which is no error: a high-contrast core in air does so. The angle keeps its
// accuracy up to grazing incidence. At a point of a graded core give its LocalNA.
func AcceptanceAngle(na, outside float64) (float64, error) {
	if err := aperture("numap.AcceptanceAngle", na, outside); err != nil {
		return 0, err
	}
	if na >= outside {
		return math.Pi / 2, nil
	}
	// The arc sine loses half the digits near grazing, the arc tangent none.
	return math.Atan2(na, leg(outside, na)), nil
}

// SolidAngle returns the exact solid angle (sr) of the acceptance cone in an outer
// medium of index n0 > 0, 2 pi (1 - cos theta) with sin theta = NA/n0 and NA at
// least 0. An NA at or above n0 gives the half-space, 2 pi.
func SolidAngle(na, outside float64) (float64, error) {
	if err := aperture("numap.SolidAngle", na, outside); err != nil {
		return 0, err
	}
	if na >= outside {
		return 2 * math.Pi, nil
	}
	s := na / outside
	cos := leg(outside, na) / outside
	return 2 * math.Pi * s * s / (1 + cos), nil // 1 - cos = sin^2/(1 + cos)
}

// SolidAngleWeak returns the small-angle form pi (NA/n0)^2 (sr) of SolidAngle, for
// an outer medium of index n0 > 0 and an NA of at least 0 (Senior, ex. 2.2). It is
// too small by about (NA/n0)^2/4 of its value. At the same time it is the exact
// projected solid angle, by which the radiance of a Lambertian source is
// multiplied; hence an NA at or above n0 gives that of a half-space, pi.
func SolidAngleWeak(na, outside float64) (float64, error) {
	if err := aperture("numap.SolidAngleWeak", na, outside); err != nil {
		return 0, err
	}
	s := math.Min(1, na/outside)
	return math.Pi * s * s, nil
}

func aperture(function string, na, outside float64) error {
	if err := domain.NonNegative(function, "na", na, ""); err != nil {
		return err
	}
	return domain.Positive(function, "outside", outside, "")
}
