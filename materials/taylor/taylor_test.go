package taylor

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
)

// near compares coefficient by coefficient with an absolute tolerance.
func near(t *testing.T, want, got Series, tolerance float64, name string) {
	t.Helper()
	for k := range want {
		assert.InDelta(t, want[k], got[k], tolerance, "%s, order %d", name, k)
	}
}

// Expansions about 0 that every table has (Abramowitz and Stegun 1964, 3.6.8 to 3.6.14,
// 4.1.24, 4.2.1, 4.3.65 and 4.3.66); the numbers are exact in binary or within one
// rounding.
func TestTextbookExpansions(t *testing.T) {
	x := Variable(0)
	sin, cos := Series{0, 1, 0, -1. / 6, 0}, Series{1, 0, -0.5, 0, 1. / 24}
	one := Constant(1)
	for _, c := range []struct {
		name      string
		got, want Series
	}{
		{"1/(1 - x)", one.Sub(x).Inv(), Series{1, 1, 1, 1, 1}},
		{"1/(1 + x)^2", x.Shift(1).Square().Inv(), Series{1, -2, 3, -4, 5}},
		{"(1 + x)/(1 - x)", x.Shift(1).Quo(one.Sub(x)), Series{1, 2, 2, 2, 2}},
		{"sqrt(1 + x)", x.Shift(1).Sqrt(), Series{1, 1. / 2, -1. / 8, 1. / 16, -5. / 128}},
		{"(1 + x)^(1/2)", x.Shift(1).Pow(0.5), Series{1, 1. / 2, -1. / 8, 1. / 16, -5. / 128}},
		{"(1 + x)^(-1/2)", x.Shift(1).Pow(-0.5), Series{1, -1. / 2, 3. / 8, -5. / 16, 35. / 128}},
		{"(1 + x)^4", x.Shift(1).Pow(4), Series{1, 4, 6, 4, 1}},
		{"(x - 1)^3", x.Shift(-1).Pow(3), Series{-1, 3, -3, 1, 0}},
		{"(1 + x)^0", x.Shift(1).Pow(0), Series{1}},
		{"exp(x)", x.Exp(), Series{1, 1, 1. / 2, 1. / 6, 1. / 24}},
		{"exp(-2 x)", x.Scale(-2).Exp(), Series{1, -2, 2, -4. / 3, 2. / 3}},
		{"exp(x^2)", x.Square().Exp(), Series{1, 0, 1, 0, 0.5}},
		{"log(1 + x)", x.Shift(1).Log(), Series{0, 1, -1. / 2, 1. / 3, -1. / 4}},
		{"sin^2 + cos^2", sin.Square().Add(cos.Mul(cos)), Series{1}},
		{"2 sin cos = sin 2x", sin.Mul(cos).Scale(2), Series{0, 2, 0, -8. / 6, 0}},
		{"tan = sin/cos", sin.Quo(cos), Series{0, 1, 0, 1. / 3, 0}},
		{"exp(sin x)", x.Exp().Compose(sin), Series{1, 1, 0.5, 0, -1. / 8}},
		{"arcsine reverses sine", sin.Reverse(0), Series{0, 1, 0, 1. / 6, 0}},
		{"log(1 + y) reverses exp(x) - 1", x.Exp().Shift(-1).Reverse(0), Series{0, 1, -1. / 2, 1. / 3, -1. / 4}},
		{"x - x^2 reversed: Catalan numbers", Series{0, 1, -1}.Reverse(0), Series{0, 1, 1, 2, 5}},
		{"y = x + y^2: Catalan numbers", Implicit(0, 1, func(y Series) Series { return y.Sub(y.Square()).Sub(x) }), Series{0, 1, 1, 2, 5}},
		{"x^2 + y^2 = 1 from the top", Implicit(1, 2, func(y Series) Series { return x.Square().Add(y.Square()).Shift(-1) }), Series{1, 0, -1. / 2, 0, -1. / 8}},
		{"x + 1 - 1 - x", x.Add(one).Sub(one).Add(x.Neg()), Series{}},
		{"constant of constant", x.Exp().Compose(Constant(7)), Series{1}},
	} {
		near(t, c.want, c.got, 3e-16, c.name)
	}
}

