package materials

import "strings"

// measuredRange is where the fits of MeasuredGlasses are accepted (m). The source
// table states none; the measurements behind it lie in the visible and near
// infrared (from memory).
var measuredRange = Range{0.4e-6, 2.5e-6}

// MeasuredGlass is a doped silica of one composition that was measured as such.
type MeasuredGlass struct {
	Sellmeier
	Composition string  // "GeO2:SiO2"
	Fraction    float64 // mole fraction of the dopant
}

// dopant is the part of Composition before the silica.
func (g MeasuredGlass) dopant() string {
	before, _, doped := strings.Cut(g.Composition, ":")
	if !doped {
		return ""
	}
	return before
}

// MeasuredGlasses returns the bulk fibre glasses of fixed composition whose
// three-term fits are collected in M. J. Adams, An Introduction to Optical
// Waveguides (Wiley, 1981), from J. W. Fleming, J. Am. Ceram. Soc. 59, 503 (1976)
// and Electron. Lett. 14, 326 (1978) and S. H. Wemple et al., J. Appl. Phys. 44,
// 5432 (1973): quenched silica, and silica doped with germania, phosphorus
// pentoxide, boron trioxide or fluorine. The coefficients are from memory. They
// were measured on different samples, so that a trend over composition is better
// taken from GermaniaSilica or FluorineSilica. They also show how far sources part:
// the glass with 0.01 of fluorine lies 4.6e-3 below silica in index at 1.55 um, where
// FluorineSilica says 2.4e-3.
func MeasuredGlasses() []MeasuredGlass {
	source := Source{
		Citation:   "J. W. Fleming, J. Am. Ceram. Soc. 59, 503 (1976) and Electron. Lett. 14, 326 (1978); S. H. Wemple et al., J. Appl. Phys. 44, 5432 (1973); as collected in M. J. Adams, An Introduction to Optical Waveguides (Wiley, 1981)",
		Conditions: "room temperature, in air; the range of wavelengths, 0.4 to 2.5 um, is from memory too",
		FromMemory: true,
		InAir:      true,
	}
	glass := func(name, composition string, fraction, a1, a2, a3, l1, l2, l3 float64) MeasuredGlass {
		return MeasuredGlass{
			Sellmeier: Sellmeier{
				Name: name,
				Terms: [6]Term{
					{a1, l1 * micrometre}, {a2, l2 * micrometre}, {a3, l3 * micrometre},
				},
				Range:  measuredRange,
				Source: source,
			},
			Composition: composition,
			Fraction:    fraction,
		}
	}
	return []MeasuredGlass{
		glass("quenched silica", "SiO2", 0, 0.696750, 0.408218, 0.890815, 0.069066, 0.115662, 9.900559),
		glass("germania-silica 3.1%", "GeO2:SiO2", 0.031, 0.7028554, 0.4146307, 0.8974540, 0.0727723, 0.1143085, 9.896161),
		glass("germania-silica 3.5%", "GeO2:SiO2", 0.035, 0.7042038, 0.4160032, 0.9074049, 0.0514415, 0.1291600, 9.896156),
		glass("germania-silica 5.8%", "GeO2:SiO2", 0.058, 0.7088876, 0.4206803, 0.8956551, 0.0609053, 0.1254514, 9.896162),
		glass("germania-silica 7.9%", "GeO2:SiO2", 0.079, 0.7136824, 0.4254807, 0.8964226, 0.0617167, 0.1270814, 9.896161),
		glass("germania-silica 13.5%", "GeO2:SiO2", 0.135, 0.711040, 0.451885, 0.704048, 0.064270, 0.129408, 9.425478),
		glass("phosphorus-silica 9.1%", "P2O5:SiO2", 0.091, 0.695790, 0.452497, 0.712513, 0.061568, 0.119921, 8.656641),
		glass("boron-silica 13.3%", "B2O3:SiO2", 0.133, 0.690618, 0.401996, 0.898817, 0.061900, 0.123662, 9.098960),
		glass("fluorine-silica 1%", "F:SiO2", 0.01, 0.691116, 0.399166, 0.890423, 0.068227, 0.116460, 9.993707),
	}
}
