package modes

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/reftable"
)

func layeredOf(f Step) Layered {
	return Layered{Layers: []Layer{{Outer: f.Radius, Glass: f.Core}}, Cladding: f.Cladding}
}

// A Layered of one layer against the step's own solver: the list, the series, shifts and cut-offs.
func TestRadialVectorAgainstStep(t *testing.T) {
	core, err := materials.GermaniaSilica(0.2)
	require.NoError(t, err)
	var worst [5]float64
	for _, f := range []Step{thread(1.5e-6), {Radius: 4e-6, Core: core, Cladding: materials.FusedSilica()},
		constantStep(1e-6, 2.4, 1), constantStep(40e-6, 1.444+1e-4, 1.444), constantStep(3e-6, 1.45, 1.444)} {
		g := layeredOf(f)
		const x = 0.8e-6
		want, err := f.GuidedVector(x)
		require.NoError(t, err)
		got, err := g.GuidedVector(x)
		require.NoError(t, err)
		require.Len(t, got, len(want))
		for i, w := range want {
			mode := g.Vector(w.Mode.Family, w.Mode.Nu, w.Mode.M)
			assert.Equal(t, w.Mode.String(), mode.String())
			assert.InDelta(t, w.Index, got[i].Index, 1e-14)
			a, err := w.Mode.Taylor(x)
			require.NoError(t, err)
			b, err := mode.Taylor(x)
			require.NoError(t, err)
			condition := 1 / w.Solution.B // next to cut-off
			for k, limit := range [5]float64{1e-15, 1e-13, 2e-12, 2e-11, 2e-10} {
				e := math.Abs(b[k]/a[k] - 1)
				assert.Less(t, e, limit*(1+0.1*condition), "%v of %+v, order %d", mode, f, k)
				if condition < 20 {
					worst[k] = math.Max(worst[k], e)
				}
			}
			s, err := mode.Solve(x)
			require.NoError(t, err)
			assert.InDelta(t, w.Solution.B, s.B, 1e-12*w.Solution.B+1e-15)
			assert.InDelta(t, s.V, math.Hypot(s.U, s.W), 1e-14*s.V)
			shift, err := w.Mode.IndexShift(x)
			require.NoError(t, err)
			own, err := mode.IndexShift(x)
			require.NoError(t, err)
			assert.InDelta(t, shift, own, 1e-11*(1+condition)*math.Abs(shift), "%v of %+v", mode, f)
		}
	}
	t.Logf("worst relative errors of the index and its derivatives, B above 0.05: %.1e", worst)

	for _, f := range []Step{thread(1e-6), {Radius: 3e-6, Core: core, Cladding: materials.FusedSilica()}} {
		for _, m := range []StepVector{f.Vector(TE, 0, 1), f.Vector(TM, 0, 1), f.Vector(HE, 2, 1), f.Vector(EH, 1, 1), f.Vector(HE, 1, 2), f.Vector(HE, 3, 1)} {
			want, err := m.CutoffWavelength(0.4e-6, 3e-6)
			require.NoError(t, err)
			got, err := layeredOf(f).Vector(m.Family, m.Nu, m.M).CutoffWavelength(0.4e-6, 3e-6)
			require.NoError(t, err)
			assert.InEpsilon(t, want, got, 1e-12, m)
		}
		_, err := layeredOf(f).Vector(HE, 1, 1).CutoffWavelength(0.4e-6, 3e-6)
		assert.ErrorIs(t, err, ErrNoCutoff)
	}
}

// L. Tong, J. Lou and E. Mazur, Opt. Express 12, 1025 (2004), from memory, recomputed: a
// silica thread in air carries one mode at 633 nm up to a diameter of 457 nm.
func TestRadialVectorTong(t *testing.T) {
	x, err := layeredOf(thread(457e-9)).Vector(TM, 0, 1).CutoffWavelength(0.4e-6, 1e-6)
	require.NoError(t, err)
	assert.InDelta(t, 633e-9, x, 1e-9)
	for _, c := range []struct {
		diameter float64
		labels   int
	}{{456e-9, 1}, {459e-9, 3}} {
		list, err := layeredOf(thread(c.diameter)).GuidedVector(633e-9)
		require.NoError(t, err)
		assert.Len(t, list, c.labels)
	}
}