// Lagrange inversion, Abramowitz and Stegun 1964, 3.6.25: the series of
// y = a x + b x^2 + c x^3 + d x^4 has A = 1/a, B = -b/a^3, C = (2 b^2 - a c)/a^5,
// D = (5 a b c - a^2 d - 5 b^3)/a^7.
func TestReverseFormula(t *testing.T) {
	a, b, c, d := 2.0, 3.0, -1.0, 0.5
	want := Series{4, 1 / a, -b / (a * a * a), (2*b*b - a*c) / math.Pow(a, 5), (5*a*b*c - a*a*d - 5*b*b*b) / math.Pow(a, 7)}
	near(t, want, Series{9, a, b, c, d}.Reverse(4), 4e-16, "reverse")
}

func TestAccess(t *testing.T) {
	s := Series{5, 4, 3, 2, 1}
	assert.Equal(t, 5.0, s.Value())
	for k, want := range []float64{5, 4, 6, 12, 24} {
		assert.Equal(t, want, s.Derivative(k))
	}
	assert.True(t, math.IsNaN(s.Derivative(-1)))
	assert.True(t, math.IsNaN(s.Derivative(Order+1)))
	assert.Equal(t, 5.0+8+12+16+16, s.At(2))
	assert.Equal(t, Series{4, 6, 6, 4, 0}, s.Diff())
	assert.Equal(t, Series{7, 0, 0, 0, 0}, Constant(7))
	assert.Equal(t, Series{7, 1, 0, 0, 0}, Variable(7))
	assert.Equal(t, Series{-5, -4, -3, -2, -1}, s.Neg())
	assert.Equal(t, Series{}, Series{}.Add(Series{}))
	assert.True(t, Series{}.Finite())
	assert.True(t, Series{math.MaxFloat64, -math.MaxFloat64, 5e-324}.Finite())
}

// The documented convention: what has no finite answer gives infinities or NaNs, and
// Finite finds them whichever coefficient they sit in.
func TestNonFiniteFlowsThrough(t *testing.T) {
	x := Variable(0)
	for name, s := range map[string]Series{
		"1/0":                x.Inv(),
		"0/0":                x.Quo(x),
		"sqrt(0)":            x.Sqrt(),
		"sqrt(constant 0)":   Constant(0).Sqrt(),
		"sqrt(-1)":           Constant(-1).Sqrt(),
		"log(0)":             x.Log(),
		"log(-1)":            Variable(-1).Log(),
		"0^(1/2)":            x.Pow(0.5),
		"(-1)^(1/2)":         Variable(-1).Pow(0.5),
		"0^2 by Pow":         x.Pow(2), // documented: the value must not be zero
		"exp(1000)":          Variable(1000).Exp(),
		"overflow in Mul":    Constant(1e300).Mul(Constant(1e300)),
		"overflow in Square": Series{0, 1e300}.Square(),
		"reverse of a flat":  Constant(1).Reverse(0),
		"slope 0":            Implicit(0, 0, func(y Series) Series { return y.Sub(x) }),
	} {
		assert.False(t, s.Finite(), "%s = %v", name, s)
	}
	for _, bad := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		for k := range Order + 1 {
			s := Series{2, 0.5, 0.25, 0.125, 0.1}
			other := s
			s[k] = bad
			assert.False(t, s.Finite())
			for name, r := range map[string]Series{
				"Add": s.Add(other), "Sub": other.Sub(s), "Neg": s.Neg(), "Scale": s.Scale(2), "Shift": s.Shift(1),
				"Mul": s.Mul(other), "Mul by": other.Mul(s), "Square": s.Square(), "Quo": s.Quo(other),
				"Compose outer": s.Compose(other),
			} {
				assert.False(t, r.Finite(), "%s of %v at order %d", name, bad, k)
			}
			if k == 0 {
				continue // 1/Inf and exp(-Inf) are finite; Compose and Reverse are given the value apart
			}
			for name, r := range map[string]Series{
				"Quo by": other.Quo(s), "Inv": s.Inv(), "Sqrt": s.Sqrt(), "Exp": s.Exp(), "Log": s.Log(), "Pow": s.Pow(1.5),
				"Compose inner": other.Compose(s), "Reverse": s.Reverse(1),
			} {
				if name == "Reverse" && k == 1 && !math.IsNaN(bad) {
					assert.Equal(t, Series{1}, r.Add(Series{}), "an infinite slope reversed is flat")
					continue
				}
				assert.False(t, r.Finite(), "%s of %v at order %d", name, bad, k)
			}
		}
	}
	nan := Series{math.NaN(), 1}
	for name, r := range map[string]Series{
		"Quo by": Constant(1).Quo(nan), "Inv": nan.Inv(), "Sqrt": nan.Sqrt(), "Exp": nan.Exp(), "Log": nan.Log(), "Pow": nan.Pow(2),
	} {
		assert.False(t, r.Finite(), name)
	}
}

