package numap_test

import (
	"errors"
	"fmt"
	"math"

	"glassthread/numap"
)

const degree = math.Pi / 180

// G. Keiser, Optical Fiber Communications, chapter 2: a core of 1.48 in a cladding
// of 1.46 has NA 0.242 and accepts 14.0 degrees in air (from memory, recomputed).
func ExampleNA() {
	na, err := numap.NA(1.48, 1.46)
	fmt.Printf("%.3f %v\n", na, err)
	angle, err := numap.AcceptanceAngle(na, 1)
	fmt.Printf("%.1f degrees %v\n", angle/degree, err)
	_, err = numap.NA(1.46, 1.48)
	fmt.Println(errors.Is(err, numap.ErrNotGuiding), err)
	// Output:
	// 0.242 <nil>
	// 14.0 degrees <nil>
	// true numap.NA: core = 1.46: must be above the index of the cladding (not guiding)
}

// J. M. Senior, Optical Fiber Communications, example 2.1: indices 1.50 and 1.47 give
// NA 0.30 and an acceptance angle of 17.4 degrees in air (from memory, recomputed).
func ExampleAcceptanceAngle() {
	na, _ := numap.NA(1.50, 1.47)
	air, err := numap.AcceptanceAngle(na, 1)
	fmt.Printf("NA %.2f, in air %.1f degrees %v\n", na, air/degree, err)
	water, _ := numap.AcceptanceAngle(na, 1.333)
	fmt.Printf("in water %.1f degrees\n", water/degree)
	// Output:
	// NA 0.30, in air 17.4 degrees <nil>
	// in water 12.9 degrees
}

// Senior, example 2.2: a core of 1.46 and a relative index difference of 1 % (weak
// form) give NA 0.21, 0.13 sr in air and a critical angle of 81.9 degrees at the wall
// (from memory, recomputed).
func ExampleNAWeak() {
	na, err := numap.NAWeak(1.46, 0.01)
	solid, _ := numap.SolidAngleWeak(na, 1)
	cladding, _ := numap.CladdingForDeltaWeak(1.46, 0.01)
	fmt.Printf("NA %.2f, %.2f sr, %.1f degrees %v\n", na, solid, math.Asin(cladding/1.46)/degree, err)
	exact, _ := numap.NA(1.46, cladding)
	fmt.Printf("weak %.5f, exact %.5f\n", na, exact)
	// Output:
	// NA 0.21, 0.13 sr, 81.9 degrees <nil>
	// weak 0.20648, exact 0.20596
}

func ExampleDelta() {
	exact, _ := numap.Delta(1.48, 1.46)
	weak, _ := numap.DeltaWeak(1.48, 1.46)
	trench, _ := numap.Delta(1.44, 1.444)
	fmt.Printf("exact %.4f %%, weak %.4f %%, a trench %.2f %%\n", 100*exact, 100*weak, 100*trench)
	// Output: exact 1.3422 %, weak 1.3514 %, a trench -0.28 %
}

func ExampleDeltaWeak() {
	delta, err := numap.DeltaWeak(1.50, 1.47)
	fmt.Printf("%.2f %% %v\n", 100*delta, err)
	// Output: 2.00 % <nil>
}

func ExampleSolidAngle() {
	exact, _ := numap.SolidAngle(0.5, 1)
	weak, _ := numap.SolidAngleWeak(0.5, 1)
	fmt.Printf("exact %.4f sr, weak %.4f sr\n", exact, weak)
	// Output: exact 0.8418 sr, weak 0.7854 sr
}

func ExampleSolidAngleWeak() {
	solid, err := numap.SolidAngleWeak(0.2, 1)
	fmt.Printf("%.3f sr %v\n", solid, err)
	// Output: 0.126 sr <nil>
}

func ExampleCladdingForNA() {
	cladding, err := numap.CladdingForNA(1.4500, 0.12)
	fmt.Printf("%.4f %v\n", cladding, err)
	// Output: 1.4450 <nil>
}

func ExampleCoreForNA() {
	core, err := numap.CoreForNA(1.444, 0.12)
	fmt.Printf("%.4f %v\n", core, err)
	// Output: 1.4490 <nil>
}

func ExampleCladdingForDelta() {
	cladding, err := numap.CladdingForDelta(1.48, 0.015)
	fmt.Printf("%.6f %v\n", cladding, err)
	// Output: 1.457631 <nil>
}

func ExampleCladdingForDeltaWeak() {
	cladding, err := numap.CladdingForDeltaWeak(1.48, 0.015)
	fmt.Printf("%.6f %v\n", cladding, err)
	// Output: 1.457800 <nil>
}

func ExampleCoreForDelta() {
	core, err := numap.CoreForDelta(1.444, 0.0035)
	fmt.Printf("%.6f %v\n", core, err)
	// Output: 1.449081 <nil>
}

func ExampleCoreForDeltaWeak() {
	core, err := numap.CoreForDeltaWeak(1.444, 0.0035)
	fmt.Printf("%.6f %v\n", core, err)
	// Output: 1.449072 <nil>
}

