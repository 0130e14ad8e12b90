package dispersion_test

import (
	"errors"
	"fmt"

	"glassthread/dispersion"
	"glassthread/materials"
	"glassthread/materials/taylor"
	"glassthread/modes"
)

// fibre is an invented design that meets ITU-T G.652: germania-silica core of 3 mol %, 8.4
// um across, in silica.
func fibre() modes.Step {
	core, err := materials.GermaniaSilica(0.03)
	if err != nil {
		panic(err)
	}
	return modes.Step{Radius: 4.2e-6, Core: core, Cladding: materials.FusedSilica()}
}

// The fibre's chromatic dispersion, and that of its cladding glass alone, by the same call.
func ExampleAt() {
	whole, err := dispersion.At(fibre().LP(0, 1), 1550e-9)
	glass, err2 := dispersion.At(materials.FusedSilica(), 1550e-9)
	fmt.Printf("fibre: D %.2f ps/(nm km), slope %.4f ps/(nm^2 km) %v\n",
		whole.D/dispersion.PsPerNmKm, whole.Slope/dispersion.PsPerNm2Km, err)
	fmt.Printf("silica: D %.2f ps/(nm km) %v\n", glass.D/dispersion.PsPerNmKm, err2)
	// Output:
	// fibre: D 16.68 ps/(nm km), slope 0.0583 ps/(nm^2 km) <nil>
	// silica: D 21.91 ps/(nm km) <nil>
}

// own is a glass of the caller's own, given by x^2 n" at one wavelength.
type own struct{}

func (own) Taylor(wavelength float64) (taylor.Series, error) {
	return taylor.Series{1.45, 0, 0.025 / (wavelength * wavelength) / 2}, nil
}

// J. M. Senior, Optical Fiber Communications, example 3.6 (from memory): with x^2 n" = 0.025
// at 0.85 um the material dispersion is 98.1 ps/(nm km), and normal.
func ExampleAt_material() {
	r, err := dispersion.At(own{}, 0.85e-6)
	fmt.Printf("%.1f ps/(nm km) %v\n", r.D/dispersion.PsPerNmKm, err)
	// Output: -98.1 ps/(nm km) <nil>
}

func ExampleChromatic() {
	r, _ := dispersion.At(fibre().LP(0, 1), 1550e-9)
	fmt.Printf("index %.5f, group index %.5f\n", r.Index, r.GroupIndex)
	fmt.Printf("beta2 %.2f ps^2/km, beta3 %.4f ps^3/km\n", r.Beta2/1e-27, r.Beta3/1e-39)
	// Output:
	// index 1.44582, group index 1.46721
	// beta2 -21.27 ps^2/km, beta3 0.1299 ps^3/km
}

// A pulse in 24 km of fibre.
func ExampleGroupDelay() {
	perMetre, err := dispersion.GroupDelay(fibre().LP(0, 1), 1310e-9)
	fmt.Printf("%.2f us %v\n", perMetre*24e3*1e6, err)
	// Output: 117.41 us <nil>
}

// The parts of D sum to the whole.
func ExampleSplit() {
	p, err := dispersion.Split(fibre().LP(0, 1), 1550e-9)
	fmt.Printf("%.2f = material %.2f, waveguide %.2f, profile %.2f ps/(nm km) %v\n", p.D/dispersion.PsPerNmKm,
		p.Material/dispersion.PsPerNmKm, p.Waveguide/dispersion.PsPerNmKm, p.Profile/dispersion.PsPerNmKm, err)
	// Output: 16.68 = material 21.12, waveguide -4.97, profile 0.52 ps/(nm km) <nil>
}

// With glasses that do not disperse all of D is the waveguide's.
func ExampleParts() {
	f := modes.Step{Radius: 4.2e-6, Core: materials.Constant(1.45), Cladding: materials.Constant(1.4455)}
	p, err := dispersion.Split(f.LP(0, 1), 1550e-9)
	fmt.Printf("%.2f of %.2f ps/(nm km) %v\n", p.Waveguide/dispersion.PsPerNmKm, p.D/dispersion.PsPerNmKm, err)
	// Output: -4.97 of -4.97 ps/(nm km) <nil>
}

// Any mode that knows its parts can be split.
func ExampleSeparable() {
	var mode dispersion.Separable = fibre().LP(0, 1)
	material, waveguide, err := mode.Parts(1550e-9)
	fmt.Printf("%.4e %.4e per m^2 %v\n", material.Derivative(2), waveguide.Derivative(2), err)
	// Output: -4.0852e+09 9.6114e+08 per m^2 <nil>
}

// D. N. Payne and W. A. Gambling, Electron. Lett. 11, 176 (1975): silica's dispersion is zero
// between 1.27 and 1.28 um; with the fit of Malitson 1965, at 1.2728 um.
func ExampleZeroDispersion() {
	x, err := dispersion.ZeroDispersion(materials.FusedSilica(), 1.1e-6, 1.5e-6)
	fmt.Printf("silica %.4f um %v\n", x*1e6, err)
	x, err = dispersion.ZeroDispersion(fibre().LP(0, 1), 1.2e-6, 1.5e-6)
	fmt.Printf("fibre %.1f nm %v\n", x*1e9, err)
	_, err = dispersion.ZeroDispersion(materials.FusedSilica(), 1.5e-6, 1.6e-6)
	fmt.Println(errors.Is(err, dispersion.ErrNoZero))
	// Output:
	// silica 1.2728 um <nil>
	// fibre 1310.4 nm <nil>
	// true
}

// The second mode of a fibre that carries a few: D is above zero between two wavelengths.
func ExampleZeroDispersions() {
	core, _ := materials.GermaniaSilica(0.1)
	f := modes.Step{Radius: 4e-6, Core: core, Cladding: materials.FusedSilica()}
	zeros, err := dispersion.ZeroDispersions(f.LP(1, 1), 0.8e-6, 2.1e-6)
	fmt.Printf("%.4g %v\n", zeros, err)
	// Output: [1.307e-06 1.803e-06] <nil>
}
