package materials

import (
	"glassthread/materials/taylor"
)

// Sellmeier is a medium whose index follows the dispersion formula of W.
// Sellmeier, Ann. Phys. Chem. 219, 272 (1871):
//
//	n^2 = 1 + Offset + sum of A x^2 / (x^2 - L^2),  x the vacuum wavelength.
//
// Terms with A = 0 are unused, so a three-term glass is a literal with three
// terms. The zero Sellmeier is vacuum. With the zero Range any wavelength is
// taken at which the formula gives a real index. The index is good to about
// one unit in the last place of what the coefficients say; how well those
// describe the glass is the Source's to tell.
type Sellmeier struct {
	Name   string  // what the glass is
	Offset float64 // pure number
	Terms  [6]Term // A: pure number, L: resonance wavelength (m)
	Range  Range   // vacuum wavelengths (m) over which the fit holds
	Source Source
}

// Taylor returns the series of the index about a vacuum wavelength (m). It fails
// outside Range (the error matches ErrRange) and where the formula gives no real
// index, as between the two sides of a resonance.
func (g Sellmeier) Taylor(wavelength float64) (taylor.Series, error) {
	return g.taylor(wavelength)
}

func (g *Sellmeier) taylor(wavelength float64) (taylor.Series, error) {
	if err := g.Range.checkWavelength("materials.Sellmeier", wavelength); err != nil {
		return taylor.Series{}, err
	}
	n := oscillators(&g.Terms, wavelength).Shift(1 + g.Offset).Sqrt()
	return n, checkSeries(n, wavelength)
}

// Extrapolate returns the same glass with the range of wavelengths (m) that the
// caller answers for. The data do not vouch for anything outside Range. An empty range,
// From above To, refuses every wavelength.
func (g Sellmeier) Extrapolate(wavelengths Range) Sellmeier {
	g.Range = wavelengths
	return g
}
