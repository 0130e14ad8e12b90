package dispersion

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/reftable"
	"glassthread/modes"
)

func germaniaStep(t testing.TB, fraction, radius float64) modes.Step {
	core, err := materials.GermaniaSilica(fraction)
	require.NoError(t, err)
	return modes.Step{Radius: radius, Core: core, Cladding: materials.FusedSilica()}
}

// The table is made by testdata/step.py: LP modes of germania-silica cores in silica.
// The rounding of n1 - n2 alone moves V by some 1e-13 of itself, which next to a
// cut-off or a zero of D is all there is to see. So each error is held against 1e-9 of
// the quantity plus what a change of 1e-12 in wavelength does to it; beta4, whose own
// derivative is not at hand, only where V is 1 % above cut-off.
func TestModesAgainstTable(t *testing.T) {
	var index, group, d, slope, beta2, beta3, beta4, plain reftable.Errors
	for _, r := range reftable.Read(t, "testdata/step.csv", 200) {
		f := germaniaStep(t, r.Float("core_fraction"), r.Float("radius"))
		x := r.Float("wavelength")
		mode := f.LP(r.Int("l"), r.Int("m"))
		got, err := At(mode, x)
		require.NoError(t, err, r)
		index.Add(r.Relative("index", got.Index), r)

		n, err := mode.Taylor(x)
		require.NoError(t, err)
		const c, move = materials.SpeedOfLight, 1e-12
		curve := x * math.Abs(12*n[3]+24*x*n[4]) / c // x dS/dx
		share := func(name string, got, relative, change float64) float64 {
			return math.Abs(r.Difference(name, got)) / (relative*math.Abs(got) + move*math.Abs(change))
		}
		group.Add(share("group_index", got.GroupIndex, 1e-15, x*c*got.D), r)
		d.Add(share("d", got.D, 1e-9, x*got.Slope), r)
		slope.Add(share("slope", got.Slope, 1e-9, curve), r)
		w := 2 * math.Pi * c / x
		beta2.Add(share("beta2", got.Beta2, 1e-9, w*got.Beta3), r)
		beta3.Add(share("beta3", got.Beta3, 1e-9, w*got.Beta4), r)

		lp, err := mode.Solve(x)
		require.NoError(t, err)
		cut, err := modes.CutoffV(lp.L, lp.M)
		require.NoError(t, err)
		if lp.V > 1.01*cut {
			beta4.Add(r.Relative("beta4", got.Beta4), r)
			if math.Abs(got.D) > 0.01*x*math.Abs(got.Slope) {
				plain.Add(r.Relative("d", got.D), r)
			}
		}
	}
	index.Check(t, "index", 1e-15)
	group.Check(t, "group index over its limit", 1)
	d.Check(t, "d over its limit", 1)
	slope.Check(t, "slope over its limit", 1)
	beta2.Check(t, "beta2 over its limit", 1)
	beta3.Check(t, "beta3 over its limit", 1)
	beta4.Check(t, "beta4, 1 % above cut-off", 1e-9)
	plain.Check(t, "d, 1 % above cut-off and away from its zero", 1e-9)
}

func TestZerosAgainstTable(t *testing.T) {
	var zero, cutoff reftable.Errors
	for _, r := range reftable.Read(t, "testdata/zeros.csv", 10) {
		f := germaniaStep(t, r.Float("core_fraction"), r.Float("radius"))
		x, err := ZeroDispersion(f.LP(0, 1), 1e-6, 2e-6)
		if r.Text("zero_dispersion") == "" {
			assert.ErrorIs(t, err, ErrNoZero, r)
		} else {
			require.NoError(t, err, r)
			zero.Add(r.Relative("zero_dispersion", x), r)
		}
		x, err = f.LP(1, 1).CutoffWavelength(0.36e-6, 4.3e-6)
		if r.Text("lp11_cutoff") == "" {
			assert.ErrorIs(t, err, modes.ErrNoCutoff, r)
		} else {
			require.NoError(t, err, r)
			cutoff.Add(r.Relative("lp11_cutoff", x), r)
		}
	}
	zero.Check(t, "zero-dispersion wavelength", 1e-12)
	cutoff.Check(t, "LP11 cut-off wavelength", 1e-12)
}
