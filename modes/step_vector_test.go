package modes

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/taylor"
)

// thread is a silica thread in air.
func thread(diameter float64) Step {
	return Step{Radius: diameter / 2, Core: materials.FusedSilica(), Cladding: materials.Constant(1)}
}

// L. Tong, J. Lou and E. Mazur, Opt. Express 12, 1025 (2004), from memory, recomputed: a
// silica thread in air carries one mode at 633 nm up to a diameter of 457 nm.
func TestTongSingleModeThread(t *testing.T) {
	x, err := thread(457e-9).Vector(TE, 0, 1).CutoffWavelength(0.4e-6, 1e-6)
	require.NoError(t, err)
	assert.InDelta(t, 633e-9, x, 1e-9)
	for _, c := range []struct {
		diameter float64
		labels   int
	}{{456e-9, 1}, {459e-9, 3}} { // HE11; and TE01 and TM01, but not HE21
		list, err := thread(c.diameter).GuidedVector(633e-9)
		require.NoError(t, err)
		assert.Len(t, list, c.labels)
		assert.Equal(t, "HE11", list[0].Mode.String())
	}
}

// With glasses that do not disperse, n_eff^2 is homogeneous in n1^2, n2^2 and 1/k^2, so
// that Euler's theorem ties the weights of Parts to the group index of Taylor:
//
//	n1^2 d(n^2)/d(n1^2) + n2^2 d(n^2)/d(n2^2) = n N
//
// At weak guidance P1 is the power in the core. P1 + P2 exceeds 1.
func TestWeightsGiveGroupIndex(t *testing.T) {
	for _, c := range []struct {
		n1, n2, radius float64
		f              Family
		nu, m          int
	}{
		{1.45, 1.444, 4e-6, HE, 1, 1}, {1.45, 1, 0.3e-6, HE, 1, 1}, {1.45, 1, 0.8e-6, TM, 0, 1}, {1.45, 1, 0.8e-6, TE, 0, 1},
		{1.45, 1, 2e-6, EH, 2, 1}, {2.4, 1, 2e-6, HE, 3, 2}, {2.4, 1, 10e-6, EH, 5, 4}, {9, 1, 0.1e-6, HE, 1, 1}, {9, 1, 0.4e-6, TM, 0, 2},
		{2.4, 1, 20e-6, HE, 1, 1}, {2.4, 1, 0.19e-6, HE, 1, 1},
	} {
		f := constantStep(c.radius, c.n1, c.n2)
		mode := f.Vector(c.f, c.nu, c.m)
		n, err := mode.Taylor(1e-6)
		require.NoError(t, err, mode)
		s, err := mode.solve(1e-6)
		require.NoError(t, err)
		p1, p2 := s.equation.weights(s.v, s.mode.U*s.mode.U, s.mode.W*s.mode.W)
		group := n[0] - 1e-6*n[1]
		assert.InEpsilon(t, n[0]*group, c.n1*c.n1*p1+c.n2*c.n2*p2, 1e-13, "%v of %v", mode, c)
		assert.Greater(t, p1+p2, 1-1e-15, "%v of %v", mode, c)
		if c.n1-c.n2 < 0.01 {
			lp, err := f.LP(0, 1).Solve(1e-6)
			require.NoError(t, err)
			assert.InDelta(t, lp.CorePower(), p1, 0.01)
		}

		// And by differences of n1 alone.
		const h = 1e-5
		var side [2]float64
		for i, d := range []float64{-h, h} {
			moved, err := constantStep(c.radius, c.n1+d, c.n2).Vector(c.f, c.nu, c.m).Taylor(1e-6)
			require.NoError(t, err)
			side[i] = moved[0]
		}
		assert.InDelta(t, (side[1]-side[0])/(2*h), p1*c.n1/n[0], 1e-5, "%v of %v", mode, c)
	}
}

// The series against the mode's own values nearby.
func TestVectorSeriesAgainstDifferences(t *testing.T) {
	core, err := materials.GermaniaSilica(0.2)
	require.NoError(t, err)
	for _, f := range []Step{thread(1.5e-6), {Radius: 4e-6, Core: core, Cladding: materials.FusedSilica()}} {
		for _, mode := range []StepVector{f.Vector(HE, 1, 1), f.Vector(TE, 0, 1), f.Vector(TM, 0, 1), f.Vector(HE, 2, 1), f.Vector(EH, 1, 1), f.Vector(HE, 1, 2)} {
			const x, h = 0.8e-6, 2e-9
			n, err := mode.Taylor(x)
			require.NoError(t, err, mode)
			for _, d := range []float64{-h, h} {
				near, err := mode.Taylor(x + d)
				require.NoError(t, err)
				assert.InDelta(t, near[0], n.At(d), 1e-11, mode)
				assert.InDelta(t, near[1], n.Diff().At(d), math.Abs(n[1])*1e-6, mode)
				assert.InDelta(t, near[2], n.Diff().Diff().At(d)/2, math.Abs(n[2])*1e-3, mode)
			}
			_, waveguide, err := mode.Parts(x)
			require.NoError(t, err)
			assert.Equal(t, n[0], waveguide[0])
		}
	}
}

