// Package dispersion tells how fast light travels in a medium and how its pulses
// spread: group index, group delay, the dispersion coefficient D and its slope,
// beta2 to beta4, and the wavelengths of zero dispersion.
//
// The medium may be a glass (then this is material dispersion) or a guided mode of a
// fibre (then it is the fibre's chromatic dispersion): both are a materials.Medium.
// All follows from the exact derivatives that the medium returns; no finite
// difference is taken.
//
// With n(x) the index at the vacuum wavelength x, beta = 2 pi n/x and w = 2 pi c/x
// (G. P. Agrawal, Nonlinear Fiber Optics, section 1.2.3; ITU-T G.650.1):
//
//	N = n - x n'              group index
//	D = -(x/c) n''            dispersion coefficient, s/m^2
//	S = dD/dx                 dispersion slope, s/m^3
//	beta_k = d^k beta/dw^k    s^k/m
//
// Units are SI throughout; divide by PsPerNmKm and PsPerNm2Km for those of the
// trade.
package dispersion

import (
	"errors"
	"math"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// PsPerNmKm is 1 ps/(nm km) in s/m^2, the trade's unit of D.
const PsPerNmKm = 1e-6

// PsPerNm2Km is 1 ps/(nm^2 km) in s/m^3, the trade's unit of the dispersion slope.
const PsPerNm2Km = 1e3

// Chromatic holds what a medium does to pulses at one wavelength, in SI units.
type Chromatic struct {
	Wavelength float64 // in vacuum (m)
	Index      float64 // phase index, or effective index of a mode
	GroupIndex float64 // n - x dn/dx
	D          float64 // -(x/c) d2n/dx2 (s/m^2)
	Slope      float64 // dD/dx (s/m^3)
	Beta2      float64 // group-delay dispersion per length (s^2/m), above 0 in normal dispersion
	Beta3      float64 // s^3/m
	Beta4      float64 // s^4/m
}

var errNoMedium = errors.New("dispersion: the medium is nil")

// At returns the chromatic properties of a medium at a vacuum wavelength (m), with the
// medium's own errors. Their relative error is of the order of 1e-13 for a mode, where
// the terms that make up D or Slope do not cancel each other; a few 1e-15 for a glass.
func At(m materials.Medium, wavelength float64) (Chromatic, error) {
	n, err := series(m, wavelength)
	if err != nil {
		return Chromatic{}, err
	}
	const c = materials.SpeedOfLight
	x := wavelength
	// In units of x: n(x(1+d)) = sum of h_k d^k.
	x2 := x * x
	h2, h3, h4 := n[2]*x2, n[3]*x2*x, n[4]*x2*x2
	w := 2 * math.Pi * c / x
	r := Chromatic{ // 0 - y rather than -y: no dispersion is 0, not -0
		Wavelength: x,
		Index:      n[0],
		GroupIndex: n[0] - x*n[1],
		D:          0 - 2*x*n[2]/c,
		Slope:      0 - (2*n[2]+6*x*n[3])/c,
		// With w -> w(1+t), d = -t/(1+t), so that beta in units of w/c is
		// (1+t) n = h_0 (1+t) - h_1 t + h_2 t^2/(1+t) - h_3 t^3/(1+t)^2 + ...
		Beta2: 2 * h2 / (w * c),
		Beta3: 0 - 6*(h2+h3)/(w*w*c),
		Beta4: 24 * (h2 + 2*h3 + h4) / (w * w * w * c),
	}
	return r, r.check()
}

func series(m materials.Medium, wavelength float64) (taylor.Series, error) {
	if m == nil {
		return taylor.Series{}, errNoMedium
	}
	if err := domain.Positive("dispersion", "wavelength", wavelength, "m"); err != nil {
		return taylor.Series{}, err
	}
	n, err := m.Taylor(wavelength)
	if err != nil {
		return taylor.Series{}, err
	}
	if !n.Finite() || n[0] <= 0 {
		return taylor.Series{}, &domain.Error{Func: "dispersion", Argument: "wavelength", Value: wavelength,
			Allowed: "where the index and its derivatives are finite and the index above 0 (m)"}
	}
	return n, nil
}

func (r *Chromatic) check() error {
	for _, v := range [...]float64{r.GroupIndex, r.D, r.Slope, r.Beta2, r.Beta3, r.Beta4} {
		if err := domain.Result("dispersion.At", "dispersion", v); err != nil {
			return err
		}
	}
	return nil
}

// GroupDelay returns the time that a pulse takes per length, N/c (s/m), in a medium at a
// vacuum wavelength (m), which must be finite, above 0 and where the medium answers. The
// errors are those of materials.GroupIndex, the medium's own among them. The result is
// good to about 1e-15 of itself; within 1 % of a mode's cut-off, to what a change of 1e-13
// in wavelength does to it.
func GroupDelay(m materials.Medium, wavelength float64) (float64, error) {
	n, err := materials.GroupIndex(m, wavelength)
	return n / materials.SpeedOfLight, err
}
