package modes

import (
	"math"

	"glassthread/modes/bessel"
)

// solve solves a guided mode, given the LP mode of its group at the same v.
func (e *vectorEquation) solve(v, delta float64, lp LP, cut vectorCut) Vector {
	p := Vector{Family: e.family, Nu: e.nu, M: lp.M, V: v, Delta: delta, U: lp.U, W: lp.W, B: lp.B}
	if e.family == TE || lp.B == 0 { // TE(0, m) is LP(1, m); 0 is an underflow
		return p
	}
	near := newLPNeighbourhood(e, lp)
	if y, ok := near.solve(); ok {
		p.setQ(near.q+y, near.s-y, y)
		return p
	}
	switch {
	case e.l == 0 && e.solveLog(&p, lp, cut):
	case cut.near:
		e.solveNear(&p, near, cut)
	default:
		e.solvePhase(&p, near)
	}
	return p
}

// lpNeighbourhood is the equation about the LP mode of the group, with the shift y of q
// as unknown: with x and G of the LP mode, whose sum is 0,
//
//	[x(s - y) - x] + [G(q + y) - G] + L(s - y, q + y) = 0,
//
// where the brackets are Taylor series by the Riccati equations, so that y has its
// relative accuracy however small it is. Where |x| exceeds u, near a pole of x, 1/x and
// 1/G stand in the brackets and -L/(G (G + L)) for L.
type lpNeighbourhood struct {
	e       *vectorEquation
	u, s, q float64 // of the LP mode
	x       float64
	at      outside
	inverse bool    // 1/x and 1/G
	first   float64 // y to first order
}

func newLPNeighbourhood(e *vectorEquation, lp LP) lpNeighbourhood {
	n := lpNeighbourhood{e: e, u: lp.U, s: lp.U * lp.U, q: lp.W * lp.W}
	n.at = e.outside(n.s, n.q)
	n.x = -n.at.decay
	n.inverse = n.at.decay > lp.U
	f, slope := n.lift(&n.at)
	if n.inverse {
		slope += (e.inside(n.s, n.x) - n.at.dDecay) / (n.x * n.x)
	} else {
		slope += n.at.dDecay - e.inside(n.s, n.x)
	}
	n.first = -f / slope
	return n
}

// lift returns the last term of the equation and its slope in y.
func (n *lpNeighbourhood) lift(o *outside) (value, slope float64) {
	d := o.dq - o.dDecay - o.ds
	if !n.inverse {
		return o.excess, d
	}
	value = -o.excess / (o.decay * o.value)
	whole := o.dq - o.ds
	return value, o.dDecay/(o.decay*o.decay) - whole/(o.value*o.value)
}

const (
	// shiftTerms is the most terms that the Taylor series in the shift may take.
	shiftTerms = 26
	// shiftTail is what the last of them may amount to, relative to the first.
	shiftTail = 1e-17
)

// solve returns y if it is small enough for the Taylor series.
func (n *lpNeighbourhood) solve() (y float64, ok bool) {
	h := -n.first                               // the series are in r = y/h
	if h >= 0 && h < 1e-25*math.Min(n.q, n.s) { // first order is all; it may underflow
		return n.first, true
	}
	if !(h > 0 && h < 0.4*n.q && h < 0.4*n.s) {
		return 0, false
	}
	c, last := n.series(h)
	y = n.first
	for pass := 0; pass < 20; pass++ {
		o := &n.at
		var moved outside
		if -y > 1e-17*math.Min(n.q, n.s) {
			moved = n.e.outside(n.s-y, n.q+y)
			o = &moved
		}
		r := y / h
		sum, slope := 0.0, 0.0
		for k := last; k >= 0; k-- {
			sum = sum*r + c[k]
			slope = slope*r + float64(k+1)*c[k]
		}
		lift, dLift := n.lift(o)
		step := (sum*r + lift) / (slope/h + dLift)
		y -= step
		if !(y < 0 && y > -1.3*h) {
			return 0, false
		}
		if math.Abs(step) < 1e-9*-y {
			tail := math.Abs(c[last])
			for range last {
				tail *= -y / h
			}
			return y, tail <= shiftTail*math.Abs(c[0])
		}
	}
	return 0, false
}

