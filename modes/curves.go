package modes

import (
	"math"

	"glassthread/materials/taylor"
)

// logSeries returns b as a Taylor series in t = ln V. From Gloge's du/dV = (u/V)(1 -
// kappa) (Appl. Opt. 10, 2252, 1971, equation 13), with u^2 = V^2 (1 - b),
//
//	db/dt = 2 kappa (1 - b),   kappa = K_l^2/(K_{l-1} K_{l+1}),
//
// and the Riccati equation of K's ratio makes kappa's own derivatives arithmetic, so
// that each coefficient settles the next.
func (p LP) logSeries() taylor.Series {
	switch {
	case p.B == 0: // underflow: b and its derivatives are all below float64's range
		return taylor.Series{}
	case p.L == 0:
		return p.logSeries0()
	}
	return p.logSeriesChain()
}

// logSeries0 serves l = 0: with G = w K_1/K_0, kappa is q/G^2 and
//
//	dG/dt = (G^2 - q)(1 + u^2/G^2),   q = w^2,
//	du^2/dt = 2 u^2 (G^2 - q)/G^2.
func (p LP) logSeries0() taylor.Series {
	b := taylor.Series{p.B}
	var g, q, s, y, square, excess, rest, v2 taylor.Series
	v2[0] = p.V * p.V
	g[0] = decay(0, p.W)
	q[0] = p.W * p.W
	s[0] = p.U * p.U
	for k := 0; ; k++ {
		if k > 0 {
			v2[k] = v2[k-1] * 2 / float64(k) // V^2 e^(2t)
			q[k] = cauchy(&v2, &b, k)
		}
		if k == taylor.Order {
			return b
		}
		n := float64(k + 1)
		square[k] = cauchy(&g, &g, k)
		excess[k] = square[k] - q[k]
		quotient(&y, &s, &square, k)
		quotient(&rest, &excess, &square, k)
		b[k+1] = 2 / n * cauchy(&b, &y, k)
		s[k+1] = 2 / n * cauchy(&s, &rest, k)
		g[k+1] = (excess[k] + cauchy(&excess, &y, k)) / n
	}
}

// chainDepth is how many orders below l logSeriesChain starts.
const chainDepth = taylor.Order

// logSeriesChain serves l >= 1. It works with c_l = K_{l-1}/(w K_l), which stays
// finite at cut-off for l >= 2: kappa = 1/(c (q c + 2 l)), q = w^2, and
//
//	dc_l/dt = (q + u^2 kappa)(q c_l^2 + 2 (l - 1) c_l - 1)/q.
//
// The last bracket is all cancellation next to cut-off. But c_l = 1/(2(l-1) + q
// c_{l-1}), and each step up this chain multiplies what is wrong below by q; so the
// equation is used four orders below l, or at order 1, where nothing cancels.
func (p LP) logSeriesChain() taylor.Series {
	depth := 0
	if p.W < 2*float64(p.L) {
		depth = max(0, min(p.L-1, chainDepth)) // 0 also for an L below 0, which no mode has
	}
	first := p.L - depth
	var c [chainDepth + 1]taylor.Series // c[i] is of order first + i
	var q, kappa, rest, over, v2 taylor.Series
	b := taylor.Series{p.B}
	u := p.U / p.V
	less := taylor.Series{u * u} // 1 - b, which b has few digits of at large V
	v2[0] = p.V * p.V
	q[0] = p.W * p.W
	c[0][0] = decay(first, p.W) / q[0]
	for k := 0; ; k++ {
		if k > 0 {
			v2[k] = v2[k-1] * 2 / float64(k) // V^2 e^(2t)
			q[k] = cauchy(&v2, &b, k)
			// dq/dt = 2 (q + u^2 kappa) is known to order k - 1, and with it c[0].
			rest[k-1] = 2 * float64(first-1) * c[0][k-1]
			if k == 1 {
				rest[0]--
			}
			quotient(&over, &rest, &q, k-1)
			sum := 0.0
			for j := 0; j < k; j++ {
				sum += float64(j+1) / 2 * q[j+1] * (cauchy(&c[0], &c[0], k-1-j) + over[k-1-j])
			}
			c[0][k] = sum / float64(k)
		}
		if k == taylor.Order {
			return b
		}
		for i := 1; i <= depth; i++ {
			var d taylor.Series
			d[0] = 2 * float64(first+i-1)
			for j := 0; j <= k; j++ {
				d[j] += cauchy(&q, &c[i-1], j)
			}
			quotient(&c[i], &one, &d, k)
		}
		// 1/kappa
		var d taylor.Series
		top := &c[depth]
		for j := 0; j <= k; j++ {
			d[j] = 2 * float64(p.L) * top[j]
			for i := 0; i <= j; i++ {
				d[j] += cauchy(&q, top, i) * top[j-i]
			}
		}
		quotient(&kappa, &one, &d, k)
		b[k+1] = 2 / float64(k+1) * cauchy(&kappa, &less, k)
		less[k+1] = -b[k+1]
	}
}

var one = taylor.Series{1}

// quotient sets the k-th coefficient of s/t, those before it being set.
func quotient(q, s, t *taylor.Series, k int) {
	r := s[k]
	for j := 1; j <= k; j++ {
		r -= q[k-j] * t[j]
	}
	q[k] = r / t[0]
}

// cauchy returns the k-th coefficient of the product of two series.
func cauchy(a, b *taylor.Series, k int) float64 {
	sum := 0.0
	for j := 0; j <= k; j++ {
		sum += a[j] * b[k-j]
	}
	return sum
}

// Series returns b as a Taylor series in V about the mode's V, for a solved mode.
// From it follow the normalised curves of Gloge 1971, see GroupCurve and
// DispersionCurve. The derivatives lose digits where b does, see SolveLP; the k-th
// is good to about 1e-15 times w^k elsewhere.
func (p LP) Series() taylor.Series {
	if p.B == 0 { // underflow: so do the derivatives
		return taylor.Series{}
	}
	return p.logSeries().Compose(taylor.Variable(p.V).Log())
}

// GroupCurve returns d(V b)/dV, which enters the group index of a weakly guiding
// fibre with glasses that do not disperse, N = n2 + (n1 - n2) d(V b)/dV (Gloge 1971,
// equation 18). It is for a solved mode, like the other methods: made-up fields may give
// NaN.
func (p LP) GroupCurve() float64 {
	b := p.logSeries()
	return b[0] + b[1]
}

// DispersionCurve returns V d2(V b)/dV2, which enters the waveguide dispersion of a
// weakly guiding fibre (Gloge 1971, equation 22).
func (p LP) DispersionCurve() float64 {
	// With ' for d/dt: V d2(V b)/dV2 = b'' + b'.
	b := p.logSeries()
	return 2*b[2] + b[1]
}

// CorePower returns the share of the mode's power that travels in the core,
//
//	(d(V b)/dV + b)/2 = 1 - (u^2/V^2)(1 - kappa) = b + (u^2/V^2) kappa
//
// (Gloge 1971, equation 27).
func (p LP) CorePower() float64 {
	g := decay(p.L, p.W)
	if g == 0 {
		return 0
	}
	kappa := p.W / g * (p.W / (g + 2*float64(p.L)))
	u := p.U / p.V
	return math.Min(1, p.B+u*u*kappa)
}
