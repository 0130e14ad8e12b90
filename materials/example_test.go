package materials_test

import (
	"errors"
	"fmt"
	"log"
	"math"

	"glassthread/materials"
	"glassthread/materials/taylor"
)

const um, nm = 1e-6, 1e-9

// An optical fibre's glasses: index, group index and the time light takes through 1 km.
func Example() {
	core, err := materials.GermaniaSilica(0.035)
	if err != nil {
		log.Fatal(err)
	}
	for _, glass := range []materials.Sellmeier{core, materials.FusedSilica()} {
		n, err := materials.Index(glass, 1.55*um)
		if err != nil {
			log.Fatal(err)
		}
		group, err := materials.GroupIndex(glass, 1.55*um)
		if err != nil {
			log.Fatal(err)
		}
		fmt.Printf("%-15s n %.5f, N %.5f, %.4f us\n", glass.Name, n, group, group*1e3/materials.SpeedOfLight*1e6)
	}
	// Output:
	// germania-silica n 1.44928, N 1.46762, 4.8954 us
	// fused silica    n 1.44402, N 1.46260, 4.8787 us
}

// Fused silica at the yellow lines of helium (d) and sodium (D): 1.45846 and 1.45840 in
// the table of I. H. Malitson, J. Opt. Soc. Am. 55, 1205 (1965) (from memory).
func ExampleIndex() {
	for _, wavelength := range []float64{587.562 * nm, 589.262 * nm} {
		n, err := materials.Index(materials.FusedSilica(), wavelength)
		fmt.Printf("%.5f %v\n", n, err)
	}
	_, err := materials.Index(materials.FusedSilica(), 10*um)
	fmt.Println(errors.Is(err, materials.ErrRange))
	// Output:
	// 1.45846 <nil>
	// 1.45840 <nil>
	// true
}

// A pulse in silica is fastest near 1.27 um, where material dispersion vanishes (D. N.
// Payne and W. A. Gambling, Electron. Lett. 11, 176, 1975).
func ExampleGroupIndex() {
	for _, wavelength := range []float64{0.85 * um, 1.2728 * um, 1.55 * um} {
		group, err := materials.GroupIndex(materials.FusedSilica(), wavelength)
		fmt.Printf("%.5f %v\n", group, err)
	}
	// Output:
	// 1.46572 <nil>
	// 1.46162 <nil>
	// 1.46260 <nil>
}

// bench is a glass of one's own: one method, and every package works on it.
type bench struct{ n, slope float64 } // index at 1 um, and its change per metre

func (b bench) Taylor(wavelength float64) (taylor.Series, error) {
	return taylor.Variable(wavelength).Shift(-1 * um).Scale(b.slope).Shift(b.n), nil
}

func ExampleMedium() {
	glass := bench{1.5, -0.02 / um}
	n, err := materials.Index(glass, 1.5*um)
	fmt.Printf("%.4f %v\n", n, err)
	group, err := materials.GroupIndex(glass, 1.5*um)
	fmt.Printf("%.4f %v\n", group, err)
	// Output:
	// 1.4900 <nil>
	// 1.5200 <nil>
}

// D = -(wavelength/c) times the second derivative of the index. J. M. Senior, Optical
// Fiber Communications, example 3.6: a glass with wavelength^2 times that derivative =
// 0.025 at 0.85 um has 98.1 ps/(nm km) (from memory; the sign is left out there).
func ExampleMedium_dispersion() {
	const wavelength = 0.85 * um
	glass := materials.Powers{Terms: [8]materials.PowerTerm{
		// n^2 = (1.45 + 0.0125 (x/wavelength - 1)^2)^2, expanded.
		{A: 1.4625 * 1.4625, P: 0},
		{A: -2 * 1.4625 * 0.025 / wavelength, P: 1},
		{A: (0.025*0.025 + 2*1.4625*0.0125) / (wavelength * wavelength), P: 2},
		{A: -2 * 0.025 * 0.0125 / math.Pow(wavelength, 3), P: 3},
		{A: 0.0125 * 0.0125 / math.Pow(wavelength, 4), P: 4},
	}}
	s, err := glass.Taylor(wavelength)
	if err != nil {
		log.Fatal(err)
	}
	fmt.Printf("%.4f\n", wavelength*wavelength*s.Derivative(2))
	d := -wavelength / materials.SpeedOfLight * s.Derivative(2) // s/m^2
	fmt.Printf("%.1f ps/(nm km)\n", d*1e6)
	// Output:
	// 0.0250
	// -98.1 ps/(nm km)
}

