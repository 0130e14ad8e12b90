// Package numap answers the ray questions about a fibre's end face: numerical
// aperture and relative index difference, V, acceptance, the number of modes, and
// how much of a source a core takes.
//
// Radii and wavelengths are in metres, angles in radians, wavelengths those in
// vacuum; indices, NA, V and shares are pure numbers. NA here is the index one,
// sqrt(n1^2 - n2^2); the far-field NA of IEC 60793-1-43, read at 5 % of the
// intensity, comes out a few per cent lower.
//
// Exact forms carry the plain name and weak-guidance forms, good to the order of
// the relative index difference, end in Weak. Acceptance, shares and the kinds of
// ray are those of the ray picture, which holds for a multimode core (V well above
// 10); what a single mode takes is an overlap of fields and not in this package.
// No share here contains the Fresnel loss at the end face.
//
// # Errors
//
// An argument that is NaN, infinite or out of place gives a *domain.Error which
// names it; a core whose index does not exceed the cladding's gives one that
// matches ErrNotGuiding. Arguments that are each allowed but lead out of the range
// of a float64 together give an error too; results too small for a float64 round
// to zero. The one infinity that is allowed is a profile exponent alpha of +Inf,
// which is the step.
//
// # Accuracy
//
// Worst relative error over the 1,100 rows of testdata, made with mpmath at 50 digits
// and full of hard cases (indices 1e-15 apart, NA at the outer index, tiny and huge
// arguments), against the nearest float64 to the true value:
//
//	NA, Delta, NAWeak, V and their inverses            2.4e-16
//	AcceptanceAngle, SolidAngle, SolidAngleWeak        3.5e-16
//	PowerLawSingleModeV, mode counts, groups and b     3.6e-16
//	LocalNA, LambertianShare, CosineShare              3.8e-16
//	CosineOrder, shares of a Gaussian beam by one side 4.4e-16
//	SkewAcceptanceAngle (worst next to gamma = pi/2)   1.3e-15
//	GaussianShare                                      1.4e-15
//	ray invariants                                     3.1e-16
//	kinds of ray told wrong                            none
//
// A call takes up to about 70 ns and does not allocate; GaussianShare of a profile
// that is neither step nor parabola takes about 23 us.
//
// The asymptotic counts carry a truncation error besides, which their comments
// state. Chapter and equation numbers are cited from memory.
package numap

import (
	"errors"
	"math"

	"glassthread/materials/domain"
)

// ErrNotGuiding says that the core guides nothing: its index is not above that of
// the cladding, or the mode group asked for lies beyond the last guided one.
var ErrNotGuiding = errors.New("not guiding")

// NA returns the numerical aperture sqrt(n1^2 - n2^2) of a core of index n1 in a
// cladding of index n2, both above 0 (exact; A. W. Snyder and J. D. Love, Optical
// Waveguide Theory, 1983, chapter 2; J. M. Senior, Optical Fiber Communications,
// eq. 2.8). It is a pure number and exceeds 1 where the contrast is high. A core
// index that is not above the cladding's gives an error that matches ErrNotGuiding.
func NA(core, cladding float64) (float64, error) {
	if err := guiding("numap.NA", core, cladding); err != nil {
		return 0, err
	}
	return leg(core, cladding), nil
}

// V returns the normalised frequency 2 pi a NA / wavelength of a core of radius a
// (m) at a vacuum wavelength (m), all above 0 (D. Gloge, Appl. Opt. 10, 2252
// (1971)). A step carries more than one mode where it exceeds StepSingleModeV.
func V(radius, na, wavelength float64) (float64, error) {
	const name = "numap.V"
	if err := positive3(name, "radius", radius, "m", "na", na, "", "wavelength", wavelength, "m"); err != nil {
		return 0, err
	}
	v := mulDiv(2*math.Pi, radius, na, wavelength)
	return v, domain.Result(name, "V", v)
}

// guiding refuses indices that are not finite and above 0, and a core that is not
// above its cladding.
func guiding(function string, core, cladding float64) error {
	if err := indices(function, core, cladding); err != nil {
		return err
	}
	if core > cladding {
		return nil
	}
	return &domain.Error{Func: function, Argument: "core", Value: core,
		Allowed: "above the index of the cladding", Kind: ErrNotGuiding}
}

func indices(function string, core, cladding float64) error {
	if err := domain.Positive(function, "core", core, ""); err != nil {
		return err
	}
	return domain.Positive(function, "cladding", cladding, "")
}