// Senior, example 2.4: a step of 80 um diameter, core index 1.48, 1.5 % (weak form),
// at 0.85 um has V = 75.8 and guides 2873 modes (from memory, recomputed; the book
// goes on from the rounded V).
func ExampleV() {
	na, _ := numap.NAWeak(1.48, 0.015)
	v, err := numap.V(40e-6, na, 0.85e-6)
	fmt.Printf("V %.1f %v\n", v, err)
	modes, _ := numap.StepModeCount(math.Round(v*10) / 10)
	fmt.Printf("%.0f modes\n", modes)
	// Output:
	// V 75.8 <nil>
	// 2873 modes
}

func ExampleStepModeCount() {
	modes, err := numap.StepModeCount(40)
	fmt.Println(modes, err)
	// Output: 800 <nil>
}

// Senior, example 2.5: a parabolic core of 50 um diameter and NA 0.2 at 1 um has
// V = 31.4 and guides 247 modes (from memory, recomputed).
func ExamplePowerLawModeCount() {
	v, _ := numap.V(25e-6, 0.2, 1e-6)
	modes, err := numap.PowerLawModeCount(v, 2)
	fmt.Printf("V %.1f, %.0f modes %v\n", v, modes, err)
	// Output: V 31.4, 247 modes <nil>
}

func ExamplePowerLawModeGroups() {
	v, _ := numap.V(25e-6, 0.2, 0.85e-6)
	groups, err := numap.PowerLawModeGroups(v, 2)
	fmt.Printf("%.1f %v\n", groups, err)
	// Output: 18.5 <nil>
}

// The groups of a parabola are evenly spaced: b = 1 - 2 g/V is exact in an unbounded
// one (Laguerre-Gauss modes; M. J. Adams, An Introduction to Optical Waveguides, 1981).
func ExamplePowerLawGroupB() {
	for g := 1.0; g <= 3; g++ {
		b, err := numap.PowerLawGroupB(g, 40, 2)
		fmt.Printf("%.2f %v\n", b, err)
	}
	// Output:
	// 0.95 <nil>
	// 0.90 <nil>
	// 0.85 <nil>
}

// L. Tong, J. Lou and E. Mazur, Opt. Express 12, 1025 (2004): a thread of silica
// (index 1.457) in air is single-mode at 633 nm up to a diameter of 457 nm (from
// memory, recomputed).
func ExampleRadiusForV() {
	na, _ := numap.NA(1.457, 1)
	radius, err := numap.RadiusForV(numap.StepSingleModeV, na, 633e-9)
	fmt.Printf("%.0f nm %v\n", 2*radius*1e9, err)
	// Output: 457 nm <nil>
}

func ExampleNAForV() {
	na, err := numap.NAForV(2.3, 4.1e-6, 1.31e-6)
	fmt.Printf("%.4f %v\n", na, err)
	// Output: 0.1170 <nil>
}

// Senior, example 2.8: a step of radius 4.5 um, core index 1.46 and 0.25 % (weak form)
// is single-mode above 1214 nm (from memory, recomputed).
func ExampleCutoffWavelength() {
	na, _ := numap.NAWeak(1.46, 0.0025)
	wavelength, err := numap.CutoffWavelength(4.5e-6, na, numap.StepSingleModeV)
	fmt.Printf("%.0f nm %v\n", wavelength*1e9, err)
	// Output: 1214 nm <nil>
}

// Senior, example 2.7: a parabolic core of index 1.5 and 1 % (weak form) is
// single-mode at 1.3 um up to a diameter of 6.6 um (from memory, recomputed; the book
// takes V = 2.4 sqrt 2).
func ExamplePowerLawSingleModeV() {
	v, err := numap.PowerLawSingleModeV(2)
	na, _ := numap.NAWeak(1.5, 0.01)
	radius, _ := numap.RadiusForV(v, na, 1.3e-6)
	fmt.Printf("V %.2f, %.1f um %v\n", v, 2*radius*1e6, err)
	// Output: V 3.40, 6.6 um <nil>
}

// A graded core of 62.5 um (IEC 60793-2: NA 0.275) accepts less towards its edge.
func ExampleCore_LocalNA() {
	core := numap.Core{Radius: 31.25e-6, NA: 0.275, Alpha: 2}
	for _, r := range []float64{0, 15e-6, 30e-6} {
		na, err := core.LocalNA(r)
		angle, _ := numap.AcceptanceAngle(na, 1)
		fmt.Printf("%.3f %.1f degrees %v\n", na, angle/degree, err)
	}
	// Output:
	// 0.275 16.0 degrees <nil>
	// 0.241 14.0 degrees <nil>
	// 0.077 4.4 degrees <nil>
}

func ExampleCore() {
	step := numap.Core{Radius: 50e-6, NA: 0.22, Alpha: math.Inf(1)}
	fmt.Println(step.LocalNA(30e-6))
	_, err := numap.Core{}.LocalNA(0)
	fmt.Println(err)
	// Output:
	// 0.22 <nil>
	// numap.Core.LocalNA: Core.Radius = 0: must be finite and above 0 (m)
}

