package materials

import (
	"fmt"
	"math"
	"strconv"
	"testing"

	"github.com/stretchr/testify/require"

	"glassthread/materials/reftable"
)

// tableGlass returns the medium that a row of testdata/index.csv is about.
func tableGlass(t testing.TB, r reftable.Row) Medium {
	name, parameter := r.Text("glass"), r.Float("parameter")
	made := func(m Medium, err error) Medium {
		require.NoError(t, err, r)
		return m
	}
	switch name {
	case "silica":
		return FusedSilica()
	case "silica-arosa":
		return SilicaByGroupIndex()
	case "ghosh-silica":
		return made(SilicaAt(Celsius(parameter)))
	case "germania":
		return Germania()
	case "germania-silica":
		return made(GermaniaSilica(parameter))
	case "sunak-germania":
		return made(GermaniaSilicaBySunak(parameter))
	case "sunak-fluorine":
		return made(FluorineSilica(parameter))
	case "air":
		return Air()
	case "water":
		return Water()
	case "pmma":
		return PMMA()
	case "pmma-sultanova":
		return PMMAByOscillator()
	case "polycarbonate":
		return Polycarbonate()
	case "zblan":
		return FluorideGlass()
	case "as2s3":
		return ArsenicTrisulfide()
	}
	for _, g := range MeasuredGlasses() {
		label := g.Composition + " (quenched)"
		if g.Fraction > 0 {
			label = fmt.Sprintf("%s %s", g.Composition, strconv.FormatFloat(100*g.Fraction, 'f', 1, 64))
		}
		if label == name {
			return g
		}
	}
	t.Fatalf("no medium for %v", r)
	return nil
}

// The table is made by testdata/index.py from the exact decimals that the papers print,
// so that its errors include the rounding of the coefficients to float64.
//
// Derivatives cancel: the second is an ultraviolet part less an infrared part, and
// vanishes where they meet. The error of D is held against |D| + x|S|, that of the
// slope and of beta2 to beta4 against the sizes of their terms. With w = 2 pi c/x,
//
//	beta2 = x^3 n2/(2 pi c^2), beta3 = -x^4 (3 n2 + x n3)/(4 pi^2 c^3),
//	beta4 = x^5 (12 n2 + 8 x n3 + x^2 n4)/(8 pi^3 c^4), nk the k-th derivative,
//
// by repeated use of d/dw = -(x^2/(2 pi c)) d/dx on beta = n w/c. The powers of the
// PMMA formula cancel one another at the short end, so it has limits of its own.
func TestAgainstTable(t *testing.T) {
	const c = SpeedOfLight
	type kinds struct{ d, slope, beta2, beta3, beta4 reftable.Errors }
	var index, group, plain reftable.Errors
	var oscillators, powers kinds
	type glass struct{ index, d reftable.Errors }
	each, order := map[string]*glass{}, []string(nil)
	for _, r := range reftable.Read(t, "testdata/index.csv", 500) {
		m, x := tableGlass(t, r), r.Float("wavelength")
		n, err := Index(m, x)
		require.NoError(t, err, r)
		ng, err := GroupIndex(m, x)
		require.NoError(t, err, r)
		s, err := m.Taylor(x)
		require.NoError(t, err, r)
		require.Equal(t, n, s.Value())
		index.Add(r.Relative("n", n), r)
		group.Add(r.Relative("group_index", ng), r)

		to := &oscillators
		if r.Text("glass") == "pmma" {
			to = &powers
		}
		n2, n3, n4 := s.Derivative(2), x*s.Derivative(3), x*x*s.Derivative(4)
		both := math.Abs(n2) + math.Abs(n2+n3) // (c/x) (|D| + x|S|)
		share := func(column string, got, scale float64) float64 {
			return math.Abs(r.Difference(column, got)) / scale
		}
		k := x / c
		d := share("d", -k*n2, k*both)
		to.d.Add(d, r)
		if math.Abs(n2) > 0.01*math.Abs(n2+n3) {
			plain.Add(r.Relative("d", -k*n2), r)
		}
		to.slope.Add(share("slope", -(n2+n3)/c, (math.Abs(n2)+math.Abs(n3))/c), r)
		k = x * x * x / (2 * math.Pi * c * c)
		to.beta2.Add(share("beta2", k*n2, k*both), r)
		k *= x / (2 * math.Pi * c)
		to.beta3.Add(share("beta3", -k*(3*n2+n3), k*(3*math.Abs(n2)+math.Abs(n3))), r)
		k *= x / (2 * math.Pi * c)
		to.beta4.Add(share("beta4", k*(12*n2+8*n3+n4), k*(12*math.Abs(n2)+8*math.Abs(n3)+math.Abs(n4))), r)

		name := r.Text("glass")
		if each[name] == nil {
			each[name] = &glass{}
			order = append(order, name)
		}
		each[name].index.Add(r.Relative("n", n), r)
		each[name].d.Add(d, r)
	}
	for _, name := range order {
		e := each[name]
		t.Logf("%-16s %3d rows; index: mean %.1e, worst %.1e; D: mean %.1e, worst %.1e",
			name, e.index.N, e.index.Mean, e.index.Worst, e.d.Mean, e.d.Worst)
	}
	require.Len(t, order, 14+len(MeasuredGlasses()))
	index.Check(t, "index", 4e-16)
	group.Check(t, "group index", 5e-16)
	plain.Check(t, "D itself, away from its zero", 3e-14)
	oscillators.d.Check(t, "D over |D| + x|S|", 6e-16)
	oscillators.slope.Check(t, "slope over its terms", 3e-15)
	oscillators.beta2.Check(t, "beta2 over its terms", 1e-15)
	oscillators.beta3.Check(t, "beta3 over its terms", 3e-15)
	oscillators.beta4.Check(t, "beta4 over its terms", 3e-15)
	powers.d.Check(t, "D of a sum of powers", 2e-15)
	powers.slope.Check(t, "slope of a sum of powers", 2e-14)
	powers.beta2.Check(t, "beta2 of a sum of powers", 2e-15)
	powers.beta3.Check(t, "beta3 of a sum of powers", 1e-14)
	powers.beta4.Check(t, "beta4 of a sum of powers", 5e-15)
}
