// Package materials describes the glasses, polymers, liquids and gases that a
// fibre is made of or stands in, by their refractive index and its exact
// derivatives with respect to wavelength.
//
// Everything with an index is a Medium: a glass, a doped glass, a warmed glass,
// a table of measured values, and, in package modes, a guided mode. Whoever has
// a glass of their own implements its one method and every package works on it.
//
// Wavelengths are vacuum wavelengths in metres, temperatures are in kelvin (see
// Celsius), compositions are mole fractions from 0 to 1.
//
// Indices are left as published, and papers refer them to one of two media. Solids
// are measured in air, mostly as a prism in air, and the trade uses their indices as
// they are; air itself and Water are relative to vacuum. Source.InAir says which. The
// index of air is 1.00027, so whoever sets a glass against water or air mixes the two
// and is off by 2.7e-4 of the index, some 4e-4 for a glass, until the glass's index is
// multiplied by the index of air. Between glasses that are both in air it drops out of
// NA and V but for the same 2.7e-4 of their value.
//
// A glass refuses wavelengths outside the range it was measured over, with an
// error that matches ErrRange; extrapolating is a choice made by name, see
// Sellmeier.Extrapolate and its like. All values are safe to copy and to share
// between goroutines, and asking for an index does not allocate.
package materials

import (
	"errors"
	"fmt"
	"math"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// A Medium has a refractive index at each vacuum wavelength.
type Medium interface {
	// Taylor returns the Taylor coefficients of the index about wavelength (m):
	// the value, and the k-th derivative over k! in m^-k.
	Taylor(wavelength float64) (taylor.Series, error)
}

// ErrRange says that a wavelength, temperature or composition lies outside the
// range over which the glass's data were measured.
var ErrRange = errors.New("outside the range of the glass's data")

// errNoMedium says that a Medium argument was nil.
var errNoMedium = errors.New("materials: the medium is nil")

// Index returns the refractive index of m at a vacuum wavelength (m), finite and above
// 0. A wavelength that is not is refused, and one outside the range of m's data with an
// error that matches ErrRange; m's own errors are returned as they are. A nil m and an
// index or derivative of m's that is no number give an error too.
func Index(m Medium, wavelength float64) (float64, error) {
	s, err := series(m, wavelength)
	if err != nil {
		return 0, err
	}
	return s[0], nil
}

// GroupIndex returns the group index N = n - wavelength dn/dwavelength of m at a
// vacuum wavelength (m). A pulse travels a length L in the time N L / c. Wavelengths
// and errors are those of Index.
func GroupIndex(m Medium, wavelength float64) (float64, error) {
	s, err := series(m, wavelength)
	if err != nil {
		return 0, err
	}
	group := s[0] - wavelength*s[1]
	return group, domain.Result("materials.GroupIndex", "group index", group)
}

// series asks m, and refuses what a Medium of the caller's own might return by
// mistake.
func series(m Medium, wavelength float64) (taylor.Series, error) {
	if m == nil {
		return taylor.Series{}, errNoMedium
	}
	if err := domain.Positive("materials", "wavelength", wavelength, "m"); err != nil {
		return taylor.Series{}, err
	}
	s, err := m.Taylor(wavelength)
	if err != nil {
		return taylor.Series{}, err
	}
	return s, checkSeries(s, wavelength)
}

func checkSeries(s taylor.Series, wavelength float64) error {
	if s.Finite() && s[0] > 0 {
		return nil
	}
	return &domain.Error{Func: "materials", Argument: "wavelength", Value: wavelength,
		Allowed: "where the index and its derivatives are finite and the index above 0 (m)"}
}

// Constant returns a medium of the same index at every wavelength: no
// dispersion. An index that is not finite and above 0 is refused when the
// medium is asked for its index.
func Constant(index float64) Medium { return constant(index) }

type constant float64

func (c constant) Taylor(wavelength float64) (taylor.Series, error) {
	if err := domain.Positive("materials.Constant", "wavelength", wavelength, "m"); err != nil {
		return taylor.Series{}, err
	}
	if err := domain.Positive("materials.Constant", "index", float64(c), ""); err != nil {
		return taylor.Series{}, err
	}
	return taylor.Constant(float64(c)), nil
}

// zeroCelsius is 0 degrees Celsius in kelvin, exact by definition (SI Brochure,
// 9th ed., 2019, section 2.3.1).
const zeroCelsius = 273.15

// Celsius returns the temperature in kelvin of a temperature in degrees Celsius. It is
// plain arithmetic like that of package math: it refuses nothing, so that below -273.15
// the result is below 0, and NaN and the infinities pass through. Whatever takes the
// temperature refuses them.
func Celsius(degrees float64) float64 { return degrees + zeroCelsius }

// SpeedOfLight is the speed of light in vacuum in m/s, exact by definition (SI
// Brochure, 9th ed., 2019).
const SpeedOfLight = 299792458.0

// Range is a closed interval, of wavelengths in metres, temperatures in kelvin
// or mole fractions. The zero Range states nothing and contains everything finite; one
// whose From exceeds its To, or with a NaN, is empty and contains nothing.
type Range struct{ From, To float64 }

// Contains reports whether x lies in the range. The zero Range contains every
// finite x.
func (r Range) Contains(x float64) bool {
	if r == (Range{}) {
		return math.Abs(x) <= math.MaxFloat64
	}
	return x >= r.From && x <= r.To
}

// check returns an error that matches ErrRange when x is outside.
func (r Range) check(function, argument string, x float64, unit string) error {
	if r == (Range{}) {
		return domain.Finite(function, argument, x, unit)
	}
	if r.Contains(x) {
		return nil
	}
	// Ten digits: limits given in degrees Celsius are no round numbers of kelvin.
	allowed := fmt.Sprintf("from %.10g to %.10g (%s)", r.From, r.To, unit)
	if !(r.From <= r.To) {
		allowed = fmt.Sprintf("in a range that is not empty: nothing lies from %.10g to %.10g (%s)", r.From, r.To, unit)
	}
	return &domain.Error{Func: function, Argument: argument, Value: x, Allowed: allowed, Kind: ErrRange}
}

// checkWavelength refuses a wavelength that is none (no ErrRange) and one outside r.
func (r Range) checkWavelength(function string, wavelength float64) error {
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return err
	}
	return r.check(function, "wavelength", wavelength, "m")
}

// checkChange refuses what a ThermoOptic cannot answer: wavelengths outside w, and
// temperatures outside r. A range need not be stated, but a temperature must: 0 K is
// one forgotten.
func (r Range) checkChange(function string, w Range, wavelength, from, to float64) error {
	if err := w.checkWavelength(function, wavelength); err != nil {
		return err
	}
	if err := r.check(function, "from", from, "K"); err != nil {
		return err
	}
	if err := r.check(function, "to", to, "K"); err != nil {
		return err
	}
	if err := domain.Positive(function, "from", from, "K"); err != nil {
		return err
	}
	return domain.Positive(function, "to", to, "K")
}

// Source says where a set of coefficients comes from.
type Source struct {
	Citation   string // author, journal, year; the equation or table
	Conditions string // temperature, sample, stated accuracy; may be empty
	FromMemory bool   // recalled rather than copied from a record
	InAir      bool   // the index is relative to air; else it is relative to vacuum
}