// series returns the coefficients of r, r^2, ... of the sum of the brackets, and the
// index of the last.
func (n *lpNeighbourhood) series(h float64) (c [shiftTerms]float64, last int) {
	// t and g are the coefficients of x and G, or of their inverses z: then
	//	s dz/ds = (s z^2 + 1 - 2l z)/2,  q dz/dq = (q z^2 - 1 - 2l z)/2.
	var t, g [shiftTerms + 1]float64
	l := float64(n.e.l)
	t[0] = n.x
	if n.inverse {
		t[0] = 1 / n.x
	}
	g[0] = -t[0]
	rs, rq := h/n.s, h/n.q
	t1, g1 := 0.0, 0.0 // coefficients of the squares one order down
	for k := 0; k < shiftTerms; k++ {
		var t2, g2 float64
		for j := 0; j <= k; j++ {
			t2 += t[j] * t[k-j]
			g2 += g[j] * g[k-j]
		}
		f := float64(k)
		var a, b float64
		if n.inverse {
			a = 2*l*t[k] - n.s*t2 + h*t1
			b = n.q*g2 + h*g1 - 2*l*g[k]
			if k == 0 {
				a--
				b--
			}
		} else {
			a, b = t2-2*l*t[k], g2+2*l*g[k]
			switch k { // s and q themselves
			case 0:
				a, b = a+n.s, b-n.q
			case 1:
				a, b = a-h, b-h
			}
		}
		t1, g1 = t2, g2
		t[k+1] = rs * (f*t[k] + a/2) / (f + 1)
		g[k+1] = rq * (b/2 - f*g[k]) / (f + 1)
		c[k] = t[k+1] + g[k+1]
		if k > 0 && math.Abs(t[k+1])+math.Abs(g[k+1]) < 0.01*shiftTail*math.Abs(c[0]) { // r may be above 1
			return c, k
		}
	}
	return c, shiftTerms - 1
}

// solveLog solves HE(1, m) for y = ln q if w is below 1 or so, since it falls
// exponentially towards cut-off: 1/x + 1/(G + L) is nearly linear in y there.
func (e *vectorEquation) solveLog(p *Vector, lp LP, cut vectorCut) bool {
	v := p.V
	if end, err := bessel.JZero(0, lp.M); err != nil || v >= end {
		return false
	}
	most := cut.above * (v + cut.u) // q where x is 0
	inverse := func(q float64) float64 {
		if cut.near {
			return 1 / fromCutoff(0, cut.u, 0, most-q)
		}
		return inverseX0(v, q)
	}
	// For small q, G = 1/(ln(2/w) - gamma) (DLMF 10.31.2) and 1 - e = 2 (1 - tau)/(2 - tau).
	left := 2 * e.rest / (2 - e.tau)
	y := 2 * (logTwoLessGamma + inverse(0)/left)
	q0 := lp.W * lp.W
	if y < -40 { // q no longer matters beside V^2
		q := math.Exp(y)
		p.setQ(q, 0, q-q0)
		if p.W = math.Exp(y / 2); q == 0 {
			p.B = (p.W / v) * (p.W / v)
		}
		return true
	}
	low, high := -60.0, math.Log(q0)
	if cut.near {
		high = math.Min(high, math.Log(most))
	}
	for pass := 0; ; pass++ {
		if !(y > low && y < high) {
			y = math.Max((low+high)/2, high-1)
			if y <= low {
				y = (low + high) / 2
			}
		}
		q := math.Exp(y)
		w := math.Sqrt(q)
		s := (v - w) * (v + w)
		ix := inverse(q)
		o := e.outside(s, q)
		f := ix + 1/o.value
		if f > 0 && ix < 0 { // ix above 0 is rounding at the upper end
			low = y
		} else {
			high = y
		}
		slope := q * (-(ix*ix+1/s)/2 - (o.dq-o.ds)/(o.value*o.value))
		step := f / slope
		y -= step
		if math.Abs(step) < 1e-9 || pass == maxVectorPasses {
			q = math.Exp(y)
			p.setQ(q, 0, q-q0)
			return true
		}
	}
}

