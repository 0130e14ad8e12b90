package modes

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/reftable"
)

// normal is the least b of the table that is held to a relative error: below it
// b or a derivative may be subnormal or 0.
const normal = 1e-290

// The table is made by testdata/lp.py. Where w or b is ill-conditioned, at v next to a
// cut-off or LP01 at small v, the error allowed is what SolveLP documents.
func TestSolveLPAgainstTable(t *testing.T) {
	var u, w, b, wc, bc reftable.Errors
	for _, r := range reftable.Read(t, "testdata/lp.csv", 1000) {
		v, l, m := r.Float("v"), r.Int("l"), r.Int("m")
		p, err := SolveLP(v, l, m)
		require.NoError(t, err, r)
		u.Add(r.Relative("u", p.U), r)
		if r.Float("b") < normal {
			assert.InDelta(t, r.Float("b"), p.B, 1e-300)
			continue
		}
		high, low, err := cutoffParts(l, m)
		require.NoError(t, err)
		above := (v - high) - low
		limit := 1e-16 * (20 + float64(l)) / above
		if l == 0 && m > 1 {
			limit *= math.Max(1, 1/(high*above))
		}
		limit += 3e-15
		ew, eb := r.Relative("w", p.W), r.Relative("b", p.B)
		wc.Add(ew/limit, r)
		bc.Add(eb/(2*limit), r)
		if limit < 1e-14 {
			w.Add(ew, r)
			b.Add(eb, r)
		}
	}
	u.Check(t, "u", 4e-16)
	w.Check(t, "w where well conditioned", 1e-14)
	b.Check(t, "b where well conditioned", 1e-14)
	wc.Check(t, "w over its limit", 1)
	bc.Check(t, "b over its limit", 1)
}

// d(V b)/dV, V d2(V b)/dV2, the share of power in the core, which is the mean of b and
// d(V b)/dV (Gloge 1971, equation 27), and the series. Each error is held against what
// SolveLP's own does, a shift of v by 1e-16 (20 + l), or 2e-16 v for LP01, times the
// slope in v; plus roundings. Those of the second derivative grow with w where it is
// above l/2: the terms that make it up, kappa (1 - b) and kappa^2 (1 - b)^2/b, then have
// a relative error of a few 1e-16 w and all but cancel each other.
func TestCurvesAgainstTable(t *testing.T) {
	var group, bend, share, value, plain1, plain2 reftable.Errors
	for _, r := range reftable.Read(t, "testdata/lp.csv", 1000) {
		v, l, m := r.Float("v"), r.Int("l"), r.Int("m")
		p, err := SolveLP(v, l, m)
		require.NoError(t, err, r)
		b, b1, b2 := r.Float("b"), r.Float("b1"), r.Float("b2")
		if b < normal {
			continue
		}
		s := p.Series()
		shift := 1e-16 * (20 + float64(l))
		if l == 0 && m == 1 {
			shift = 2e-16 * v
		}
		slope1 := math.Abs(b2 / v)                               // of b1, from the table
		slope2 := math.Abs(2*s[1] + 4*v*(2*s[2]) + v*v*(6*s[3])) // of b2
		e1, e2 := r.Difference("b1", p.GroupCurve()), r.Difference("b2", p.DispersionCurve())
		cancel := 0.0
		if kappa := (b1 - b) / (2 * (1 - b)); p.W > float64(l)/2 {
			cancel = 4e-15 * (1 + p.W) * kappa * (1 - b) * (1 + kappa*(1-b)/b)
		}
		limit1 := 4e-15*math.Abs(b1) + shift*slope1
		limit2 := 1e-14*math.Abs(b2) + shift*slope2 + cancel
		group.Add(math.Abs(e1)/limit1, r)
		bend.Add(math.Abs(e2)/limit2, r)
		share.Add(math.Abs(p.CorePower()-(b1+b)/2)/limit1, r)
		// The series gives the same two curves by another road.
		value.Add(math.Abs(s[0]-p.B)/1e-15, r)
		value.Add(math.Abs(p.GroupCurve()-(s[0]+v*s[1]))/b1/1e-15, r)
		value.Add(math.Abs(p.DispersionCurve()-(2*v*s[1]+2*v*v*s[2]))/(math.Abs(2*v*s[1])+math.Abs(2*v*v*s[2]))/1e-15, r)
		if cut, err := CutoffV(l, m); assert.NoError(t, err) && v > cut+0.3 && v > 0.3 {
			plain1.Add(r.Relative("b1", p.GroupCurve()), r)
			plain2.Add(r.Relative("b2", p.DispersionCurve()), r)
		}
	}
	group.Check(t, "d(Vb)/dV over its limit", 1)
	bend.Check(t, "V d2(Vb)/dV2 over its limit", 1)
	share.Check(t, "core power over its limit", 1)
	value.Check(t, "series against the curves, units of 1e-15", 1)
	plain1.Check(t, "d(Vb)/dV, 0.3 above cut-off", 1e-14)
	plain2.Check(t, "V d2(Vb)/dV2, 0.3 above cut-off", 1e-10)
}
