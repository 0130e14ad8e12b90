// Package taylor is the small algebra that glassthread differentiates with: a
// Series holds a quantity and its first four derivatives with respect to one
// variable, and every operation composes them exactly, with no finite
// difference anywhere.
//
// A Series f about x0 stands for
//
//	f(x0 + t) = f[0] + f[1] t + f[2] t^2 + f[3] t^3 + f[4] t^4 + O(t^5),
//
// so that f[k] is the k-th derivative divided by k!. Its unit is that of f over
// that of x to the k. The arithmetic of such truncated series is textbook
// (A. Griewank and A. Walther, Evaluating Derivatives, 2nd ed., SIAM 2008,
// chapter 13, table 13.1 and 13.2): each operation costs a few dozen
// multiplications, rounds like the float64 arithmetic that it is made of, and
// does not allocate.
//
// Like package math, the operations return no error: a quotient by zero, the
// logarithm or root of a negative value, and overflow give infinities and NaNs
// that flow on by the rules of IEEE 754, so that one call of Finite on the result
// finds them, except where an infinity is divided by or raised away into a zero.
package taylor

import "math"

// Order is the highest power that a Series carries: it follows derivatives to
// the fourth, which is what beta4 needs.
const Order = 4

// Series is a truncated Taylor series: s[k] is the k-th derivative over k!. The
// zero Series is the constant 0. Series compare with == and copy by value.
type Series [Order + 1]float64

// Constant returns the series of a quantity that does not vary.
func Constant(value float64) Series { return Series{value} }

// Variable returns the series of the variable itself about the given value.
func Variable(value float64) Series { return Series{value, 1} }

// Value returns the value at the point of expansion, s[0].
func (s Series) Value() float64 { return s[0] }

var factorial = [Order + 1]float64{1, 1, 2, 6, 24}

// Derivative returns the k-th derivative at the point of expansion, k! s[k], or
// NaN for k outside 0 to Order: the series does not know those.
func (s Series) Derivative(k int) float64 {
	if k < 0 || k > Order {
		return math.NaN()
	}
	return factorial[k] * s[k]
}

// Finite reports whether no coefficient is NaN or infinite.
func (s Series) Finite() bool {
	for _, c := range s {
		if !(math.Abs(c) <= math.MaxFloat64) {
			return false
		}
	}
	return true
}

// At returns the truncated series at a distance t from the point of expansion.
func (s Series) At(t float64) float64 {
	return s[0] + t*(s[1]+t*(s[2]+t*(s[3]+t*s[4])))
}

// Diff returns the series of the first derivative. Its last coefficient is
// unknown and set to zero: the result is good to order Order-1.
func (s Series) Diff() Series {
	return Series{s[1], 2 * s[2], 3 * s[3], 4 * s[4]}
}
