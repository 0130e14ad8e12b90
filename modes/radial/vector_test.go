package radial_test

import (
	"flag"
	"fmt"
	"math"
	"math/rand"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/taylor"
	"glassthread/modes"
	"glassthread/modes/radial"
)

var vectorProfiles = flag.Int("vectorprofiles", 200, "random profiles of TestGuidedVectorRandom")

func stepProfile() radial.Profile {
	return radial.Profile{Pieces: []radial.Piece{{From: 0, To: 1, F: func(float64) float64 { return 1 }}}}
}

// countKey tells the orders apart, TM being -1.
func countKey(m radial.VectorMode) int {
	if m.Family == radial.VectorTM {
		return -1
	}
	return m.Nu
}

func countVector(t testing.TB, p radial.Profile, v, cladding float64, key int) int {
	f, nu := radial.VectorHE, key
	switch key {
	case -1:
		f, nu = radial.VectorTM, 0
	case 0:
		f = radial.VectorTE
	}
	n, err := radial.CountVector(p, v, cladding, f, nu)
	require.NoError(t, err)
	return n
}

// The step's own equation (Snyder and Love 1983, table 12-4; solver checked against arbitrary precision): every
// mode, its label, and B, whose condition number next to cut-off is about 1/B.
func TestGuidedVectorAgainstStep(t *testing.T) {
	worst, all := 0.0, 0
	for _, ratio := range []float64{1 + 1e-7, 1.001, 1.01, 1.1, 1.45, 2.4} {
		for _, v := range []float64{1.5, 2.4, 2.6, 3, 4, 5.5, 8, 13, 20} {
			excess := (ratio - 1) * (ratio + 1)
			want, err := modes.GuidedVector(v, excess/2/ratio/ratio)
			require.NoError(t, err)
			got, err := radial.GuidedVector(stepProfile(), v, v/math.Sqrt(excess))
			require.NoError(t, err)
			require.Len(t, got, len(want), "V %v, %v : 1", v, ratio)
			counts := map[int]int{}
			byLabel := map[string]modes.Vector{}
			for _, w := range want {
				byLabel[w.String()] = w
			}
			for _, g := range got {
				w, ok := byLabel[modes.Vector{Family: modes.Family(g.Family), Nu: g.Nu, M: g.M}.String()]
				require.True(t, ok, "%+v", g)
				e := math.Abs(g.B-w.B) / (w.B + 1e-3)
				assert.Less(t, e, 5e-13, "%v of V %v, %v : 1", w, v, ratio)
				worst = math.Max(worst, e)
				counts[countKey(g)]++
				all++
			}
			for key := -1; key < 25; key++ {
				assert.Equal(t, counts[key], countVector(t, stepProfile(), v, v/math.Sqrt(excess), key), "order %d", key)
			}
		}
	}
	t.Logf("%d modes, worst error of B over B + 0.001: %.1e", all, worst)
}

// randomVectorProfile draws layers with powers and jumps, and a contrast.
func randomVectorProfile(r *rand.Rand) (p radial.Profile, v, cladding float64, text string) {
	n := 1 + r.Intn(4)
	ends := []float64{0}
	for i := range n {
		ends = append(ends, ends[i]+0.01+r.Float64())
	}
	v = math.Exp(math.Log(0.8) + r.Float64()*math.Log(15))
	excess := math.Exp(math.Log(1e-6) + r.Float64()*math.Log(5e6)) // of n^2 over the cladding's, relative
	top := r.Intn(n)
	for i := range n {
		from, to := ends[i]/ends[n], ends[i+1]/ends[n]
		if i == n-1 {
			to = 1
		}
		height := 2*r.Float64() - 1
		if i == top {
			height = 1
		}
		if height < 0 {
			height *= math.Min(1, 0.9/excess) // n^2 stays above 0
		}
		dip, power := r.Float64(), []float64{0, 1, 2, 3, 4, 8}[r.Intn(6)]
		if power == 0 {
			dip = 0
		}
		text += fmt.Sprintf("%.3f-%.3f %.4g (1 - %.3f t^%v), ", from, to, height, dip, power)
		p.Pieces = append(p.Pieces, radial.Piece{From: from, To: to, F: func(x float64) float64 {
			return height * (1 - dip*math.Pow(math.Max(0, x-from)/(to-from), power))
		}})
	}
	return p, v, v / math.Sqrt(excess), text + fmt.Sprintf("V %.4f, excess %.4g", v, excess)
}

// halved is the same profile in twice the pieces.
func halved(p radial.Profile) (q radial.Profile) {
	for _, x := range p.Pieces {
		m := x.From + (x.To-x.From)*0.43
		q.Pieces = append(q.Pieces, radial.Piece{From: x.From, To: m, F: x.F, Graded: x.Graded}, radial.Piece{From: m, To: x.To, F: x.F})
	}
	return q
}