func ExampleConstant() {
	m := materials.Constant(1.45)
	n, err := materials.Index(m, 1.55*um)
	group, _ := materials.GroupIndex(m, 1.55*um)
	fmt.Println(n, group, err)
	_, err = materials.Index(materials.Constant(-1.45), 1.55*um)
	fmt.Println(err)
	// Output:
	// 1.45 1.45 <nil>
	// materials.Constant: index = -1.45: must be finite and above 0
}

func ExampleCelsius() {
	fmt.Printf("%.2f K\n", materials.Celsius(20))
	// Output: 293.15 K
}

// A literal is a glass: here one oscillator in the ultraviolet and one in the infrared.
func ExampleSellmeier() {
	glass := materials.Sellmeier{
		Name:   "of my own",
		Terms:  [6]materials.Term{{A: 1.1, L: 0.095 * um}, {A: 0.9, L: 9.9 * um}},
		Range:  materials.Range{From: 0.4 * um, To: 2 * um},
		Source: materials.Source{Citation: "own measurement, 2024", Conditions: "21 C"},
	}
	n, err := materials.Index(glass, 1.31*um)
	fmt.Printf("%s: %.5f %v\n", glass.Name, n, err)
	// Output: of my own: 1.44561 <nil>
}

func ExampleSellmeier_Taylor() {
	s, err := materials.FusedSilica().Taylor(1.55 * um)
	if err != nil {
		log.Fatal(err)
	}
	fmt.Printf("n  %.6f\n", s.Value())
	fmt.Printf("n' %.4e per m\n", s.Derivative(1))
	fmt.Printf("D  %.2f ps/(nm km)\n", -1.55*um/materials.SpeedOfLight*s.Derivative(2)*1e6)
	fmt.Printf("n just beside: %.6f\n", s.At(10*nm))
	// Output:
	// n  1.444024
	// n' -1.1982e+04 per m
	// D  21.91 ps/(nm km)
	// n just beside: 1.443904
}

func ExampleSellmeier_Extrapolate() {
	glass := materials.Germania()
	_, err := materials.Index(glass, 5*um)
	fmt.Println(err)
	n, err := materials.Index(glass.Extrapolate(materials.Range{From: 0.36 * um, To: 5 * um}), 5*um)
	fmt.Printf("%.3f %v\n", n, err)
	// Output:
	// materials.Sellmeier: wavelength = 5e-06: must be from 3.6e-07 to 4.3e-06 (m) (outside the range of the glass's data)
	// 1.530 <nil>
}

// n^2 = 1 + 2 x^2/(x^2 - L^2) with L = 0 is the constant 3.
func ExampleTerm() {
	n, err := materials.Index(materials.Sellmeier{Terms: [6]materials.Term{{A: 2, L: 0}}}, 1*um)
	fmt.Printf("%.6f %v\n", n*n, err)
	// Output: 3.000000 <nil>
}

func ExampleRange() {
	fmt.Println(materials.FusedSilica().Range)
	// Output: {2.1e-07 6.7e-06}
}

func ExampleRange_Contains() {
	r := materials.Range{From: 0.4 * um, To: 2 * um}
	fmt.Println(r.Contains(0.4*um), r.Contains(2.1*um), materials.Range{}.Contains(2.1*um))
	// Output: true false true
}

// Where numbers come from can be read by a program.
func ExampleSource() {
	source := materials.Germania().Source
	fmt.Println(source.Citation)
	fmt.Println(source.Conditions)
	fmt.Println(source.FromMemory, source.InAir)
	// Output:
	// J. W. Fleming, Appl. Opt. 23, 4486 (1984); open record (CC0) of refractiveindex.info
	// room temperature, in air
	// false true
}

// Handbook values of fused silica at 0.6328 and 1.064 um: 1.45702 and 1.44963 (from
// memory).
func ExampleFusedSilica() {
	for _, wavelength := range []float64{0.6328 * um, 1.064 * um} {
		n, err := materials.Index(materials.FusedSilica(), wavelength)
		fmt.Printf("%.5f %v\n", n, err)
	}
	// Output:
	// 1.45702 <nil>
	// 1.44963 <nil>
}

func ExampleSilicaByGroupIndex() {
	glass := materials.SilicaByGroupIndex()
	group, err := materials.GroupIndex(glass, 1.55*um)
	fmt.Printf("%.4f %v\n", group, err)
	// Output: 1.4627 <nil>
}

