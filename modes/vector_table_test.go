package modes

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/reftable"
)

func family(t testing.TB, name string) Family {
	for _, f := range []Family{TE, TM, HE, EH} {
		if f.String() == name {
			return f
		}
	}
	t.Fatalf("no family %q", name)
	return 0
}

// vectorLimit returns the relative error of w that SolveVector documents.
func vectorLimit(t testing.TB, v, delta float64, f Family, nu, m int) float64 {
	e := newVectorEquation(f, nu, delta)
	high, low, err := e.cutoff(m)
	require.NoError(t, err)
	above := (v - high) - low
	c := (2 - e.tau) / e.rest // (n1^2 + n2^2)/n2^2
	switch {
	case high == 0:
		return 3e-15 + 4e-16*c/(v*v)
	case e.l == 0:
		return 3e-15 + 1e-16*(20+float64(e.l))/above*math.Max(1, c/2/(high*above))
	}
	return 3e-15 + 1e-16*(20+float64(e.l))/above
}

// The table is made by testdata/vector.py, from the determinant and mpmath.
func TestSolveVectorAgainstTable(t *testing.T) {
	var u, w, b, shift, wc, bc, sc reftable.Errors
	for _, r := range reftable.Read(t, "testdata/vector.csv", 800) {
		v, delta, f, nu, m := r.Float("v"), r.Float("delta"), family(t, r.Text("family")), r.Int("nu"), r.Int("m")
		p, err := SolveVector(v, delta, f, nu, m)
		if delta > MaxDelta {
			assert.Error(t, err)
			continue
		}
		require.NoError(t, err, r)
		limit := vectorLimit(t, v, delta, f, nu, m)
		ew, eb, es := r.Relative("w", p.W), r.Relative("b", p.B), r.Relative("shift", p.Shift)
		u.Add(r.Relative("u", p.U), r)
		wc.Add(ew/limit, r)
		bc.Add(eb/(2*limit), r)
		// Of a shift that is of the order of b itself, the error is that of b.
		sc.Add(es/(4*limit), r)
		if limit < 1e-14 {
			w.Add(ew, r)
			b.Add(eb, r)
			shift.Add(es, r)
		}
	}
	u.Check(t, "u", 4e-16)
	w.Check(t, "w where well conditioned", 1e-14)
	b.Check(t, "b where well conditioned", 1e-14)
	shift.Check(t, "shift where well conditioned", 2e-14)
	wc.Check(t, "w over its limit", 1)
	bc.Check(t, "b over its limit", 1)
	sc.Check(t, "shift over its limit", 1)
}

// The table is made by testdata/vector.py.
func TestCutoffVectorVAgainstTable(t *testing.T) {
	var e, low reftable.Errors
	for _, r := range reftable.Read(t, "testdata/vector_cutoff.csv", 100) {
		delta, f, nu, m := r.Float("delta"), family(t, r.Text("family")), r.Int("nu"), r.Int("m")
		v, err := CutoffVectorV(delta, f, nu, m)
		if delta > MaxDelta {
			assert.Error(t, err)
			continue
		}
		require.NoError(t, err, r)
		e.Add(r.Relative("cutoff_v", v), r)
		// The sum of the two parts, of which solutions just above cut-off live.
		eq := newVectorEquation(f, nu, delta)
		high, rest, err := eq.cutoff(m)
		require.NoError(t, err)
		low.Add(math.Abs(r.Difference("cutoff_v", high)+rest)/float64(20+nu), r)
	}
	e.Check(t, "cut-off", 2e-16)
	low.Check(t, "cut-off in two parts, absolute, over 20 + nu", 1e-16)
}
