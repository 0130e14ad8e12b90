package modes

import (
	"math"

	"glassthread/materials/domain"
	"glassthread/modes/bessel"
)

// LP is one solved LP mode of a step-index fibre, in pure numbers.
type LP struct {
	L, M int     // azimuthal order, from 0; radial number, from 1
	V    float64 // normalised frequency
	U, W float64 // transverse parameters of core and cladding: U^2 + W^2 = V^2
	B    float64 // normalised effective index W^2/V^2, from 0 (cut-off) to 1
}

// Degeneracy returns how many modes share the label, counting polarisations and
// orientations: 2 for l = 0, 4 otherwise (Gloge 1971).
func (p LP) Degeneracy() int {
	if p.L == 0 {
		return 2
	}
	return 4
}

// CutoffV returns the V below which the mode LP(l, m) is not guided: j_{l-1,m}, or
// for l = 0 j_{1,m-1}, and 0 for LP01, which has no cut-off (Gloge 1971). The error
// is half a unit in the last place or little more. l is from 0, m from 1, both to
// bessel.MaxOrder.
func CutoffV(l, m int) (float64, error) {
	if err := checkLabel("modes.CutoffV", l, m); err != nil {
		return 0, err
	}
	high, _, err := cutoffParts(l, m)
	return high, err
}

func checkLabel(function string, l, m int) error {
	if l < 0 || l > bessel.MaxOrder {
		return &domain.Error{Func: function, Argument: "l", Value: float64(l), Allowed: "from 0 to 100000"}
	}
	if m < 1 || m > bessel.MaxOrder {
		return &domain.Error{Func: function, Argument: "m", Value: float64(m), Allowed: "from 1 to 100000"}
	}
	return nil
}

// cutoffParts returns the cut-off V as a sum of two float64.
func cutoffParts(l, m int) (high, low float64, err error) {
	switch {
	case l > 0:
		return bessel.JZeroParts(l-1, m)
	case m > 1:
		return bessel.JZeroParts(1, m-1)
	}
	return 0, 0, nil
}

// SolveLP returns the mode LP(l, m) at a normalised frequency v above 0 and at most
// MaxV. The error matches ErrCutoff when v is at or below the mode's cut-off.
//
// U has a relative error of an ulp or two, W and B of a few 1e-15 where they are well
// conditioned. Just above a cut-off V_c they are not: there W has a relative error
// of about 1e-16 (20 + l)/(v - V_c), and for l = 0 that over V_c (v - V_c) where that
// is below 1, since W then falls like exp(-1/(V_c (v - V_c))); the rounding of v itself
// does as much. LP01 is guided at any v, but W falls like exp(-2/v^2), so that a
// relative error of v grows by 4/v^2, and W underflows to 0 below v = 0.052 (B below
// 0.073) with U = v; so do those of LP(0, m) where V_c (v - V_c) is below about 1/700.
func SolveLP(v float64, l, m int) (LP, error) {
	const function = "modes.SolveLP"
	if err := checkLabel(function, l, m); err != nil {
		return LP{}, err
	}
	if err := checkV(function, v, MaxV); err != nil {
		return LP{}, err
	}
	if float64(l) > v+1 || float64(m-1) > v { // the zeros exceed l - 1 and m - 1
		return LP{}, cutoffError(function, v, l, m)
	}
	high, low, err := cutoffParts(l, m)
	if err != nil {
		return LP{}, err
	}
	above := (v - high) - low
	if above <= 0 {
		return LP{}, cutoffError(function, v, l, m)
	}
	end, err := bessel.JZero(l, m)
	if err != nil {
		return LP{}, err
	}
	return solveLP(v, l, m, high, above, end), nil
}

func checkV(function string, v, most float64) error {
	if v > 0 && v <= most {
		return nil
	}
	return domain.Within(function, "v", v, math.SmallestNonzeroFloat64, most, "")
}

func cutoffError(function string, v float64, l, m int) error {
	allowed := "above the cut-off of the mode"
	if c, err := CutoffV(l, m); err == nil {
		allowed += " " + formatV(c)
	}
	return &domain.Error{Func: function, Argument: "v", Value: v, Allowed: allowed, Kind: ErrCutoff}
}