// The index of silica grows by 1.07e-5 per K at 1.55 um (G. Ghosh, M. Endo and T.
// Iwasaki, J. Lightwave Technol. 12, 1338, 1994; from memory).
func ExampleSilicaAt() {
	var n [2]float64
	for i, celsius := range []float64{20, 30} {
		glass, err := materials.SilicaAt(materials.Celsius(celsius))
		if err != nil {
			log.Fatal(err)
		}
		if n[i], err = materials.Index(glass, 1.55*um); err != nil {
			log.Fatal(err)
		}
	}
	fmt.Printf("%.2e per K\n", (n[1]-n[0])/10)
	_, err := materials.SilicaAt(20) // meant in degrees Celsius
	fmt.Println(errors.Is(err, materials.ErrRange))
	// Output:
	// 1.07e-05 per K
	// true
}

func ExampleGermania() {
	n, err := materials.Index(materials.Germania(), 1.55*um)
	fmt.Printf("%.4f %v\n", n, err)
	// Output: 1.5871 <nil>
}

// J. W. Fleming, Appl. Opt. 23, 4486 (1984): strengths and resonances in proportion to
// the mole fraction.
func ExampleGermaniaSilica() {
	for _, fraction := range []float64{0, 0.035, 0.1} {
		glass, err := materials.GermaniaSilica(fraction)
		if err != nil {
			log.Fatal(err)
		}
		n, err := materials.Index(glass, 1.55*um)
		fmt.Printf("%.1f %% GeO2: %.5f %v\n", 100*fraction, n, err)
	}
	_, err := materials.GermaniaSilica(3.5) // meant in per cent
	fmt.Println(err)
	// Output:
	// 0.0 % GeO2: 1.44402 <nil>
	// 3.5 % GeO2: 1.44928 <nil>
	// 10.0 % GeO2: 1.45899 <nil>
	// materials.GermaniaSilica: moleFraction = 3.5: must be from 0 to 1 (mole fraction) (outside the range of the glass's data)
}

// Undoped, this is Malitson's silica, 1.4440236 at 1.55 um (H. R. D. Sunak and S. P.
// Bastien, IEEE Photon. Technol. Lett. 1, 142, 1989; from memory).
func ExampleGermaniaSilicaBySunak() {
	for _, fraction := range []float64{0, 0.035} {
		glass, err := materials.GermaniaSilicaBySunak(fraction)
		if err != nil {
			log.Fatal(err)
		}
		n, err := materials.Index(glass, 1.55*um)
		fmt.Printf("%.7f %v\n", n, err)
	}
	// Output:
	// 1.4440236 <nil>
	// 1.4494784 <nil>
}

func ExampleFluorineSilica() {
	trench, err := materials.FluorineSilica(0.015)
	if err != nil {
		log.Fatal(err)
	}
	n, err := materials.Index(trench, 1.31*um)
	n0, _ := materials.Index(materials.FusedSilica(), 1.31*um)
	fmt.Printf("%.4f below silica, %v\n", n0-n, err)
	// Output: 0.0036 below silica, <nil>
}

func ExampleMeasuredGlasses() {
	for _, g := range materials.MeasuredGlasses() {
		n, err := materials.Index(g, 1.55*um)
		fmt.Printf("%-22s %.7f %v\n", g.Name, n, err)
	}
	// Output:
	// quenched silica        1.4443882 <nil>
	// germania-silica 3.1%   1.4487016 <nil>
	// germania-silica 3.5%   1.4495076 <nil>
	// germania-silica 5.8%   1.4528983 <nil>
	// germania-silica 7.9%   1.4562390 <nil>
	// germania-silica 13.5%  1.4655213 <nil>
	// phosphorus-silica 9.1% 1.4589419 <nil>
	// boron-silica 13.3%     1.4385514 <nil>
	// fluorine-silica 1%     1.4394244 <nil>
}

func ExampleMeasuredGlass() {
	g := materials.MeasuredGlasses()[5]
	fmt.Println(g.Composition, g.Fraction, g.Source.FromMemory)
	// Output: GeO2:SiO2 0.135 true
}

// The refractivity (n^2 - 1)/(n^2 + 2) adds up over the atoms of a mixture: here half.
func ExampleLorentzLorenz() {
	glass := materials.LorentzLorenz{Terms: [6]materials.Term{{A: 0.25, L: 0}, {A: 0.25, L: 0}}}
	n, err := materials.Index(glass, 1*um)
	fmt.Printf("%.4f %v\n", n, err)
	// Output: 2.0000 <nil>
}