// Keiser, chapter 5: a Lambertian disc of radius 35 um and 150 W/(cm^2 sr) puts
// 0.725 mW into a step core of radius 50 um and NA 0.20, and 0.37 mW into one of
// radius 25 um (from memory, recomputed).
func ExampleCore_LambertianShare() {
	const source, radiance = 35e-6, 150e4 // m, W/(m^2 sr)
	power := radiance * math.Pi * math.Pi * source * source
	for _, radius := range []float64{50e-6, 25e-6} {
		core := numap.Core{Radius: radius, NA: 0.20, Alpha: math.Inf(1)}
		share, err := core.LambertianShare(source, 1)
		fmt.Printf("%.3f mW %v\n", share*power*1e3, err)
	}
	// Output:
	// 0.725 mW <nil>
	// 0.370 mW <nil>
}

func ExampleCosineShare() {
	order, _ := numap.CosineOrder(15 * degree)
	narrow, err := numap.CosineShare(0.2, order, 1)
	lambertian, _ := numap.CosineShare(0.2, 1, 1)
	fmt.Printf("lobe of 15 degrees %.3f, Lambertian %.3f %v\n", narrow, lambertian, err)
	// Output: lobe of 15 degrees 0.349, Lambertian 0.040 <nil>
}

// Keiser, chapter 5: a laser diode with a full angle of 10 degrees at half power has
// the lateral coefficient 182 (from memory, recomputed). A Lambertian source has 1.
func ExampleCosineOrder() {
	laser, err := numap.CosineOrder(5 * degree)
	lambertian, _ := numap.CosineOrder(60 * degree)
	fmt.Printf("%.0f %.0f %v\n", laser, lambertian, err)
	// Output: 182 1 <nil>
}

// An aperture of the beam's own 1/e^2 radius passes 86.5 % (any laser handbook).
func ExampleGaussianSpatialShare() {
	share, err := numap.GaussianSpatialShare(10e-6, 10e-6)
	fmt.Printf("%.3f %v\n", share, err)
	// Output: 0.865 <nil>
}

func ExampleGaussianAngularShare() {
	share, err := numap.GaussianAngularShare(0.2, 1.5e-6, 0.85e-6)
	fmt.Printf("%.3f %v\n", share, err)
	// Output: 0.914 <nil>
}

func ExampleCore_GaussianShare() {
	core := numap.Core{Radius: 25e-6, NA: 0.2, Alpha: 2}
	for _, waist := range []float64{1e-6, 5e-6, 25e-6} {
		share, err := core.GaussianShare(waist, 0.85e-6)
		fmt.Printf("%.3f %v\n", share, err)
	}
	// Output:
	// 0.664 <nil>
	// 1.000 <nil>
	// 0.864 <nil>
}

// Senior, example 2.3: with NA 0.4 in air, meridional rays are accepted to 23.6
// degrees, skew rays that change direction by 100 degrees at each reflection to 38.5
// (from memory, recomputed).
func ExampleSkewAcceptanceAngle() {
	meridional, _ := numap.SkewAcceptanceAngle(0.4, 1, 0)
	skew, err := numap.SkewAcceptanceAngle(0.4, 1, 50*degree)
	fmt.Printf("%.1f %.1f degrees %v\n", meridional/degree, skew/degree, err)
	// Output: 23.6 38.5 degrees <nil>
}

func ExampleCore_RayKind() {
	core := numap.Core{Radius: 25e-6, NA: 0.2, Alpha: math.Inf(1)}
	for _, gamma := range []float64{0, 60 * degree} {
		for _, angle := range []float64{10 * degree, 15 * degree} {
			kind, err := core.RayKind(numap.Ray{R: 25e-6, Transverse: math.Sin(angle), Gamma: gamma})
			fmt.Println(kind, err)
		}
	}
	// Output:
	// bound <nil>
	// refracting <nil>
	// bound <nil>
	// tunnelling <nil>
}

func ExampleCore_Invariants() {
	core := numap.Core{Radius: 25e-6, NA: 0.2, Alpha: 2}
	beta, l, err := core.Invariants(numap.Ray{R: 10e-6, Transverse: 0.1, Gamma: 30 * degree}, 1.444)
	fmt.Printf("beta %.5f, l %.3f %v\n", beta, l, err)
	// Output: beta 1.45215, l 0.020 <nil>
}

// A ray that enters from air at 8 degrees, 12 um off the axis and square to the radius.
func ExampleRay() {
	ray := numap.Ray{R: 12e-6, Transverse: math.Sin(8 * degree), Gamma: 90 * degree}
	fmt.Println(numap.Core{Radius: 25e-6, NA: 0.2, Alpha: 2}.RayKind(ray))
	// Output: bound <nil>
}

func ExampleRayKind() {
	var none numap.RayKind
	fmt.Println(numap.Bound, numap.Tunnelling, numap.Refracting, none)
	// Output: bound tunnelling refracting no kind of ray
}

func ExampleRayKind_String() {
	fmt.Println(numap.Tunnelling.String())
	// Output: tunnelling
}
