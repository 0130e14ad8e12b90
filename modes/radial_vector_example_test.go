package modes_test

import (
	"fmt"

	"glassthread/materials"
	"glassthread/modes"
)

// coatedThread is a silica thread in air with an invented coat of fluoride glass.
func coatedThread(radius float64) modes.Layered {
	return modes.Layered{
		Layers:   []modes.Layer{{Outer: radius, Glass: materials.FusedSilica()}, {Outer: 1.2 * radius, Glass: materials.Constant(1.38)}},
		Cladding: materials.Constant(1),
	}
}

// L. Tong, J. Lou and E. Mazur (Opt. Express 12, 1025, 2004, from memory, recomputed): a
// silica thread in air carries one mode at 633 nm up to a diameter of 457 nm.
func ExampleRadialVector_CutoffWavelength() {
	f := modes.Layered{Layers: []modes.Layer{{Outer: 457e-9 / 2, Glass: materials.FusedSilica()}}, Cladding: materials.Constant(1)}
	x, err := f.Vector(modes.TE, 0, 1).CutoffWavelength(0.4e-6, 1e-6)
	fmt.Printf("TE01 to %.0f nm %v\n", x*1e9, err)
	// Output: TE01 to 633 nm <nil>
}

func ExampleLayered_GuidedVector() {
	list, err := coatedThread(0.4e-6).GuidedVector(0.8e-6)
	for _, g := range list {
		fmt.Printf("%v %.6f\n", g.Mode, g.Index)
	}
	fmt.Println(err)
	// Output:
	// HE11 1.342895
	// TE01 1.201981
	// TM01 1.165445
	// HE21 1.162659
	// EH11 1.003273
	// HE12 1.000000
	// <nil>
}

func ExampleLayered_Vector() {
	m := coatedThread(0.4e-6).Vector(modes.HE, 1, 1)
	n, err := m.Taylor(0.8e-6)
	fmt.Printf("%v: index %.6f, group index %.6f %v\n", m, n[0], n[0]-0.8e-6*n[1], err)
	// Output:
	// HE11: index 1.342895, group index 1.541042 <nil>
}

func ExamplePowerLaw_GuidedVector() {
	core, _ := materials.GermaniaSilica(0.1)
	f := modes.PowerLaw{Radius: 3e-6, Core: core, Cladding: materials.FusedSilica(), Alpha: 2}
	list, err := f.GuidedVector(0.9e-6)
	for _, g := range list {
		fmt.Printf("%v %.9f, %d\n", g.Mode, g.Index, g.Degeneracy)
	}
	fmt.Println(err)
	// Output:
	// HE11 1.459906896, 2
	// TM01 1.453610137, 1
	// TE01 1.453600473, 1
	// HE21 1.453579304, 2
	// <nil>
}

func ExamplePowerLaw_Vector() {
	core, _ := materials.GermaniaSilica(0.1)
	f := modes.PowerLaw{Radius: 3e-6, Core: core, Cladding: materials.FusedSilica(), Alpha: 2}
	m := f.Vector(modes.HE, 2, 1)
	fmt.Println(m, m.Degeneracy(), m.Group())
	// Output: HE21 2 LP11
}

// By how much polarisation splits LP11.
func ExampleRadialVector_IndexShift() {
	core, _ := materials.GermaniaSilica(0.1)
	f := modes.PowerLaw{Radius: 3e-6, Core: core, Cladding: materials.FusedSilica(), Alpha: 2}
	for _, m := range []modes.RadialVector{f.Vector(modes.TE, 0, 1), f.Vector(modes.HE, 2, 1), f.Vector(modes.TM, 0, 1)} {
		shift, err := m.IndexShift(0.9e-6)
		fmt.Printf("%v %.4e %v\n", m, shift, err)
	}
	// Output:
	// TE01 0.0000e+00 <nil>
	// HE21 -2.1169e-05 <nil>
	// TM01 9.6636e-06 <nil>
}

func ExampleRadialVector_Solve() {
	s, err := coatedThread(0.4e-6).Vector(modes.TM, 0, 1).Solve(0.8e-6)
	fmt.Printf("V %.6f, b %.6f %v\n", s.V, s.B, err)
	// Output:
	// V 3.975659, b 0.322140 <nil>
}
