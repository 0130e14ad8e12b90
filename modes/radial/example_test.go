package radial_test

import (
	"errors"
	"fmt"
	"math"

	"glassthread/materials/taylor"
	"glassthread/modes/radial"
)

func parabola() radial.Profile {
	return radial.Profile{Pieces: []radial.Piece{{To: 1, F: func(r float64) float64 { return 1 - r*r }}}}
}

// A core up to half the radius in a depressed ring.
func ExampleProfile() {
	w := radial.Profile{Pieces: []radial.Piece{
		{From: 0, To: 0.5, F: func(float64) float64 { return 1 }},
		{From: 0.5, To: 1, F: func(float64) float64 { return -0.5 }},
	}}
	e, err := radial.Solve(w, 5, 0, 1)
	fmt.Printf("b = %.6f %v\n", e.B, err)
	// Output: b = 0.492582 <nil>
}

// A power of the radius that is not whole has a cusp on the axis, which Graded tells.
func ExamplePiece() {
	p := radial.Profile{Pieces: []radial.Piece{{To: 1, F: func(r float64) float64 { return 1 - math.Sqrt(r) }, Graded: true}}}
	v, err := radial.CutoffV(p, 1, 1)
	fmt.Printf("LP11 of 1 - sqrt(R) above V = %.4f %v\n", v, err)
	// Output: LP11 of 1 - sqrt(R) above V = 5.7343 <nil>
}

// Modes of a parabola in groups of 2m + l: b = 1 - 2(2m + l - 1)/V but for those near cut-off (M.
// J. Adams, An Introduction to Optical Waveguides, 1981).
func ExampleGuided() {
	list, err := radial.Guided(parabola(), 10)
	for _, e := range list {
		fmt.Printf("LP%d%d b = %.4f, unbounded %.1f\n", e.L, e.M, e.B, 1-2*float64(2*e.M+e.L-1)/10)
	}
	fmt.Println(err)
	// Output:
	// LP01 b = 0.8000, unbounded 0.8
	// LP11 b = 0.6001, unbounded 0.6
	// LP02 b = 0.4008, unbounded 0.4
	// LP21 b = 0.4004, unbounded 0.4
	// LP12 b = 0.2048, unbounded 0.2
	// LP31 b = 0.2021, unbounded 0.2
	// LP03 b = 0.0322, unbounded 0.0
	// LP22 b = 0.0243, unbounded 0.0
	// LP41 b = 0.0088, unbounded 0.0
	// <nil>
}

func ExampleMode() {
	e, err := radial.Solve(parabola(), 40, 1, 2)
	fmt.Printf("LP%d%d at V = %v: u = %.6f, w = %.6f, b = %.6f %v\n", e.L, e.M, e.V, e.U, e.W, e.B, err)
	// Output:
	// LP12 at V = 40: u = 17.888544, w = 35.777088, b = 0.800000 <nil>
}

func ExampleSolve() {
	_, err := radial.Solve(parabola(), 3.5, 1, 1)
	fmt.Println(errors.Is(err, radial.ErrCutoff))
	e, err := radial.Solve(parabola(), 3.6, 1, 1)
	fmt.Printf("b = %.6f %v\n", e.B, err)
	// Output:
	// true
	// b = 0.007403 <nil>
}

// Cut-off of LP11 of a truncated parabola, 3.518, and of a triangle, 4.381 (W. A. Gambling, D. N.
// Payne and H. Matsumura, Electron. Lett. 13, 139, 1977, from memory).
func ExampleCutoffV() {
	v, err := radial.CutoffV(parabola(), 1, 1)
	fmt.Printf("%.2f %v\n", v, err)
	triangle := radial.Profile{Pieces: []radial.Piece{{To: 1, F: func(r float64) float64 { return 1 - r }}}}
	v, err = radial.CutoffV(triangle, 1, 1)
	fmt.Printf("%.2f %v\n", v, err)
	// Output:
	// 3.52 <nil>
	// 4.38 <nil>
}

// d(Vb)/dV of LP01 of a parabola.
func ExampleSeries() {
	const v = 3.0
	square := taylor.Variable(v).Square()
	_, lambda, err := radial.Series(parabola(), v, 0, 1, func(_ int, r float64) (taylor.Series, error) {
		return square.Scale(1 - r*r), nil
	})
	vb := lambda.Quo(taylor.Variable(v))
	fmt.Printf("b = %.6f, d(Vb)/dV = %.6f %v\n", vb[0]/v, vb[1], err)
	// Output:
	// b = 0.363123, d(Vb)/dV = 0.894709 <nil>
}

// The share of power beyond the core, and the field on the axis.
func ExampleSolveField() {
	s, err := radial.SolveField(parabola(), 3, 0, 1)
	fmt.Printf("%.4f outside, %.4f on the axis %v\n", s.Outside, s.Nodes[0].Psi, err)
	// Output:
	// 0.1053 outside, 2.3055 on the axis <nil>
}

// The nodes of LP03.
func ExampleSolution() {
	s, err := radial.SolveField(parabola(), 20, 0, 3)
	before := s.Nodes[0]
	for _, n := range s.Nodes[1:] {
		if n.Psi > 0 != (before.Psi > 0) {
			fmt.Printf("psi changes sign between R = %.2f and %.2f\n", before.R, n.R)
		}
		before = n
	}
	fmt.Println(err)
	// Output:
	// psi changes sign between R = 0.16 and 0.19
	// psi changes sign between R = 0.41 and 0.44
	// <nil>
}

// The weights integrate over the core.
func ExampleNode() {
	s, err := radial.SolveField(parabola(), 20, 0, 1)
	sum := 0.0
	for _, n := range s.Nodes {
		sum += n.Weight
	}
	fmt.Printf("%.6f in the core, %.1e outside %v\n", sum, s.Outside, err)
	// Output:
	// 1.000000 in the core, 2.2e-09 outside <nil>
}

// The mean of R^2 over the power of LP01: 1/V for a parabola without an edge.
func ExampleSolution_Mean() {
	s, err := radial.SolveField(parabola(), 40, 0, 1)
	fmt.Printf("%.6f %v\n", s.Mean(func(_ int, r float64) float64 { return r * r }), err)
	// Output:
	// 0.025000 <nil>
}

// How much V^2 b of a step-index fibre of V = 2.4 rises when its edge moves outwards by 0.001.
func ExampleSolution_Edge() {
	p := radial.Profile{Pieces: []radial.Piece{{To: 1, F: func(float64) float64 { return 1 }}}}
	s, err := radial.SolveField(p, 2.4, 0, 1)
	fmt.Printf("%.6f %v\n", 2.4*2.4*s.Edge(0)*0.001, err)
	// Output:
	// 0.003419 <nil>
}