func ExampleLorentzLorenz_Taylor() {
	glass, err := materials.FluorineSilica(0.01)
	if err != nil {
		log.Fatal(err)
	}
	s, err := glass.Taylor(1.31 * um)
	fmt.Printf("D %.2f ps/(nm km), %v\n", -1.31*um/materials.SpeedOfLight*s.Derivative(2)*1e6, err)
	// Output: D 3.76 ps/(nm km), <nil>
}

func ExampleLorentzLorenz_Extrapolate() {
	glass, err := materials.FluorineSilica(0.01)
	if err != nil {
		log.Fatal(err)
	}
	n, err := materials.Index(glass.Extrapolate(materials.Range{From: 0.5 * um, To: 2 * um}), 0.5893*um)
	fmt.Printf("%.4f %v\n", n, err)
	// Output: 1.4559 <nil>
}

// n^2 = 2.4 + 0.02 um^2/x^2, after A. L. Cauchy (1836).
func ExamplePowers() {
	medium := materials.Powers{
		Name:  "resin",
		Terms: [8]materials.PowerTerm{{A: 2.4, P: 0}, {A: 0.02 * um * um, P: -2}},
	}
	n, err := materials.Index(medium, 0.5*um)
	fmt.Printf("%.4f %v\n", n*n, err)
	// Output: 2.4800 <nil>
}

// n^2 = 4 x^2, which is n = 2 x.
func ExamplePowerTerm() {
	s, err := materials.Powers{Terms: [8]materials.PowerTerm{{A: 4, P: 2}}}.Taylor(3)
	fmt.Println(s, err)
	// Output: [6 2 0 0 0] <nil>
}

func ExamplePowers_Taylor() {
	s, err := materials.PMMA().Taylor(0.65 * um)
	fmt.Printf("n %.4f, D %.0f ps/(nm km), %v\n", s.Value(), -0.65*um/materials.SpeedOfLight*s.Derivative(2)*1e6, err)
	// Output: n 1.4903, D -297 ps/(nm km), <nil>
}

func ExamplePowers_Extrapolate() {
	n, err := materials.Index(materials.PMMA().Extrapolate(materials.Range{From: 0.4 * um, To: 1.62 * um}), 0.4*um)
	fmt.Printf("%.3f %v\n", n, err)
	// Output: 1.508 <nil>
}

// Makers give 1.491 to 1.492 at 587.6 nm (from memory).
func ExamplePMMA() {
	n, err := materials.Index(materials.PMMA(), 587.6*nm)
	fmt.Printf("%.3f %v\n", n, err)
	// Output: 1.493 <nil>
}

func ExamplePMMAByOscillator() {
	n, err := materials.Index(materials.PMMAByOscillator(), 587.6*nm)
	fmt.Printf("%.3f %v\n", n, err)
	// Output: 1.491 <nil>
}

// Makers give 1.585 at 587.6 nm (from memory).
func ExamplePolycarbonate() {
	n, err := materials.Index(materials.Polycarbonate(), 587.6*nm)
	fmt.Printf("%.3f %v\n", n, err)
	// Output: 1.585 <nil>
}

// The CRC Handbook of Chemistry and Physics has 1.33299 in air at 20 C and 589.3 nm (from
// memory).
func ExampleWater() {
	n, err := materials.Index(materials.Water(), 589.3*nm)
	const air = 1.00027 // at 20 C
	fmt.Printf("%.5f, in air %.4f %v\n", n, n/air, err)
	// Output: 1.33335, in air 1.3330 <nil>
}

func ExampleFluorideGlass() {
	n, err := materials.Index(materials.FluorideGlass(), 2*um)
	fmt.Printf("%.3f %v\n", n, err)
	// Output: 1.488 <nil>
}

// W. S. Rodney, I. H. Malitson and T. A. King, J. Opt. Soc. Am. 48, 633 (1958), table:
// 2.47773 at 1 um and 2.38155 at 10 um (from memory).
func ExampleArsenicTrisulfide() {
	for _, wavelength := range []float64{1 * um, 10 * um} {
		n, err := materials.Index(materials.ArsenicTrisulfide(), wavelength)
		fmt.Printf("%.5f %v\n", n, err)
	}
	// Output:
	// 2.47773 <nil>
	// 2.38155 <nil>
}

func ExampleGas() {
	vacuum := materials.Gas{}
	n, err := materials.Index(vacuum, 1*um)
	fmt.Println(n, err)
	// Output: 1 <nil>
}