// Every list against the count at cut-off on another mesh, to orders well beyond the last;
// the modes themselves against those of that mesh; and in the limit of weak guidance against
// the scalar modes, whose degree 12 leaves errors of 5e-12 where a layer is steep or thin.
func TestGuidedVectorRandom(t *testing.T) {
	const seed = 20
	r := rand.New(rand.NewSource(seed))
	total, worst, least := 0, 0.0, 0
	for k := range *vectorProfiles {
		p, v, cladding, text := randomVectorProfile(r)
		text = fmt.Sprintf("seed %d, profile %d: %s", seed, k, text)
		list, err := radial.GuidedVector(p, v, cladding)
		require.NoError(t, err, text)
		fine := halved(p)
		again, err := radial.GuidedVector(fine, v, cladding)
		require.NoError(t, err, text)
		require.Len(t, again, len(list), text)
		counts := map[int]int{}
		top := 1
		for i, m := range list {
			e := math.Abs(m.B-again[i].B) / (m.B + 1e-3)
			worst = math.Max(worst, e)
			assert.Less(t, e, 2e-12, "%s: %+v", text, m)
			counts[countKey(m)]++
			top = max(top, m.Nu)
			if i > 0 {
				assert.LessOrEqual(t, m.B, list[i-1].B, text)
			}
		}
		total += len(list)
		for key := -1; key < top+4; key++ {
			n := countVector(t, fine, v, cladding, key)
			if key == 1 && n == counts[1]+1 {
				// A mode of order 1 above its cut-off, but below the b from which modes are listed.
				least++
				continue
			}
			assert.Equal(t, n, counts[key], "%s: order %d", text, key)
		}
		scalar, err := radial.Guided(p, v)
		require.NoError(t, err, text)
		weak, err := radial.GuidedVector(p, v, math.Inf(1))
		require.NoError(t, err, text)
		b := map[[2]int]float64{}
		number := 0
		for _, m := range scalar {
			b[[2]int{m.L, m.M}] = m.B
			number += []int{1, 3}[min(m.L, 1)]
			if m.L > 1 {
				number--
			}
		}
		require.Len(t, weak, number, text)
		for _, m := range weak {
			l := m.Nu + 1
			if m.Family == radial.VectorHE {
				l = m.Nu - 1
			}
			lp, ok := b[[2]int{l, m.M}]
			require.True(t, ok, "%s: %+v", text, m)
			assert.InDelta(t, lp, m.B, 2e-11, "%s: %+v", text, m)
		}
	}
	t.Logf("%d profiles, %d modes, worst difference of B over B + 0.001: %.1e, %d with HE11 below the least b", *vectorProfiles, total, worst, least)
	assert.Less(t, least, *vectorProfiles/10)
}

// A profile without closed form: the error falls with the elements until it is at rounding.
func TestVectorConvergence(t *testing.T) {
	f := func(r float64) float64 { return 1 / (1 + 40*(r-0.6)*(r-0.6)) }
	profile := func(n int) (p radial.Profile) {
		for i := range n {
			p.Pieces = append(p.Pieces, radial.Piece{From: float64(i) / float64(n), To: float64(i+1) / float64(n), F: f})
		}
		return p
	}
	const v, cladding = 9, 6 // n^2 up to 3.25 times the cladding's
	want, err := radial.GuidedVector(profile(24), v, cladding)
	require.NoError(t, err)
	for _, n := range []int{1, 3, 8} {
		got, err := radial.GuidedVector(profile(n), v, cladding)
		require.NoError(t, err)
		require.Len(t, got, len(want))
		for i, m := range got {
			assert.Equal(t, want[i].Family, m.Family)
			assert.InDelta(t, want[i].B, m.B, 1e-12, "%d pieces: %+v", n, m)
		}
	}
}

// The shift against the difference of lambda where that has digits enough, and small
// contrasts against each other: it goes like the contrast.
func TestVectorShift(t *testing.T) {
	f := func(r float64) float64 { return 1 - 0.7*r*r }
	p := radial.Profile{Pieces: []radial.Piece{{From: 0, To: 0.8, F: f}, {From: 0.8, To: 1, F: func(float64) float64 { return -0.3 }}}}
	const v = 6
	for _, m := range []radial.VectorMode{{Family: radial.VectorHE, Nu: 1, M: 1}, {Family: radial.VectorTE, M: 1}, {Family: radial.VectorTM, M: 1},
		{Family: radial.VectorHE, Nu: 2, M: 1}, {Family: radial.VectorEH, Nu: 1, M: 1}, {Family: radial.VectorHE, Nu: 1, M: 2}} {
		lp, err := radial.SolveVector(p, v, math.Inf(1), m.Family, m.Nu, m.M)
		require.NoError(t, err)
		var at [4]float64
		for i, excess := range []float64{0.03, 1e-5, 1e-8, 1e-11} {
			got, shift, err := radial.VectorShift(p, v, v/math.Sqrt(excess), m.Family, m.Nu, m.M)
			require.NoError(t, err)
			assert.InDelta(t, got.W*got.W-lp.W*lp.W, shift, 1e-12, "%+v", m)
			at[i] = shift / excess
		}
		if m.Family == radial.VectorTE {
			assert.Zero(t, at)
			continue
		}
		assert.InEpsilon(t, at[1], at[2], 1e-3, "%+v", m)
		assert.InEpsilon(t, at[2], at[3], 1e-6, "%+v", m)
	}
}

