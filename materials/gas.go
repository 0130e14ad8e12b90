package materials

import (
	"math"

	"glassthread/materials/taylor"
)

// Gas is a medium so thin that its index itself is a sum of oscillators:
//
//	n = 1 + sum of A x^2 / (x^2 - L^2),  x the vacuum wavelength.
//
// The zero Gas is vacuum.
type Gas struct {
	Name   string  // what the gas is
	Terms  [6]Term // A: pure number, L: resonance wavelength (m)
	Range  Range   // vacuum wavelengths (m) over which the fit holds
	Source Source
}

// Taylor returns the series of the index about a vacuum wavelength (m). It fails
// outside Range; the error matches ErrRange.
func (g Gas) Taylor(wavelength float64) (taylor.Series, error) {
	if err := g.Range.checkWavelength("materials.Gas", wavelength); err != nil {
		return taylor.Series{}, err
	}
	n := oscillators(&g.Terms, wavelength).Shift(1)
	return n, checkSeries(n, wavelength)
}

// Extrapolate returns the same gas with the range of wavelengths (m) that the
// caller answers for. The data do not vouch for anything outside Range. An empty range,
// From above To, refuses every wavelength.
func (g Gas) Extrapolate(wavelengths Range) Gas {
	g.Range = wavelengths
	return g
}

// airTemperature is that of Air (K), exactly 15 degrees Celsius.
const airTemperature = zeroCelsius + 15

// Air returns dry air at 15 C and 101.325 kPa with 450 ppm of CO2, 0.23 to
// 1.69 um (P. E. Ciddor, Appl. Opt. 35, 1566, 1996). The index is relative to vacuum,
// while the glasses of this package are relative to air (Source.InAir): a glass set
// against Air as it stands is too low by 2.7e-4 of its index, 4e-4 for silica. Either
// multiply its index by this one, or keep it and take Constant(1) for the
// air. For other temperatures see AirThermoOptic.
func Air() Gas {
	// Published as c/(d - x^-2) with x in um, which is (c/d) x^2/(x^2 - 1/d).
	const d1, d2 = 238.0185, 57.362
	return Gas{
		Name: "air",
		Terms: [6]Term{
			{0.05792105 / d1, micrometre / math.Sqrt(d1)},
			{0.00167917 / d2, micrometre / math.Sqrt(d2)},
		},
		Range: Range{0.23e-6, 1.69e-6},
		Source: Source{
			Citation:   "P. E. Ciddor, Appl. Opt. 35, 1566 (1996); open record (CC0) of refractiveindex.info",
			Conditions: "dry air, 15 C, 101.325 kPa, 450 ppm CO2; relative to vacuum",
		},
	}
}
