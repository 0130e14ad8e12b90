package snell_test

import (
	"errors"
	"fmt"
	"math"
	"math/cmplx"

	"glassthread/materials"
	"glassthread/snell"
)

const degree = math.Pi / 180

func ExampleRefract() {
	inside, err := snell.Refract(1, 1.48, 14*degree)
	fmt.Printf("%.2f deg %v\n", inside/degree, err)

	_, err = snell.Refract(1.48, 1.46, 81*degree)
	fmt.Println(errors.Is(err, snell.ErrTotalReflection))
	// Output:
	// 9.41 deg <nil>
	// true
}

// Keiser, Optical Fiber Communications, chapter 2: a core of 1.48 in a cladding
// of 1.46 (from memory, recomputed).
func ExampleCriticalAngle() {
	critical, err := snell.CriticalAngle(1.48, 1.46)
	fmt.Printf("%.2f deg %v\n", critical/degree, err)
	// Output: 80.57 deg <nil>
}

func ExampleBrewster() {
	angle, _ := snell.Brewster(1, 1.5)
	c, _ := snell.Fresnel(1, 1.5, angle)
	fmt.Printf("%.1f deg, S %.1f %%, P %.1f %%\n", angle/degree, 100*c.S.Reflectance, 100*c.P.Reflectance)
	// Output: 56.3 deg, S 14.8 %, P 0.0 %
}

// Fresnel's rhomb: Born and Wolf, Principles of Optics, section 1.5.4, glass of
// 1.51 (from memory, recomputed). Two reflections of 45 degrees make circular
// light.
func ExampleTotalReflectionPhase() {
	for _, angle := range []float64{48 + 37./60, 54 + 37./60, 51 + 20./60} {
		phase, _ := snell.TotalReflectionPhase(1.51, 1, angle*degree)
		fmt.Printf("%.2f\n", phase.Difference/degree)
	}
	// Output:
	// 44.99
	// 45.00
	// 45.94
}

func ExamplePhase() {
	phase, _ := snell.TotalReflectionPhase(1.5, 1, 45*degree)
	fmt.Printf("S %.2f, P %.2f, difference %.2f rad\n", phase.S, phase.P, phase.Difference)
	// Output: S -0.64, P -1.29, difference 0.64 rad
}

// The field of a core ray two degrees off the axis in the cladding around it; a cladding must be many
// times as thick for the ray not to feel what lies beyond.
func ExamplePenetrationDepth() {
	depth, err := snell.PenetrationDepth(1.4502, 1.444, 88*degree, 1550e-9)
	fmt.Printf("%.2f um %v\n", depth*1e6, err)
	// Output: 1.99 um <nil>
}

func ExampleLateralShift() {
	s, p, _ := snell.LateralShift(1.515, 1, 45*degree, 633e-9)
	fmt.Printf("S %.0f nm, P %.0f nm across the beam\n", s.Beam*1e9, p.Beam*1e9)
	// Output: S 371 nm, P 573 nm across the beam
}

func ExampleShift() {
	s, _, _ := snell.LateralShift(1.515, 1, 60*degree, 633e-9)
	fmt.Printf("%.0f nm across the beam, %.0f nm along the face\n", s.Beam*1e9, s.Along*1e9)
	// Output: 205 nm across the beam, 411 nm along the face
}

// Silver at 589.3 nm: Born and Wolf, section 14.2, table of optical constants,
// reflectance 0.94 (from memory, recomputed).
func ExampleFresnel() {
	c, err := snell.Fresnel(1, 0.20+3.44i, 0)
	fmt.Printf("%.2f %v\n", c.S.Reflectance, err)
	// Output: 0.94 <nil>
}

// An eight-degree polished end still reflects as much power as a square one; it
// only sends it out of the core.
func ExampleCoefficients_Unpolarised() {
	c, _ := snell.Fresnel(1.4502, 1, 8*degree)
	fmt.Printf("%.2f %%\n", 100*c.Unpolarised().Reflectance)
	// Output: 3.38 %
}

func ExampleCoefficients() {
	c, _ := snell.Fresnel(1, 1.5, 45*degree)
	fmt.Printf("R: S %.4f, P %.4f\n", c.S.Reflectance, c.P.Reflectance)
	fmt.Printf("T: S %.4f, P %.4f\n", c.S.Transmittance, c.P.Transmittance)
	// Output:
	// R: S 0.0920, P 0.0085
	// T: S 0.9080, P 0.9915
}

func ExamplePolarised() {
	c, _ := snell.Fresnel(1.5, 1, 45*degree)
	w := c.S
	fmt.Printf("|r| = %.3f, phase %.3f rad, R = %v\n", cmplx.Abs(w.Reflection), cmplx.Phase(w.Reflection), w.Reflectance)
	// Output: |r| = 1.000, phase -0.644 rad, R = 1
}

func ExamplePowers() {
	p := snell.Powers{Reflectance: 0.04, Transmittance: 0.96}
	back, _ := p.ReturnLoss()
	through, _ := p.InsertionLoss()
	fmt.Printf("return loss %.2f dB, insertion loss %.3f dB\n", back, through)
	// Output: return loss 13.98 dB, insertion loss 0.177 dB
}

func ExamplePowers_ReturnLoss() {
	matched, _ := snell.CleavedEnd(1.45, 1.45)
	_, err := matched.ReturnLoss()
	fmt.Println(errors.Is(err, snell.ErrNoPower))
	// Output: true
}

