// Package snell describes plane interfaces between media: refraction, total
// reflection, Fresnel's coefficients, and stacks of films. A cleaved end, an
// index-matched joint, an air gap and an anti-reflection coating are one call
// each.
//
//	where does the ray go            Refract, CriticalAngle, Brewster
//	total reflection                 TotalReflectionPhase, PenetrationDepth, LateralShift
//	one interface                    Fresnel
//	films, evanescent gaps, mirrors  Stack.At
//	a fibre's end                    CleavedEnd, Coated, QuarterWave, AntiReflection
//	two ends face to face            AirGap, Joint.Coherent, Joint.Incoherent
//	in decibels                      Powers.ReturnLoss, Powers.InsertionLoss
//
// # Conventions
//
// Angles are in radians from the normal, from 0 to pi/2 as a float64, which is
// short of pi/2 by 6.1e-17 and taken as it is. Wavelengths are vacuum wavelengths
// in metres. Indices are plain numbers from 1e-40 to 1e40: take them from any
// medium with materials.Index. Waves vary as exp(i k r - i omega t), so an
// absorbing medium has an index with a positive imaginary part, n + i kappa, and
// the power in it falls as exp(-4 pi kappa z/wavelength). The medium that the
// light comes from is lossless.
//
// S has its electric field across the plane of incidence (TE), P in it (TM).
// Amplitudes are those of the electric field. The sign of reflected P waves is
// that of Born and Wolf: at normal incidence it is opposite to that of S.
//
// All waves are plane and all interfaces flat: what a guided mode loses because
// its field spreads in a gap, or is sent askew by a slanted end, is not in here.
//
// # Accuracy
//
// An angle near the critical or the Brewster angle, or near grazing, costs no
// digits, nor do indices that nearly agree: differences are factored, and those
// that still cancel are taken in twofold precision. Errors against 200-digit
// arithmetic, in units of 2^-53 = 1.1e-16 relative, over random arguments that
// fall on these corners more often than not (see testdata/reference.py), and the
// time of a call on one core of a present-day server:
//
//	                                  cases    mean   worst   time
//	CriticalAngle                      8000    0.00    0.00   0.2 us
//	Refract                           12601    0.59    3.82   0.07 us, near critical 0.3 us
//	TotalReflectionPhase              10197    0.72    7.26
//	PenetrationDepth, LateralShift    16995    0.99   14.4
//	Fresnel, amplitudes               32000    1.42   13.5    0.15 us
//	Fresnel, powers                   32000    1.47   26.7
//	Stack.At, reflection              16000    0.51   98      0.15 us a film
//	Stack.At, reflectance             16000    0.53   76
//	Stack.At, transmission            16000    1.03  190
//	Stack.At, transmittance           16000    1.02   82
//	Stack.At, absorptance (of 1)      16000    0.40   17
//
// The angle that CriticalAngle returns is the nearest float64 in all cases. The
// figures of Stack.At are divided by 1 + the phase 2 pi thickness |kz|/wavelength
// of all films together: that many radians, each with its rounding, cannot be
// known better from a float64. A reflection is measured against the sum of those
// of all faces (but at most 1), of which a good coating leaves little. The worst
// are sharp resonances, which enlarge every error by their finesse.
//
// Weak points: an absorptance is what remains of 1 and so good to about 1e-15 of
// the incident power, not to digits of its own; the phase behind a film of 1e15
// wavelengths is noise.
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
