package radial_test

import (
	"fmt"

	"glassthread/modes/radial"
)

// LP11 of a depressed-cladding profile on either side of its cut-off.
func ExampleLeaky() {
	p := radial.Profile{Pieces: []radial.Piece{
		{From: 0, To: 0.5, F: func(float64) float64 { return 1 }},
		{From: 0.5, To: 1, F: func(float64) float64 { return -0.8 }},
	}}
	for _, v := range []float64{7, 6, 5.5, 5} {
		mode, err := radial.Leaky(p, v, 1, 1)
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Printf("V = %.1f: lambda = %.4f\n", v, mode.Lambda)
	}
	// Output:
	// V = 7.0: lambda = (10.2818+0.0000i)
	// V = 6.0: lambda = (0.1027+0.0000i)
	// V = 5.5: lambda = (-3.8696+0.1033i)
	// V = 5.0: lambda = (-7.0637+0.2994i)
}

// The tunnelling modes of a step profile: behind the centrifugal barrier the loss is as good as
// nothing.
func ExampleLeakyMode() {
	p := radial.Profile{Pieces: []radial.Piece{{From: 0, To: 1, F: func(float64) float64 { return 1 }}}}
	mode, err := radial.Leaky(p, 15, 12, 1)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("LP(%d,%d): %.2e\n", mode.L, mode.M, imag(mode.Lambda)/real(mode.Lambda))
	// Output:
	// LP(12,1): -5.04e-09
}
