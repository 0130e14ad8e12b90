package taylor

import "math"

// Sqrt returns the square root of s. A value of zero has no derivatives there,
// and a negative one no real root: both give infinities or NaNs.
func (s Series) Sqrt() Series {
	var r Series
	r[0] = math.Sqrt(s[0])
	h := 1 / (2 * r[0])
	r[1] = s[1] * h
	r[2] = (s[2] - r[1]*r[1]) * h
	r[3] = (s[3] - 2*r[1]*r[2]) * h
	r[4] = (s[4] - 2*r[1]*r[3] - r[2]*r[2]) * h
	return r
}

// Exp returns e to the power s, from f' = s' f.
func (s Series) Exp() Series {
	f := Series{math.Exp(s[0])}
	for k := 1; k <= Order; k++ {
		sum := 0.0
		for j := 1; j <= k; j++ {
			sum += float64(j) * s[j] * f[k-j]
		}
		f[k] = sum / float64(k)
	}
	return f
}

// Log returns the natural logarithm of s, whose value must be above zero, from
// f' = s'/s.
func (s Series) Log() Series {
	f := Series{math.Log(s[0])}
	for k := 1; k <= Order; k++ {
		sum := float64(k) * s[k]
		for j := 1; j < k; j++ {
			sum -= float64(j) * f[j] * s[k-j]
		}
		f[k] = sum / (float64(k) * s[0])
	}
	return f
}

// Pow returns s to a constant power p, from s f' = p s' f. The value of s must
// not be zero, and must be above zero unless p is whole.
func (s Series) Pow(p float64) Series {
	f := Series{math.Pow(s[0], p)}
	for k := 1; k <= Order; k++ {
		sum := 0.0
		for j := 1; j <= k; j++ {
			sum += (p*float64(j) - float64(k-j)) * s[j] * f[k-j]
		}
		f[k] = sum / (float64(k) * s[0])
	}
	return f
}

// Compose returns f(g(x)), where f is the series of the outer function about
// the value of g. The value of g itself is not used: f[0] is already its image.
func (f Series) Compose(g Series) Series {
	g[0] = 0
	r := Constant(f[Order])
	for k := Order - 1; k >= 0; k-- {
		r = r.Mul(g).Shift(f[k])
	}
	return r
}

// Reverse returns the series of the inverse function x(y) about y = s[0], given
// s = y(x) about the point x (Lagrange inversion; Abramowitz and Stegun 1964,
// 3.6.25). The first derivative of s must not be zero.
func (s Series) Reverse(x float64) Series {
	r := 1 / s[1]
	a, b, c := s[2]*r, s[3]*r, s[4]*r
	return Series{
		x,
		r,
		-a * r * r,
		(2*a*a - b) * r * r * r,
		(5*a*b - c - 5*a*a*a) * r * r * r * r,
	}
}

// Implicit returns the series of y(x) that solves F(x, y) = 0, by the implicit
// function theorem. The caller has solved for the value y0 and knows slope, the
// partial derivative of F with respect to y there; residual returns the series
// F(x, y(x)) for a trial series y. Each call of residual settles one
// coefficient, so it is called Order times. The error of the k-th coefficient
// is about that of residual over slope; the value y0 is returned as given.
func Implicit(y0, slope float64, residual func(y Series) Series) Series {
	y := Constant(y0)
	for k := 1; k <= Order; k++ {
		// With y known below order k, F's k-th coefficient is what is missing.
		y[k] = -residual(y)[k] / slope
	}
	return y
}
