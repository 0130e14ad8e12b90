package modes

import (
	"math"
	"math/rand"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/modes/bessel"
)

// checkMode holds a solved mode against what every mode obeys: u^2 + w^2 = V^2, b =
// w^2/V^2 between 0 and 1, u between the cut-off zero and the next zero of J_l, the share
// of core power above b and at most 1.
func checkMode(t testing.TB, p LP) {
	t.Helper()
	for _, x := range []float64{p.V, p.U, p.W, p.B} {
		if math.IsNaN(x) || math.IsInf(x, 0) {
			t.Fatalf("%+v is not finite", p)
		}
	}
	if v := math.Hypot(p.U, p.W); math.Abs(v/p.V-1) > 8e-16 {
		t.Errorf("%+v: u^2 + w^2 is V^2 to %.2g", p, v/p.V-1)
	}
	if !(p.B >= 0 && p.B < 1) || p.B == 0 && p.W/p.V > 1e-160 {
		t.Errorf("%+v: b is out of range", p)
	}
	if w := p.W / p.V; p.B > 1e-290 && math.Abs(w*w/p.B-1) > 1e-15 {
		t.Errorf("%+v: b is w^2/V^2 to %.2g", p, w*w/p.B-1)
	}
	cut, err := CutoffV(p.L, p.M)
	end, err2 := bessel.JZero(p.L, p.M)
	if err != nil || err2 != nil || !(p.U >= cut && p.U <= p.V && p.U < end) {
		t.Errorf("%+v: u is not between the zeros %v and %v", p, cut, end)
	}
	if share := p.CorePower(); !(share >= p.B && share <= 1) {
		t.Errorf("%+v: core power %v", p, share)
	}
	for _, x := range []float64{p.GroupCurve(), p.DispersionCurve()} {
		if math.IsNaN(x) || math.IsInf(x, 0) {
			t.Errorf("%+v: curves %v and %v", p, p.GroupCurve(), p.DispersionCurve())
		}
	}
	if !p.Series().Finite() && p.V > 1e-3 {
		t.Errorf("%+v: series %v", p, p.Series())
	}
}

// same holds two solutions of one mode against each other, to a few times what SolveLP
// allows each.
func same(t testing.TB, want, got LP) {
	t.Helper()
	assert.Equal(t, [3]float64{float64(want.L), float64(want.M), want.V}, [3]float64{float64(got.L), float64(got.M), got.V})
	cut, err := CutoffV(want.L, want.M)
	require.NoError(t, err)
	limit := 4e-16 * (20 + float64(want.L)) / (want.V - cut)
	if want.L == 0 {
		limit *= math.Max(1, 1/(want.V*(want.V-cut)))
	}
	limit += 1e-14
	assert.InDelta(t, want.U, got.U, 1e-15*want.U)
	assert.InDelta(t, want.W, got.W, limit*want.W)
	assert.InDelta(t, want.B, got.B, 2*limit*want.B)
}

// randomLabel returns a mode guided at v, or LP01.
func randomLabel(r *rand.Rand, v float64) (l, m int) {
	for range 20 {
		l, m = int(math.Exp(r.Float64()*math.Log(v+1)))-1, 1+int(r.Float64()*v/math.Pi)
		if cut, err := CutoffV(l, m); err == nil && cut < v {
			return l, m
		}
	}
	return 0, 1
}

func TestEveryMode(t *testing.T) {
	r := rand.New(rand.NewSource(5))
	for range 3000 {
		v := math.Exp(r.Float64()*math.Log(1e4/0.05)) * 0.05
		l, m := randomLabel(r, v)
		checkMode(t, solve(t, v, l, m))
	}
	for _, c := range [][2]int{{0, 1}, {1, 1}, {0, 2}, {30000, 1}, {99000, 1}, {3, 31000}, {50000, 3000}} {
		checkMode(t, solve(t, MaxV, c[0], c[1]))
	}
}

// V just above cut-off, down to the next float64.
func TestNextToCutoff(t *testing.T) {
	for _, c := range [][2]int{{0, 2}, {0, 3}, {0, 50}, {1, 1}, {1, 2}, {1, 100}, {2, 1}, {2, 20}, {3, 1}, {7, 4}, {100, 1}, {3000, 2}} {
		cut, err := CutoffV(c[0], c[1])
		require.NoError(t, err)
		for v, step := cut, 0x1p-52*cut; step < 1; step *= 3 {
			p, err := SolveLP(v, c[0], c[1])
			if err != nil {
				assert.ErrorIs(t, err, ErrCutoff)
				assert.Equal(t, cut, v, "only the float64 nearest to the cut-off may lie below it")
			} else {
				checkMode(t, p)
			}
			v = cut + step
		}
		_, err = SolveLP(math.Nextafter(cut, 0), c[0], c[1])
		assert.ErrorIs(t, err, ErrCutoff)
		_, err = SolveLP(math.Nextafter(cut, 1e9), c[0], c[1])
		assert.NoError(t, err)
	}
}

// b rises with V, also where the method of solution changes (above cut-off by 0.5, and at
// V = 1.2 and 1.6 for LP01) and where b underflows.
func TestBRisesWithV(t *testing.T) {
	for _, c := range [][2]int{{0, 1}, {0, 2}, {0, 9}, {1, 1}, {1, 8}, {2, 1}, {5, 3}, {40, 1}, {200, 10}} {
		cut, err := CutoffV(c[0], c[1])
		require.NoError(t, err)
		last, lastV := -1.0, 0.0
		for above := 1e-3; above < 300; above *= 1.003 {
			p := solve(t, cut+above, c[0], c[1])
			if !(p.B > last || p.B == 0) {
				t.Errorf("LP(%d,%d): b %v at V = %v but %v at %v", c[0], c[1], p.B, p.V, last, lastV)
			}
			last, lastV = p.B, p.V
		}
		for _, seam := range []float64{0.5, 1.2, 1.6} {
			v := cut + seam
			a, b := solve(t, v-1e-9, c[0], c[1]), solve(t, v+1e-9, c[0], c[1])
			slope := a.Series()[1]
			assert.InDelta(t, 2e-9*slope, b.B-a.B, 1e-15+1e-6*2e-9*slope, "LP(%d,%d) at V = %v", c[0], c[1], v)
		}
	}
}

