// Package modes finds the guided modes of optical fibres.
//
// A step-index fibre in the weakly guiding approximation (D. Gloge, Appl. Opt. 10,
// 2252, 1971; A. W. Snyder and J. D. Love, Optical Waveguide Theory, 1983, chapter
// 14) has the LP modes. With core radius a, core and cladding indices n1 and n2 and
// vacuum wavelength x,
//
//	V = (2 pi a / x) sqrt(n1^2 - n2^2),   u^2 + w^2 = V^2,
//	u J_{l-1}(u)/J_l(u) = -w K_{l-1}(w)/K_l(w),
//	b = w^2/V^2,   n_eff^2 = n2^2 + b (n1^2 - n2^2).
//
// LP modes are labelled LP(l, m) by the azimuthal order l >= 0 and the radial number
// m >= 1: u lies between the cut-off V_c = j_{l-1,m} (for l = 0: 0 for m = 1, else
// j_{1,m-1}) and j_{l,m}, j_{l,m} being the m-th positive zero of J_l.
//
// SolveLP works on pure numbers. Step takes glasses and a radius, and its LP method
// returns the mode as a materials.Medium whose index is the effective index, so
// that group index, dispersion and zero-dispersion wavelength come from the same
// functions that serve a glass.
//
// SolveVector and Step's Vector method do the same for the exact vector modes, TE, TM, HE
// and EH, of any index difference (Snyder and Love 1983, chapter 12), each with its
// distance from the LP mode that it belongs to.
package modes

import (
	"errors"

	"glassthread/modes/radial"
)

// ErrCutoff says that the mode asked for is not guided: V is at or below its
// cut-off, or the wavelength is at or beyond its cut-off wavelength.
var ErrCutoff = radial.ErrCutoff

// ErrNoCutoff says that a mode has no cut-off in the range searched.
var ErrNoCutoff = errors.New("no cut-off wavelength in the range")

// MaxV is the largest V that SolveLP accepts.
const MaxV = 1e5

// MaxListV is the largest V for which GuidedLP lists the modes; the list has about
// V^2/8 entries.
const MaxListV = 3000
