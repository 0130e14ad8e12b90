package modes

import (
	"math"
	"strconv"

	"glassthread/modes/bessel"
)

func formatV(v float64) string { return strconv.FormatFloat(v, 'g', 10, 64) }

// The eigenvalue equation is x(u) + G(w) = 0 with
//
//	x = u J_{l-1}(u)/J_l(u),   G = w K_{l-1}(w)/K_l(w),
//
// and in terms of s = u^2 and q = w^2 the Riccati equations of x and G read
//
//	dx/ds = -(1 + x (x - 2l)/s)/2,   dG/dq = (G (G + 2l)/q - 1)/2.
//
// x falls from 0 at the cut-off zero to minus infinity at j_{l,m}, G is positive
// and rises with w, so that there is one root between, whatever the method.

const (
	// nearCutoff is the distance from cut-off in V within which w^2, not u, is the
	// unknown: u would leave w^2 = V^2 - u^2 too few digits.
	nearCutoff = 0.1
	// tinyW2 is ln w^2 below which w^2 no longer matters beside V^2.
	tinyW2    = -40
	maxPasses = 60
	// lastStep3 and lastStep4 end an iteration of third or fourth order in u: the error
	// left is of the order of that power of the step, both in units of V - u where that
	// is below 1.
	lastStep3 = 4e-6
	lastStep4 = 1e-4
	// largeOrder is the order from which solveLarge beats the recurrences.
	largeOrder = 8
)

// logTwoLessGamma is ln 2 - gamma: 1/G = ln(2/w) - gamma + O(w^2) for l = 0, since
// K_0 is that and w K_1 is 1 (DLMF 10.31.2, 10.30.2).
const logTwoLessGamma = math.Ln2 - 0.57721566490153286060651209008240243

// solveLP solves a guided mode: cut is the float64 nearest its cut-off, above the
// distance of v from the cut-off, end the zero j_{l,m}.
func solveLP(v float64, l, m int, cut, above, end float64) LP {
	p := LP{L: l, M: m, V: v}
	switch {
	case cut == 0 && v >= lp01From && v < lp01To:
		p.solveFit()
	case cut == 0 && v < lp01From:
		p.solveTiny()
	case cut > 0 && above < nearCutoff && l == 0:
		p.solveNearCutoff0(cut, above)
	case cut > 0 && above < nearCutoff:
		p.solveNearCutoff(cut, above)
	default:
		if u, ok := p.tableU(cut, end); ok {
			p.solveDirect(u, cut, end)
		} else if u := p.guessU(cut); !p.solveLarge(u) {
			p.solveDirect(u, cut, end)
		}
	}
	return p
}

// setW completes the mode from w.
func (p *LP) setW(w float64) {
	p.W = w
	p.U = math.Sqrt((p.V - w) * (p.V + w))
	p.B = (w / p.V) * (w / p.V)
}

// solveDirect solves for u between cut and end by steps of fourth order on the phase
//
//	atan(x/u) + atan(G/u) = atan((u J_{l-1} + G J_l)/(u J_l - G J_{l-1})),
//
// which has no poles and is nearly linear in u, from a trial u.
func (p *LP) solveDirect(u, cut, end float64) {
	low, high := cut, math.Min(end, p.V)
	if !(u > low && u < high) {
		u = (low + high) / 2
	}
	for pass := 0; ; pass++ {
		phase, step := p.phaseStep(u)
		if phase > 0 {
			low = u
		} else {
			high = u
		}
		if math.Abs(step) < lastStep4*math.Min(1, p.V-u) || pass == maxPasses {
			p.setU(u, step)
			return
		}
		u -= step
		if !(u > low && u < high) {
			u = (low + high) / 2
		}
	}
}

