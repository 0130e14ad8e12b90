package bessel

import "math"

// zero is a number as the unevaluated sum of a float64 and a small rest.
type zero struct{ high, low float64 }

// Where the expansions of debye.go are used: their error falls with the main phase R - l
// acos(l/x) of J, and with R for K, and is below 1e-16 from here on (measured against
// mpmath; it depends on little else).
const (
	phaseFew  = 100 // terms to k = 9
	phaseMore = 36  // terms to k = 13
	phaseMost = 25  // terms to k = 17
	radiusFew = 100 // for K, terms to k = 9
	radiusMin = 40  // for K, terms to k = 13
)

// JPhase writes J_l = M cos(theta), x dJ_l/dx = J_l (rho - s tan(theta)) for x above l,
// with s = x dtheta/dx and rho = x M'/M. It returns theta - n pi, s and rho, at a cost
// that does not grow with l or x: theta from Debye's expansion (DLMF 10.19.6),
//
//	theta = R - l acos(l/x) - pi/4 - ...,   R^2 = x^2 - l^2,
//
// whose main part is formed in doubled precision, so that the result has an absolute
// error of about 2e-16 however large theta is. The error of s and rho is of the order of
// 1e-16 s. ok is false where the expansion does not reach that, for a main phase below
// 25 (the first eight zeros of J_l), and for l or x out of range.
func JPhase(l int, x float64, n int) (theta, s, rho float64, ok bool) {
	if l < 0 || l > MaxOrder || !(x > float64(l)) || x > MaxArgument || n < 0 || n > MaxOrder {
		return 0, 0, 0, false
	}
	nu := float64(l)
	// R^2 and R as sums of two.
	square := x * x
	low := math.FMA(x, x, -square)
	r2 := square - nu*nu // nu*nu is exact
	low += (square - r2) - nu*nu
	if !(r2 >= phaseMost*phaseMost) { // the main phase is below R
		return 0, 0, 0, false
	}
	r := math.Sqrt(r2 + low)
	rest := (math.FMA(-r, r, r2) + low) / (2 * r)
	// acos(l/x) = atan(R/l) = table entry + d, tan(d) = top/bottom.
	j := math.Round(angleSteps * r / (r + nu))
	k := angleSteps - j
	rk := r * k
	top := rk - nu*j
	topLow := math.FMA(r, k, -rk) + rest*k + ((rk - top) - nu*j)
	rj := r * j
	bottom := nu*k + rj
	bottomLow := math.FMA(r, j, -rj) + rest*j + ((nu*k - bottom) + rj)
	if nu*k < rj {
		bottomLow = math.FMA(r, j, -rj) + rest*j + ((rj - bottom) + nu*k)
	}
	d := top / bottom
	dLow := (math.FMA(-d, bottom, top) + topLow - d*bottomLow) / bottom
	d2 := d * d
	dLow -= d * d2 * (1./3 - d2*(1./5-d2/7))
	a := angleTable[int(j)]
	// main = R - l (a + d), less n pi.
	la := nu * a.high
	laLow := math.FMA(nu, a.high, -la) + nu*(a.low+dLow)
	ld := nu * d
	laLow += math.FMA(nu, d, -ld)
	np := float64(n) * math.Pi
	npLow := math.FMA(float64(n), math.Pi, -np) + float64(n)*piLow
	sum, e := r-la, 0.0
	e += twoDiffError(r, la, sum)
	main := sum - ld
	e += twoDiffError(sum, ld, main)
	if main < phaseMost {
		return 0, 0, 0, false
	}
	theta = main - np
	e += twoDiffError(main, np, theta)
	theta += e + (rest - laLow - npLow)
	// The expansions, with R -> iR.
	z := -1 / r2
	ss := z * nu * nu
	var even, odd, phase float64
	switch {
	case main >= phaseFew:
		even, odd = debye9(ss, z)
		phase = phase9(ss, z)
	case main >= phaseMore:
		even, odd = debye13(ss, z)
		phase = phase13(ss, z)
	default:
		even, odd = debye17(ss, z)
		phase = phase17(ss, z)
	}
	theta -= r*phase + math.Pi/4
	return theta, r * (1 - (1-ss)*even), (1 - ss) * odd, true
}

// piLow is pi less its float64.
const piLow = 1.2246467991473531772e-16

// twoDiffError returns what a - b lost when it was rounded to d (Knuth, The Art of Computer
// Programming, vol. 2, section 4.2.2).
func twoDiffError(a, b, d float64) float64 {
	t := a - d
	return (a - (d + t)) + (t - b)
}

// decayLarge is decay for R = sqrt(l^2 + x^2) at least radiusMin:
//
//	G = R - l - sum over k >= 1 of R^(1-k) (1 - s) Q_k(s),   1 - s = x^2/R^2.
func decayLarge(l int, x, r2 float64) float64 {
	nu := float64(l)
	r := math.Sqrt(r2)
	z := 1 / r2
	s := nu * nu * z
	var even, odd float64
	if r >= radiusFew {
		even, odd = debye9(s, z)
	} else {
		even, odd = debye13(s, z)
	}
	return x * x * (1/(r+nu) - (r*even+odd)*z)
}
