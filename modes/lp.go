package modes

import (
	"math"
	"sort"

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
// 0.073) with U = v.
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

// GuidedLP returns every guided LP mode at a normalised frequency v above 0 and at
// most MaxListV, in falling B. None is missed: they are the pairs (l, m) whose
// cut-off, a zero of a Bessel function, lies below v. Each label stands once; see
// Degeneracy. Close to a cut-off the errors are those of SolveLP.
func GuidedLP(v float64) ([]LP, error) {
	if err := checkV("modes.GuidedLP", v, MaxListV); err != nil {
		return nil, err
	}
	list := make([]LP, 0, int(v*v/8+v)+2)
	// The zeros of J_l end the modes of order l and are the cut-offs of order l + 1.
	var cuts, ends []zeroParts
	ends = zerosBelow(0, v, ends)
	for l := 0; ; l++ {
		if l == 0 {
			cuts = append(append(cuts, zeroParts{}), zerosBelow(1, v, nil)...)
		} else {
			cuts, ends = ends, cuts
			ends = zerosBelow(l, v, ends[:0])
		}
		guided := 0
		for i, c := range cuts {
			above := (v - c.high) - c.low
			if above <= 0 {
				break
			}
			list = append(list, solveLP(v, l, i+1, c.high, above, ends[i].high))
			guided++
		}
		if guided == 0 {
			break
		}
		if l == 0 { // the zeros of J_0, not of J_1, are the cut-offs of l = 1
			cuts = cuts[:0]
		}
	}
	sort.Slice(list, func(i, j int) bool {
		a, b := &list[i], &list[j]
		if a.B != b.B {
			return a.B > b.B
		}
		return a.L < b.L || a.L == b.L && a.M < b.M
	})
	return list, nil
}

type zeroParts struct{ high, low float64 }

// zerosBelow appends the zeros of J_l up to v, and the next beyond.
func zerosBelow(l int, v float64, list []zeroParts) []zeroParts {
	for m := 1; ; m++ {
		high, low, err := bessel.JZeroParts(l, m)
		if err != nil { // out of range only far beyond MaxListV
			return list
		}
		list = append(list, zeroParts{high, low})
		if high > v {
			return list
		}
	}
}
