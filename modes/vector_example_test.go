package modes_test

import (
	"errors"
	"fmt"

	"glassthread/materials"
	"glassthread/modes"
)

// thread is a silica thread of 0.8 um in air, of an invented design.
func thread() modes.Step {
	return modes.Step{Radius: 0.4e-6, Core: materials.FusedSilica(), Cladding: materials.Constant(1)}
}

func ExampleFamily() {
	for _, f := range []modes.Family{modes.TE, modes.TM, modes.HE, modes.EH} {
		fmt.Print(f, " ")
	}
	// Output: TE TM HE EH
}

func ExampleFamily_String() {
	fmt.Println(modes.HE.String())
	// Output: HE
}

// HE21's cut-off tends to that of TE01 and TM01 as the index difference vanishes (Snyder
// and Love 1983, table 12-4).
func ExampleCutoffVectorV() {
	for _, delta := range []float64{0.003, 0.26} {
		te, _ := modes.CutoffVectorV(delta, modes.TE, 0, 1)
		he, _ := modes.CutoffVectorV(delta, modes.HE, 2, 1)
		fmt.Printf("delta %v: TE01 %.6f, HE21 %.6f\n", delta, te, he)
	}
	// Output:
	// delta 0.003: TE01 2.404826, HE21 2.407332
	// delta 0.26: TE01 2.404826, HE21 2.755994
}

func ExampleSolveVector() {
	p, err := modes.SolveVector(2.5, 0.26, modes.HE, 1, 1)
	fmt.Printf("%v: u %.6f, w %.6f, b %.6f %v\n", p, p.U, p.W, p.B, err)
	_, err = modes.SolveVector(2.5, 0.26, modes.HE, 2, 1)
	fmt.Println(errors.Is(err, modes.ErrCutoff), err)
	// Output:
	// HE11: u 1.819545, w 1.714426, b 0.470281 <nil>
	// true modes.SolveVector: v = 2.5: must be above the cut-off of the mode 2.755993758 (the mode is not guided)
}

// The polarisation splitting of LP11 at an index difference of 1e-9: far below what the
// last digit of b can show.
func ExampleVector() {
	for _, f := range []modes.Family{modes.TE, modes.TM} {
		p, _ := modes.SolveVector(3, 1e-9, f, 0, 1)
		fmt.Printf("%v: b %.6f, shift %.6e\n", p, p.B, p.Shift)
	}
	// Output:
	// TE01: b 0.178517, shift 0.000000e+00
	// TM01: b 0.178517, shift -1.994437e-10
}

func ExampleVector_String() {
	fmt.Println(modes.Vector{Family: modes.EH, Nu: 12, M: 3})
	// Output: EH(12,3)
}

func ExampleVector_Degeneracy() {
	fmt.Println(modes.Vector{Family: modes.TM, M: 1}.Degeneracy(), modes.Vector{Family: modes.HE, Nu: 1, M: 1}.Degeneracy())
	// Output: 1 2
}

func ExampleVector_Group() {
	l, m := modes.Vector{Family: modes.EH, Nu: 1, M: 1}.Group()
	fmt.Printf("LP%d%d\n", l, m)
	// Output: LP21
}

// In weak guidance the 2, 4, 4 and 2 modes of LP01, LP11, LP21 and LP02 stay together.
func ExampleGuidedVector() {
	list, _ := modes.GuidedVector(4, 0.003)
	for _, p := range list {
		l, m := p.Group()
		fmt.Printf("%v x %d (LP%d%d) %.5f\n", p, p.Degeneracy(), l, m, p.B)
	}
	// Output:
	// HE11 x 2 (LP01) 0.77247
	// TE01 x 1 (LP11) 0.44006
	// HE21 x 2 (LP11) 0.43941
	// TM01 x 1 (LP11) 0.43937
	// EH11 x 2 (LP21) 0.04717
	// HE31 x 2 (LP21) 0.04631
	// HE12 x 2 (LP02) 0.00442
}

