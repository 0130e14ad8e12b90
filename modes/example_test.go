package modes_test

import (
	"errors"
	"fmt"

	"glassthread/materials"
	"glassthread/modes"
	"glassthread/numap"
)

// fibre is a step-index fibre of an invented design: germania-silica core of 3.6 mol %,
// 8.2 um across, in silica.
func fibre() modes.Step {
	core, err := materials.GermaniaSilica(0.036)
	if err != nil {
		panic(err)
	}
	return modes.Step{Radius: 4.1e-6, Core: core, Cladding: materials.FusedSilica()}
}

// H.-D. Rudolph and E.-G. Neumann (Nachrichtentech. Z. 29, 328, 1976, from memory) give
// w = 1.1428 V - 0.9960 for LP01, good to 0.1 % or so for V from 1.5 to 2.5.
func ExampleSolveLP() {
	p, err := modes.SolveLP(2.4, 0, 1)
	fmt.Printf("u %.6f, w %.6f, b %.6f %v\n", p.U, p.W, p.B, err)
	fmt.Printf("Rudolph and Neumann: w %.3f\n", 1.1428*2.4-0.9960)
	_, err = modes.SolveLP(2.4, 1, 1)
	fmt.Println(errors.Is(err, modes.ErrCutoff), err)
	// Output:
	// u 1.645311, w 1.747270, b 0.530026 <nil>
	// Rudolph and Neumann: w 1.747
	// true modes.SolveLP: v = 2.4: must be above the cut-off of the mode 2.404825558 (the mode is not guided)
}

func ExampleLP() {
	p, _ := modes.SolveLP(5, 2, 1)
	fmt.Printf("LP(%d,%d) at V = %v: u^2 + w^2 = %.6f\n", p.L, p.M, p.V, p.U*p.U+p.W*p.W)
	// Output: LP(2,1) at V = 5: u^2 + w^2 = 25.000000
}

// The cut-offs are zeros of Bessel functions (D. Gloge, Appl. Opt. 10, 2252, 1971; NIST DLMF
// 10.21: j01 = 2.40483, j11 = 3.83171, j21 = 5.13562).
func ExampleCutoffV() {
	for _, label := range [][2]int{{0, 1}, {1, 1}, {2, 1}, {0, 2}, {3, 1}} {
		v, err := modes.CutoffV(label[0], label[1])
		fmt.Printf("LP%d%d %.5f %v\n", label[0], label[1], v, err)
	}
	// Output:
	// LP01 0.00000 <nil>
	// LP11 2.40483 <nil>
	// LP21 3.83171 <nil>
	// LP02 3.83171 <nil>
	// LP31 5.13562 <nil>
}

func ExampleGuidedLP() {
	list, err := modes.GuidedLP(4.5)
	for _, p := range list {
		fmt.Printf("LP%d%d b %.5f\n", p.L, p.M, p.B)
	}
	fmt.Println(err)
	// Output:
	// LP01 b 0.81131
	// LP11 b 0.53096
	// LP21 b 0.18466
	// LP02 b 0.10103
	// <nil>
}

// J. M. Senior, Optical Fiber Communications, example 2.4 (from memory): V = 75.8 and, by
// V^2/2, 2873 modes. Counted one by one they are 0.5 % more.
func ExampleLP_Degeneracy() {
	list, _ := modes.GuidedLP(75.8)
	count := 0
	for _, p := range list {
		count += p.Degeneracy()
	}
	rough, _ := numap.StepModeCount(75.8)
	fmt.Printf("%d modes under %d labels; V^2/2 = %.0f\n", count, len(list), rough)
	// Output: 2888 modes under 734 labels; V^2/2 = 2873
}

// D. Gloge, Appl. Opt. 10, 2252 (1971), figure 5: b, d(Vb)/dV and V d2(Vb)/dV2 of LP01.
func ExampleLP_GroupCurve() {
	for _, v := range []float64{1, 1.5, 2, 2.4, 3} {
		p, _ := modes.SolveLP(v, 0, 1)
		fmt.Printf("V %.1f: b %.4f, d(Vb)/dV %.4f, V d2(Vb)/dV2 %.4f\n", v, p.B, p.GroupCurve(), p.DispersionCurve())
	}
	// Output:
	// V 1.0: b 0.0410, d(Vb)/dV 0.3025, V d2(Vb)/dV2 1.3456
	// V 1.5: b 0.2292, d(Vb)/dV 0.8492, V d2(Vb)/dV2 1.0631
	// V 2.0: b 0.4162, d(Vb)/dV 1.0653, V d2(Vb)/dV2 0.4623
	// V 2.4: b 0.5300, d(Vb)/dV 1.1236, V d2(Vb)/dV2 0.1951
	// V 3.0: b 0.6515, d(Vb)/dV 1.1431, V d2(Vb)/dV2 0.0015
}

// The waveguide dispersion of LP01 in weak guidance (D. Gloge, Appl. Opt. 10, 2442, 1971):
// -((n1 - n2)/(c x)) V d2(V b)/dV2, here for n1 - n2 = 0.005 at 1550 nm and V = 2.
func ExampleLP_DispersionCurve() {
	p, _ := modes.SolveLP(2, 0, 1)
	d := -0.005 / (materials.SpeedOfLight * 1550e-9) * p.DispersionCurve()
	fmt.Printf("%.2f ps/(nm km)\n", d/1e-6)
	// Output: -4.97 ps/(nm km)
}