// LP01 at V so small that the field spreads beyond what a float64 can say: no NaN.
func TestLP01AtSmallV(t *testing.T) {
	for v := 5e-324; v < 0.2; v *= 1.9 {
		p := solve(t, v, 0, 1)
		checkMode(t, p)
		assert.InEpsilon(t, v, p.U, 1e-15)
		list, err := GuidedLP(v)
		require.NoError(t, err)
		require.Len(t, list, 1)
		same(t, p, list[0])
		// ln w = -2/V^2 + ln 2 - gamma + 1/4 + O(V^2), from the leading terms of DLMF 10.2.2,
		// 10.31.2 and 10.30.2.
		if p.W > 0 {
			assert.InDelta(t, -2/v/v+math.Ln2-0.5772156649015329+0.25, math.Log(p.W), v*v/50+1e-15/v/v)
		}
	}
}

// The order and the labels of the list; each entry is what SolveLP gives.
func TestGuidedList(t *testing.T) {
	for _, v := range []float64{1e-9, 0.04, 1, 2.4, 2.5, 3.84, 7.0155867, 12, 40, 123.4} {
		list, err := GuidedLP(v)
		require.NoError(t, err)
		seen := map[[2]int]bool{}
		for i, p := range list {
			label := [2]int{p.L, p.M}
			assert.False(t, seen[label], "%v twice", label)
			seen[label] = true
			one, err := SolveLP(v, p.L, p.M)
			require.NoError(t, err)
			same(t, one, p)
			checkMode(t, p)
			if i > 0 {
				assert.GreaterOrEqual(t, list[i-1].B, p.B)
			}
			want := 4
			if p.L == 0 {
				want = 2
			}
			assert.Equal(t, want, p.Degeneracy())
		}
		assert.Equal(t, LP{L: 0, M: 1, V: v, U: list[0].U, W: list[0].W, B: list[0].B}, list[0])
		// For each l the radial numbers run from 1 without a gap.
		for label := range seen {
			assert.True(t, label[1] == 1 || seen[[2]int{label[0], label[1] - 1}], "%v without the one before", label)
		}
	}
}

// The derivatives that the library forms without differences, against differences of b:
// central ones of fourth order (A&S 25.3.23 and 25.3.24, and the like for the third and
// fourth).
func TestSeriesAgainstDifferences(t *testing.T) {
	for _, c := range []struct {
		v, h float64
		l, m int
	}{
		{0.9, 1e-3, 0, 1}, {1.6, 2e-3, 0, 1}, {2.4, 4e-3, 0, 1}, {6, 1e-2, 0, 1}, {30, 3e-2, 0, 1},
		{3, 2e-3, 1, 1}, {4.4, 2e-3, 2, 1}, {5, 3e-3, 0, 2}, {12, 1e-2, 5, 2}, {30, 2e-2, 24, 1}, {9, 1e-2, 2, 2},
	} {
		b := func(k float64) float64 { return solve(t, c.v+k*c.h, c.l, c.m).B }
		b0, p1, p2, p3, m1, m2, m3 := b(0), b(1), b(2), b(3), b(-1), b(-2), b(-3)
		h := c.h
		want := [5]float64{
			b0,
			(m2 - 8*m1 + 8*p1 - p2) / (12 * h),
			(-m2 + 16*m1 - 30*b0 + 16*p1 - p2) / (12 * h * h),
			(m3 - 8*m2 + 13*m1 - 13*p1 + 8*p2 - p3) / (8 * h * h * h),
			(-m3 + 12*m2 - 39*m1 + 56*b0 - 39*p1 + 12*p2 - p3) / (6 * h * h * h * h),
		}
		p := solve(t, c.v, c.l, c.m)
		s := p.Series()
		size := 1 / c.v
		for k := 1; k <= 4; k++ {
			noise := 2e-15 / math.Pow(h, float64(k)) // of the differences
			scale := math.Abs(s.Derivative(k)) + math.Pow(size, float64(k))
			assert.InDelta(t, want[k], s.Derivative(k), noise+2e-5*scale, "LP%d%d at V = %v, derivative %d", c.l, c.m, c.v, k)
		}
		assert.InEpsilon(t, p.B+c.v*s[1], p.GroupCurve(), 1e-14)
		assert.InDelta(t, c.v*(2*s[1]+2*c.v*s[2]), p.DispersionCurve(), 1e-12)
	}
}

// The zero LP and one that underflows: no NaN.
func TestCurvesOfNothing(t *testing.T) {
	for _, p := range []LP{{}, {M: 1, V: 1e-200, U: 1e-200}, {M: 1, V: 0.05, U: 0.05}} {
		assert.Zero(t, p.Series())
		assert.Zero(t, p.GroupCurve())
		assert.Zero(t, p.DispersionCurve())
		assert.Zero(t, p.CorePower())
	}
}

// The share of core power keeps its digits where it is far below an ulp of 1: it is
// the mean of b and d(V b)/dV, here some 2e-38.
func TestCorePowerKeepsDigits(t *testing.T) {
	p := solve(t, 0.2, 0, 1)
	assert.InEpsilon(t, (p.GroupCurve()+p.B)/2, p.CorePower(), 1e-13)
}