func ExamplePowers_InsertionLoss() {
	p := snell.Powers{Transmittance: 0.5, Absorptance: 0.5}
	loss, _ := p.InsertionLoss()
	fmt.Printf("%.2f dB\n", loss)
	// Output: 3.01 dB
}

// A quarter wave of magnesium fluoride on glass of 1.5 leaves 1.4 % of the 4 %
// (handbook), at normal incidence.
func ExampleStack_At() {
	film, _ := snell.QuarterWave(1.38, 550e-9)
	lens := snell.Stack{Entrance: 1, Films: []snell.Film{film}, Exit: 1.5}
	for _, angle := range []float64{0, 30, 60} {
		c, _ := lens.At(550e-9, angle*degree)
		fmt.Printf("%2.0f deg: %.1f %%\n", angle, 100*c.Unpolarised().Reflectance)
	}
	// Output:
	//  0 deg: 1.4 %
	// 30 deg: 1.5 %
	// 60 deg: 5.5 %
}

// Frustrated total reflection: how much crosses a gap of air between two prisms.
func ExampleStack() {
	for _, gap := range []float64{100e-9, 500e-9, 1e-6} {
		prisms := snell.Stack{Entrance: 1.515, Films: []snell.Film{{Index: 1, Thickness: gap}}, Exit: 1.515}
		c, _ := prisms.At(633e-9, 45*degree)
		fmt.Printf("%4.0f nm: S %.4f, P %.4f\n", gap*1e9, c.S.Transmittance, c.P.Transmittance)
	}
	// Output:
	//  100 nm: S 0.7258, P 0.8632
	//  500 nm: S 0.0359, P 0.0816
	// 1000 nm: S 0.0008, P 0.0019
}

// A metal mirror on a fibre's end: 100 nm of aluminium (indices of this order are
// in the handbooks for 1550 nm).
func ExampleFilm() {
	end := snell.Stack{Entrance: 1.444, Films: []snell.Film{{Index: 1.5 + 15i, Thickness: 100e-9}}, Exit: 1}
	c, _ := end.At(1550e-9, 0)
	fmt.Printf("R %.3f, T %.1e, A %.3f\n", c.S.Reflectance, c.S.Transmittance, c.S.Absorptance)
	// Output: R 0.963, T 5.1e-07, A 0.037
}

// The return loss of a clean silica end in air is 14.7 to 14.8 dB at 1550 nm
// (common practice). An open end also lets out the light of the laser behind it:
// make sure that it is off, or below the eye-safe limit, before looking at one.
func ExampleCleavedEnd() {
	silica, _ := materials.Index(materials.FusedSilica(), 1550e-9)
	end, _ := snell.CleavedEnd(silica, 1)
	loss, err := end.ReturnLoss()
	fmt.Printf("%.1f dB %v\n", loss, err)
	// Output: 14.8 dB <nil>
}

// The loss of a gap of air between two silica fibres is about 0.3 dB when its
// width is not known (common practice).
func ExampleAirGap() {
	gap, _ := snell.AirGap(1.444, 1.444).Incoherent()
	loss, _ := gap.InsertionLoss()
	fmt.Printf("%.2f dB\n", loss)
	// Output: 0.29 dB
}

// A gel that matches the fibres to 0.01 in a joint of unknown width.
func ExampleJoint() {
	joint, _ := snell.Joint{First: 1.4502, Filling: 1.46, Second: 1.4502}.Incoherent()
	back, _ := joint.ReturnLoss()
	fmt.Printf("return loss %.1f dB\n", back)
	// Output: return loss 46.4 dB
}

func ExampleJoint_Incoherent() {
	p, _ := snell.Joint{First: 1.444, Filling: 1.33, Second: 1.444}.Incoherent() // a wet joint
	fmt.Printf("R %.2f %%, T %.2f %%\n", 100*p.Reflectance, 100*p.Transmittance)
	// Output: R 0.34 %, T 99.66 %
}

// The faces of a narrow gap interfere: a half wave of air is no worse than
// contact, and a quarter wave costs twice the mean.
func ExampleJoint_Coherent() {
	for _, gap := range []float64{1550e-9 / 8, 1550e-9 / 4, 1550e-9 / 2} {
		p, _ := snell.AirGap(1.444, 1.444).Coherent(gap, 1550e-9)
		loss, _ := p.InsertionLoss()
		fmt.Printf("%3.0f nm: %.2f dB\n", gap*1e9, loss)
	}
	// Output:
	// 194 nm: 0.30 dB
	// 388 nm: 0.57 dB
	// 775 nm: 0.00 dB
}

func ExampleQuarterWave() {
	film, _ := snell.QuarterWave(1.38, 550e-9)
	fmt.Printf("%.1f nm\n", film.Thickness*1e9)
	// Output: 99.6 nm
}

func ExampleAntiReflection() {
	film, _ := snell.AntiReflection(1.444, 1, 1550e-9)
	fmt.Printf("index %.3f, %.1f nm thick\n", real(film.Index), film.Thickness*1e9)
	// Output: index 1.202, 322.5 nm thick
}

// A coating made for 1550 nm, at 1310 nm.
func ExampleCoated() {
	film, _ := snell.AntiReflection(1.444, 1, 1550e-9)
	end, _ := snell.Coated(1.444, film, 1, 1310e-9)
	loss, _ := end.ReturnLoss()
	fmt.Printf("%.1f dB\n", loss)
	// Output: 25.6 dB
}
