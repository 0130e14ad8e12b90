package bessel_test

import (
	"fmt"
	"math"

	"glassthread/modes/bessel"
)

// Abramowitz and Stegun, Handbook of Mathematical Functions, tables 9.1 and 9.4 (from
// memory): J_2(5) = 0.0465651163, J_10(1) = 2.630615124e-10.
func ExampleJ() {
	a, err := bessel.J(2, 5)
	fmt.Printf("%.10f %v\n", a, err)
	b, err := bessel.J(10, 1)
	fmt.Printf("%.9e %v\n", b, err)
	// Output:
	// 0.0465651163 <nil>
	// 2.630615124e-10 <nil>
}

// Both functions of a mode's core at once: u J_{l-1}(u)/J_l(u).
func ExampleJPair() {
	const u = 3.0
	below, at, err := bessel.JPair(1, u)
	fmt.Printf("J0 %.6f, J1 %.6f %v\n", below, at, err)
	fmt.Printf("%.6f\n", u*below/at)
	// Output:
	// J0 -0.260052, J1 0.339059 <nil>
	// -2.300945
}

// At order 2000 and argument 1 both functions are far below the smallest float64;
// their ratio is not: it tends to x/(2 l + 2).
func ExampleJRatio() {
	j, _ := bessel.J(2000, 1)
	ratio, err := bessel.JRatio(2000, 1)
	fmt.Printf("%v %.9e %.9e %v\n", j, ratio, 1./4002, err)
	// Output: 0 2.498750781e-04 2.498750625e-04 <nil>
}

// The first zeros of J_0 and J_1: the cut-offs of LP11 and LP02 (NIST DLMF 10.21:
// 2.40483, 3.83171).
func ExampleJZero() {
	for l := range 2 {
		z, err := bessel.JZero(l, 1)
		fmt.Printf("%.5f %v\n", z, err)
	}
	// Output:
	// 2.40483 <nil>
	// 3.83171 <nil>
}

// How far the float64 nearest to a zero lies from it. J falls there with slope -J_1.
func ExampleJZeroParts() {
	high, low, err := bessel.JZeroParts(0, 1)
	fmt.Printf("%v and %.1e %v\n", high, low, err)
	fmt.Printf("J0 there: %.0e\n", low*math.J1(high))
	// Output:
	// 2.404825557695773 and -1.2e-16 <nil>
	// J0 there: -6e-17
}

// Abramowitz and Stegun, table 9.8 (from memory): e K_0(1) = 1.1444630798, e K_1(1) =
// 1.6361534863.
func ExampleKScaled() {
	k0, _ := bessel.KScaled(0, 1)
	k1, err := bessel.KScaled(1, 1)
	fmt.Printf("%.10f %.10f %v\n", k0, k1, err)
	// Output: 1.1444630798 1.6361534863 <nil>
}

// The ratio where neither function can be written as a float64.
func ExampleKRatio() {
	ratio, err := bessel.KRatio(500, 1e-3)
	fmt.Printf("%.6e %v\n", ratio, err)
	_, err = bessel.KScaled(500, 1e-3)
	fmt.Println(err)
	// Output:
	// 1.000000e+06 <nil>
	// bessel.KScaled: value (result) = +Inf: must be within the range of a float64; the arguments are too extreme together
}

// A field outside a core falls like exp(-w r/a) and faster: x K_l'(x)/K_l(x) = -l - G.
func ExampleDecay() {
	for _, l := range []int{0, 1, 2} {
		g, err := bessel.Decay(l, 2)
		fmt.Printf("l = %d: G %.6f, logarithmic slope %.6f %v\n", l, g, -float64(l)-g, err)
	}
	// Output:
	// l = 0: G 2.456074, logarithmic slope -2.456074 <nil>
	// l = 1: G 1.628616, logarithmic slope -2.628616 <nil>
	// l = 2: G 1.102349, logarithmic slope -3.102349 <nil>
}

// Abramowitz and Stegun, table 9.8 (from memory): e^-2 I_0(2) = 0.3085083226.
func ExampleIScaled() {
	i, err := bessel.IScaled(0, 2)
	fmt.Printf("%.10f %v\n", i, err)
	// Output: 0.3085083226 <nil>
}

func ExampleIRatio() {
	for _, x := range []float64{0.1, 2, 1e6} {
		ratio, err := bessel.IRatio(0, x)
		fmt.Printf("%.7f %v\n", ratio, err)
	}
	// Output:
	// 0.0499376 <nil>
	// 0.6977747 <nil>
	// 0.9999995 <nil>
}

// The first zeros of J_1' and J_2', 1.84118 and 3.05424 (Abramowitz and Stegun 1964,
// table 9.5).
func ExampleJPrimeZero() {
	a, _ := bessel.JPrimeZero(1, 1)
	b, err := bessel.JPrimeZero(2, 1)
	fmt.Printf("%.5f %.5f %v\n", a, b, err)
	// Output: 1.84118 3.05424 <nil>
}

// The phase counts the zeros of J_2 below 100: one wherever theta passes an odd multiple
// of pi/2.
func ExampleJPhase() {
	theta, _, _, ok := bessel.JPhase(2, 100, 0)
	count := int(theta/math.Pi + 0.5)
	before, _ := bessel.JZero(2, count)
	after, _ := bessel.JZero(2, count+1)
	fmt.Println(count, before < 100 && after > 100, ok)
	// Output: 31 true true
}

// J_1/J_0 at 2 and its derivative, 1 + j^2 - j/2.
func ExampleJRatioSlope() {
	j, _ := bessel.JRatio(0, 2)
	slope, err := bessel.JRatioSlope(0, 2, j)
	fmt.Printf("%.6f %.6f %v\n", j, slope, err)
	// Output: 2.575920 6.347405 <nil>
}

// K_1/K_0 falls with its argument towards 1.
func ExampleKRatioSlope() {
	k, _ := bessel.KRatio(0, 2)
	slope, err := bessel.KRatioSlope(0, 2, k)
	fmt.Printf("%.6f %.6f %v\n", k, slope, err)
	// Output: 1.228037 -0.105944 <nil>
}

// I_1/I_0 rises towards 1.
func ExampleIRatioSlope() {
	i, _ := bessel.IRatio(0, 2)
	slope, err := bessel.IRatioSlope(0, 2, i)
	fmt.Printf("%.6f %.6f %v\n", i, slope, err)
	// Output: 0.697775 0.164223 <nil>
}

// e^x K_0(x) falls like the root of 1/x.
func ExampleKScaledSlope() {
	value, _ := bessel.KScaled(0, 2)
	ratio, _ := bessel.KRatio(0, 2)
	slope, err := bessel.KScaledSlope(0, 2, value, ratio)
	fmt.Printf("%.6f %.6f %v\n", value, slope, err)
	// Output: 0.841568 -0.191909 <nil>
}

// e^-x I_0(x) falls like the root of 1/x.
func ExampleIScaledSlope() {
	value, _ := bessel.IScaled(0, 2)
	ratio, _ := bessel.IRatio(0, 2)
	slope, err := bessel.IScaledSlope(0, 2, value, ratio)
	fmt.Printf("%.6f %.6f %v\n", value, slope, err)
	// Output: 0.308508 -0.093239 <nil>
}
