package materials

import "math"

// sultanova is the source of two polymers.
var sultanova = Source{
	Citation:   "N. Sultanova, S. Kasarova and I. Nikolov, Acta Phys. Pol. A 116, 585 (2009), fitted by one oscillator; open record (CC0) of refractiveindex.info",
	Conditions: "20 C; relative to air (from memory)",
	InAir:      true,
}

// oneOscillator returns a polymer fitted with n^2 = 1 + a x^2/(x^2 - c), x and
// math.Sqrt(c) in micrometres.
func oneOscillator(name string, a, c float64) Sellmeier {
	return Sellmeier{
		Name:   name,
		Terms:  [6]Term{{a, math.Sqrt(c) * micrometre}},
		Range:  Range{0.4368e-6, 1.052e-6},
		Source: sultanova,
	}
}

// PMMAByOscillator returns poly(methyl methacrylate) at 20 C, 0.4368 to 1.052 um (N.
// Sultanova, S. Kasarova and I. Nikolov, Acta Phys. Pol. A 116, 585, 2009). PMMA
// has the wider range.
func PMMAByOscillator() Sellmeier {
	return oneOscillator("PMMA (one oscillator)", 1.1819, 0.011313)
}

// Polycarbonate returns polycarbonate at 20 C, 0.4368 to 1.052 um (N. Sultanova, S.
// Kasarova and I. Nikolov, Acta Phys. Pol. A 116, 585, 2009).
func Polycarbonate() Sellmeier {
	return oneOscillator("polycarbonate", 1.4182, 0.021304)
}

// Water returns distilled water at 20 C, 0.182 to 1.129 um (M. Daimon and A.
// Masumura, Appl. Opt. 46, 3811, 2007). The index is relative to vacuum, as its
// agreement with handbooks shows: they give 1.33299 in air at 589 nm, and this is
// 1.33335, which is 1.33299 times the index of air. The glasses and polymers of this
// package are relative to air (Source.InAir), so that one of them set against Water as
// they stand is too low by 2.7e-4 of its index, 4e-4 for silica: divide this index by
// that of air, or multiply theirs by it.
func Water() Sellmeier {
	return Sellmeier{
		Name: "water",
		Terms: [6]Term{
			{5.684027565e-1, math.Sqrt(5.101829712e-3) * micrometre},
			{1.726177391e-1, math.Sqrt(1.821153936e-2) * micrometre},
			{2.086189578e-2, math.Sqrt(2.620722293e-2) * micrometre},
			{1.130748688e-1, math.Sqrt(1.069792721e1) * micrometre},
		},
		Range: Range{0.182e-6, 1.129e-6},
		Source: Source{
			Citation:   "M. Daimon and A. Masumura, Appl. Opt. 46, 3811 (2007); open record (CC0) of refractiveindex.info",
			Conditions: "distilled water, 20.0 C; relative to vacuum, as its agreement with handbooks shows",
		},
	}
}

// FluorideGlass returns a zirconium-barium-lanthanum-aluminium-sodium fluoride glass
// (ZBLAN) at room temperature, 0.365 to 3.5 um (F. Gan, J. Non-Cryst. Solids 184, 9,
// 1995).
func FluorideGlass() Sellmeier {
	return Sellmeier{
		Name: "fluoride glass",
		Terms: [6]Term{
			{1.22514, 0.08969 * micrometre},
			{1.52898, 21.3825 * micrometre},
		},
		Range: Range{0.365e-6, 3.5e-6},
		Source: Source{
			Citation:   "F. Gan, J. Non-Cryst. Solids 184, 9 (1995); open record (CC0) of refractiveindex.info",
			Conditions: "room temperature; taken to be relative to air (from memory)",
			InAir:      true,
		},
	}
}

// ArsenicTrisulfide returns As2S3 glass at 25 C, 0.57 to 11.8 um (W. S. Rodney, I.
// H. Malitson and T. A. King, J. Opt. Soc. Am. 48, 633, 1958).
func ArsenicTrisulfide() Sellmeier {
	return Sellmeier{
		Name: "arsenic trisulfide",
		Terms: [6]Term{
			{1.8983678, 0.15 * micrometre},
			{1.9222979, 0.25 * micrometre},
			{0.8765134, 0.35 * micrometre},
			{0.1188704, 0.45 * micrometre},
			{0.9569903, math.Sqrt(750) * micrometre},
		},
		Range: Range{0.57e-6, 11.8e-6},
		Source: Source{
			Citation:   "W. S. Rodney, I. H. Malitson and T. A. King, J. Opt. Soc. Am. 48, 633 (1958); open record (CC0) of refractiveindex.info",
			Conditions: "25 C; a prism in air (from memory)",
			InAir:      true,
		},
	}
}
