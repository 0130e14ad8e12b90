package modes

import (
	"math"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// BLP01 returns b of LP01 alone, for v from 0.5 up to, not including, 32: a fast form of
// SolveLP(v, 0, 1).B with a relative error below 1e-15, from piecewise fits made at 40
// digits.
func BLP01(v float64) (float64, error) {
	if err := checkLP01("modes.BLP01", v); err != nil {
		return 0, err
	}
	c, s, _ := lp01Piece(v)
	t := c[lp01Terms-1]
	for k := lp01Terms - 2; k >= 0; k-- {
		t = t*s + c[k]
	}
	if v < lp01Turn {
		return (t / v) * (t / v), nil
	}
	return (v - t) * (v + t) / (v * v), nil
}

// BLP01Series returns b of LP01 as a Taylor series in v, for v from 0.5 up to, not
// including, 32: a fast form of LP.Series, by differentiating the fits. The derivatives 1 to
// 4 have errors of at most 2e-15, 2e-14, 3e-13 and 1e-11 of their own size.
func BLP01Series(v float64) (taylor.Series, error) {
	if err := checkLP01("modes.BLP01Series", v); err != nil {
		return taylor.Series{}, err
	}
	c, s, scale := lp01Piece(v)
	// Horner's scheme for the value and four derivatives over k!.
	var t0, t1, t2, t3, t4 float64
	for k := lp01Terms - 1; k >= 0; k-- {
		t4 = t4*s + t3
		t3 = t3*s + t2
		t2 = t2*s + t1
		t1 = t1*s + t0
		t0 = t0*s + c[k]
	}
	// With v -> v (1 + d): t/v is y0 + y1 d + ..., b or 1 - b its square over (1 + d)^2.
	r := 1 / v
	x := scale * v
	x2 := x * x
	y0, y1, y2, y3, y4 := t0*r, t1*scale, t2*scale*x, t3*scale*x2, t4*scale*x2*x
	q0 := y0 * y0
	q1 := 2 * y0 * y1
	q2 := 2*y0*y2 + y1*y1
	q3 := 2 * (y0*y3 + y1*y2)
	q4 := 2*(y0*y4+y1*y3) + y2*y2
	sign := 1.0
	b0 := q0
	if v >= lp01Turn {
		sign = -1
		b0 = (1 - y0) * (1 + y0)
	}
	sign *= r
	r2 := sign * r
	r3 := r2 * r
	return taylor.Series{
		b0,
		(q1 - 2*q0) * sign,
		(q2 - 2*q1 + 3*q0) * r2,
		(q3 - 2*q2 + 3*q1 - 4*q0) * r3,
		(q4 - 2*q3 + 3*q2 - 4*q1 + 5*q0) * (r3 * r),
	}, nil
}

// lp01Turn is the v below which the fits hold w, and from which they hold u.
const lp01Turn = 2

func checkLP01(function string, v float64) error {
	if v >= lp01From && v < lp01To {
		return nil
	}
	return &domain.Error{Func: function, Argument: "v", Value: v, Allowed: "from 0.5 and below 32; SolveLP takes any"}
}

// lp01Piece returns the coefficients of the piece of v, its variable s from -1 to 1, and
// ds/dv.
func lp01Piece(v float64) (c *[lp01Terms]float64, s, scale float64) {
	bits := math.Float64bits(v)
	octave := int(bits>>52) - 1022 // 0 from 0.5
	i := int(bits >> 48 & 15)
	scale = 32 / math.Float64frombits(bits>>52<<52) // over the octave's start, exact
	start := math.Float64frombits(bits >> 48 << 48)
	return &lp01Fit[octave*lp01Pieces+i], (v-start)*scale - 1, scale
}

// solveFit solves LP01 for v in the range of the fits.
func (p *LP) solveFit() {
	v := p.V
	c, s, _ := lp01Piece(v)
	t := c[lp01Terms-1]
	for k := lp01Terms - 2; k >= 0; k-- {
		t = t*s + c[k]
	}
	if v < lp01Turn {
		p.setW(t)
		return
	}
	p.setU(t, 0)
}
