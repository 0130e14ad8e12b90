package dispersion

import (
	"errors"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// Separable is a guided mode that can tell its causes of dispersion apart: two
// series of the effective index about a wavelength (m), one with the field frozen and
// the glasses dispersing, one with the glasses frozen.
type Separable interface {
	materials.Medium
	Parts(wavelength float64) (material, waveguide taylor.Series, err error)
}

// Parts is the dispersion coefficient of a mode split by cause, in s/m^2.
type Parts struct {
	D         float64 // the whole, as At gives it
	Material  float64 // the field frozen: each glass counts by the power it carries
	Waveguide float64 // the glasses frozen at their indices
	Profile   float64 // the rest: how the index difference and the field move together
}

var errNoMode = errors.New("dispersion.Split: the mode is nil")

// Split returns the dispersion of a mode at a vacuum wavelength (m) by cause, after W. A.
// Gambling, H. Matsumura and C. M. Ragdale, IEE J. Microw. Opt. Acoust. 3, 239 (1979;
// from memory):
//
//   - Material is D of the mode with its field held as it is while the glasses
//     disperse, in the main -(x/c)(P n1" + (1 - P) n2") with P the share of power in
//     the core;
//   - Waveguide is D of the mode with the glasses held at their indices; for weak
//     guidance -((n1 - n2)/(c x)) V d2(V b)/dV2 (D. Gloge, Appl. Opt. 10, 2442, 1971);
//   - Profile is what is left of D, small where the index difference hardly moves
//     with wavelength.
//
// The three sum to D exactly. No split is the only possible one (D. Marcuse, Appl. Opt.
// 18, 2930, 1979): others count dopant dispersion under another name, and only D is
// measured.
func Split(mode Separable, wavelength float64) (Parts, error) {
	if mode == nil {
		return Parts{}, errNoMode
	}
	whole, err := At(mode, wavelength)
	if err != nil {
		return Parts{}, err
	}
	material, waveguide, err := mode.Parts(wavelength)
	if err != nil {
		return Parts{}, err
	}
	p := Parts{
		D:         whole.D,
		Material:  0 - 2*wavelength*material[2]/materials.SpeedOfLight, // 0 has no sign
		Waveguide: 0 - 2*wavelength*waveguide[2]/materials.SpeedOfLight,
	}
	p.Profile = p.D - p.Material - p.Waveguide
	return p, domain.Result("dispersion.Split", "dispersion", p.Profile)
}
