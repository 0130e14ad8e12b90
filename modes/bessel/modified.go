package bessel

import (
	"math"

	"glassthread/materials/domain"
)

// kSeries returns K_0(x) and x K_1(x) for 0 < x <= 1 from their power series (DLMF
// 10.31.1 and 10.31.2), with t = x^2/4 and h = ln(x/2) + gamma:
//
//	K_0   = -h sum t^k/k!^2 + sum H_k t^k/k!^2
//	x K_1 = 1 + 2 t (h sum t^k/(k!(k+1)!) - sum (H_k + H_{k+1})/2 t^k/(k!(k+1)!))
func kSeries(x float64) (k0, xk1 float64) {
	t := x * x / 4
	h := math.Log(x) + (eulerGamma - math.Ln2) // x/2 may be 0
	var i0, s0, i1, s1 float64
	for k := len(kSeriesTerms) - 1; k >= 0; k-- {
		c := &kSeriesTerms[k]
		i0 = i0*t + c[0]
		s0 = s0*t + c[1]
		i1 = i1*t + c[2]
		s1 = s1*t + c[3]
	}
	return s0 - h*i0, 1 + 2*t*(h*i1-s1)
}

// kSeriesTerms holds 1/k!^2, H_k/k!^2, 1/(k!(k+1)!) and (H_k + H_{k+1})/2 over
// k!(k+1)!, H_k being the harmonic numbers. At t = 1/4 the first term left out is
// below 1e-18.
var kSeriesTerms = [10][4]float64{
	{1, 0, 1, 1. / 2},
	{1, 1, 1. / 2, 5. / 8},
	{1. / 4, 3. / 8, 1. / 12, 5. / 36},
	{1. / 36, 11. / 216, 1. / 144, 47. / 3456},
	{1. / 576, 25. / 6912, 1. / 2880, 131. / 172800},
	{1. / 14400, 137. / 864000, 1. / 86400, 71. / 2592000},
	{1. / 518400, 49. / 10368000, 1. / 3628800, 353. / 508032000},
	{1. / 25401600, 121. / 1185408000, 1. / 203212800, 1487. / 113799168000},
	{1. / 1625702400, 761. / 455196672000, 1. / 14631321600, 6989. / 36870930432000},
	{1. / 131681894400, 7129. / 331838373888000, 1. / 1316818944000, 1451. / 663676747776000},
}

// kPiece returns the piece of the fits that x >= 1 lies in, and the variable s.
func kPiece(x float64) (piece int, s float64) {
	t := 1 / x
	switch {
	case t > 0.5:
		return 0, 4*t - 3
	case t > 0.25:
		return 1, 8*t - 3
	case t > 0.125:
		return 2, 16*t - 3
	}
	return 3, 16*t - 1
}

// polynomial sums even and odd powers apart, which halves the chain of operations.
func polynomial(c *[kTerms]float64, s float64) float64 {
	s2 := s * s
	even, odd := c[kTerms-2], c[kTerms-1]
	for k := kTerms - 4; k >= 0; k -= 2 {
		even = even*s2 + c[k]
		odd = odd*s2 + c[k+1]
	}
	return even + s*odd
}

// KRatio returns K_{l+1}(x)/K_l(x), which exceeds 1. Its relative error is of the
// order of 1e-15 or below. It fails where the ratio overflows, x below about
// 1e-308 l.
func KRatio(l int, x float64) (float64, error) {
	if err := check("bessel.KRatio", l, x); err != nil {
		return 0, err
	}
	r := kRatio(l, x)
	return r, domain.Result("bessel.KRatio", "ratio", r)
}

// kRatio is a sum of positive terms (DLMF 10.29.1).
func kRatio(l int, x float64) float64 { return (2*float64(l) + decay(l, x)) / x }

// Decay returns G = x K_{l-1}(x)/K_l(x) for l >= 0, with K_{-1} = K_1. It is how
// a field outside a core falls off: x K_l'(x)/K_l(x) = -l - G (DLMF 10.29.2). G
// is finite everywhere, tends to 0 with x (like x^2/(2(l - 1)) for l >= 2, like x^2
// ln(1/x) for l = 1, like 1/ln(1/x) for l = 0), and
//
//	d ln G / d ln x^2 = (G (G + 2l) - x^2)/(2 G).
//
// Its relative error is of the order of 1e-15 or below. An x of 0 is allowed and
// gives 0.
func Decay(l int, x float64) (float64, error) {
	if x == 0 && l >= 0 && l <= MaxOrder {
		return 0, nil
	}
	if err := check("bessel.Decay", l, x); err != nil {
		return 0, err
	}
	return decay(l, x), nil
}