func ExampleGas_Taylor() {
	s, err := materials.Air().Taylor(0.85 * um)
	fmt.Printf("n - 1 = %.4e, n' = %.2f per m, %v\n", s.Value()-1, s.Derivative(1), err)
	// Output: n - 1 = 2.7477e-04, n' = -5.11 per m, <nil>
}

func ExampleGas_Extrapolate() {
	n, err := materials.Index(materials.Air().Extrapolate(materials.Range{From: 0.23 * um, To: 2 * um}), 2*um)
	fmt.Printf("n - 1 = %.3e %v\n", n-1, err)
	// Output: n - 1 = 2.730e-04 <nil>
}

// Handbooks have n - 1 = 2.77e-4 at 15 C and 589 nm (from memory).
func ExampleAir() {
	n, err := materials.Index(materials.Air(), 589.3*nm)
	fmt.Printf("%.2e %v\n", n-1, err)
	// Output: 2.77e-04 <nil>
}

// Every medium that the package knows.
func ExampleCatalogue() {
	for _, e := range materials.Catalogue() {
		memory := ""
		if e.Source.FromMemory {
			memory = ", from memory"
		}
		fmt.Printf("%-30s %.2f to %.2f um%s\n", e.Name, e.Wavelengths.From/um, e.Wavelengths.To/um, memory)
	}
	// Output:
	// silica                         0.21 to 6.70 um
	// silica-by-group-index          0.26 to 1.70 um
	// silica-with-temperature        0.23 to 3.37 um, from memory
	// germania                       0.36 to 4.30 um
	// germania-silica                0.36 to 4.30 um
	// germania-silica-by-sunak       0.60 to 1.80 um, from memory
	// fluorine-silica                0.60 to 1.80 um, from memory
	// quenched-silica-measured       0.40 to 2.50 um, from memory
	// germania-silica-3.1-measured   0.40 to 2.50 um, from memory
	// germania-silica-3.5-measured   0.40 to 2.50 um, from memory
	// germania-silica-5.8-measured   0.40 to 2.50 um, from memory
	// germania-silica-7.9-measured   0.40 to 2.50 um, from memory
	// germania-silica-13.5-measured  0.40 to 2.50 um, from memory
	// phosphorus-silica-9.1-measured 0.40 to 2.50 um, from memory
	// boron-silica-13.3-measured     0.40 to 2.50 um, from memory
	// fluorine-silica-1-measured     0.40 to 2.50 um, from memory
	// air                            0.23 to 1.69 um
	// water                          0.18 to 1.13 um
	// pmma                           0.42 to 1.62 um
	// pmma-by-oscillator             0.44 to 1.05 um
	// polycarbonate                  0.44 to 1.05 um
	// fluoride-glass                 0.36 to 3.50 um
	// arsenic-trisulfide             0.57 to 11.80 um
}

func ExampleLookup() {
	e, err := materials.Lookup("Fluorine-Silica")
	fmt.Println(e.Composition, e.Fractions, err)
	_, err = materials.Lookup("butter")
	fmt.Println(errors.Is(err, materials.ErrUnknown))
	// Output:
	// x F + (1 - x) SiO2 {0 0.2} <nil>
	// true
}

// A recipe: germania-doped silica at a temperature, by name.
func ExampleEntry() {
	e, err := materials.Lookup("germania-silica")
	if err != nil {
		log.Fatal(err)
	}
	fmt.Println(e.Composition, e.Fractions, e.Temperature)
	glass, err := e.Glass(0.05)
	if err != nil {
		log.Fatal(err)
	}
	n, err := materials.Index(glass, 1.31*um)
	fmt.Printf("%.5f %v\n", n, err)
	// Output:
	// x GeO2 + (1 - x) SiO2 {0 1} 293.15
	// 1.45427 <nil>
}

func ExampleEntry_Glass() {
	e, err := materials.Lookup("fluorine-silica")
	if err != nil {
		log.Fatal(err)
	}
	_, err = e.Glass(0.3)
	fmt.Println(err)
	// Output: materials.Entry.Glass: fraction = 0.3: must be from 0 to 0.2 (mole fraction) (outside the range of the glass's data)
}

func ExampleEntry_GlassAt() {
	e, err := materials.Lookup("germania-silica")
	if err != nil {
		log.Fatal(err)
	}
	for _, celsius := range []float64{2, 22, 60} {
		glass, err := e.GlassAt(0.05, materials.Celsius(celsius))
		if err != nil {
			log.Fatal(err)
		}
		n, err := materials.Index(glass, 1.31*um)
		fmt.Printf("%2.0f C: %.5f %v\n", celsius, n, err)
	}
	e, _ = materials.Lookup("polycarbonate")
	_, err = e.GlassAt(0, 300)
	fmt.Println(errors.Is(err, materials.ErrNoThermoOptic))
	// Output:
	//  2 C: 1.45407 <nil>
	// 22 C: 1.45429 <nil>
	// 60 C: 1.45471 <nil>
	// true
}

