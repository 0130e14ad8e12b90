package materials

import (
	"errors"

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
// with wavelength and the dispersion moves too. Lightly doped silica (fibre cores
// and claddings) follows it to within some 10 % (common practice, no source).
// 213.15 to 1101.15 K, 0.23 to 3.37 um; the errors match ErrRange.
type SilicaThermoOptic struct{}

// Change returns what the index gains from one temperature to another (K).
func (SilicaThermoOptic) Change(wavelength, from, to float64) (taylor.Series, error) {
	const function = "materials.SilicaThermoOptic"
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return taylor.Series{}, err
	}
	if err := ghoshTemperatures.check(function, "from", from, "K"); err != nil {
		return taylor.Series{}, err
	}
	if err := ghoshTemperatures.check(function, "to", to, "K"); err != nil {
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
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return taylor.Series{}, err
	}
	if err := l.Temperatures.check(function, "from", from, "K"); err != nil {
		return taylor.Series{}, err
	}
	if err := l.Temperatures.check(function, "to", to, "K"); err != nil {
		return taylor.Series{}, err
	}
	// A range need not be stated, but a temperature must: 0 K is one forgotten.
	if err := domain.Positive(function, "from", from, "K"); err != nil {
		return taylor.Series{}, err
	}
	if err := domain.Positive(function, "to", to, "K"); err != nil {
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
