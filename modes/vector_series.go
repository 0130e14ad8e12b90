package modes

import (
	"math"

	"glassthread/materials/taylor"
	"glassthread/modes/bessel"
)

// wave holds what a fibre's eigenvalue equation depends on, as Taylor series in the
// wavelength.
type wave struct {
	v2        taylor.Series // V^2
	tau, rest taylor.Series // 1 - n2^2/n1^2, n2^2/n1^2
}

// series returns the smaller of s = u^2 and q = w^2 as a series, given both values of a
// solved mode: the larger, V^2 less the smaller, loses nothing. Each coefficient follows
// from the equation's residual with those before it (implicit function theorem).
func (e *vectorEquation) series(f *wave, s, q float64) (small taylor.Series, isS bool) {
	o := e.outside(s, q)
	dx := e.inside(s, -o.value)
	slope := o.dq - (o.ds + dx) // with s = V^2 - q
	isS = s < q
	if isS {
		slope = -slope
		return taylor.Implicit(s, slope, func(s taylor.Series) taylor.Series {
			larger := f.v2.Sub(s)
			larger[0] = q
			return e.residual(f, &o, s, larger)
		}), true
	}
	return taylor.Implicit(q, slope, func(q taylor.Series) taylor.Series {
		larger := f.v2.Sub(q)
		larger[0] = s
		return e.residual(f, &o, larger, q)
	}), false
}

// residual returns x_l + G + L, whose value is taken as 0.
func (e *vectorEquation) residual(f *wave, o *outside, s, q taylor.Series) taylor.Series {
	x := xSeries(e.l, -o.value, s)
	nu := float64(e.nu)
	switch e.family {
	case HE:
		g := decaySeries(e.l, q)
		h := g.Shift(2 * float64(e.l))
		nh := h.Scale(nu)
		d := f.v2.Quo(s)
		d[0] = 1 + q[0]/s[0]
		p := nh.Mul(d.Scale(2).Sub(f.tau)).Sub(f.tau.Mul(q))
		t := f.tau.Mul(nh).Mul(d)
		root := p.Square().Add(q.Mul(t).Scale(4)).Sqrt()
		var small taylor.Series
		if p[0] > 0 {
			small = t.Scale(2).Quo(p.Add(root))
		} else {
			small = root.Sub(p).Quo(q.Scale(2))
		}
		left := small.Neg()
		left[0] = o.left
		return x.Add(g).Add(h.Mul(small).Quo(left))
	case EH:
		below := decaySeries(e.nu, q)
		g := below.Shift(2 * nu).Inv()
		beta := below.Mul(g)
		ng := g.Scale(nu)
		d := f.v2.Quo(s)
		d[0] = 1 + q[0]/s[0]
		c := ng.Mul(d.Scale(2).Sub(f.tau))
		a := c.Sub(f.tau.Mul(beta))
		t := f.tau.Mul(ng).Mul(d)
		root := a.Square().Add(t.Mul(beta).Scale(4)).Sqrt()
		small := t.Scale(2).Quo(c.Add(f.tau).Add(root))
		left := small.Neg()
		left[0] = o.left
		return x.Add(q.Mul(g).Quo(left))
	}
	g := decaySeries(1, q)
	if e.family == TE {
		return x.Add(g)
	}
	return x.Add(g.Quo(f.rest))
}

// xSeries returns x_l as a series from its value and s = u^2, by ds/s times the Riccati
// equation s dx/ds = -(s + x^2 - 2l x)/2.
func xSeries(l int, value float64, s taylor.Series) taylor.Series {
	rate := s.Diff().Quo(s)
	x := taylor.Series{value}
	var r taylor.Series
	for k := 0; k < taylor.Order; k++ {
		r[k] = s[k] - 2*float64(l)*x[k]
		for j := 0; j <= k; j++ {
			r[k] += x[j] * x[k-j]
		}
		x[k+1] = -cauchy(&rate, &r, k) / float64(2*(k+1))
	}
	return x
}

// decaySeries returns G_l as a series from q = w^2, by dq/q times the Riccati equation q
// dG/dq = (G^2 + 2l G - q)/2; for small w from a few orders lower and G_l = q/(2 (l - 1) +
// G_{l-1}), since higher derivatives in q cancel there: each step multiplies what is
// wrong by q.
func decaySeries(l int, q taylor.Series) taylor.Series {
	w := math.Sqrt(q[0])
	first := l
	if w < 2*float64(l) {
		first = max(min(l, 1), l-taylor.Order)
	}
	value, _ := bessel.Decay(first, w)
	g := taylor.Series{value}
	rate := q.Diff().Quo(q)
	var r taylor.Series
	for k := 0; k < taylor.Order; k++ {
		r[k] = 2*float64(first)*g[k] - q[k]
		for j := 0; j <= k; j++ {
			r[k] += g[j] * g[k-j]
		}
		g[k+1] = cauchy(&rate, &r, k) / float64(2*(k+1))
	}
	for n := first; n < l; n++ {
		g = q.Quo(g.Shift(2 * float64(n)))
	}
	return g
}

// weights returns the partial derivatives of n_eff^2 with respect to n1^2 and n2^2 at
// fixed wavelength, by the equation's own partial derivatives: with n_eff^2 = n2^2 + q
// (n1^2 - n2^2)/V^2 and V^2 proportional to n1^2 - n2^2.
func (e *vectorEquation) weights(v, s, q float64) (core, cladding float64) {
	if q == 0 {
		return 0, 1
	}
	o := e.outside(s, q)
	inner := o.ds + e.inside(s, -o.value)
	slope := o.dq - inner
	byV2 := -inner / slope           // dq/dV^2
	byTau := -o.dtau / slope         // dq/dtau
	share := byTau * (e.tau / v / v) // tau n1^2 is n1^2 - n2^2
	return byV2 + share*e.rest, 1 - byV2 - share
}
