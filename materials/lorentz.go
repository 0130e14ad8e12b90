package materials

import (
	"glassthread/materials/taylor"
)

// LorentzLorenz is a medium whose refractivity, rather than n^2, is a sum of
// oscillators (H. A. Lorentz and L. Lorenz, 1880; Born and Wolf, Principles of
// Optics, section 2.3.3):
//
//	(n^2 - 1)/(n^2 + 2) = sum of A x^2 / (x^2 - L^2),  x the vacuum wavelength.
//
// The zero LorentzLorenz is vacuum.
type LorentzLorenz struct {
	Name   string  // what the glass is
	Terms  [6]Term // A: pure number, L: resonance wavelength (m)
	Range  Range   // vacuum wavelengths (m) over which the fit holds
	Source Source
}

// Taylor returns the series of the index about a vacuum wavelength (m). It fails
// outside Range (the error matches ErrRange) and where the formula gives no real
// index.
func (g LorentzLorenz) Taylor(wavelength float64) (taylor.Series, error) {
	if err := g.Range.checkWavelength("materials.LorentzLorenz", wavelength); err != nil {
		return taylor.Series{}, err
	}
	y := oscillators(&g.Terms, wavelength)
	n := y.Scale(2).Shift(1).Quo(y.Neg().Shift(1)).Sqrt()
	return n, checkSeries(n, wavelength)
}

// Extrapolate returns the same glass with the range of wavelengths (m) that the
// caller answers for. The data do not vouch for anything outside Range. An empty range,
// From above To, refuses every wavelength.
func (g LorentzLorenz) Extrapolate(wavelengths Range) LorentzLorenz {
	g.Range = wavelengths
	return g
}

var sunak = Source{
	Citation:   "H. R. D. Sunak and S. P. Bastien, IEEE Photon. Technol. Lett. 1, 142 (1989)",
	Conditions: "room temperature; dopant mole fraction below 0.2, 0.6 to 1.8 um; relative to air, as is the silica that it meets undoped",
	FromMemory: true,
	InAir:      true,
}

var (
	sunakRange     = Range{0.6e-6, 1.8e-6}
	sunakFractions = Range{0, 0.2}
	sunakSilica    = [3]float64{0.2045154578, 0.06451676258, 0.1311583151}
	sunakLengths   = [3]float64{0.06130807320, 0.1108859848, 8.964441861} // um
	sunakGermania  = [3]float64{-0.1011783769, 0.1778934999, -0.1064179581}
	sunakFluorine  = [3]float64{0.05413938039, -0.1788588824, -0.07445931332}
)

// FluorineSilica returns silica glass doped with a mole fraction of fluorine from
// 0 to 0.2, 0.6 to 1.8 um (H. R. D. Sunak and S. P. Bastien, IEEE Photon. Technol.
// Lett. 1, 142, 1989; coefficients from memory). Fluorine lowers the index:
// claddings and trenches hold up to about 0.03.
func FluorineSilica(moleFraction float64) (LorentzLorenz, error) {
	return sunakGlass("materials.FluorineSilica", "fluorine-silica", moleFraction, &sunakFluorine)
}

// GermaniaSilicaBySunak returns silica glass doped with a mole fraction of GeO2
// from 0 to 0.2, 0.6 to 1.8 um (H. R. D. Sunak and S. P. Bastien, IEEE Photon.
// Technol. Lett. 1, 142, 1989; coefficients from memory). It is the partner of
// FluorineSilica in a fibre with both dopants; alone, GermaniaSilica has the wider
// range.
func GermaniaSilicaBySunak(moleFraction float64) (LorentzLorenz, error) {
	return sunakGlass("materials.GermaniaSilicaBySunak", "germania-silica (Sunak and Bastien)", moleFraction, &sunakGermania)
}

func sunakGlass(function, name string, fraction float64, dopant *[3]float64) (LorentzLorenz, error) {
	if err := sunakFractions.check(function, "moleFraction", fraction, "mole fraction"); err != nil {
		return LorentzLorenz{}, err
	}
	g := LorentzLorenz{Name: name, Range: sunakRange, Source: sunak}
	for i := range sunakSilica {
		g.Terms[i] = Term{sunakSilica[i] + fraction*dopant[i], sunakLengths[i] * micrometre}
	}
	return g, nil
}