func decay(l int, x float64) float64 {
	nu := float64(l)
	if r2 := nu*nu + x*x; r2 >= radiusFew*radiusFew || l >= directOrders && r2 >= radiusMin*radiusMin {
		return decayLarge(l, x, r2)
	}
	if x <= 1 {
		k0, xk1 := kSeries(x)
		if l == 0 {
			return xk1 / k0
		}
		// G of order 1, from G_0 G_1 = x^2, and up.
		x2 := x * x
		g := x2 * k0 / xk1
		for k := 1; k < l; k++ {
			g = x2 / (2*float64(k) + g)
		}
		return g
	}
	piece, s := kPiece(x)
	k0, k1 := 1.0, polynomial(&kRatioFit[piece], s)
	if l == 0 {
		return x * k1
	}
	// l is below radiusMin here, so that nothing overflows.
	two := 2 / x
	for k := 1; k < l; k++ {
		k0, k1 = k1, math.FMA(float64(k)*two, k1, k0)
	}
	return x * k0 / k1
}

// directOrders is the order from which the expansion for large R beats the recurrence.
const directOrders = 8

// KScaled returns e^x K_l(x). It fails where that overflows, x far below l.
// Its relative error is of the order of 1e-15, growing like the square root of l.
func KScaled(l int, x float64) (float64, error) {
	if err := check("bessel.KScaled", l, x); err != nil {
		return 0, err
	}
	k := kScaled(l, x)
	return k, domain.Result("bessel.KScaled", "value", k)
}

func kScaled(l int, x float64) float64 {
	var k0, k1 float64
	if x <= 1 {
		k0, k1 = kSeries(x)
		e := math.Exp(x)
		k0 *= e
		k1 *= e / x
	} else {
		piece, s := kPiece(x)
		k0 = math.Sqrt(math.Pi/(2*x)) * polynomial(&kScaledFit[piece], s)
		k1 = k0 * polynomial(&kRatioFit[piece], s)
	}
	if l == 0 {
		return k0
	}
	for k := 1; k < l; k++ {
		k0, k1 = k1, k0+2*float64(k)/x*k1
	}
	return k1
}

// IRatio returns I_{l+1}(x)/I_l(x), between 0 and 1, to a relative error of the
// order of 1e-15.
func IRatio(l int, x float64) (float64, error) {
	if err := check("bessel.IRatio", l, x); err != nil {
		return 0, err
	}
	return iRatio(l, x), nil
}

// iRatio evaluates the continued fraction DLMF 10.33.1, whose terms are all positive, from
// its tail: from index n to l an error shrinks by the product of the squares of
// I_{k+1}/I_k, about exp(-sum 2 asinh(k/x)), for the n below less than e^-40. For large
// R^2 = l^2 + x^2 it is the expansion of decayLarge with R -> -R.
func iRatio(l int, x float64) float64 {
	nu := float64(l)
	if r2 := nu*nu + x*x; r2 >= radiusMin*radiusMin {
		r := math.Sqrt(r2)
		z := 1 / r2
		even, odd := debye13(nu*nu*z, z)
		return x * (1/(r+nu) + (odd-r*even)*z)
	}
	r := 0.0
	for k := l + 16 + int(7*math.Sqrt(x)); k > l; k-- {
		r = 1 / (2*float64(k)/x + r)
	}
	return r
}

// IScaled returns e^-x I_l(x), from the Wronskian DLMF 10.28.2,
//
//	I_l K_{l+1} + I_{l+1} K_l = 1/x,
//
// to a relative error of the order of 1e-15, growing like the square root of l.
// It underflows to 0 for x far below l, where K overflows.
func IScaled(l int, x float64) (float64, error) {
	if err := check("bessel.IScaled", l, x); err != nil {
		return 0, err
	}
	return 1 / (kScaled(l, x) * (2*float64(l) + decay(l, x) + x*iRatio(l, x))), nil
}