// TE01, TM01 and HE21 as LP11 split by polarisation, and IndexShift as the difference of
// effective indices.
func TestIndexShift(t *testing.T) {
	f := thread(1e-6)
	lp, err := f.LP(1, 1).Taylor(0.6e-6)
	require.NoError(t, err)
	for _, mode := range []StepVector{f.Vector(TE, 0, 1), f.Vector(TM, 0, 1), f.Vector(HE, 2, 1)} {
		n, err := mode.Taylor(0.6e-6)
		require.NoError(t, err)
		shift, err := mode.IndexShift(0.6e-6)
		require.NoError(t, err)
		assert.InDelta(t, n[0]-lp[0], shift, 4e-16, mode)
		assert.Equal(t, "LP11", mode.Group().String())
	}
	// A faint fibre: the shift is far below the last digit of the index, and goes like the
	// square of the index difference at a given V.
	shift := func(n1 float64) float64 {
		const n2 = 1.444
		radius := 2.0 / (2 * math.Pi / 1e-6 * math.Sqrt((n1-n2)*(n1+n2)))
		s, err := constantStep(radius, n1, n2).Vector(HE, 1, 1).IndexShift(1e-6)
		require.NoError(t, err)
		return s
	}
	const d = 1.0 / (1 << 30)
	assert.InEpsilon(t, 4, shift(1.444+2*d)/shift(1.444+d), 1e-6)
	assert.Less(t, math.Abs(shift(1.444+d)), 1e-18)
}

// The cut-off of HE21 depends on the glasses: at it, V is its cut-off V for the index
// difference there. Indices that cross, and a medium that disperses strongly.
func TestVectorCutoffWavelength(t *testing.T) {
	core, err := materials.GermaniaSilica(0.1)
	require.NoError(t, err)
	for _, f := range []Step{thread(1e-6), {Radius: 3e-6, Core: core, Cladding: materials.FusedSilica()},
		{Radius: 2e-6, Core: straight(1.5, -2e4), Cladding: straight(1.46, 2e4)}} {
		for _, mode := range []StepVector{f.Vector(TE, 0, 1), f.Vector(TM, 0, 1), f.Vector(HE, 2, 1), f.Vector(EH, 1, 1), f.Vector(HE, 1, 2), f.Vector(HE, 3, 1)} {
			x, err := mode.CutoffWavelength(0.4e-6, 3e-6)
			require.NoError(t, err, mode)
			_, err = mode.Solve(x * (1 + 1e-12))
			assert.ErrorIs(t, err, ErrCutoff, mode)
			p, err := mode.Solve(x * (1 - 1e-9))
			require.NoError(t, err, mode)
			cut, err := CutoffVectorV(p.Delta, p.Family, p.Nu, p.M)
			require.NoError(t, err)
			assert.InEpsilon(t, cut, p.V, 1e-8, mode)
		}
	}
	// The glasses cross inside the range, at 2.6 um.
	crossing := Step{Radius: 6e-6, Core: straight(1.48, -1e4), Cladding: straight(1.464, 0)}
	x, err := crossing.Vector(HE, 2, 1).CutoffWavelength(0.4e-6, 3e-6)
	require.NoError(t, err)
	assert.Less(t, x, 2.6e-6)
}

func TestStepGuidedVector(t *testing.T) {
	f := thread(2e-6)
	list, err := f.GuidedVector(0.6e-6)
	require.NoError(t, err)
	v, err := f.V(0.6e-6)
	require.NoError(t, err)
	bare, err := GuidedVector(v, list[0].Solution.Delta)
	require.NoError(t, err)
	require.Len(t, list, len(bare))
	seen := map[string]bool{}
	for i, g := range list {
		assert.Equal(t, bare[i].String(), g.Mode.String())
		assert.False(t, seen[g.Mode.String()], "twice: %v", g.Mode)
		seen[g.Mode.String()] = true
		n, err := g.Mode.Taylor(0.6e-6)
		require.NoError(t, err)
		assert.InDelta(t, n[0], g.Index, 3e-16)
		assert.Equal(t, g.Mode.Degeneracy(), g.Degeneracy)
		if i > 0 {
			assert.LessOrEqual(t, g.Index, list[i-1].Index)
		}
	}
}

// HE11 of a faint and thin fibre, whose w underflows, travels like the cladding's light.
func TestVectorUnderflow(t *testing.T) {
	f := thread(0.02e-6)
	n, err := f.Vector(HE, 1, 1).Taylor(1e-6)
	require.NoError(t, err)
	assert.Equal(t, taylor.Constant(1), n)
	_, _, err = f.Vector(HE, 1, 1).Parts(1e-6)
	require.NoError(t, err)
	p, err := SolveVector(0.04, 0.3, HE, 1, 1)
	require.NoError(t, err)
	assert.Equal(t, Vector{Family: HE, Nu: 1, M: 1, V: 0.04, Delta: 0.3, U: 0.04}, p)
}