// How much germania raises the index of silica to 1.45 at 1.55 um?
func ExampleEntry_FractionForIndex() {
	e, err := materials.Lookup("germania-silica")
	if err != nil {
		log.Fatal(err)
	}
	fraction, err := e.FractionForIndex(1.45, 1.55*um)
	fmt.Printf("%.4f %v\n", fraction, err)
	_, err = e.FractionForIndex(1.4, 1.55*um)
	fmt.Println(err)
	// Output:
	// 0.0398 <nil>
	// materials.Entry.FractionForIndex: index = 1.4: must be what an index from 1.44402 to 1.5871 gives at this wavelength (no composition within range gives it)
}

// A relative index difference of 0.36 %, that of standard single-mode fibre, takes about
// 3.6 mole per cent of germania (common practice: 1 mole per cent for 0.1 %); a trench
// of -0.5 % takes fluorine.
func ExampleEntry_FractionForDelta() {
	for _, c := range []struct {
		name  string
		delta float64
	}{{"germania-silica", 0.0036}, {"fluorine-silica", -0.005}} {
		e, err := materials.Lookup(c.name)
		if err != nil {
			log.Fatal(err)
		}
		fraction, err := e.FractionForDelta(c.delta, 1.31*um)
		fmt.Printf("%s: %.4f %v\n", c.name, fraction, err)
	}
	// Output:
	// germania-silica: 0.0351 <nil>
	// fluorine-silica: 0.0300 <nil>
}

// A medium from measured points. Here they are taken from silica, so that the error
// shows: nine points from 0.9 to 1.7 um.
func ExampleTable() {
	var wavelengths, indices []float64
	for i := range 9 {
		x := (0.9 + 0.1*float64(i)) * um
		n, err := materials.Index(materials.FusedSilica(), x)
		if err != nil {
			log.Fatal(err)
		}
		wavelengths, indices = append(wavelengths, x), append(indices, n)
	}
	table, err := materials.NewTable(wavelengths, indices, materials.Source{Citation: "sampled"})
	if err != nil {
		log.Fatal(err)
	}
	for _, m := range []materials.Medium{table, materials.FusedSilica()} {
		s, err := m.Taylor(1.35 * um)
		fmt.Printf("n %.7f, D %.4f ps/(nm km), %v\n", s.Value(), -1.35*um/materials.SpeedOfLight*s.Derivative(2)*1e6, err)
	}
	// Output:
	// n 1.4463505, D 7.1533 ps/(nm km), <nil>
	// n 1.4463505, D 7.1453 ps/(nm km), <nil>
}

func ExampleNewTable() {
	wavelengths := []float64{1.0 * um, 1.1 * um, 1.2 * um, 1.2 * um, 1.4 * um, 1.5 * um}
	indices := []float64{1.450, 1.449, 1.448, 1.447, 1.446, 1.445}
	_, err := materials.NewTable(wavelengths, indices, materials.Source{})
	fmt.Println(err)
	wavelengths[3] = 1.3 * um
	table, err := materials.NewTable(wavelengths, indices, materials.Source{})
	if err != nil {
		log.Fatal(err)
	}
	n, err := materials.Index(table, 1.25*um)
	fmt.Printf("%.4f %v\n", n, err)
	// Output:
	// materials.NewTable: wavelengths[3] = 1.2e-06: must be above the one before (m)
	// 1.4475 <nil>
}

func newTable() materials.Table {
	table, err := materials.NewTable(
		[]float64{1.0 * um, 1.1 * um, 1.2 * um, 1.3 * um, 1.4 * um, 1.5 * um},
		[]float64{1.450, 1.449, 1.448, 1.447, 1.446, 1.445},
		materials.Source{Citation: "bench 3, invented"})
	if err != nil {
		log.Fatal(err)
	}
	return table
}

func ExampleTable_Taylor() {
	s, err := newTable().Taylor(1.25 * um)
	fmt.Printf("n %.4f, n' %.0f per m, %v\n", s.Value(), s.Derivative(1), err)
	_, err = newTable().Taylor(1.6 * um)
	fmt.Println(errors.Is(err, materials.ErrRange))
	// Output:
	// n 1.4475, n' -10000 per m, <nil>
	// true
}

