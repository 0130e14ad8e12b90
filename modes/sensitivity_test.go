package modes

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
)

// A trench fibre, invented: germania-silica core, silica, a fluorine trench, silica.
func trench(t testing.TB, core, gap, ditch float64, shift [4]float64) Layered {
	return Layered{
		Layers: []Layer{
			{Outer: core, Glass: materials.Constant(1.4500 + shift[0])},
			{Outer: gap, Glass: materials.Constant(1.4440 + shift[1])},
			{Outer: ditch, Glass: materials.Constant(1.4380 + shift[2])},
		},
		Cladding: materials.Constant(1.4440 + shift[3]),
	}
}

func index(t testing.TB, m materials.Medium, x float64) float64 {
	n, err := materials.Index(m, x)
	require.NoError(t, err)
	return n
}

// Against central differences of whole solutions, whose own error is some 1e-13 over the step.
func TestSensitivityAgainstDifferences(t *testing.T) {
	const x = 1.4e-6
	for _, lm := range [][2]int{{0, 1}, {1, 1}} {
		base := trench(t, 4.6e-6, 8e-6, 12e-6, [4]float64{}).LP(lm[0], lm[1])
		s, err := base.Sensitivity(x)
		require.NoError(t, err)
		require.Len(t, s.Radius, 3)
		require.Len(t, s.Index, 4)
		for i := range s.Radius {
			r := func(h float64) Layered {
				a := [3]float64{4.6e-6, 8e-6, 12e-6}
				a[i] += h
				return trench(t, a[0], a[1], a[2], [4]float64{})
			}
			const h = 2e-9
			want := (index(t, r(h).LP(lm[0], lm[1]), x) - index(t, r(-h).LP(lm[0], lm[1]), x)) / (2 * h)
			assert.InDelta(t, want, s.Radius[i], 2e-6*abs(want)+1e-4, "radius %d of %v", i, base)
		}
		for i := range s.Index {
			f := func(h float64) Layered {
				var shift [4]float64
				shift[i] = h
				return trench(t, 4.6e-6, 8e-6, 12e-6, shift)
			}
			const h = 1e-6
			want := (index(t, f(h).LP(lm[0], lm[1]), x) - index(t, f(-h).LP(lm[0], lm[1]), x)) / (2 * h)
			assert.InDelta(t, want, s.Index[i], 1e-6*abs(want)+1e-8, "index %d of %v", i, base)
		}
	}
	core, err := materials.GermaniaSilica(0.09)
	require.NoError(t, err)
	f := PowerLaw{Radius: 9e-6, Core: core, Cladding: materials.FusedSilica(), Alpha: 1.9}
	s, err := f.LP(1, 2).Sensitivity(x)
	require.NoError(t, err)
	wide, slim := f, f
	const h = 2e-9
	wide.Radius += h
	slim.Radius -= h
	want := (index(t, wide.LP(1, 2), x) - index(t, slim.LP(1, 2), x)) / (2 * h)
	assert.InEpsilon(t, want, s.Radius[0], 1e-6)
	assert.InDelta(t, 1, s.Index[0]+s.Index[1], 0.01)
}

func abs(x float64) float64 {
	if x < 0 {
		return -x
	}
	return x
}

// How far the effective index moves when the draw makes the core 10 nm wider, and when the
// core takes up a little more germania. Gloge's curves say the same: (n1 - n2) V db/dV / a is 850
// per metre and the share of power in the core 0.77.
func ExampleRadialLP_Sensitivity() {
	f := Layered{Layers: []Layer{{Outer: 4.1e-6, Glass: materials.Constant(1.4495)}}, Cladding: materials.Constant(1.4440)}
	s, err := f.LP(0, 1).Sensitivity(1.55e-6)
	fmt.Printf("10 nm of radius: %.2e, 1e-4 of core index: %.2e %v\n", s.Radius[0]*10e-9, s.Index[0]*1e-4, err)
	// Output: 10 nm of radius: 8.57e-06, 1e-4 of core index: 7.67e-05 <nil>
}
