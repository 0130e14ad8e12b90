// Package bessel holds the Bessel functions of integer order that the modes of a
// round fibre are made of: ratios of neighbouring orders of J, K and I, the
// exponentially scaled K and I, and the zeros of J.
//
// A mode's eigenvalue equation needs ratios, not values. A ratio neither
// overflows nor underflows where both functions do, and its derivative is
// arithmetic (the Riccati equation): with j = J_{l+1}/J_l, k = K_{l+1}/K_l and
// i = I_{l+1}/I_l (from DLMF 10.6.2 and 10.29.2)
//
//	dj/dx = 1 + j^2 - (2l+1) j/x
//	dk/dx = k^2 - 1 - (2l+1) k/x
//	di/dx = 1 - i^2 - (2l+1) i/x.
//
// Orders run from 0 to MaxOrder and arguments from 0 (excluded) to MaxArgument. DLMF is
// the NIST Digital Library of Mathematical Functions, https://dlmf.nist.gov, chapter 10.
//
// # Errors and times
//
// Against tables of mpmath at 50 to 80 digits, arguments from 1e-8 to 1e5, in units in the
// last place (JRatio: the angle whose tangent the ratio is, in units of 2^-53, since next to
// a zero or pole a relative error means nothing), and the time of one call on one core of a
// small server, at x = 2l + 5 or m = 3 + l/4 with l the upper order:
//
//	function     orders      values  mean   worst  time (ns)
//	JRatio          0-10        575   0.71     8.1        38
//	JRatio         11-100       255   1.91    14.5       183
//	JRatio        101-1000      313   8.61   219.7       117
//	JRatio       1001-10000     255  47.69  1194.7       120
//	KRatio          0-10        275   0.41     1.9        24
//	KRatio         11-100       195   0.38     1.3        23
//	KRatio        101-1000      193   0.38     1.2        23
//	KRatio       1001-10000     195   0.33     1.3        23
//	KScaled         0-10        275   0.99     6.1        25
//	KScaled        11-100       187   2.48    29.9       184
//	KScaled       101-1000      107   4.88    19.8      2023
//	KScaled      1001-10000      16   9.21    20.9     20354
//	IScaled         0-10        275   1.22     5.9       313
//	IScaled        11-100       187   2.61    40.6       261
//	IScaled       101-1000      106   4.93    27.2      2081
//	IScaled      1001-10000      16  10.41    23.9     20644
//	JZero           0-10        160   0.22     0.5         6
//	JZero          11-100        96   0.25     0.5       295
//	JZero         101-1000       80   0.24     0.7       272
//	JZero        1001-10000      64   0.25     0.5       272
//	JPrimeZero      0-10        160   0.23     0.5       327
//	JPrimeZero     11-100        96   0.25     0.5       411
//	JPrimeZero    101-1000       80   0.26     0.5       363
//	JPrimeZero   1001-10000      64   0.27     0.8       272
//
// Made by
//
//	go test -run TestReport -report -v ./modes/bessel
//
// Weak corners: JRatio, J and JPair close above x = l at high order, where the recurrence
// takes l steps and its roundings add up to about 1e-16 (40 + l); KScaled and IScaled at high
// order, whose error and cost grow with l; the slopes of the ratios, KRatioSlope and
// IRatioSlope at x far above l, which lose digits like x^2, JRatioSlope and IRatioSlope at x
// below l, which lose them like 2l + 2.
package bessel

import (
	"math"

	"glassthread/materials/domain"
)

// MaxOrder is the highest order and the highest number of a zero accepted.
const MaxOrder = 100000

// MaxArgument is the largest argument accepted.
const MaxArgument = 1e6

// eulerGamma is Euler's constant (DLMF 5.2.3).
const eulerGamma = 0.57721566490153286060651209008240243

// check refuses an order or an argument out of range.
func check(function string, order int, x float64) error {
	if err := checkOrder(function, order); err != nil {
		return err
	}
	if x > 0 && x <= MaxArgument {
		return nil
	}
	return &domain.Error{Func: function, Argument: "x", Value: x, Allowed: "above 0 and at most 1e6"}
}

func checkOrder(function string, order int) error {
	if order >= 0 && order <= MaxOrder {
		return nil
	}
	return &domain.Error{Func: function, Argument: "l", Value: float64(order), Allowed: "from 0 to 100000"}
}