func ExampleTable_Range() {
	fmt.Println(newTable().Range())
	// Output: {1e-06 1.5e-06}
}

func ExampleTable_Source() {
	fmt.Println(newTable().Source().Citation)
	// Output: bench 3, invented
}

// A doped core at 60 C: its index at 20 C plus what silica and germania gain, in
// proportion.
func ExampleWarmed() {
	core, err := materials.GermaniaSilica(0.05)
	if err != nil {
		log.Fatal(err)
	}
	warm := materials.Warmed{
		Glass:       core,
		ThermoOptic: materials.GermaniaSilicaThermoOptic{MoleFraction: 0.05},
		Reference:   materials.Celsius(20),
		Temperature: materials.Celsius(60),
	}
	for _, m := range []materials.Medium{core, warm} {
		n, err := materials.Index(m, 1.55*um)
		fmt.Printf("%.5f %v\n", n, err)
	}
	// Output:
	// 1.45153 <nil>
	// 1.45197 <nil>
}

func ExampleWarmed_Taylor() {
	warm := materials.Warmed{Glass: materials.FusedSilica(), ThermoOptic: materials.SilicaThermoOptic{},
		Reference: materials.Celsius(20), Temperature: materials.Celsius(85)}
	for _, m := range []materials.Medium{materials.FusedSilica(), warm} {
		s, err := m.Taylor(1.31 * um)
		fmt.Printf("D %.3f ps/(nm km), %v\n", -1.31*um/materials.SpeedOfLight*s.Derivative(2)*1e6, err)
	}
	// Output:
	// D 3.582 ps/(nm km), <nil>
	// D 3.432 ps/(nm km), <nil>
}

// swelling is a behaviour of one's own: 1e-5 per K, whatever the wavelength.
type swelling struct{}

func (swelling) Change(_, from, to float64) (taylor.Series, error) {
	return taylor.Constant(1e-5 * (to - from)), nil
}

func ExampleThermoOptic() {
	n, err := materials.Index(materials.Warmed{Glass: materials.Constant(1.5), ThermoOptic: swelling{},
		Reference: 300, Temperature: 350}, 1*um)
	fmt.Printf("%.4f %v\n", n, err)
	// Output: 1.5005 <nil>
}

// A core of 10 % of germania gains 8 % more per kelvin than its silica cladding.
func ExampleGermaniaSilicaThermoOptic() {
	for _, fraction := range []float64{0, 0.1, 1} {
		b := materials.GermaniaSilicaThermoOptic{MoleFraction: fraction}
		change, err := b.Change(1.55*um, materials.Celsius(20), materials.Celsius(21))
		fmt.Printf("%.3e per K %v\n", change.Value(), err)
	}
	// Output:
	// 1.066e-05 per K <nil>
	// 1.153e-05 per K <nil>
	// 1.940e-05 per K <nil>
}

func ExampleGermaniaSilicaThermoOptic_Change() {
	_, err := materials.GermaniaSilicaThermoOptic{MoleFraction: 5}.Change(1.55*um, 290, 300) // meant in per cent
	fmt.Println(err)
	// Output: materials.GermaniaSilicaThermoOptic: MoleFraction = 5: must be from 0 to 1 (mole fraction) (outside the range of the glass's data)
}

func ExampleGermaniaSilicaThermoOptic_Source() {
	source := materials.GermaniaSilicaThermoOptic{}.Source()
	fmt.Println(source.FromMemory)
	// Output: true
}

func ExampleGermaniaSilicaThermoOptic_Wavelengths() {
	fmt.Println(materials.GermaniaSilicaThermoOptic{}.Wavelengths())
	// Output: {2.3e-07 3.37e-06}
}

// Carbon dioxide, an invented fit: n - 1 follows the density.
func ExampleGasThermoOptic() {
	gas := materials.Gas{Terms: [6]materials.Term{{A: 4.2e-4, L: 0.09 * um}}}
	b := materials.GasThermoOptic{Gas: gas, Reference: 300}
	n, err := materials.Index(materials.Warmed{Glass: gas, ThermoOptic: b, Reference: 300, Temperature: 600}, 1*um)
	fmt.Printf("%.3e %v\n", n-1, err)
	// Output: 2.117e-04 <nil>
}

func ExampleGasThermoOptic_Change() {
	change, err := materials.AirThermoOptic().Change(1.55*um, materials.Celsius(15), materials.Celsius(16))
	fmt.Printf("%.2e %v\n", change.Value(), err)
	// Output: -9.45e-07 <nil>
}