// b near a solved mode without solving again.
func ExampleLP_Series() {
	p, _ := modes.SolveLP(2.4, 0, 1)
	near, _ := modes.SolveLP(2.41, 0, 1)
	fmt.Printf("%.9f %.9f\n", p.Series().At(0.01), near.B)
	// Output: 0.532490852 0.532490852
}

// D. Gloge, Appl. Opt. 10, 2252 (1971), as quoted by Keiser (from memory): about 84 % of the
// power of LP01 in the core at V = 2.405.
func ExampleLP_CorePower() {
	p, _ := modes.SolveLP(2.405, 0, 1)
	fmt.Printf("%.1f %%\n", 100*p.CorePower())
	// Output: 82.8 %
}

func ExampleStep() {
	f := fibre()
	for _, x := range []float64{1310e-9, 1550e-9} {
		v, err := f.V(x)
		n, err2 := materials.Index(f.LP(0, 1), x)
		fmt.Printf("%.0f nm: V %.4f, effective index %.6f %v %v\n", x*1e9, v, n, err, err2)
	}
	// Output:
	// 1310 nm: V 2.4552, effective index 1.449729 <nil> <nil>
	// 1550 nm: V 2.0787, effective index 1.446411 <nil> <nil>
}

func ExampleStep_NA() {
	na, err := fibre().NA(1310e-9)
	fmt.Printf("%.4f %v\n", na, err)
	// Output: 0.1249 <nil>
}

func ExampleStep_V() {
	f := fibre()
	v, err := f.V(850e-9)
	fmt.Printf("%.3f %v\n", v, err)
	f.Core, f.Cladding = f.Cladding, f.Core
	_, err = f.V(850e-9)
	fmt.Println(errors.Is(err, numap.ErrNotGuiding))
	// Output:
	// 3.796 <nil>
	// true
}

// The same fibre at 850 nm is no longer a single-mode one.
func ExampleStep_Guided() {
	list, err := fibre().Guided(850e-9)
	for _, g := range list {
		fmt.Printf("%v: index %.6f, %d modes\n", g.Mode, g.Index, g.Degeneracy)
	}
	fmt.Println(err)
	// Output:
	// LP01: index 1.456563, 2 modes
	// LP11: index 1.454637, 4 modes
	// <nil>
}

func ExampleGuided() {
	list, _ := fibre().Guided(850e-9)
	last := list[len(list)-1]
	fmt.Printf("%v: V %.3f, b %.4f, %.0f %% of its power in the core\n",
		last.Mode, last.Solution.V, last.Solution.B, 100*last.Solution.CorePower())
	// Output: LP11: V 3.796, b 0.3962, 83 % of its power in the core
}

// A mode is a medium: it has an index and a group index like a glass.
func ExampleStep_LP() {
	mode := fibre().LP(0, 1)
	n, _ := materials.Index(mode, 1550e-9)
	group, err := materials.GroupIndex(mode, 1550e-9)
	fmt.Printf("%v: %.5f, group %.5f %v\n", mode, n, group, err)
	// Output: LP01: 1.44641, group 1.46829 <nil>
}

func ExampleStepLP() {
	mode := modes.StepLP{Fibre: fibre(), L: 1, M: 1}
	_, err := mode.Solve(1550e-9)
	fmt.Println(errors.Is(err, modes.ErrCutoff))
	// Output: true
}

func ExampleStepLP_String() {
	fmt.Println(fibre().LP(0, 1), fibre().LP(12, 3))
	// Output: LP01 LP(12,3)
}

// The k-th derivative of the effective index by wavelength.
func ExampleStepLP_Taylor() {
	s, err := fibre().LP(0, 1).Taylor(1310e-9)
	fmt.Printf("n %.6f, n' %.4e per m, n'' %.3e per m^2 %v\n", s.Value(), s.Derivative(1), s.Derivative(2), err)
	// Output: n 1.449729, n' -1.3664e+04 per m, n'' -6.740e+07 per m^2 <nil>
}

func ExampleStepLP_Solve() {
	p, err := fibre().LP(0, 1).Solve(1310e-9)
	fmt.Printf("V %.4f, b %.4f %v\n", p.V, p.B, err)
	// Output: V 2.4552, b 0.5434 <nil>
}

// How steeply the effective index falls with wavelength by each cause.
func ExampleStepLP_Parts() {
	mode := fibre().LP(0, 1)
	whole, _ := mode.Taylor(1310e-9)
	material, waveguide, err := mode.Parts(1310e-9)
	fmt.Printf("%.0f per m: %.0f the glasses, %.0f the guide %v\n", whole[1], material[1], waveguide[1], err)
	// Output: -13664 per m: -11266 the glasses, -2398 the guide <nil>
}

// J. M. Senior, Optical Fiber Communications, example 2.8 (from memory): a core of radius 4.5
// um with n1 = 1.46 and Delta = 0.25 % carries one mode above 1214 nm.
func ExampleStepLP_CutoffWavelength() {
	cladding, _ := numap.CladdingForDelta(1.46, 0.0025)
	f := modes.Step{Radius: 4.5e-6, Core: materials.Constant(1.46), Cladding: materials.Constant(cladding)}
	x, err := f.LP(1, 1).CutoffWavelength(0.8e-6, 2e-6)
	fmt.Printf("%.0f nm %v\n", x*1e9, err)
	_, err = f.LP(0, 1).CutoffWavelength(0.8e-6, 2e-6)
	fmt.Println(errors.Is(err, modes.ErrNoCutoff))
	// Output:
	// 1214 nm <nil>
	// true
}
