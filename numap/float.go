package numap

import (
	"math"

	"glassthread/materials/domain"
)

// leg returns sqrt(a^2 - b^2) for a >= b >= 0: the leg of the right triangle with
// hypotenuse a. The difference of nearby a and b is exact, so the product form has
// no cancellation; numbers whose squares leave the range of a float64 are scaled.
func leg(a, b float64) float64 {
	p := (a - b) * (a + b)
	if p > 1e-280 && p <= math.MaxFloat64 {
		return math.Sqrt(p)
	}
	if a == b {
		return 0
	}
	m, e := math.Frexp(a)
	b = math.Ldexp(b, -e)
	return math.Ldexp(math.Sqrt((m-b)*(m+b)), e)
}

// mulDiv returns a b c / d for numbers above 0, without an overflow or underflow
// on the way; a must be of ordinary size.
func mulDiv(a, b, c, d float64) float64 {
	p := b * c
	if p > 1e-280 && p < 1e280 {
		if q := a * p / d; q > 1e-280 && q <= math.MaxFloat64 {
			return q
		}
	}
	b, i := math.Frexp(b)
	c, j := math.Frexp(c)
	d, k := math.Frexp(d)
	return math.Ldexp(a*b*c/d, i+j-k)
}

// lnRatio returns the natural logarithm of x/y for x >= 0 and y > 0, -Inf for
// x = 0. Near x = y it keeps the digits that x/y would round away.
func lnRatio(x, y float64) float64 {
	q := x / y
	switch {
	case q > 0.5 && q < 2:
		return math.Log1p((x - y) / y)
	case q > 1e-300 && q <= math.MaxFloat64:
		return math.Log(q)
	}
	return math.Log(x) - math.Log(y)
}

// positive3 refuses the first of three named values that is not finite and above 0.
func positive3(function, name1 string, x1 float64, unit1, name2 string, x2 float64, unit2, name3 string, x3 float64, unit3 string) error {
	if err := domain.Positive(function, name1, x1, unit1); err != nil {
		return err
	}
	if err := domain.Positive(function, name2, x2, unit2); err != nil {
		return err
	}
	return domain.Positive(function, name3, x3, unit3)
}