// Fibres of several uniform layers against determinants of Bessel functions in arbitrary
// precision, which also tell the families by the field: made by testdata/radial_vector.py.
func TestRadialVectorAgainstTable(t *testing.T) {
	var index, excess reftable.Errors
	for _, r := range reftable.Read(t, "testdata/radial_vector.csv", 40) {
		numbers := func(column string) (list []float64) {
			for _, s := range strings.Fields(r.Text(column)) {
				x, err := strconv.ParseFloat(s, 64)
				require.NoError(t, err)
				list = append(list, x)
			}
			return list
		}
		radii, n := numbers("radii"), numbers("indices")
		f := Layered{Cladding: materials.Constant(n[len(n)-1])}
		for i, a := range radii {
			f.Layers = append(f.Layers, Layer{Outer: a, Glass: materials.Constant(n[i])})
		}
		s, err := f.Vector(family(t, r.Text("family")), r.Int("nu"), r.Int("m")).Taylor(1)
		require.NoError(t, err, r)
		index.Add(r.Relative("index", s[0]), r)
		n2 := n[len(n)-1]
		excess.Add(math.Abs(r.Relative("excess", s[0]-n2))/(1+1e-4/(s[0]-n2)), r)
	}
	index.Check(t, "effective index", 6e-16)
	excess.Check(t, "its excess over the cladding's", 1e-12)
}

// A faint parabola: the shift is what the two indices differ by, and the derivatives are those of
// the LP mode to the order of the contrast.
func TestRadialVectorWeakGuidance(t *testing.T) {
	f := PowerLaw{Radius: 20e-6, Core: materials.Constant(1.4441), Cladding: materials.Constant(1.444), Alpha: 2}
	for _, m := range []RadialVector{f.Vector(HE, 1, 1), f.Vector(TE, 0, 1), f.Vector(TM, 0, 1), f.Vector(HE, 2, 1)} {
		lp, err := m.Group().Taylor(0.4e-6)
		require.NoError(t, err)
		n, err := m.Taylor(0.4e-6)
		require.NoError(t, err)
		shift, err := m.IndexShift(0.4e-6)
		require.NoError(t, err)
		assert.InDelta(t, n[0]-lp[0], shift, 1e-15, m)
		assert.Less(t, math.Abs(shift), 1e-9, m)
		for k := 1; k < 4; k++ {
			assert.InEpsilon(t, lp[k], n[k], 1e-3, "%v, order %d", m, k)
		}
	}
}

// The fundamental mode of a W fibre has a cut-off, near that of LP01 at low contrast.
func TestRadialVectorFundamentalCutoff(t *testing.T) {
	f := Layered{Layers: []Layer{{Outer: 3e-6, Glass: materials.Constant(1.446)}, {Outer: 9e-6, Glass: materials.Constant(1.4435)}},
		Cladding: materials.Constant(1.444)}
	lp, err := f.LP(0, 1).CutoffWavelength(0.5e-6, 4e-6)
	require.NoError(t, err)
	he, err := f.Vector(HE, 1, 1).CutoffWavelength(0.5e-6, 4e-6)
	require.NoError(t, err)
	assert.InEpsilon(t, lp, he, 2e-3)
	_, err = f.Vector(HE, 1, 1).Solve(he * 1.0001)
	assert.ErrorIs(t, err, ErrCutoff)
}

// A glass that varies with the radius: the series against the mode's own values nearby.
func TestRadialVectorSeriesOfGradedFibre(t *testing.T) {
	f := Layered{Layers: []Layer{{Outer: 3e-6, Vary: func(r float64) (materials.Medium, error) {
		return materials.GermaniaSilica(0.25 * math.Max(0, 1-r*r/9e-12))
	}}}, Cladding: materials.FusedSilica()}
	for _, m := range []RadialVector{f.Vector(HE, 1, 1), f.Vector(TE, 0, 1), f.Vector(TM, 0, 1), f.Vector(HE, 2, 1), f.Vector(EH, 1, 1)} {
		const x, h = 0.8e-6, 4e-9
		n, err := m.Taylor(x)
		require.NoError(t, err, m)
		for _, d := range []float64{-h, h} {
			near, err := m.Taylor(x + d)
			require.NoError(t, err)
			assert.InDelta(t, near[0], n.At(d), 1e-12, m)
			assert.InEpsilon(t, near[1], n.Diff().At(d), 1e-7, m)
			assert.InEpsilon(t, near[2], n.Diff().Diff().At(d)/2, 1e-3, m)
		}
	}
}

