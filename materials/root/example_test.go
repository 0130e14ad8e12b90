package root_test

import (
	"fmt"
	"math"

	"glassthread/materials/root"
)

// The first zero of J0, 2.40482 55576 95773 (DLMF 10.21).
func ExampleFind() {
	x, err := root.Find(func(x float64) (float64, error) { return math.J0(x), nil }, 2, 3, 0)
	fmt.Printf("%.12f %v\n", x, err)
	// Output: 2.404825557696 <nil>
}

// Both zeros of a parabola, though they share a cell.
func ExampleAll() {
	zeros, err := root.All(func(x float64) (float64, float64, error) { return x*x - 0.01, 2 * x, nil }, -1, 1, 1)
	fmt.Printf("%.12f %v\n", zeros, err)
	// Output: [-0.100000000000 0.100000000000] <nil>
}
