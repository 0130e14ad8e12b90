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
