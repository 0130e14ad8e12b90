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

// The causes of D one at a time, by their definitions: the power in the core from the
// integrals of the fields, D with the field frozen and D with the glasses frozen. Each
// error is held against 1e-11 of the quantity plus what a change of 1e-13 in wavelength
// does to it: to the waveguide's part by its slope, to the material's by the power that
// moves from one glass to the other.
func TestPartsAgainstTable(t *testing.T) {
	var power, material, waveguide, profile, plainPower, plainMaterial, plainWaveguide reftable.Errors
	for _, r := range reftable.Read(t, "testdata/step.csv", 200) {
		f := germaniaStep(t, r.Float("core_fraction"), r.Float("radius"))
		x := r.Float("wavelength")
		mode := f.LP(r.Int("l"), r.Int("m"))
		got, err := Split(mode, x)
		require.NoError(t, err, r)
		lp, err := mode.Solve(x)
		require.NoError(t, err)
		_, guide, err := mode.Parts(x)
		require.NoError(t, err)

		const c, move = materials.SpeedOfLight, 1e-13
		// By Gloge 1971, equation 27, V dP/dV = (V db/dV + V d2(Vb)/dV2)/2.
		swing := math.Abs(lp.GroupCurve()-lp.B+lp.DispersionCurve()) / 2
		exchange := swing * math.Abs(at(t, f.Core, x).D-at(t, f.Cladding, x).D)
		slope := math.Abs(2*guide[2]+6*x*guide[3]) / c
		share := func(name string, got, change float64) float64 {
			return math.Abs(r.Difference(name, got)) / (1e-11*math.Abs(got) + move*change)
		}
		power.Add(share("core_power", lp.CorePower(), swing), r)
		material.Add(share("d_material", got.Material, exchange), r)
		waveguide.Add(share("d_waveguide", got.Waveguide, x*slope), r)
		whole := at(t, mode, x)
		rest := r.Float("d") - r.Float("d_material") - r.Float("d_waveguide")
		sizes := math.Abs(got.D) + math.Abs(got.Material) + math.Abs(got.Waveguide)
		profile.Add(math.Abs(got.Profile-rest)/(1e-11*sizes+move*(x*math.Abs(whole.Slope)+exchange+x*slope)), r)

		cut, err := modes.CutoffV(lp.L, lp.M)
		require.NoError(t, err)
		if lp.V > 1.01*cut {
			plainPower.Add(r.Relative("core_power", lp.CorePower()), r)
			plainMaterial.Add(r.Relative("d_material", got.Material), r)
			plainWaveguide.Add(r.Relative("d_waveguide", got.Waveguide), r)
		}
	}
	power.Check(t, "core power over its limit", 1)
	material.Check(t, "material over its limit", 1)
	waveguide.Check(t, "waveguide over its limit", 1)
	profile.Check(t, "profile over its limit", 1)
	plainPower.Check(t, "core power, 1 % above cut-off", 5e-12)
	plainMaterial.Check(t, "material, 1 % above cut-off", 2e-13)
	plainWaveguide.Check(t, "waveguide, 1 % above cut-off", 2e-11)
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
