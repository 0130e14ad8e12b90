package modes

import (
	"math"

	"glassthread/modes/bessel"
)

// vectorCut is what a solution near cut-off needs to know; it is filled in only where V
// may be near.
type vectorCut struct {
	near  bool
	u     float64 // the float64 nearest the cut-off
	above float64 // distance of V from the exact cut-off
}

// guided tells whether V is above the m-th mode's cut-off, the LP mode of the group
// being guided.
func (e *vectorEquation) guided(v float64, lp LP) (cut vectorCut, guided bool, err error) {
	moves := e.family == HE && e.l > 0 // the cut-off is above that of the LP mode
	// As q <= V^2 - V_c^2 <= 2 V (V - V_c) for the LP mode, it is far from its cut-off if q
	// is as large as this.
	far := lp.W*lp.W > 2*v*nearVectorCutoff
	if e.family == TE || e.l == 0 && lp.M == 1 || far && !moves {
		return cut, true, nil
	}
	end, err := bessel.JZero(e.l, lp.M)
	if err != nil || v >= end { // every cut-off is below j_{l,m}
		return cut, err == nil, err
	}
	high, low, err := e.cutoff(lp.M)
	if err != nil {
		return cut, false, err
	}
	cut.u, cut.above = high, (v-high)-low
	cut.near = cut.above < nearVectorCutoff && (cut.above < 0.5 || e.rest < 0.2)
	return cut, cut.above > 0, nil
}

// nearVectorCutoff is the distance from cut-off in V within which w^2, not u, is the
// unknown; at low contrast, where w rises faster, 0.5 does.
const nearVectorCutoff = 0.9

// cutoff returns the m-th cut-off as a sum of two float64.
func (e *vectorEquation) cutoff(m int) (high, low float64, err error) {
	if e.l == 0 {
		if m == 1 {
			return 0, 0, nil
		}
		return bessel.JZeroParts(1, m-1)
	}
	high, low, err = bessel.JZeroParts(e.l-1, m)
	if err != nil || e.family != HE {
		return high, low, err
	}
	end, err := bessel.JZero(e.l, m)
	if err != nil {
		return 0, 0, err
	}
	return e.cutoffHE(high, low, end)
}

// cutoffHE solves u J_{l-1}(u) + c J_l(u) = 0, c = l tau/(1 - tau), between the zeros of
// the two, by Newton's method on the phase atan(x/u) + atan(c/u), which falls with u.
func (e *vectorEquation) cutoffHE(start, startLow, end float64) (high, low float64, err error) {
	c, l := e.limit(), float64(e.l)
	// The first step needs no Bessel function: x is 0 there.
	first := math.Atan(c/start) / (1 + c/(start*start+c*c))
	if first < 1e-9 {
		high = start + first
		return high, (start - high) + (startLow + first), nil
	}
	from, to := start, end
	u := start + first
	for pass := 0; ; pass++ {
		if !(u > from && u < to) {
			u = (from + to) / 2
		}
		below, at, err := bessel.JPair(e.l, u)
		if err != nil {
			return 0, 0, err
		}
		phase := math.Atan((u*below + c*at) / (u*at - c*below))
		if phase > 0 {
			from = u
		} else {
			to = u
		}
		slope := -1 + (2*l-1)*below*at/(u*(at*at+below*below)) - c/(u*u+c*c)
		step := phase / slope
		if math.Abs(step) < 1e-9 || pass == maxVectorPasses {
			high = u - step
			return high, (u - high) - step, nil
		}
		u -= step
	}
}

const maxVectorPasses = 80

// fromCutoff returns x_l less its value c at the point u_c at a distance t in s = u^2 from
// there. With N = u J_{l-1} - c J_l and Y = J_l it is N/Y, and
//
//	2s dN/ds = (l - c) N - (s + c^2 - 2 l c) Y,   2s dY/ds = N - (l - c) Y
//
// (DLMF 10.6.2) give the Taylor coefficients of both, N beginning with 0: the result
// has the relative accuracy of t.
func fromCutoff(order int, uc, c, t float64) float64 {
	l := float64(order)
	sc := uc * uc
	r := t / sc // below 1, the singular point being s = 0
	a, b := l-c, sc+c*(c-2*l)
	n, y := 0.0, 1.0 // terms
	sumN, sumY := 0.0, 1.0
	before := 0.0 // the term of Y one order down
	for k := 0; k < 400; k++ {
		f := float64(k)
		nextN := ((a-2*f)*n*r - b*y*r - before*r*t) / (2 * (f + 1))
		nextY := (n*r - (a+2*f)*y*r) / (2 * (f + 1))
		before, n, y = y, nextN, nextY
		sumN += n
		sumY += y
		if math.Abs(n) <= 1e-18*math.Abs(sumN) && math.Abs(y) < 1e-18 {
			break
		}
	}
	return sumN / sumY
}