// solveLarge solves for u from a trial u by Debye's expansions, see bessel.JPhase: with
// x = l + rho - s tan(theta) the equation is
//
//	theta - (m - 1) pi = atan((rho + l + G)/s),
//
// whose branch is that of the label, whatever the trial u. It reports false where the
// expansions do not reach, or the trial u is too far off; then p is as before.
func (p *LP) solveLarge(u float64) bool {
	if p.L < largeOrder {
		return false
	}
	v, l := p.V, float64(p.L)
	for range 8 {
		if !(u < v) {
			return false
		}
		theta, s, rho, ok := bessel.JPhase(p.L, u, p.M-1)
		if !ok {
			return false
		}
		q := (v - u) * (v + u)
		g := decay(p.L, math.Sqrt(q))
		// Derivatives with respect to ln u: ds = -2 rho s, and rho's from the Riccati
		// equation.
		a := (rho + l + g) / s
		over := 1 / (1 + a*a)
		u2 := u * u
		pq := g * (g + 2*l) / q
		g1 := u2 * (1 - pq)
		g2 := g1 + u2*(1-pq) - 2*u2/q*((g+l)*g1+u2*pq)
		rho1 := s*s - (u-l)*(u+l) - rho*rho
		rho2 := -4*rho*s*s - 2*u2 - 2*rho*rho1
		a1 := (rho1+g1)/s + 2*rho*a
		a2 := (rho2+g2+2*rho*(rho1+g1))/s + 2*(rho1*a+rho*a1)
		f := theta - math.Atan(a)
		f1 := s - a1*over
		f2 := -2*rho*s - (a2-2*a*a1*a1*over)*over
		h := f / f1
		h /= 1 - h*f2/(2*f1)
		step := u * h * (1 - h/2) // u (1 - e^-h)
		if math.Abs(step) < lastStep3*math.Min(1, v-u) {
			p.setU(u, step)
			return true
		}
		u -= step
	}
	return false
}

// setU completes the mode from a trial u and the last step; V - u is formed before u
// is rounded.
func (p *LP) setU(u, step float64) {
	v := p.V
	rest := (v - u) + step
	p.U = u - step
	p.W = math.Sqrt(rest * (v + p.U))
	p.B = (rest / v) * ((v + p.U) / v)
}

// phaseStep returns the phase at u, which falls with u and vanishes at the root, and
// Halley's step towards it.
func (p *LP) phaseStep(u float64) (phase, step float64) {
	l := float64(p.L)
	q := (p.V - u) * (p.V + u)
	g := decay(p.L, math.Sqrt(q))
	below, at, _ := bessel.JPair(p.L, u) // u exceeds l, see the zeros
	phase = math.Atan((u*below + g*at) / (u*at - g*below))
	iu, iq := 1/u, 1/q
	// The angle whose tangent is x/u = J_{l-1}/J_l: a' = -1 + (l - 1/2) sin(2a)/u.
	r := iu / (at*at + below*below)
	sine := (2*l - 1) * at * below * r
	cosine := (2*l - 1) * (at - below) * (at + below) * r
	a1 := -1 + sine
	a2 := cosine*a1 - sine*iu
	a3 := 2*iu*(sine*iu-cosine*a1) - 4*sine*a1*a1 + cosine*a2
	// The angle whose tangent is G/u, with G' = u (1 - p), p = G (G + 2l)/q.
	p0 := g * (g + 2*l) * iq
	g1 := u * (1 - p0)
	p1 := 2 * iq * ((g+l)*g1 + u*p0)
	g2 := 1 - p0 - u*p1
	p2 := 2 * iq * (g1*g1 + (g+l)*g2 + p0 + 2*u*p1)
	g3 := -2*p1 - u*p2
	s := 1 / (u*u + g*g)
	s1, s2 := 2*(u+g*g1), 2*(1+g1*g1+g*g2) // derivatives of 1/s
	b1 := (g1*u - g) * s
	b2 := (g2*u - b1*s1) * s
	b3 := (g2 + g3*u - 2*b2*s1 - b1*s2) * s
	// Reversion of the series of the phase.
	inverse := 1 / (a1 + b1)
	h := phase * inverse
	c2 := (a2 + b2) * inverse / 2
	c3 := (a3 + b3) * inverse / 6
	return phase, h * (1 + h*(c2+h*(2*c2*c2-c3)))
}

// guessU returns u to a per cent or so: Gloge 1971, equation 16 for LP01 and
// equation 15 for the others, which is exact at cut-off.
func (p *LP) guessU(cut float64) float64 {
	v := p.V
	if cut == 0 {
		return (1 + math.Sqrt2) * v / (1 + math.Sqrt(math.Sqrt(4+v*v*v*v)))
	}
	l := float64(p.L)
	s2 := math.Max(cut*cut-l*l-1, 1)
	s := math.Sqrt(s2)
	// asin(s/cut) - asin(s/v) as the arcsine of d, that by Abramowitz and Stegun 4.4.45.
	d := s / (cut * v) * (math.Sqrt(v*v-s2) - math.Sqrt(cut*cut-s2))
	angle := math.Pi/2 - math.Sqrt(1-d)*(1.5707288+d*(-0.2121144+d*(0.0742610-d*0.0187293)))
	return cut * math.Exp(angle/s)
}

