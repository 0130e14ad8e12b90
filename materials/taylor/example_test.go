package taylor_test

import (
	"fmt"
	"math"

	"glassthread/materials/taylor"
)

// The value and four derivatives of exp(x)/x at 2, in one pass.
func Example() {
	x := taylor.Variable(2)
	f := x.Exp().Quo(x)
	for k := range taylor.Order + 1 {
		fmt.Printf("%.6f ", f.Derivative(k))
	}
	fmt.Println(f.Finite())
	// The first derivative by hand is exp(x) (x - 1)/x^2.
	fmt.Printf("%.6f\n", math.Exp(2)/4)
	// Output:
	// 3.694528 1.847264 1.847264 0.923632 1.847264 true
	// 1.847264
}

func ExampleSeries() {
	// sin(t) to fourth order about 0.
	sin := taylor.Series{0, 1, 0, -1. / 6, 0}
	fmt.Printf("%.5f %.5f\n", sin.At(0.2), math.Sin(0.2))
	// Output: 0.19867 0.19867
}

func ExampleConstant() {
	fmt.Println(taylor.Constant(1.45))
	// Output: [1.45 0 0 0 0]
}

func ExampleVariable() {
	fmt.Println(taylor.Variable(1.45).Square())
	// Output: [2.1025 2.9 1 0 0]
}

func ExampleSeries_Value() {
	fmt.Println(taylor.Variable(3).Square().Value())
	// Output: 9
}

func ExampleSeries_Derivative() {
	cube := taylor.Variable(2).Pow(3)
	fmt.Println(cube.Derivative(1), cube.Derivative(2), cube.Derivative(3), cube.Derivative(5))
	// Output: 12 12 6 NaN
}

func ExampleSeries_Finite() {
	x := taylor.Variable(0)
	fmt.Println(x.Exp().Finite(), x.Log().Finite())
	// Output: true false
}

func ExampleSeries_At() {
	exp := taylor.Variable(0).Exp()
	fmt.Printf("%.5f\n", exp.At(0.1))
	// Output: 1.10517
}

func ExampleSeries_Diff() {
	fmt.Println(taylor.Series{1, 1, 1, 1, 1}.Diff())
	// Output: [1 2 3 4 0]
}

func ExampleSeries_Add() {
	fmt.Println(taylor.Variable(1).Add(taylor.Series{1, 2, 3, 4, 5}))
	// Output: [2 3 3 4 5]
}

func ExampleSeries_Sub() {
	fmt.Println(taylor.Variable(1).Sub(taylor.Constant(3)))
	// Output: [-2 1 0 0 0]
}

func ExampleSeries_Neg() {
	fmt.Println(taylor.Series{1, -2, 3, -4, 5}.Neg())
	// Output: [-1 2 -3 4 -5]
}

func ExampleSeries_Scale() {
	fmt.Println(taylor.Variable(1).Scale(10))
	// Output: [10 10 0 0 0]
}

func ExampleSeries_Shift() {
	fmt.Println(taylor.Variable(1).Shift(10))
	// Output: [11 1 0 0 0]
}

func ExampleSeries_Mul() {
	x := taylor.Variable(1)
	fmt.Println(x.Mul(x).Mul(x))
	// Output: [1 3 3 1 0]
}

func ExampleSeries_Square() {
	fmt.Println(taylor.Variable(3).Square())
	// Output: [9 6 1 0 0]
}

func ExampleSeries_Quo() {
	x := taylor.Variable(0)
	fmt.Println(x.Shift(1).Quo(x.Neg().Shift(1))) // (1 + x)/(1 - x)
	// Output: [1 2 2 2 2]
}

func ExampleSeries_Inv() {
	fmt.Println(taylor.Variable(0).Shift(1).Inv()) // 1/(1 + x)
	// Output: [1 -1 1 -1 1]
}

// Abramowitz and Stegun 1964, 3.6.11: sqrt(1 + x) = 1 + x/2 - x^2/8 + x^3/16 - ...
func ExampleSeries_Sqrt() {
	fmt.Println(taylor.Variable(1).Sqrt())
	// Output: [1 0.5 -0.125 0.0625 -0.0390625]
}

func ExampleSeries_Exp() {
	fmt.Printf("%.6f\n", taylor.Variable(0).Exp())
	// Output: [1.000000 1.000000 0.500000 0.166667 0.041667]
}

func ExampleSeries_Log() {
	fmt.Printf("%.6f\n", taylor.Variable(1).Log())
	// Output: [0.000000 1.000000 -0.500000 0.333333 -0.250000]
}

func ExampleSeries_Pow() {
	fmt.Println(taylor.Variable(1).Pow(-2))
	// Output: [1 -2 3 -4 5]
}

// The sine of x^2 about 1: the outer series is that of the sine about 1^2.
func ExampleSeries_Compose() {
	inner := taylor.Variable(1).Square()
	s, c := math.Sincos(inner.Value())
	outer := taylor.Series{s, c, -s / 2, -c / 6, s / 24}
	f := outer.Compose(inner)
	fmt.Printf("%.6f %.6f\n", f.Derivative(1), 2*math.Cos(1)) // 2 x cos(x^2)
	// Output: 1.080605 1.080605
}

// From wavelength as a function of frequency to frequency as one of wavelength: the
// series of 1/x is its own inverse.
func ExampleSeries_Reverse() {
	wavelength := taylor.Variable(2).Inv()
	frequency := wavelength.Reverse(2)
	fmt.Println(frequency)
	fmt.Println(taylor.Variable(0.5).Inv())
	// Output:
	// [2 -4 8 -16 32]
	// [2 -4 8 -16 32]
}

// The y that solves y exp(y) = x about x = e, where y = 1.
func ExampleImplicit() {
	x := taylor.Variable(math.E)
	y := taylor.Implicit(1, 2*math.E, func(y taylor.Series) taylor.Series {
		return y.Mul(y.Exp()).Sub(x)
	})
	fmt.Printf("%.6f %.6f\n", y.Value(), y.Derivative(1)) // y' = y/(x (1 + y)) = 1/(2 e)
	// Output: 1.000000 0.183940
}