// Derivatives with respect to k of a fibre without dispersion, lambda's series against its
// values nearby.
func TestVectorSeries(t *testing.T) {
	f := func(r float64) float64 { return 1 - 0.7*r*r }
	p := radial.Profile{Pieces: []radial.Piece{{From: 0, To: 0.8, F: f}, {From: 0.8, To: 1, F: func(float64) float64 { return -0.3 }}}}
	const v, ratio = 8.0, 1.2 // V over k a n2
	for _, m := range []radial.VectorMode{{Family: radial.VectorHE, Nu: 1, M: 1}, {Family: radial.VectorTE, M: 1}, {Family: radial.VectorTM, M: 1},
		{Family: radial.VectorHE, Nu: 2, M: 1}, {Family: radial.VectorEH, Nu: 1, M: 1}, {Family: radial.VectorHE, Nu: 3, M: 1}} {
		v2 := taylor.Variable(v).Square()
		got, lambda, err := radial.VectorSeries(p, v, v2.Scale(1/ratio/ratio), m.Family, m.Nu, m.M, func(piece int, r float64) (taylor.Series, error) {
			return v2.Scale(p.Pieces[piece].F(r)), nil
		})
		require.NoError(t, err)
		assert.InEpsilon(t, got.W*got.W, lambda[0], 1e-15)
		for _, h := range []float64{-0.02, 0.01, 0.02} {
			near, err := radial.SolveVector(p, v+h, (v+h)/ratio, m.Family, m.Nu, m.M)
			require.NoError(t, err)
			assert.InDelta(t, near.W*near.W, lambda.At(h), 1e-11+0.1*math.Abs(h*h*h*h*h), "%+v", m)
		}
	}
}

func TestVectorErrors(t *testing.T) {
	p := stepProfile()
	for _, v := range []float64{math.NaN(), 0, -1, math.Inf(1), 100.1} {
		_, err := radial.GuidedVector(p, v, 3)
		assert.Error(t, err, v)
	}
	for _, c := range []float64{math.NaN(), 0, -1} {
		_, err := radial.GuidedVector(p, 3, c)
		assert.Error(t, err, c)
		_, err = radial.CountVector(p, 3, c, radial.VectorTE, 0)
		assert.Error(t, err, c)
	}
	for _, m := range []radial.VectorMode{{Family: -1, M: 1}, {Family: 4, M: 1}, {Family: radial.VectorTE, Nu: 1, M: 1}, {Family: radial.VectorHE, M: 1},
		{Family: radial.VectorHE, Nu: 1}, {Family: radial.VectorEH, Nu: 10001, M: 1}, {Family: radial.VectorEH, Nu: 1, M: 10001}} {
		_, err := radial.SolveVector(p, 3, 3, m.Family, m.Nu, m.M)
		assert.Error(t, err, "%+v", m)
		_, _, err = radial.VectorShift(p, 3, 3, m.Family, m.Nu, m.M)
		assert.Error(t, err, "%+v", m)
		_, err = radial.VectorRank(p, 3, 3, m.Family, m.Nu, m.M)
		assert.Error(t, err, "%+v", m)
	}
	_, err := radial.SolveVector(p, 2.4, 3, radial.VectorTM, 0, 1)
	assert.ErrorIs(t, err, radial.ErrCutoff)
	_, err = radial.SolveVector(p, 3, 3, radial.VectorHE, 1, 2)
	assert.ErrorIs(t, err, radial.ErrCutoff)
	_, err = radial.VectorRank(p, 3, 3, radial.VectorHE, 1, 2)
	assert.ErrorIs(t, err, radial.ErrCutoff)
	// n^2 below 0 in a layer.
	hole := radial.Profile{Pieces: []radial.Piece{{From: 0, To: 0.5, F: func(float64) float64 { return -1 }}, {From: 0.5, To: 1, F: func(float64) float64 { return 1 }}}}
	_, err = radial.GuidedVector(hole, 3, 2.9)
	assert.Error(t, err)
	_, err = radial.GuidedVector(hole, 3, 3.1)
	assert.NoError(t, err)
	_, err = radial.SolveVector(p, 3, 3/math.Sqrt(99.1), radial.VectorHE, 1, 1)
	assert.ErrorContains(t, err, "ten times")
	_, err = radial.SolveVector(p, 3, 3/math.Sqrt(98.9), radial.VectorHE, 1, 1)
	assert.NoError(t, err)
}

func BenchmarkGuidedVector(b *testing.B) {
	for _, v := range []float64{3, 8, 20, 40} {
		b.Run(fmt.Sprint(v), func(b *testing.B) {
			n := 0
			for b.Loop() {
				list, err := radial.GuidedVector(stepProfile(), v, v)
				if err != nil {
					b.Fatal(err)
				}
				n = len(list)
			}
			b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/float64(n), "ns/mode")
		})
	}
}