// tableU returns u to about 1e-4, from fits over xi = w0/(w0 + 1.6 sqrt(cut)), w0^2 = v^2 -
// cut^2, where there is a fit for the mode.
func (p *LP) tableU(cut, end float64) (u float64, ok bool) {
	if p.L >= trialOrders || p.M > trialStart[p.L+1]-trialStart[p.L] || p.V > trialMaxV {
		return 0, false
	}
	w := math.Sqrt((p.V - cut) * (p.V + cut))
	x := 2*w/(w+trialScale*math.Sqrt(cut)) - 1
	c := &trialFit[trialStart[p.L]+p.M-1]
	even, odd := c[trialTerms-2], c[trialTerms-1]
	x2 := float32(x * x)
	for k := trialTerms - 4; k >= 0; k -= 2 {
		even = even*x2 + c[k]
		odd = odd*x2 + c[k+1]
	}
	return cut + (end-cut)*(float64(even)+x*float64(odd)), true
}

// decay is bessel.Decay without its checks: w is in range by construction.
func decay(l int, w float64) float64 {
	g, _ := bessel.Decay(l, w)
	return g
}

// solveNearCutoff solves for q = w^2 when l >= 1 and v is just above the cut-off
// zero. x comes from its own expansion about the zero, so that x + G keeps its
// relative accuracy however small q is, and is nearly linear in q.
func (p *LP) solveNearCutoff(cut, above float64) {
	v, l := p.V, float64(p.L)
	most := above * (v + cut) // q where u is the cut-off zero
	low, high := 0.0, most
	// To first order x = -cut (above - q/2v) and G = q/(2(l-1)), or q ln(2/w) - gamma
	// for l = 1.
	var q float64
	if p.L == 1 {
		q = most / 2
		for range 4 {
			q = above * cut / (cut/(2*v) + math.Max(logTwoLessGamma-math.Log(q)/2, 0.3))
		}
	} else {
		q = above * cut / (cut/(2*v) + 0.5/(l-1))
	}
	for pass := 0; ; pass++ {
		if !(q > low && q < high) {
			q = (low + high) / 2
		}
		u := math.Sqrt((v + math.Sqrt(q)) * (v - math.Sqrt(q)))
		rest := q / (v + u)
		x := nearZero(p.L, cut, above-rest)
		g := decay(p.L, math.Sqrt(q))
		f := x + g
		if f < 0 {
			low = q
		} else {
			high = q
		}
		slope := (x*(x-2*l)/(u*u) + g*(g+2*l)/q) / 2
		step := f / slope
		q -= step
		if math.Abs(step) < 1e-9*q || pass == maxPasses {
			break
		}
	}
	p.setW(math.Sqrt(q))
}

// solveNearCutoff0 solves for y = ln w^2 when l = 0 and v is just above a cut-off
// zero: 1/x + 1/G is nearly linear in y, since 1/G is ln(2/w) - gamma for small w.
func (p *LP) solveNearCutoff0(cut, above float64) {
	v := p.V
	x := nearZero(0, cut, above)
	if y := 2 * (logTwoLessGamma + 1/x); y < tinyW2 {
		p.setW(math.Exp(y / 2))
		return
	}
	most := math.Log(above * (v + cut))
	low, high := float64(tinyW2)-1, most
	y := 2 * (logTwoLessGamma - 1/(cut*above) + 1/(2*cut*cut))
	if cut*above > 1.1 {
		y = 2 * math.Log(math.Max(math.Sqrt(2*cut*above)-1, 0.05))
	}
	for pass := 0; ; pass++ {
		if !(y > low && y < high) {
			y = (low + high) / 2
		}
		q := math.Exp(y)
		w := math.Sqrt(q)
		u := math.Sqrt((v + w) * (v - w))
		rest := q / (v + u)
		x := nearZero(0, cut, above-rest)
		g := decay(0, w)
		f := 1/x + 1/g
		if f > 0 && x < 0 { // falls with y; x >= 0 is rounding at the upper end
			low = y
		} else {
			high = y
		}
		dx := -(1 + x*x/(u*u)) / 2
		slope := q*dx/(x*x) - (g*g-q)/(2*g*g)
		step := f / slope
		y -= step
		if math.Abs(step) < 1e-9 || pass == maxPasses {
			p.setW(math.Exp(y / 2))
			return
		}
	}
}

