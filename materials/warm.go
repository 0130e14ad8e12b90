package materials

import (
	"errors"
	"math"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// ThermoOptic says how an index moves with temperature.
type ThermoOptic interface {
	// Change returns the series, about a vacuum wavelength (m), of what the index
	// gains when the temperature goes from one value to another (K).
	Change(wavelength, from, to float64) (taylor.Series, error)
}

// Warmed is a medium at a temperature other than the one its data were taken at.
// It is a Medium of its own: the index of Glass plus the Change of ThermoOptic.
type Warmed struct {
	Glass       Medium
	ThermoOptic ThermoOptic
	Reference   float64 // temperature of Glass as given (K)
	Temperature float64 // temperature wanted (K)
}

var errNoThermoOptic = errors.New("materials.Warmed: the thermo-optic behaviour is nil")

// Taylor returns the series of the index about a vacuum wavelength (m), with the
// errors of Glass and of ThermoOptic.
func (w Warmed) Taylor(wavelength float64) (taylor.Series, error) {
	n, err := series(w.Glass, wavelength)
	if err != nil {
		return taylor.Series{}, err
	}
	if w.ThermoOptic == nil {
		return taylor.Series{}, errNoThermoOptic
	}
	change, err := w.ThermoOptic.Change(wavelength, w.Reference, w.Temperature)
	if err != nil {
		return taylor.Series{}, err
	}
	n = n.Add(change)
	return n, checkSeries(n, wavelength)
}

// SilicaThermoOptic is the behaviour of pure silica, from the coefficients of
// SilicaAt: its Change is the difference of two such glasses, so that it varies
// with wavelength and the dispersion moves too. Silica with up to 0.03 of fluorine
// follows it to within some 10 % (common practice, no source); for germania see
// GermaniaSilicaThermoOptic. Boron and phosphorus lower dn/dT so much that it does not
// serve for them. 213.15 to 1101.15 K, 0.23 to 3.37 um; the errors match ErrRange.
type SilicaThermoOptic struct{}

// Change returns what the index gains from one temperature to another (K).
func (SilicaThermoOptic) Change(wavelength, from, to float64) (taylor.Series, error) {
	return silicaChange("materials.SilicaThermoOptic", wavelength, from, to)
}

func silicaChange(function string, wavelength, from, to float64) (taylor.Series, error) {
	if err := ghoshTemperatures.checkChange(function, ghoshWavelengths, wavelength, from, to); err != nil {
		return taylor.Series{}, err
	}
	before, after := ghoshSilica(from), ghoshSilica(to)
	n0, err := before.taylor(wavelength)
	if err != nil {
		return taylor.Series{}, err
	}
	n1, err := after.taylor(wavelength)
	return n1.Sub(n0), err
}

// Wavelengths returns where Change answers (m).
func (SilicaThermoOptic) Wavelengths() Range { return ghoshWavelengths }

// Source returns where the coefficients come from.
func (SilicaThermoOptic) Source() Source { return ghosh }

// germaniaRate is dn/dT of pure GeO2 glass (1/K).
const germaniaRate = 1.94e-5

var germaniaThermoOptic = Source{
	Citation:   "silica's part: " + ghosh.Citation + "; germania's: 1.94e-5 per K, a value in common use, whose first measurement is not known here; their sum in proportion: after the additive model of P. D. Dragic et al., Nature Photon. 6, 627 (2012), which weights by volume",
	Conditions: "about room temperature for germania's part, no dispersion of its own; mole fractions for volume fractions, which are 5 % of themselves apart or less",
	FromMemory: true,
}

// GermaniaSilicaThermoOptic is the behaviour of silica glass in which a mole fraction
// (0 to 1) of the SiO2 is replaced by GeO2: silica's Change and germania's, each in
// proportion to its fraction, so that a core and its cladding drift apart with
// temperature. Germania's is 1.94e-5 per K at every wavelength and temperature (from
// memory, a value in common use; 1.07e-5 per K is silica's), which is rough a hundred
// kelvin from room temperature. The sum in proportion follows the additive model of P.
// D. Dragic et al., Nature Photon. 6, 627 (2012, from memory), with mole fractions in
// place of volume fractions: the molar volumes of the two glasses are 5 % apart. It
// leaves out the stress between core and cladding. The zero value is pure silica.
// 213.15 to 1101.15 K, 0.23 to 3.37 um; the errors match ErrRange.
type GermaniaSilicaThermoOptic struct{ MoleFraction float64 }

// Change returns what the index gains from one temperature to another (K).
func (g GermaniaSilicaThermoOptic) Change(wavelength, from, to float64) (taylor.Series, error) {
	const function = "materials.GermaniaSilicaThermoOptic"
	if err := anyFraction.check(function, "MoleFraction", g.MoleFraction, "mole fraction"); err != nil {
		return taylor.Series{}, err
	}
	change, err := silicaChange(function, wavelength, from, to)
	if err != nil {
		return taylor.Series{}, err
	}
	return change.Scale(1 - g.MoleFraction).Shift(g.MoleFraction * (germaniaRate * (to - from))), nil
}

// Wavelengths returns where Change answers (m).
func (GermaniaSilicaThermoOptic) Wavelengths() Range { return ghoshWavelengths }

// Source returns where the numbers come from.
func (GermaniaSilicaThermoOptic) Source() Source { return germaniaThermoOptic }

// GasThermoOptic is the behaviour of an ideal gas at constant pressure: n - 1 is in
// proportion to the density, so it goes like 1/T,
//
//	change of n = (n - 1) Reference (1/to - 1/from),  n the index at Reference.
//
// The zero GasThermoOptic gives an error, since its Reference was forgotten.
type GasThermoOptic struct {
	Gas          Gas
	Reference    float64 // temperature at which Gas holds (K)
	Temperatures Range   // K
}

// Change returns what the index gains from one temperature to another (K). It fails
// outside Temperatures and outside the gas's own range of wavelengths; the errors
// match ErrRange.
func (g GasThermoOptic) Change(wavelength, from, to float64) (taylor.Series, error) {
	const function = "materials.GasThermoOptic"
	if err := g.Temperatures.checkChange(function, g.Gas.Range, wavelength, from, to); err != nil {
		return taylor.Series{}, err
	}
	if err := domain.Positive(function, "Reference", g.Reference, "K"); err != nil {
		return taylor.Series{}, err
	}
	change := oscillators(&g.Gas.Terms, wavelength).Scale(g.Reference / from * ((from - to) / to))
	if !change.Finite() {
		return taylor.Series{}, domain.Result(function, "index change", math.Inf(1))
	}
	return change, nil
}

// Wavelengths returns where Change answers (m).
func (g GasThermoOptic) Wavelengths() Range { return g.Gas.Range }

// AirThermoOptic returns the behaviour of Air at constant pressure, 233.15 to 353.15 K
// (-40 to 80 C): n - 1 falls by 0.35 % of itself, 1e-6, per K. Real air departs from
// the ideal gas by less than 2.1e-7 in n there (after the temperature term of K. P.
// Birch and M. J. Downs, Metrologia 30, 155, 1993; from memory). A change of pressure
// changes n - 1 in proportion and is not in it.
func AirThermoOptic() GasThermoOptic {
	return GasThermoOptic{Gas: Air(), Reference: airTemperature, Temperatures: Range{Celsius(-40), Celsius(80)}}
}

// LinearThermoOptic is a dn/dT that does not vary with wavelength:
//
//	change of n = First (T2 - T1) + Second ((T2 - About)^2 - (T1 - About)^2).
//
// The zero LinearThermoOptic changes nothing at any temperature above 0 K.
type LinearThermoOptic struct {
	First        float64 // dn/dT at the temperature About (1/K)
	Second       float64 // half of d2n/dT2 (1/K^2)
	About        float64 // K; of no effect when Second is 0
	Temperatures Range   // K
	Source       Source
}

// Change returns what the index gains from one temperature to another (K). It
// fails outside Temperatures; the error matches ErrRange.
func (l LinearThermoOptic) Change(wavelength, from, to float64) (taylor.Series, error) {
	const function = "materials.LinearThermoOptic"
	if err := l.Temperatures.checkChange(function, Range{}, wavelength, from, to); err != nil {
		return taylor.Series{}, err
	}
	slope := l.First
	if l.Second != 0 {
		slope += l.Second * ((to - l.About) + (from - l.About))
	}
	change := (to - from) * slope
	return taylor.Constant(change), domain.Result(function, "index change", change)
}

// PMMAThermoOptic returns dn/dT = -1.05e-4 per K for poly(methyl methacrylate)
// below its softening, 0 to 60 C. From memory: handbooks give -0.8e-4 to -1.3e-4,
// by grade.
func PMMAThermoOptic() LinearThermoOptic {
	return LinearThermoOptic{
		First:        -1.05e-4,
		Temperatures: Range{Celsius(0), Celsius(60)},
		Source: Source{
			Citation:   "common handbook value, no single source",
			Conditions: "visible light; -0.8e-4 to -1.3e-4 per K by grade",
			FromMemory: true,
		},
	}
}

// WaterThermoOptic returns the behaviour of water from 0 to 30 C: dn/dT = -8.9e-5
// per K at 20 C, falling by 3.7e-6 per K for each kelvin. It is the parabola
// through the indices 1.33369, 1.33299 and 1.33192 at 10, 20 and 30 C and 589 nm
// of the CRC Handbook of Chemistry and Physics (from memory), and is 7e-5 off its
// 1.33395 at 0 C.
func WaterThermoOptic() LinearThermoOptic {
	return LinearThermoOptic{
		First:        -8.85e-5,
		Second:       -1.85e-6,
		About:        Celsius(20),
		Temperatures: Range{Celsius(0), Celsius(30)},
		Source: Source{
			Citation:   "parabola through the indices at 10, 20 and 30 C and 589 nm of the CRC Handbook of Chemistry and Physics",
			Conditions: "589 nm",
			FromMemory: true,
		},
	}
}
