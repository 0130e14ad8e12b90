// Package snell describes plane interfaces between media: refraction, total
// reflection, Fresnel's coefficients, and films.
//
// PLACEHOLDER
package snell

import (
	"errors"
	"fmt"
	"math"

	"glassthread/materials/domain"
)

// ErrTotalReflection says that there is no refracted ray: the incidence is
// beyond the critical angle.
var ErrTotalReflection = errors.New("totally reflected")

// ErrNoTotalReflection says that there is no total reflection: the second
// medium is not the rarer one, or the incidence is not beyond the critical angle.
var ErrNoTotalReflection = errors.New("no total reflection")

// Refract returns the angle (rad) to the normal at which a ray that meets the
// interface from index n1 at the angle incidence (rad, from 0 to pi/2) goes on
// in index n2, by the law of Snell and Descartes
//
//	n1 sin(incidence) = n2 sin(refraction)
//
// (Born and Wolf, Principles of Optics, section 1.5.1). Beyond the critical
// angle the error matches ErrTotalReflection. At the critical angle as
// CriticalAngle returns it the refraction is pi/2 exactly, and a float64 one
// step above it is totally reflected: compare with CriticalAngle, whose rounding
// is the right one, rather than with an arcsine of n2/n1. Equal indices return
// the incidence itself, and a grazing ray (pi/2) into a denser medium returns
// CriticalAngle(n2, n1), so that the ray can be sent back.
func Refract(n1, n2, incidence float64) (refraction float64, err error) {
	if err := checkInterface("snell.Refract", n1, n2, incidence); err != nil {
		return 0, err
	}
	if n1 == n2 {
		return incidence, nil
	}
	r := newRay(n1, incidence)
	q := r.normalSquared(n2)
	if n1 > n2 {
		switch r.side(q, n2) {
		case beyond:
			return 0, &domain.Error{Func: "snell.Refract", Argument: "incidence", Value: incidence,
				Allowed: fmt.Sprintf("from 0 to the critical angle, %v (rad)", criticalAngle(n1, n2)),
				Kind:    ErrTotalReflection}
		case critical:
			return math.Pi / 2, nil
		}
		q = math.Max(q, 0)
	}
	kz := math.Sqrt(q)
	refraction = math.Atan2(r.kx, kz)
	if n1 < n2 && r.kz*r.kz <= rounding*n1*kz {
		// A grazing ray: no rounding may carry it beyond the critical angle.
		refraction = math.Min(refraction, criticalAngle(n2, n1))
		if incidence == math.Pi/2 {
			refraction = criticalAngle(n2, n1)
		}
	}
	return refraction, nil
}

// CriticalAngle returns the incidence (rad) above which a ray from index n1 is
// totally reflected by index n2, arcsin(n2/n1) (Born and Wolf, section 1.5.4).
// It is rounded correctly but for rare ties, also for indices that differ in
// their last digit. When n2 is not below n1 the error matches
// ErrNoTotalReflection.
func CriticalAngle(n1, n2 float64) (float64, error) {
	if err := checkInterface("snell.CriticalAngle", n1, n2, 0); err != nil {
		return 0, err
	}
	if n1 <= n2 {
		return 0, notRarer("snell.CriticalAngle", n1, n2)
	}
	return criticalAngle(n1, n2), nil
}

// criticalAngle takes n1 > n2.
func criticalAngle(n1, n2 float64) float64 {
	kz := math.Sqrt((n1 - n2) * (n1 + n2))
	angle := math.Atan2(n2, kz)
	// One Newton step on n2^2 - n1^2 sin^2, whose value is known to all digits.
	r := newRay(n1, angle)
	return angle + r.normalSquared(n2)/(2*n2*kz)
}

// Brewster returns the incidence (rad) at which a wave polarised in the plane of
// incidence (p) is not reflected, arctan(n2/n1) (Born and Wolf, section 1.5.3).
func Brewster(n1, n2 float64) (float64, error) {
	if err := checkInterface("snell.Brewster", n1, n2, 0); err != nil {
		return 0, err
	}
	return math.Atan2(n2, n1), nil
}

// rounding is far above the rounding of an angle and far below anything else.
const rounding = 1e-13

const (
	below = iota
	critical
	beyond
)

// side says on which side of the critical angle of a rarer medium n2 the ray is,
// given q = normalSquared(n2). The critical angle is the rounded one.
func (r *ray) side(q, n2 float64) int {
	near := rounding * r.kx * r.kx
	switch {
	case q > near:
		return below
	case q < -near:
		return beyond
	}
	switch angle := criticalAngle(r.n, n2); {
	case r.angle < angle:
		return below
	case r.angle > angle:
		return beyond
	}
	return critical
}

func notRarer(function string, n1, n2 float64) error {
	return &domain.Error{Func: function, Argument: "n1", Value: n1,
		Allowed: fmt.Sprintf("above n2, %v", n2), Kind: ErrNoTotalReflection}
}
