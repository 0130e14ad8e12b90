package materials

import "math"

// micrometre is 1e-6 m, for the formulas published in micrometres.
const micrometre = 1e-6

var malitson = Source{
	Citation:   "I. H. Malitson, J. Opt. Soc. Am. 55, 1205 (1965), the three-term fit of its abstract; open record (CC0) of refractiveindex.info",
	Conditions: "20 C, in air; the fit covers 0.21 to 3.71 um to about 1e-5, and C. Z. Tan, J. Non-Cryst. Solids 223, 158 (1998) confirms it to 6.7 um",
	InAir:      true,
}

// FusedSilica returns pure silica glass at 20 C, 0.21 to 6.7 um (I. H. Malitson,
// J. Opt. Soc. Am. 55, 1205, 1965; index in air, to about 1e-5).
func FusedSilica() Sellmeier {
	return Sellmeier{
		Name: "fused silica",
		Terms: [6]Term{
			{0.6961663, 0.0684043 * micrometre},
			{0.4079426, 0.1162414 * micrometre},
			{0.8974794, 9.896161 * micrometre},
		},
		Range:  Range{0.21e-6, 6.7e-6},
		Source: malitson,
	}
}

// SilicaByGroupIndex returns pure silica glass as fitted to phase index and
// group-velocity dispersion together, 0.26 to 1.7 um (Y. Arosa and R. de la
// Fuente, Opt. Lett. 45, 4268, 2020): the better one of the two for dispersion,
// the lesser for the index itself, by its authors' account.
func SilicaByGroupIndex() Sellmeier {
	return Sellmeier{
		Name: "fused silica (fitted to dispersion)",
		Terms: [6]Term{
			{0.9310, 0.079 * micrometre},
			{0.1735, 0.130 * micrometre},
			{2.1121, 14.918 * micrometre},
		},
		Range: Range{0.26e-6, 1.7e-6},
		Source: Source{
			Citation:   "Y. Arosa and R. de la Fuente, Opt. Lett. 45, 4268 (2020); open record (CC0) of refractiveindex.info",
			Conditions: "room temperature; fitted to index and dispersion together; taken to be relative to air (from memory)",
			InAir:      true,
		},
	}
}

// ghoshTemperatures is where SilicaAt is accepted (K), and ghoshWavelengths
// where the measurements behind it lie (m).
var (
	ghoshTemperatures = Range{Celsius(-60), Celsius(828)}
	ghoshWavelengths  = Range{0.23e-6, 3.37e-6}
)

var ghosh = Source{
	Citation:   "G. Ghosh, M. Endo and T. Iwasaki, J. Lightwave Technol. 12, 1338 (1994), table of temperature-dependent Sellmeier coefficients",
	Conditions: "linear in temperature; fitted to measurements at 26, 471 and 828 C over 0.23 to 3.37 um; below 20 C this is a continuation of the straight lines, taken to -60 C here; relative to air",
	FromMemory: true,
	InAir:      true,
}

// SilicaAt returns pure silica glass at a temperature from 213.15 to 1101.15 K
// (-60 to 828 C), 0.23 to 3.37 um (G. Ghosh, M. Endo and T. Iwasaki, J. Lightwave
// Technol. 12, 1338, 1994; coefficients from memory, giving dn/dT = 1.07e-5 per K
// at 1.55 um). At 20 C its index lies above that of FusedSilica, by 0.8e-4 to
// 2e-4 from 0.34 to 2 um and by up to 4.1e-4 at the ends: the two rest on
// different samples, so take both glasses of a fibre from one. To warm any other
// glass use Warmed. The error matches ErrRange.
func SilicaAt(temperature float64) (Sellmeier, error) {
	if err := ghoshTemperatures.check("materials.SilicaAt", "temperature", temperature, "K"); err != nil {
		return Sellmeier{}, err
	}
	return ghoshSilica(temperature), nil
}

// ghoshSilica writes n^2 = A + B/(1 - C/x^2) + D/(1 - E/x^2) as oscillators, since
// B/(1 - C/x^2) = B x^2/(x^2 - C).
func ghoshSilica(temperature float64) Sellmeier {
	t := temperature - zeroCelsius // the paper's unit
	return Sellmeier{
		Name:   "fused silica at temperature",
		Offset: 0.31552 + 6.90754e-6*t,
		Terms: [6]Term{
			{0.788404 + 2.35835e-5*t, math.Sqrt(0.0110199+5.84758e-7*t) * micrometre},
			{0.91316 + 5.48368e-7*t, 10 * micrometre},
		},
		Range:  ghoshWavelengths,
		Source: ghosh,
	}
}

var fleming = Source{
	Citation:   "J. W. Fleming, Appl. Opt. 23, 4486 (1984): strengths and resonance wavelengths between those of silica (Malitson 1965) and of germania, in proportion to the mole fraction",
	Conditions: "room temperature, in air",
	InAir:      true,
}

// Germania returns pure GeO2 glass, 0.36 to 4.3 um (J. W. Fleming, Appl. Opt. 23,
// 4486, 1984).
func Germania() Sellmeier {
	return Sellmeier{
		Name: "germania",
		Terms: [6]Term{
			{0.80686642, 0.068972606 * micrometre},
			{0.71815848, 0.15396605 * micrometre},
			{0.85416831, 11.841931 * micrometre},
		},
		Range: Range{0.36e-6, 4.3e-6},
		Source: Source{
			Citation:   "J. W. Fleming, Appl. Opt. 23, 4486 (1984); open record (CC0) of refractiveindex.info",
			Conditions: "room temperature, in air",
			InAir:      true,
		},
	}
}

// anyFraction is every mole fraction.
var anyFraction = Range{0, 1}

// GermaniaSilica returns silica glass in which the given mole fraction (0 to 1) of
// the SiO2 is replaced by GeO2, 0.36 to 4.3 um: each strength and each resonance
// wavelength lies between those of silica and germania in proportion to the
// fraction (J. W. Fleming, Appl. Opt. 23, 4486, 1984). Fibre cores hold 0.03 to
// 0.2. At fraction 0 it is FusedSilica over the shorter range. The error of a
// fraction out of range matches ErrRange.
func GermaniaSilica(moleFraction float64) (Sellmeier, error) {
	if err := anyFraction.check("materials.GermaniaSilica", "moleFraction", moleFraction, "mole fraction"); err != nil {
		return Sellmeier{}, err
	}
	silica, germania := FusedSilica(), Germania()
	g := Sellmeier{Name: "germania-silica", Range: germania.Range, Source: fleming}
	for i := range g.Terms {
		s, t := silica.Terms[i], germania.Terms[i]
		g.Terms[i] = Term{s.A + moleFraction*(t.A-s.A), s.L + moleFraction*(t.L-s.L)}
	}
	return g, nil
}
