package bessel

import "math"

// pair01 returns J_0(x) and J_1(x), whose errors are about 1e-16 of their amplitude.
func pair01(x float64) (j0, j1 float64) {
	switch {
	case x < jStart:
		return math.J0(x), math.J1(x)
	case x < jEnd:
		i := int(2*x) - 2*jStart
		s := 4*x - float64(2*i+4*jStart+1)
		a, b := &j0Fit[i], &j1Fit[i]
		j0, j1 = a[jTerms-1], b[jTerms-1]
		for k := jTerms - 2; k >= 0; k-- {
			j0 = j0*s + a[k]
			j1 = j1*s + b[k]
		}
		return j0, j1
	}
	// cos(x - pi/4) and sin(x - pi/4), times the root of 2, in which x - 3 pi/4 differs
	// by a quarter turn.
	r := 1 / x
	s := 512*r*r - 1
	sin, cos := math.Sincos(x)
	c, d := cos+sin, sin-cos
	p0, q0, p1, q1 := hankel0[0][8], hankel0[1][8], hankel1[0][8], hankel1[1][8]
	for k := 7; k >= 0; k-- {
		p0 = p0*s + hankel0[0][k]
		q0 = q0*s + hankel0[1][k]
		p1 = p1*s + hankel1[0][k]
		q1 = q1*s + hankel1[1][k]
	}
	a := math.Sqrt(r / math.Pi)
	return a * (p0*c - q0*r*d), a * (p1*d + q1*r*c)
}

// jPair returns J_{l-1}(x) and J_l(x) for x > l, by recurrence towards higher
// orders (DLMF 10.6.1), which is stable there. For l = 0 the first is -J_1. The
// coefficients 2 k/x are divided one by one: the rounding of 2/x would act in every
// step like the same error of x.
func jPair(l int, x float64) (below, at float64) {
	j0, j1 := pair01(x)
	if l == 0 {
		return -j1, j0
	}
	for k := 1; k < l; k++ {
		j0, j1 = j1, math.FMA(float64(2*k)/x, j1, -j0)
	}
	return j0, j1
}