func TestNothingAllocates(t *testing.T) {
	s, u := Series{2, 0.5, 0.25, 0.125, 0.1}, Series{1.5, -0.5, 0.3, 0.2, -0.1}
	x := Variable(0.3)
	var r Series
	keep := func(q Series) { r = r.Add(q) }
	for name, f := range map[string]func(){
		"Constant": func() { keep(Constant(2)) },
		"Variable": func() { keep(Variable(2)) },
		"Value":    func() { r[0] += s.Value() },
		"Deriv":    func() { r[0] += s.Derivative(3) },
		"Finite":   func() { _ = s.Finite() },
		"At":       func() { r[0] += s.At(0.1) },
		"Diff":     func() { keep(s.Diff()) },
		"Add":      func() { keep(s.Add(u)) },
		"Sub":      func() { keep(s.Sub(u)) },
		"Neg":      func() { keep(s.Neg()) },
		"Scale":    func() { keep(s.Scale(2)) },
		"Shift":    func() { keep(s.Shift(2)) },
		"Mul":      func() { keep(s.Mul(u)) },
		"Square":   func() { keep(s.Square()) },
		"Quo":      func() { keep(s.Quo(u)) },
		"Inv":      func() { keep(s.Inv()) },
		"Sqrt":     func() { keep(s.Sqrt()) },
		"Exp":      func() { keep(s.Exp()) },
		"Log":      func() { keep(s.Log()) },
		"Pow":      func() { keep(s.Pow(1.5)) },
		"Compose":  func() { keep(s.Compose(u)) },
		"Reverse":  func() { keep(s.Reverse(1)) },
		"Implicit": func() {
			keep(Implicit(0.5, 1.5, func(y Series) Series { return y.Mul(y.Exp()).Sub(x).Add(s) }))
		},
	} {
		assert.Zero(t, testing.AllocsPerRun(100, f), name)
	}
	assert.NotEqual(t, Series{}, r)
}

// fit maps any float64 into -1 to 1, so that every input of a fuzz run counts.
func fit(x float64) float64 {
	if x = math.Mod(x, 1); math.IsNaN(x) {
		return 0.5
	}
	return x
}

// FuzzIdentities checks operations against their inverses. With coefficients below 1
// and values from 1 to 3 the intermediate coefficients stay below 62: those of
// 1/(1 - t - t^2 - t^3 - t^4) are 1, 1, 2, 4, 8; a logarithm has at most 3.75, a
// quotient 32, an exponential e^3 73/24; the inverse function of t - t^2 - t^3 - t^4 has
// 1, 1, 3, 11. About ten roundings to a coefficient come to 62 times 1e-15 at the very
// worst; at the corners of the domain the worst found is 7e-15. So 2e-14 is asked, and
// 6e-14 of the exponential, the cube and the products of sums.
func FuzzIdentities(f *testing.F) {
	f.Add(1.3, 0.2, 0.3, -0.9, 0.1, 0.7, 0.4, -0.5, 0.99, -0.3)
	f.Add(0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0)
	f.Add(0.999, 0.999, -0.999, 0.999, -0.999, -0.999, 0.999, -0.999, 0.999, -0.999)
	f.Add(0.0, -0.9999, 0.9999, -0.9999, 0.9999, 0.0, 0.9999, 0.9999, 0.9999, 0.9999)
	f.Add(math.NaN(), math.Inf(1), math.Inf(-1), 5e-324, -1e300, 1e-160, 2.5, -0.1, 1e17, 0.3)
	f.Fuzz(func(t *testing.T, a0, a1, a2, a3, a4, b0, b1, b2, b3, b4 float64) {
		a := Series{2 + fit(a0), fit(a1), fit(a2), fit(a3), fit(a4)}
		b := Series{2 + fit(b0), fit(b1), fit(b2), fit(b3), fit(b4)}
		check := func(name string, want, got Series, tolerance float64) {
			t.Helper()
			for k := range want {
				if !(math.Abs(got[k]-want[k]) <= tolerance) {
					t.Errorf("%s: order %d: %v, not %v; a %v, b %v", name, k, got[k], want[k], a, b)
				}
			}
		}
		check("a b/b", a, a.Mul(b).Quo(b), 2e-14)
		check("a/b b", a, a.Quo(b).Mul(b), 2e-14)
		check("a b - b a", Series{}, a.Mul(b).Sub(b.Mul(a)), 1e-15)
		check("a a - a^2", a.Mul(a), a.Square(), 2e-14)
		check("(a + b)^2", a.Add(b).Square(), a.Square().Add(b.Square()).Add(a.Mul(b).Scale(2)), 6e-14)
		check("sqrt(a)^2", a, a.Sqrt().Square(), 2e-14)
		check("exp(log a)", a, a.Log().Exp(), 2e-14)
		check("log(exp a)", a, a.Exp().Log(), 6e-14)
		check("a^p a^(1 - p)", a, a.Pow(fit(b1)).Mul(a.Pow(1-fit(b1))), 2e-14)
		check("a^3", a.Mul(a).Mul(a), a.Pow(3), 6e-14)
		check("1/(1/a)", a, a.Inv().Inv(), 2e-14)
		check("(a b)' = a' b + a b', to order 3", Series{}, truncate(a.Mul(b).Diff().Sub(a.Diff().Mul(b)).Sub(a.Mul(b.Diff()))), 6e-14)
		check("(log a)' = a'/a, to order 3", Series{}, truncate(a.Log().Diff().Sub(a.Diff().Quo(a))), 2e-14)

		// With a slope of 1 to 3.
		s := Series{fit(a0), 2 + fit(a1), fit(a2), fit(a3), fit(a4)}
		x := fit(b0)
		inverse := s.Reverse(x)
		check("reversed twice", s, inverse.Reverse(s[0]), 2e-14)
		check("s of its inverse", Series{s[0], 1}, s.Compose(inverse), 2e-14)
		check("inverse of s", Series{x, 1}, inverse.Compose(s), 2e-14)
		solved := Implicit(x, s[1], func(y Series) Series { return s.Compose(y).Sub(Variable(s[0])) })
		check("reversed by Implicit", inverse, solved, 2e-14)
		check("square by Compose", a.Square(), Series{a[0] * a[0], 2 * a[0], 1}.Compose(a), 2e-14)
		if g := a.At(0); g != a[0] {
			t.Errorf("At(0) = %v, not %v", g, a[0])
		}
	})
}