// A graded core of high contrast as the limit of staircases, whose layers need no gradient of
// the index: the error falls with the square of the step, and extrapolation meets the graded core.
func TestRadialVectorStaircase(t *testing.T) {
	const radius, x = 1e-6, 1e-6
	square := func(r float64) float64 { return 4 - 2.5*r*r } // n^2 of the core
	graded := Layered{Layers: []Layer{{Outer: radius, Vary: func(r float64) (materials.Medium, error) {
		return materials.Constant(math.Sqrt(square(r / radius))), nil
	}}}, Cladding: materials.Constant(1)}
	stairs := func(n int) (f Layered) {
		for i := range n {
			a, b := float64(i)/float64(n), float64(i+1)/float64(n)
			f.Layers = append(f.Layers, Layer{Outer: radius * b, Glass: materials.Constant(math.Sqrt(square(math.Sqrt((a*a + b*b) / 2))))})
		}
		f.Cladding = graded.Cladding
		return f
	}
	for _, m := range []RadialVector{graded.Vector(HE, 1, 1), graded.Vector(TE, 0, 1), graded.Vector(TM, 0, 1), graded.Vector(HE, 2, 1), graded.Vector(EH, 1, 1), graded.Vector(HE, 1, 2)} {
		want, err := m.Taylor(x)
		require.NoError(t, err, m)
		var e [3]float64
		for i, n := range []int{10, 20, 40} {
			m.Fibre = stairs(n)
			got, err := m.Taylor(x)
			require.NoError(t, err, m)
			e[i] = got[0] - want[0]
		}
		assert.InDelta(t, 4, e[1]/e[2], 0.1, "%v: %v", m, e)
		assert.Less(t, math.Abs(4*e[2]-e[1])/3, 3e-2*math.Abs(e[2]), "%v: %v", m, e)
	}
}

func TestRadialVectorErrors(t *testing.T) {
	f := layeredOf(thread(1e-6))
	for _, m := range []RadialVector{{}, {Family: HE, Nu: 1, M: 1}, f.Vector(TE, 1, 1), f.Vector(HE, 0, 1), f.Vector(EH, 1, 0), f.Vector(7, 1, 1),
		Layered{}.Vector(HE, 1, 1), PowerLaw{}.Vector(HE, 1, 1), f.Vector(HE, 20000, 1), f.Vector(HE, 1, 20000)} {
		_, err := m.Taylor(1e-6)
		assert.Error(t, err, m)
		_, err = m.Solve(1e-6)
		assert.Error(t, err, m)
		_, err = m.IndexShift(1e-6)
		assert.Error(t, err, m)
		_, err = m.CutoffWavelength(0.5e-6, 1e-6)
		assert.Error(t, err, m)
	}
	for _, x := range []float64{math.NaN(), 0, -1, math.Inf(1)} {
		_, err := f.GuidedVector(x)
		assert.Error(t, err, x)
		_, err = f.Vector(HE, 1, 1).CutoffWavelength(x, 1)
		assert.Error(t, err, x)
	}
	_, err := f.Vector(EH, 3, 2).Solve(1e-6)
	assert.ErrorIs(t, err, ErrCutoff)
	_, err = layeredOf(constantStep(1e-6, 10.5, 1)).Vector(HE, 1, 1).Solve(1e-6)
	assert.Error(t, err)
	_, err = layeredOf(constantStep(1e-6, 1.4, 1.5)).Vector(HE, 1, 1).CutoffWavelength(0.5e-6, 1e-6)
	assert.ErrorIs(t, err, ErrNoCutoff)
	assert.Equal(t, 1, f.Vector(TM, 0, 1).Degeneracy())
}