func ExampleGasThermoOptic_Wavelengths() {
	fmt.Println(materials.AirThermoOptic().Wavelengths())
	// Output: {2.3e-07 1.69e-06}
}

// n - 1 of air is 2.926e-4 at 0 C and 589 nm (common handbook value, from memory).
func ExampleAirThermoOptic() {
	cold := materials.Warmed{Glass: materials.Air(), ThermoOptic: materials.AirThermoOptic(),
		Reference: materials.Celsius(15), Temperature: materials.Celsius(0)}
	n, err := materials.Index(cold, 589.3*nm)
	fmt.Printf("%.2e %v\n", n-1, err)
	// Output: 2.92e-04 <nil>
}

func ExampleEntry_ThermoOptic() {
	e, err := materials.Lookup("germania-silica")
	if err != nil {
		log.Fatal(err)
	}
	b, err := e.ThermoOptic(0.05)
	fmt.Println(b, err)
	e, _ = materials.Lookup("polycarbonate")
	_, err = e.ThermoOptic(0)
	fmt.Println(errors.Is(err, materials.ErrNoThermoOptic))
	// Output:
	// {0.05} <nil>
	// true
}

func ExampleSilicaThermoOptic() {
	b := materials.SilicaThermoOptic{}
	fmt.Println(b.Wavelengths(), b.Source().FromMemory)
	// Output: {2.3e-07 3.37e-06} true
}

func ExampleSilicaThermoOptic_Change() {
	change, err := materials.SilicaThermoOptic{}.Change(1.55*um, materials.Celsius(20), materials.Celsius(21))
	fmt.Printf("%.2e %v\n", change.Value(), err)
	_, err = materials.SilicaThermoOptic{}.Change(1.55*um, 20, 21) // meant in degrees Celsius
	fmt.Println(errors.Is(err, materials.ErrRange))
	// Output:
	// 1.07e-05 <nil>
	// true
}

func ExampleSilicaThermoOptic_Source() {
	fmt.Println(materials.SilicaThermoOptic{}.Source().Citation)
	// Output: G. Ghosh, M. Endo and T. Iwasaki, J. Lightwave Technol. 12, 1338 (1994), table of temperature-dependent Sellmeier coefficients
}

func ExampleSilicaThermoOptic_Wavelengths() {
	fmt.Println(materials.SilicaThermoOptic{}.Wavelengths().Contains(1.55 * um))
	// Output: true
}

// A dn/dT from a data sheet.
func ExampleLinearThermoOptic() {
	sheet := materials.LinearThermoOptic{
		First:        1.2e-5,
		Temperatures: materials.Range{From: materials.Celsius(-40), To: materials.Celsius(80)},
		Source:       materials.Source{Citation: "data sheet, invented"},
	}
	warm := materials.Warmed{Glass: materials.Constant(1.5), ThermoOptic: sheet,
		Reference: materials.Celsius(20), Temperature: materials.Celsius(70)}
	n, err := materials.Index(warm, 1*um)
	fmt.Printf("%.4f %v\n", n, err)
	// Output: 1.5006 <nil>
}

func ExampleLinearThermoOptic_Change() {
	l := materials.LinearThermoOptic{First: -1e-4, Second: -2e-6, About: 300}
	change, err := l.Change(0.6*um, 300, 310)
	fmt.Printf("%.6f %v\n", change.Value(), err)
	// Output: -0.001200 <nil>
}

// Water at 25 C and 589 nm: 1.33250 in the CRC Handbook of Chemistry and Physics (from
// memory), which did not go into the parabola.
func ExampleWaterThermoOptic() {
	warm := materials.Warmed{Glass: materials.Constant(1.33299), ThermoOptic: materials.WaterThermoOptic(),
		Reference: materials.Celsius(20), Temperature: materials.Celsius(25)}
	n, err := materials.Index(warm, 589.3*nm)
	fmt.Printf("%.5f %v\n", n, err)
	// Output: 1.33250 <nil>
}

func ExamplePMMAThermoOptic() {
	warm := materials.Warmed{Glass: materials.PMMA(), ThermoOptic: materials.PMMAThermoOptic(),
		Reference: materials.Celsius(20), Temperature: materials.Celsius(50)}
	for _, m := range []materials.Medium{materials.PMMA(), warm} {
		n, err := materials.Index(m, 0.65*um)
		fmt.Printf("%.4f %v\n", n, err)
	}
	// Output:
	// 1.4903 <nil>
	// 1.4871 <nil>
}
