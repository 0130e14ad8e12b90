// Package root finds the zero of a function of one variable inside a bracket.
// It serves the inverse questions of the other packages, where a sign change is
// known and derivatives of the unknown are not at hand.
package root

import (
	"errors"
	"math"
)

// ErrNoBracket says that the function has the same sign at both ends.
var ErrNoBracket = errors.New("no sign change between the ends of the interval")

// ErrNotFinite says that the function returned NaN inside the bracket.
var ErrNotFinite = errors.New("function value is not a number")

// maxSteps is far beyond need: bisection alone ends in 1,100 on float64.
const maxSteps = 2000

// Find returns a zero of f between a and b, whose images must differ in sign
// (or be zero). The result is within tolerance of a sign change of f, or as near
// as float64 allows when tolerance is 0. An error of f ends the search and is
// returned as it is. f is called about ten times for a smooth function.
//
// The method is inverse quadratic interpolation guarded by bisection, with the
// acceptance test of T. R. Chandrupatla, Adv. Eng. Softw. 28, 145 (1997).
func Find(f func(float64) (float64, error), a, b, tolerance float64) (float64, error) {
	fa, err := f(a)
	if err != nil {
		return 0, err
	}
	if fa == 0 {
		return a, nil
	}
	fb, err := f(b)
	if err != nil {
		return 0, err
	}
	if fb == 0 {
		return b, nil
	}
	if math.IsNaN(fa) || math.IsNaN(fb) {
		return 0, ErrNotFinite
	}
	if (fa > 0) == (fb > 0) {
		return 0, ErrNoBracket
	}
	// a is the newest point, b the other end of the bracket, c the point before.
	t := 0.5
	for range maxSteps {
		x := (1-t)*a + t*b // not a + t(b - a): the ends may span the whole range
		fx, err := f(x)
		if err != nil {
			return 0, err
		}
		if math.IsNaN(fx) {
			return 0, ErrNotFinite
		}
		c, fc := b, fb
		if (fx > 0) == (fa > 0) {
			c, fc = a, fa
		} else {
			b, fb = a, fa
		}
		a, fa = x, fx
		best, fbest := a, fa
		if math.Abs(fb) < math.Abs(fa) {
			best, fbest = b, fb
		}
		near := (2*epsilon*math.Abs(best) + tolerance/2) / math.Abs(b-a)
		if fbest == 0 || !(near <= 0.5) {
			return best, nil
		}
		xi := (a - b) / (c - b)
		phi := (fa - fb) / (fc - fb)
		t = 0.5
		if phi*phi < xi && (1-phi)*(1-phi) < 1-xi {
			t = fa/(fb-fa)*(fc/(fb-fc)) + (c-a)/(b-a)*(fa/(fc-fa))*(fb/(fc-fb))
		}
		if !(t >= near) { // also when t is NaN
			t = near
		}
		t = math.Min(t, 1-near)
	}
	return a, nil
}

const epsilon = 0x1p-53
