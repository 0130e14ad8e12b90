package modes_test

import (
	"errors"
	"fmt"

	"glassthread/materials"
	"glassthread/modes"
)

// graded is a multimode fibre of 50 um core and NA 0.20.
func graded() modes.PowerLaw {
	return modes.PowerLaw{Radius: 25e-6, Core: materials.Constant(1.4662), Cladding: materials.Constant(1.4525), Alpha: 2}
}

// depressed is an invented W fibre: a core in a ring of lower index than the cladding.
func depressed() modes.Layered {
	return modes.Layered{
		Layers: []modes.Layer{
			{Outer: 4e-6, Glass: materials.Constant(1.4500)},
			{Outer: 9e-6, Glass: materials.Constant(1.4410)},
		},
		Cladding: materials.Constant(1.4440),
	}
}

// The groups of a graded multimode core at 850 nm: modes of one 2m + l have nearly one index.
func ExamplePowerLaw() {
	list, err := graded().Guided(850e-9)
	n := 0
	for _, e := range list {
		n += e.Degeneracy
	}
	fmt.Println(len(list), "labels,", n, "modes", err)
	for _, e := range list[:4] {
		fmt.Printf("%v %.6f\n", e.Mode, e.Index)
	}
	// Output:
	// 90 labels, 342 modes <nil>
	// LP01 1.465462
	// LP11 1.464723
	// LP21 1.463984
	// LP02 1.463984
}

// Single-mode cut-off of a parabolic core of NA 0.13 and 9 um: 2 pi a NA/3.518 is 1.045 um (W. A.
// Gambling, D. N. Payne and H. Matsumura, Electron. Lett. 13, 139, 1977, from memory).
func ExamplePowerLaw_LP() {
	f := modes.PowerLaw{Radius: 4.5e-6, Core: materials.Constant(1.45583), Cladding: materials.Constant(1.45001), Alpha: 2}
	x, err := f.LP(1, 1).CutoffWavelength(0.8e-6, 1.6e-6)
	fmt.Printf("%.3f um %v\n", x*1e6, err)
	// Output:
	// 1.045 um <nil>
}

func ExamplePowerLaw_Guided() {
	f := graded()
	f.Radius = 5e-6
	list, err := f.Guided(1310e-9)
	for _, e := range list {
		fmt.Printf("%v x%d %.5f\n", e.Mode, e.Degeneracy, e.Index)
	}
	fmt.Println(err)
	// Output:
	// LP01 x2 1.46054
	// LP11 x4 1.45509
	// <nil>
}

// What one entry of the list holds.
func ExampleGuidedRadial() {
	list, err := graded().Guided(850e-9)
	e := list[0]
	fmt.Printf("%v: n_eff %.6f, b %.4f, %d modes %v\n", e.Mode, e.Index, e.Solution.B, e.Degeneracy, err)
	// Output:
	// LP01: n_eff 1.465462, b 0.9459, 2 modes <nil>
}

func ExampleLayered() {
	list, err := depressed().Guided(900e-9)
	for _, e := range list {
		fmt.Printf("%v %.6f\n", e.Mode, e.Index)
	}
	fmt.Println(err)
	// Output:
	// LP01 1.448309
	// LP11 1.445792
	// <nil>
}

func ExampleLayered_LP() {
	n, err := materials.Index(depressed().LP(0, 1), 1.31e-6)
	fmt.Printf("%.6f %v\n", n, err)
	// Output:
	// 1.447006 <nil>
}

func ExampleLayered_Guided() {
	list, err := depressed().Guided(1.55e-6)
	fmt.Println(len(list), list[0].Mode, err)
	// Output:
	// 1 LP01 <nil>
}

// A core whose germania falls outwards from 8 per cent, in silica.
func ExampleLayer() {
	const radius = 10e-6
	fall := func(r float64) (materials.Medium, error) {
		return materials.GermaniaSilica(0.08 * (1 - (r/radius)*(r/radius)))
	}
	silica, err := materials.GermaniaSilica(0)
	f := modes.Layered{Layers: []modes.Layer{{Outer: radius, Vary: fall}}, Cladding: silica}
	const x = 1.55e-6
	n, err2 := f.LP(0, 1).Taylor(x)
	group, d := n[0]-x*n[1], -2*x*n[2]/materials.SpeedOfLight // as dispersion.At has them
	fmt.Printf("group index %.5f, D %.2f ps/(nm km) %v %v\n", group, d/1e-6, err, err2)
	// Output:
	// group index 1.47414, D 19.61 ps/(nm km) <nil> <nil>
}

// Any of the fibres.
func ExampleRadial() {
	for _, f := range []modes.Radial{graded(), depressed()} {
		n, err := materials.Index(modes.RadialLP{Fibre: f, L: 0, M: 1}, 1e-6)
		fmt.Printf("%.5f %v\n", n, err)
	}
	// Output:
	// 1.46533 <nil>
	// 1.44800 <nil>
}

func ExampleRadialLP() {
	var m materials.Medium = depressed().LP(0, 1)
	n, err := materials.GroupIndex(m, 1.31e-6)
	fmt.Printf("%.6f %v\n", n, err)
	// Output:
	// 1.451280 <nil>
}

func ExampleRadialLP_String() {
	fmt.Println(graded().LP(0, 1), graded().LP(12, 3))
	// Output: LP01 LP(12,3)
}

func ExampleRadialLP_Solve() {
	p, err := depressed().LP(0, 1).Solve(1.31e-6)
	fmt.Printf("V = %.3f, b = %.4f %v\n", p.V, p.B, err)
	_, err = depressed().LP(1, 1).Solve(1.31e-6)
	fmt.Println(errors.Is(err, modes.ErrCutoff))
	// Output:
	// V = 5.688, b = 0.5004 <nil>
	// true
}

func ExampleRadialLP_Taylor() {
	s, err := depressed().LP(0, 1).Taylor(1.31e-6)
	fmt.Printf("n = %.6f, dn/dx = %.4e per metre %v\n", s[0], s[1], err)
	// Output:
	// n = 1.447006, dn/dx = -3.2628e+03 per metre <nil>
}

// A W fibre loses even its fundamental mode.
func ExampleRadialLP_CutoffWavelength() {
	x, err := depressed().LP(0, 1).CutoffWavelength(0.8e-6, 5e-6)
	fmt.Printf("LP01 up to %.3f um %v\n", x*1e6, err)
	x, err = depressed().LP(1, 1).CutoffWavelength(0.8e-6, 5e-6)
	fmt.Printf("LP11 up to %.3f um %v\n", x*1e6, err)
	_, err = graded().LP(0, 1).CutoffWavelength(0.8e-6, 5e-6)
	fmt.Println(errors.Is(err, modes.ErrNoCutoff))
	// Output:
	// LP01 up to 2.608 um <nil>
	// LP11 up to 1.149 um <nil>
	// true
}