// nearZero returns x = u J_{l-1}(u)/J_l(u) at u = cut + d, d small, where J_{l-1}
// vanishes at cut: J_{l-1} from its Taylor series about cut, scaled to slope 1,
// whose terms follow from Bessel's equation, and J_l = (l-1) J_{l-1}/u - J_{l-1}'
// (DLMF 10.6.2). Near d = 0 the result has the relative accuracy of d.
func nearZero(l int, cut, d float64) float64 {
	nu := float64(l - 1)
	a2 := cut * cut
	c := (cut - nu) * (cut + nu)
	// Terms are kept multiplied by powers of d: t[n] = coefficient d^n.
	t0, t1 := 0.0, d
	tm1, tm2 := 0.0, 0.0
	f, df := d, 1.0 // f and its derivative
	d2 := d * d
	for n := 0; n < 200; n++ {
		k := float64(n)
		next := -(cut*(k+1)*(2*k+1)*d*t1 + (k*k+c)*d2*t0 + 2*cut*d2*d*tm1 + d2*d2*tm2) /
			(a2 * (k + 2) * (k + 1))
		f += next
		slope := (k + 2) * next / d
		df += slope
		if math.Abs(slope) < 1e-18 && math.Abs(t1*(k+1)/d) < 1e-18 {
			break
		}
		tm2, tm1, t0, t1 = tm1, t0, t1, next
	}
	u := cut + d
	if d == 0 {
		return 0
	}
	return u * f / (nu*f/u - df)
}

// solveTiny solves LP01 below the range of the fits, where w is below 5e-4. With L = ln(2/w)
// - gamma and t = w^2/4, from the power series of K_0 and w K_1 (DLMF 10.31.1, 10.31.2),
//
//	1/G = L + (L (t + t^2/4) + t + 3 t^2/8 + 2 t L k)/(1 - 2 t k) + O(t^3 L^3),
//	k = L (1 + t/2) + 1/2 + 5 t/8,
//
// and -1/x = 2/s - lessPole(s), s = v^2 - w^2, so that w = exp(-2/v^2) times a factor near
// 1, which a few passes settle. ln w is never rounded as one number.
func (p *LP) solveTiny() {
	v := p.V
	if v < 0.05 { // w is below the smallest float64
		p.U = v
		return
	}
	s := v * v
	r := 2 / s
	rest := (math.FMA(-r, s, 2) - r*math.FMA(v, v, -s)) / s // 2/v^2 is r + rest
	front := math.Exp(-r)
	w := 0.0
	for range 4 {
		q := w * w
		less := r * (q / s) / (1 - q/s) // 2/(v^2 - q) - 2/v^2
		h := 0.0
		if q > 0 {
			t, log := q/4, logTwoLessGamma-math.Log(w)
			k := log*(1+t/2) + 0.5 + 0.625*t
			h = t * (log*(1+t/4) + 1 + 0.375*t + 2*log*k) / (1 - 2*t*k)
		}
		w = front * math.Exp(logTwoLessGamma+lessPole(s-q)-rest-less+h)
	}
	p.setW(w)
}

// lessPole returns 2/s - J_0(u)/(u J_1(u)), s = u^2 <= 0.25. The coefficients are
// those of the quotient of the two power series: sum over the zeros of J_1 of
// 2/j^(2k+2), which shrink like 1/14.68^k (Rayleigh sums; DLMF 10.21.57 and G. N.
// Watson, Theory of Bessel Functions, section 15.51).
func lessPole(s float64) float64 {
	sum := 0.0
	for k := len(rayleigh) - 1; k >= 0; k-- {
		sum = sum*s + rayleigh[k]
	}
	return sum
}

// rayleigh holds the coefficients of lessPole; at s = 0.25 the first left out is below
// 1e-18.
var rayleigh = [10]float64{
	0.25,
	0.010416666666666666667,
	0.00065104166666666666667,
	0.000043402777777777777778,
	2.9387297453703703704e-6,
	1.9981747581845238095e-7,
	1.3602894239745232584e-8,
	9.2636574115936321159e-10,
	6.3092678686041423626e-11,
	4.2972330457407514763e-12,
}
