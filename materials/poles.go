package materials

import "glassthread/materials/taylor"

// Term is one oscillator of a dispersion formula: A x^2 / (x^2 - L^2), with a
// pure number A (its strength) and the resonance wavelength L in metres.
type Term struct{ A, L float64 }

// oscillators returns the series of the sum of A x^2/(x^2 - L^2) about x.
//
// The k-th coefficient of one term for k >= 1 is, by partial fractions,
//
//	(-1)^k A L^2 p_k / (x^2 - L^2)^(k+1),
//	p_k = ((x + L)^(k+1) - (x - L)^(k+1)) / (2 L),
//
// and p_k is a sum of positive terms: no cancellation within a term, and near a
// resonance x^2 - L^2 is formed as a product.
func oscillators(terms *[6]Term, x float64) taylor.Series {
	var s taylor.Series
	x2 := x * x
	for i := range terms {
		a, l := terms[i].A, terms[i].L
		if a == 0 {
			continue
		}
		l2 := l * l
		r := 1 / ((x - l) * (x + l))
		c := a * l2 * r
		s[0] += a * x2 * r
		c *= r
		s[1] -= c * 2 * x
		c *= r
		s[2] += c * (3*x2 + l2)
		c *= r
		s[3] -= c * 4 * x * (x2 + l2)
		c *= r
		s[4] += c * (5*x2*x2 + 10*x2*l2 + l2*l2)
	}
	return s
}
