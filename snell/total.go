package snell

import (
	"fmt"
	"math"

	"glassthread/materials/domain"
)

// Phase holds the phase jumps (rad) of a wave on total reflection: the arguments
// of the reflection coefficients that Fresnel returns, from 0 down to -pi.
type Phase struct {
	S, P       float64
	Difference float64 // S - P, never negative: how far a rhomb's face retards
}

// TotalReflectionPhase returns the phase jumps when a plane wave in index n1
// meets the rarer index n2 at an incidence (rad) from the critical angle to pi/2:
//
//	tan(S/2) = -sqrt(n1^2 sin^2 - n2^2) / (n1 cos)
//	tan(P/2) = (n1/n2)^2 tan(S/2)
//	tan((S-P)/2) = cos sqrt(n1^2 sin^2 - n2^2) / (n1 sin^2)
//
// (Born and Wolf, section 1.5.4, equations 60 and 61, from memory, recomputed).
// Each keeps its digits up to the critical angle, where all are 0, and to
// grazing. Where there is no total reflection the error matches
// ErrNoTotalReflection.
func TotalReflectionPhase(n1, n2, incidence float64) (Phase, error) {
	r, decay, err := totalReflection("snell.TotalReflectionPhase", n1, n2, incidence)
	if err != nil {
		return Phase{}, err
	}
	return Phase{
		S:          -2 * math.Atan2(decay, r.kz),
		P:          -2 * math.Atan2(n1*n1*decay, n2*n2*r.kz),
		Difference: 2 * math.Atan2(r.cos*decay, r.kx*r.sin),
	}, nil
}

// PenetrationDepth returns the distance (m) from the interface at which the
// amplitude of the evanescent wave in the rarer index n2 has fallen to 1/e:
//
//	wavelength / (2 pi sqrt(n1^2 sin^2 - n2^2))
//
// (Born and Wolf, section 1.5.4). Its intensity falls to 1/e in half of this.
// The wavelength (m) is in vacuum, the incidence (rad) is in index n1, beyond the
// critical angle: at it the depth is infinite, and there and below the error
// matches ErrNoTotalReflection.
func PenetrationDepth(n1, n2, incidence, wavelength float64) (float64, error) {
	_, depth, err := evanescent("snell.PenetrationDepth", n1, n2, incidence, wavelength)
	return depth, err
}

// Shift is how far a totally reflected beam leaves from where it arrived (m).
type Shift struct {
	Beam  float64 // sideways, across the reflected beam
	Along float64 // along the interface: Beam / cos(incidence)
}

// LateralShift returns the shifts of a totally reflected beam of s and of p waves
// first found by F. Goos and H. Haenchen, Ann. Phys. 436, 333 (1947). With the
// penetration depth d,
//
//	s.Beam = 2 d sin
//	p.Beam = s.Beam n2^2 / (n1^2 sin^2 - n2^2 cos^2)
//
// which is the exact derivative of the phase jump (K. Artmann, Ann. Phys. 437, 87
// (1948); closed forms derived here). It holds for a beam wide enough that its
// spread of angles is small against the distance from the critical angle.
// Arguments and errors are those of PenetrationDepth.
func LateralShift(n1, n2, incidence, wavelength float64) (s, p Shift, err error) {
	const function = "snell.LateralShift"
	r, depth, err := evanescent(function, n1, n2, incidence, wavelength)
	if err != nil {
		return Shift{}, Shift{}, err
	}
	// n1^2 sin^2 - n2^2 cos^2 as a sum: decay^2 + n2^2 sin^2, over n2^2.
	decay := math.Sqrt(math.Max(0, -r.normalSquared(n2))) / n2
	share := 1 / (decay*decay + r.sin*r.sin)
	s = Shift{Beam: 2 * depth * r.sin, Along: 2 * depth * (r.sin / r.cos)}
	p = Shift{Beam: s.Beam * share, Along: s.Along * share}
	for _, shift := range [...]float64{s.Beam, s.Along, p.Beam, p.Along} {
		if err := domain.Result(function, "lateral shift", shift); err != nil {
			return Shift{}, Shift{}, err
		}
	}
	return s, p, nil
}

// evanescent returns the ray and its penetration depth.
func evanescent(function string, n1, n2, incidence, wavelength float64) (ray, float64, error) {
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return ray{}, 0, err
	}
	r, decay, err := totalReflection(function, n1, n2, incidence)
	if err != nil {
		return ray{}, 0, err
	}
	if decay == 0 {
		return ray{}, 0, notBeyond(function, n1, n2, incidence)
	}
	depth := wavelength / (2 * math.Pi) / decay
	if err := domain.Result(function, "penetration depth", depth); err != nil {
		return ray{}, 0, err
	}
	return r, depth, nil
}

// totalReflection returns the ray and the decay of the evanescent wave,
// sqrt(n1^2 sin^2 - n2^2), which is 0 at the critical angle.
func totalReflection(function string, n1, n2, incidence float64) (r ray, decay float64, err error) {
	if err := checkInterface(function, n1, n2, incidence); err != nil {
		return r, 0, err
	}
	if n1 <= n2 {
		return r, 0, notRarer(function, n1, n2)
	}
	r = newRay(n1, incidence)
	q := r.normalSquared(n2)
	if r.side(q, n2) == below {
		return r, 0, notBeyond(function, n1, n2, incidence)
	}
	return r, math.Sqrt(math.Max(0, -q)), nil
}

func notBeyond(function string, n1, n2, incidence float64) error {
	return &domain.Error{Func: function, Argument: "incidence", Value: incidence,
		Allowed: fmt.Sprintf("beyond the critical angle, %v (rad)", criticalAngle(n1, n2)),
		Kind:    ErrNoTotalReflection}
}
