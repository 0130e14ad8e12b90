package radial_test

import (
	"fmt"
	"math"

	"glassthread/materials/taylor"
	"glassthread/modes/radial"
)

// vectorParabola has a jump of a fifth of its height at its edge.
var vectorParabola = radial.Profile{Pieces: []radial.Piece{{From: 0, To: 1, F: func(r float64) float64 { return 1 - 0.8*r*r }}}}

// V = 4 at an index ratio of 1.45 : 1.
var claddingAt4 = 4 / math.Sqrt(1.45*1.45-1)

func ExampleGuidedVector() {
	list, err := radial.GuidedVector(vectorParabola, 4, claddingAt4)
	for _, m := range list {
		fmt.Printf("%d(%d,%d) %.9f\n", m.Family, m.Nu, m.M, m.B)
	}
	fmt.Println(err)
	// Output:
	// 2(1,1) 0.518072613
	// 1(0,1) 0.132828189
	// 0(0,1) 0.131507362
	// 2(2,1) 0.070634607
	// <nil>
}

func ExampleSolveVector() {
	m, err := radial.SolveVector(vectorParabola, 4, claddingAt4, radial.VectorHE, 1, 1)
	fmt.Printf("%.9f %v\n", m.B, err)
	// Output:
	// 0.518072613 <nil>
}

func ExampleVectorShift() {
	m, shift, err := radial.VectorShift(vectorParabola, 4, claddingAt4, radial.VectorHE, 1, 1)
	lp, _ := radial.Solve(vectorParabola, 4, 0, 1)
	fmt.Printf("%.9f %.9f %v\n", shift, m.W*m.W-lp.W*lp.W, err)
	// Output:
	// -0.583049722 -0.583049722 <nil>
}

func ExampleVectorRank() {
	rank, err := radial.VectorRank(vectorParabola, 4, claddingAt4, radial.VectorHE, 1, 1)
	n, _ := radial.CountVector(vectorParabola, 4, claddingAt4, radial.VectorHE, 1)
	fmt.Println(rank, n, err)
	// Output: 1 1 <nil>
}

func ExampleCountVector() {
	n, err := radial.CountVector(vectorParabola, 4, claddingAt4, radial.VectorTM, 0)
	fmt.Println(n, err)
	// Output: 1 <nil>
}

// The derivative of lambda with respect to V for glasses without dispersion.
func ExampleVectorSeries() {
	v2 := taylor.Variable(4).Square()
	cladding := v2.Scale(1 / (1.45*1.45 - 1))
	m, lambda, err := radial.VectorSeries(vectorParabola, 4, cladding, radial.VectorHE, 1, 1, func(_ int, r float64) (taylor.Series, error) {
		return v2.Scale(1 - 0.8*r*r), nil
	})
	fmt.Printf("%.6f %.6f %v\n", m.W*m.W, lambda[1], err)
	// Output:
	// 8.289162 6.159269 <nil>
}
