package modes

import (
	"math"

	"glassthread/modes/bessel"
)

// The exact eigenvalue equation of a step-index fibre (Snyder and Love 1983, table
// 12-4; K. Okamoto, Fundamentals of Optical Waveguides, section 3.3), with
//
//	jp = J'_nu(u)/(u J_nu(u)),  kp = K'_nu(w)/(w K_nu(w)),  D = 1/u^2 + 1/w^2,
//	tau = 1 - n2^2/n1^2,
//	(jp + kp)(jp + (1 - tau) kp) = nu^2 D (D - tau/w^2),
//
// is solved here in a form that leaves the LP mode of the group as a limit. Write s =
// u^2, q = w^2, and x_l = u J_{l-1}/J_l and G_l = w K_{l-1}/K_l of the group's order l, so
// that x_l + G_l = 0 is LP(l, m). Then every family obeys
//
//	x_l(s) + G_l(q) + L(s, q) = 0,   L >= 0,
//
// L being 0 for TE, tau G_1/(1 - tau) for TM, and for the hybrid modes a root of a
// quadratic, as follows.
//
// HE, l = nu - 1. jp = A - nu/s with A = J_{nu-1}/(u J_nu) = 1/(2l - x_l), kp = -B -
// nu/q with B = K_{nu-1}/(w K_nu) = 1/H, H = 2l + G_l. With E = A - B the equation is
//
//	E^2 - (2 nu D - tau (B + nu/q)) E - tau nu B D = 0,
//
// whose negative root is HE and whose positive one is EH. With E = -e B,
//
//	q e^2 + p e - T = 0,  p = nu H (2d - tau) - tau q,  T = tau nu H d,  d = 1 + q/s,
//	L = H e/(1 - e).
//
// EH, l = nu + 1. With F = J_{nu+1}/(u J_nu) + K_{nu+1}/(w K_nu) = f/G_l and g = G_l/q =
// 1/(2 nu + G_nu),
//
//	f^2 - p f + T = 0,  p = nu g (2d - tau) + tau,  T = tau nu g d,
//	L = G_l f/(1 - f),
//
// f being the smaller root. Its discriminant is that of the first quadratic but for a
// factor, and as such a sum of two terms that are never negative.
//
// Both 1 - e and 1 - f are positive, so that x_l is negative at a mode: u lies between
// the zeros j_{l-1,m} of J_{l-1} and j_{l,m} of J_l, where x_l falls from 0 to minus
// infinity. That interval is the label: no mode leaves it as V or tau changes, w above
// 0, and tau = 0 is the LP mode. Since L is not negative, w is below that of the LP mode.
//
// In each interval the equation gives one u for each w, from w = 0 at cut-off, and V
// rises with w up to MaxDelta (tested against every root of the determinant), so each
// label has one root, if V is above its cut-off.

// vectorEquation is the equation of one family and order.
type vectorEquation struct {
	family Family
	nu, l  int     // azimuthal order; that of the LP group
	tau    float64 // 1 - n2^2/n1^2
	rest   float64 // n2^2/n1^2, which tau has few digits of at high contrast
}

func newVectorEquation(family Family, nu int, delta float64) vectorEquation {
	return vectorEquation{family, nu, groupOrder(family, nu), 2 * delta, 1 - 2*delta}
}

// outside is G + L at a point, L, and the partial derivatives of G + L.
type outside struct {
	value, excess float64
	ds, dq, dtau  float64
	decay, dDecay float64 // G and dG/dq
	small, left   float64 // e or f, and 1 less that
}

// decaySlope returns G_l and dG_l/dq.
func decaySlope(l int, q float64) (g, dg float64) {
	g, _ = bessel.Decay(l, math.Sqrt(q))
	return g, (g*((g+2*float64(l))/q) - 1) / 2
}

// outside evaluates G + L at s and q > 0.
func (e *vectorEquation) outside(s, q float64) outside {
	nu, tau := float64(e.nu), e.tau
	d := 1 + q/s
	switch e.family {
	case HE:
		g, dg := decaySlope(e.l, q)
		h := 2*float64(e.l) + g
		nh := nu * h
		p := nh*(2*d-tau) - tau*q
		t := tau * nh * d
		root := math.Sqrt(p*p + 4*q*t)
		small := 2 * t / (p + root)
		if p < 0 {
			small = (root - p) / (2 * q)
		}
		left := 2 * (q*e.rest + nh*(2*e.rest+(2-tau)*q/s)) / (2*q + p + root)
		ratio := small / left
		f := h / (left * left) / root
		return outside{
			value: g + h*ratio, excess: h * ratio,
			ds:    f * (2*small - tau) * nh * (q / s) / s,
			dq:    dg*(1+ratio) + f*(tau*nu*(d*dg+h/s)-small*(small+nu*(2*d-tau)*dg+2*nh/s-tau)),
			dtau:  f * (small*(nh+q) + nh*d),
			decay: g, dDecay: dg, small: small, left: left,
		}
	case EH:
		below, dBelow := decaySlope(e.nu, q)
		g := 1 / (2*nu + below)
		dg := -g * g * dBelow
		beta := below * g
		a := nu*g*(2*d-tau) - tau*beta
		t := tau * nu * g * d
		root := math.Sqrt(a*a + 4*t*beta)
		p := nu*g*(2*d-tau) + tau
		small := 2 * t / (p + root)
		left := (2 - p + root) / 2
		if p > 2 {
			left = 2 * (nu*g*(2-tau)*q/s - e.rest*beta) / (p - 2 + root)
		}
		at := q * g
		f := at / (left * left) / root
		return outside{
			value: at / left, excess: at * small / left,
			ds:    f * (2*small - tau) * nu * g * (q / s) / s,
			dq:    (g+q*dg)/left + f*(tau*nu*(d*dg+g/s)-small*(nu*(2*d-tau)*dg+2*nu*g/s)),
			dtau:  f * (nu*g*d - small*(1-nu*g)),
			decay: at, dDecay: g + q*dg, small: small, left: left,
		}
	}
	g, dg := decaySlope(1, q)
	if e.family == TE {
		return outside{value: g, dq: dg, decay: g, dDecay: dg, left: 1}
	}
	return outside{
		value: g / e.rest, excess: tau / e.rest * g,
		dq: dg / e.rest, dtau: g / e.rest / e.rest,
		decay: g, dDecay: dg, small: tau, left: e.rest,
	}
}

// inside returns dx_l/ds from x_l, by the Riccati equation.
func (e *vectorEquation) inside(s, x float64) float64 {
	return -(1 + x/s*(x-2*float64(e.l))) / 2
}

// limit is L at q = 0 of HE modes of nu >= 2: there x_l = -limit, which is Snyder and
// Love's condition for their cut-off. It is 0 for all others.
func (e *vectorEquation) limit() float64 {
	if e.family == HE {
		return float64(e.l) * e.tau / e.rest
	}
	return 0
}

// rise returns G + L less its limit at q = 0, with its relative accuracy, from what
// outside returned.
func (e *vectorEquation) rise(o *outside, s, q float64) float64 {
	if e.family != HE || e.l == 0 {
		return o.value
	}
	l, nu, tau := float64(e.l), float64(e.nu), e.tau
	g := o.decay
	// e less its limit tau/(2 - tau), from the quadratic.
	nh := nu * (2*l + g)
	more := q * (tau*nh/s - o.small*(o.small+2*nh/s-tau)) / (nh * (2 - tau))
	limit := 2 * e.rest / (2 - tau) // of 1 - e
	return g*(1+o.small/o.left) + 2*l*more/(o.left*limit)
}