func ExampleStep_Vector() {
	n, err := materials.Index(thread().Vector(modes.HE, 1, 1), 633e-9)
	fmt.Printf("%.9f %v\n", n, err)
	// Output: 1.362499782 <nil>
}

func ExampleStepVector() {
	mode := thread().Vector(modes.HE, 2, 1)
	group, err := materials.GroupIndex(mode, 633e-9)
	fmt.Printf("%v: group index %.6f %v\n", mode, group, err)
	// Output: HE21: group index 1.667245 <nil>
}

func ExampleStepVector_String() {
	fmt.Println(thread().Vector(modes.TM, 0, 1))
	// Output: TM01
}

func ExampleStepVector_Degeneracy() {
	fmt.Println(thread().Vector(modes.TM, 0, 1).Degeneracy())
	// Output: 1
}

func ExampleStepVector_Group() {
	fmt.Println(thread().Vector(modes.TM, 0, 1).Group())
	// Output: LP11
}

func ExampleStepVector_Taylor() {
	n, err := thread().Vector(modes.HE, 1, 1).Taylor(633e-9)
	fmt.Printf("n %.6f, dn/dx %.4e /m %v\n", n.Value(), n.Derivative(1), err)
	// Output: n 1.362500, dn/dx -2.8928e+05 /m <nil>
}

func ExampleStepVector_Solve() {
	p, err := thread().Vector(modes.TE, 0, 1).Solve(633e-9)
	fmt.Printf("V %.4f, delta %.4f, b %.6f %v\n", p.V, p.Delta, p.B, err)
	// Output: V 4.2073, delta 0.2645, b 0.480463 <nil>
}

// By how much polarisation splits LP11 of a standard fibre at 850 nm.
func ExampleStepVector_IndexShift() {
	for _, mode := range []modes.StepVector{fibre().Vector(modes.TE, 0, 1), fibre().Vector(modes.TM, 0, 1), fibre().Vector(modes.HE, 2, 1)} {
		shift, _ := mode.IndexShift(850e-9)
		fmt.Printf("%v %.4e\n", mode, shift)
	}
	// Output:
	// TE01 0.0000e+00
	// TM01 -4.7810e-06
	// HE21 -4.7776e-06
}

// The waveguide part of a thread's dispersion outweighs that of its glass.
func ExampleStepVector_Parts() {
	material, waveguide, err := thread().Vector(modes.HE, 1, 1).Parts(800e-9)
	fmt.Printf("second derivatives %.3e and %.3e /m2 %v\n", material.Derivative(2), waveguide.Derivative(2), err)
	// Output: second derivatives 3.945e+10 and -1.466e+11 /m2 <nil>
}

// L. Tong, J. Lou and E. Mazur (Opt. Express 12, 1025, 2004, from memory): a silica thread
// of 457 nm in air is at its single-mode limit at 633 nm.
func ExampleStepVector_CutoffWavelength() {
	f := thread()
	f.Radius = 457e-9 / 2
	x, err := f.Vector(modes.TE, 0, 1).CutoffWavelength(400e-9, 1000e-9)
	fmt.Printf("%.0f nm %v\n", x*1e9, err)
	// Output: 633 nm <nil>
}

func ExampleStep_GuidedVector() {
	list, _ := thread().GuidedVector(633e-9)
	for _, g := range list {
		fmt.Printf("%v %.6f\n", g.Mode, g.Index)
	}
	// Output:
	// HE11 1.362500
	// TE01 1.240768
	// HE21 1.206245
	// TM01 1.201422
	// EH11 1.052139
	// HE12 1.008178
}

func ExampleGuidedVectorMode() {
	list, _ := thread().GuidedVector(633e-9)
	count := 0
	for _, g := range list {
		count += g.Degeneracy
	}
	fmt.Println(len(list), "labels,", count, "modes")
	// Output: 6 labels, 10 modes
}