// J returns J_l(x). Its error is an absolute one, a few units of 1e-16 times the
// larger of |J_l(x)| and the amplitude sqrt(2/(pi x)) in the oscillating range;
// below the turning point x = l it is relative, growing like the square root of l. It
// underflows to 0 for x far below l.
func J(l int, x float64) (float64, error) {
	if err := check("bessel.J", l, x); err != nil {
		return 0, err
	}
	if x > float64(l) {
		_, j := jPair(l, x)
		return j, nil
	}
	return jBelow(l, x), nil
}

// jBelow returns J_l(x) for x <= l by recurrence towards lower orders, which is stable
// there (J. C. P. Miller's method, DLMF 3.6(ii)), with the scale from J_0 or J_1,
// whichever is larger: next to a zero of the one, where package math's Jn loses every
// digit, the other is near its extremum.
func jBelow(l int, x float64) float64 {
	if x < 0x1p-27 { // (x/2)^l/l!; the next term is below half a unit in the last place
		j := 1.0
		for k := 1; k <= l && j > 0; k++ {
			j *= x / (2 * float64(k))
		}
		return j
	}
	above, at := jFraction(l, x), 1.0
	exponent := 0
	for k := l; k > 0; k-- {
		above, at = at, 2*float64(k)/x*at-above
		if math.Abs(at) > 0x1p500 {
			above, at = above*0x1p-500, at*0x1p-500
			exponent -= 500
		}
	}
	j := math.J0(x) / at
	if math.Abs(above) > math.Abs(at) {
		j = math.J1(x) / above
	}
	return math.Ldexp(j, exponent)
}

// JPair returns J_{l-1}(x) and J_l(x), with J_{-1} = -J_1, for x above l. Their errors
// are absolute ones against the amplitude they share, of the order of 1e-16, growing
// like the square root of l. It costs one J_0, one J_1 and l steps of recurrence.
func JPair(l int, x float64) (below, at float64, err error) {
	if err := check("bessel.JPair", l, x); err != nil {
		return 0, 0, err
	}
	if !(x > float64(l)) {
		return 0, 0, &domain.Error{Func: "bessel.JPair", Argument: "x", Value: x, Allowed: "above l"}
	}
	below, at = jPair(l, x)
	return below, at, nil
}

// JRatio returns J_{l+1}(x)/J_l(x). Its relative error is of the order of 1e-15, for
// large orders up to 1e-16 (40 + l) where x is just above l; but next to a zero of
// either function it is the absolute error of x times the slope there that counts. It
// fails at a zero of J_l that a float64 hits, where the ratio is infinite.
func JRatio(l int, x float64) (float64, error) {
	if err := check("bessel.JRatio", l, x); err != nil {
		return 0, err
	}
	r := 0.0
	switch {
	case x <= float64(l):
		r = jFraction(l, x)
	case l >= longOrders && jPhaseRatio(l, x, &r):
	default:
		a, b := jPair(l+1, x)
		r = b / a
	}
	return r, domain.Result("bessel.JRatio", "ratio", r)
}

// longOrders is the order from which the expansion of the phase beats the recurrence.
const longOrders = 32

// jPhaseRatio sets the ratio from JPhase, and reports whether that reaches.
func jPhaseRatio(l int, x float64, r *float64) bool {
	theta, _, _, ok := JPhase(l, x, 0)
	if !ok {
		return false
	}
	theta, s, rho, ok := JPhase(l, x, int(math.Round(theta/math.Pi)))
	*r = (float64(l) - rho + s*math.Tan(theta)) / x
	return ok
}

// jFraction returns J_{l+1}/J_l for x <= l from the continued fraction DLMF
// 10.10.2 by the method of W. J. Lentz (Appl. Opt. 15, 668, 1976) as modified by I.
// J. Thompson and A. R. Barnett (J. Comput. Phys. 64, 490, 1986):
//
//	J_{l+1}/J_l = 1/(b_1 - 1/(b_2 - ...)),  b_k = 2(l + k)/x.
//
// Every b_k exceeds 2, so that no partial denominator vanishes.
func jFraction(l int, x float64) float64 {
	f := 2 * float64(l+1) / x
	if f > 0x1p30 { // the next term is below half a unit in the last place
		return 1 / f
	}
	c, d := f, 0.0
	for k := 2; k < 4*MaxOrder; k++ {
		b := 2 * float64(l+k) / x
		d = 1 / (b - d)
		c = b - 1/c
		step := c * d
		f *= step
		if math.Abs(step-1) < 0x1p-53 {
			break
		}
	}
	return 1 / f
}