func truncate(s Series) Series { s[Order] = 0; return s }

// FuzzAnything feeds any floats: nothing panics or hangs, and Finite tells the truth.
func FuzzAnything(f *testing.F) {
	for _, x := range []float64{0, 1, -1, math.NaN(), math.Inf(1), math.Inf(-1), 5e-324, 1e-160, math.MaxFloat64, -math.MaxFloat64} {
		f.Add(x, 1.0, 0.5, 0.25, 0.1, 2.0, 3)
		f.Add(2.0, x, 0.5, x, 0.1, 2.0, -1)
		f.Add(2.0, 1.0, x, 0.25, x, x, 5)
	}
	f.Fuzz(func(t *testing.T, s0, s1, s2, s3, s4, p float64, k int) {
		s := Series{s0, s1, s2, s3, s4}
		u := Series{s4, p, s0, s1, s2}
		for _, r := range []Series{s, s.Add(u), s.Sub(u), s.Neg(), s.Scale(p), s.Shift(p), s.Mul(u), s.Square(), s.Quo(u), s.Inv(),
			s.Sqrt(), s.Exp(), s.Log(), s.Pow(p), s.Compose(u), s.Reverse(p), s.Diff(), Constant(p), Variable(p),
			Implicit(p, s1, func(y Series) Series { return y.Mul(s).Sub(u) })} {
			finite := true
			for _, c := range r {
				if math.IsNaN(c) || math.IsInf(c, 0) {
					finite = false
				}
			}
			if finite != r.Finite() {
				t.Errorf("Finite() = %v of %v", r.Finite(), r)
			}
			if (k < 0 || k > Order) != math.IsNaN(r.Derivative(k)) && r.Finite() {
				t.Errorf("derivative %d of %v is %v", k, r, r.Derivative(k))
			}
			_ = r.At(p)
			_ = r.Value()
		}
	})
}

var sink Series

func BenchmarkMul(b *testing.B) {
	s, u := Series{2, 0.5, 0.25, 0.125, 0.1}, Series{1.5, -0.5, 0.3, 0.2, -0.1}
	for b.Loop() {
		sink = s.Mul(u)
	}
}

func BenchmarkSqrt(b *testing.B) {
	s := Series{2, 0.5, 0.25, 0.125, 0.1}
	for b.Loop() {
		sink = s.Sqrt()
	}
}

func BenchmarkImplicit(b *testing.B) {
	x := Variable(1.2)
	for b.Loop() {
		sink = Implicit(0.6, 1.6*1.8, func(y Series) Series { return y.Mul(y.Exp()).Sub(x) })
	}
}