// inverseX0 returns 1/x_0 = -J_0(u)/(u J_1(u)) at u^2 = v^2 - q, by the power series (DLMF
// 10.2.2) for small u, which keeps the relative accuracy.
func inverseX0(v, q float64) float64 {
	w := math.Sqrt(q)
	s := (v - w) * (v + w)
	if s > 2.6 {
		u := math.Sqrt(s)
		below, at, _ := bessel.JPair(0, u)
		return at / (u * below)
	}
	t := -s / 4
	j0, j1 := 1.0, 1.0
	for k := 11.0; k >= 1; k-- { // the first term left out is below 1e-18
		j0 = 1 + j0*t/(k*k)
		j1 = 1 + j1*t/(k*(k+1))
	}
	return -2 / s * (j0 / j1)
}

// solveNear solves a mode just above its cut-off for q, both sides of the equation
// less their values at cut-off.
func (e *vectorEquation) solveNear(p *Vector, n lpNeighbourhood, cut vectorCut) {
	v := p.V
	most := cut.above * (v + cut.u) // q where u is the cut-off
	c := -e.limit()
	low, high := 0.0, n.q
	q := n.q + n.first
	for pass := 0; ; pass++ {
		if !(q > low && q < high) {
			q = (low + high) / 2
		}
		w := math.Sqrt(q)
		s := (v - w) * (v + w)
		x := fromCutoff(e.l, cut.u, c, most-q)
		o := e.outside(s, q)
		f := x + e.rise(&o, s, q)
		if f < 0 {
			low = q
		} else {
			high = q
		}
		step := f / (o.dq - o.ds - e.inside(s, x+c))
		q -= step
		if math.Abs(step) < 1e-9*q || pass == maxVectorPasses {
			p.setQ(q, 0, q-n.q)
			return
		}
	}
}

// solvePhase solves for u by Newton's method on the phase atan(x/u) + atan((G + L)/u),
// which has no poles and is nearly linear in u.
func (e *vectorEquation) solvePhase(p *Vector, n lpNeighbourhood) {
	v, l := p.V, float64(e.l)
	u := p.U
	low, high := u, v
	// The LP mode gives the first step without a Bessel function.
	phase := math.Atan(n.x/u) + math.Atan(n.at.value/u)
	x := n.x
	slope := e.phaseSlope(u, x, &n.at)
	if step := phase / slope; u-step > low && u-step < high {
		u -= step
	} else {
		u = low + (high-low)*1e-3
	}
	if end, err := bessel.JZero(e.l, p.M); err == nil {
		high = math.Min(high, end)
	}
	for pass := 0; ; pass++ {
		if !(u > low && u < high) {
			u = (low + high) / 2
		}
		q := (v - u) * (v + u)
		o := e.outside(u*u, q)
		below, at, _ := bessel.JPair(e.l, u) // u exceeds l, see the zeros
		phase = math.Atan((u*below + o.value*at) / (u*at - o.value*below))
		if phase > 0 {
			low = u
		} else {
			high = u
		}
		// x may be infinite; only its ratio enters.
		inside := -1 + (2*l-1)*below*at/(u*(at*at+below*below))
		side := (2*u*u*(o.ds-o.dq) - o.value) / (u*u + o.value*o.value)
		step := phase / (inside + side)
		if math.Abs(step) < 1e-9 || pass == maxVectorPasses {
			// V - u is formed before u is rounded.
			rest := (v - u) + step
			q = rest * (v + (u - step))
			y := ((n.u - u) - (n.rounding(v) - step)) * (n.u + (u - step))
			p.setQ(q, 0, y)
			p.U = u - step
			return
		}
		u -= step
	}
}

// rounding returns u of the LP mode as rounded less its exact value.
func (n *lpNeighbourhood) rounding(v float64) float64 {
	l, u := float64(n.e.l), n.u
	q := (v - u) * (v + u)
	g, dg := decaySlope(n.e.l, q)
	below, at, _ := bessel.JPair(n.e.l, u)
	phase := math.Atan((u*below + g*at) / (u*at - g*below))
	inside := -1 + (2*l-1)*below*at/(u*(at*at+below*below))
	return phase / (inside - (2*u*u*dg+g)/(u*u+g*g))
}

// phaseSlope is the slope of solvePhase's phase in u.
func (e *vectorEquation) phaseSlope(u, x float64, o *outside) float64 {
	return -1 + (2*float64(e.l)-1)*x/(u*u+x*x) +
		(2*u*u*(o.ds-o.dq)-o.value)/(u*u+o.value*o.value)
}
