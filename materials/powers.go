package materials

import (
	"math"

	"glassthread/materials/taylor"
)

// PowerTerm is one term of a Powers formula: A x^P with a whole power P, the
// wavelength x in metres and A in m^-P.
type PowerTerm struct {
	A float64
	P int
}

// Powers is a medium whose squared index is a sum of whole powers of the vacuum
// wavelength, the form that polymer data are often fitted with (A. L. Cauchy,
// 1836, for even negative powers; glass makers' catalogues add positive ones):
//
//	n^2 = sum of A x^P.
//
// The zero Powers has no index and gives an error.
type Powers struct {
	Name   string       // what the medium is
	Terms  [8]PowerTerm // unused terms have A = 0
	Range  Range        // vacuum wavelengths (m) over which the fit holds
	Source Source
}

// Taylor returns the series of the index about a vacuum wavelength (m). It fails
// outside Range (the error matches ErrRange) and where the formula gives no real
// index.
func (g Powers) Taylor(wavelength float64) (taylor.Series, error) {
	if err := g.Range.checkWavelength("materials.Powers", wavelength); err != nil {
		return taylor.Series{}, err
	}
	var sum taylor.Series
	for _, t := range g.Terms {
		if t.A == 0 {
			continue
		}
		c := t.A * math.Pow(wavelength, float64(t.P))
		for k := range sum {
			sum[k] += c
			c *= float64(t.P-k) / (float64(k+1) * wavelength) // next binomial term
		}
	}
	n := sum.Sqrt()
	return n, checkSeries(n, wavelength)
}

// Extrapolate returns the same medium with the range of wavelengths (m) that the
// caller answers for. The data do not vouch for anything outside Range. An empty range,
// From above To, refuses every wavelength.
func (g Powers) Extrapolate(wavelengths Range) Powers {
	g.Range = wavelengths
	return g
}

// PMMA returns poly(methyl methacrylate) at 20 C, 0.42 to 1.62 um (G. Beadie et
// al., Appl. Opt. 54, F139, 2015; index to 2e-4).
func PMMA() Powers {
	return Powers{
		Name: "PMMA",
		Terms: [8]PowerTerm{
			{2.1778, 0}, {6.1209e9, 2}, {-1.5004e21, 4}, {2.3678e-14, -2},
			{-4.2137e-27, -4}, {7.3417e-40, -6}, {-4.5042e-53, -8},
		},
		Range: Range{0.42e-6, 1.62e-6},
		Source: Source{
			Citation:   "G. Beadie, M. Brindza, R. A. Flynn, A. Rosenberg and J. S. Shirk, Appl. Opt. 54, F139 (2015); open record (CC0) of refractiveindex.info",
			Conditions: "20.1 C, accuracy 2e-4; taken to be relative to air (from memory)",
			InAir:      true,
		},
	}
}
