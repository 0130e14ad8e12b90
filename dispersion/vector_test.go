package dispersion

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/reftable"
	"glassthread/modes"
)

// glass returns a medium by its name in the table.
func glass(t testing.TB, name string) materials.Medium {
	kind, number, _ := strings.Cut(name, ":")
	x, _ := strconv.ParseFloat(number, 64)
	switch kind {
	case "silica":
		return materials.FusedSilica()
	case "as2s3":
		return materials.ArsenicTrisulfide()
	case "air", "constant":
		return materials.Constant(x)
	case "germania-silica":
		g, err := materials.GermaniaSilica(x)
		require.NoError(t, err)
		return g
	}
	t.Fatalf("no glass %q", name)
	return nil
}

func vectorMode(t testing.TB, r reftable.Row) modes.StepVector {
	f := modes.Step{Radius: r.Float("radius"), Core: glass(t, r.Text("core")), Cladding: glass(t, r.Text("cladding"))}
	family := map[string]modes.Family{"TE": modes.TE, "TM": modes.TM, "HE": modes.HE, "EH": modes.EH}[r.Text("family")]
	return f.Vector(family, r.Int("nu"), r.Int("m"))
}

// The table is made by testdata/vector.py, from the determinant: vector modes of
// germania-silica in silica and up to As2S3 in air. Limits as for the LP modes: 1e-9 of
// the quantity plus what a change of 1e-12 in wavelength does to it; and 1e-10 alone
// where that is small.
func TestVectorModesAgainstTable(t *testing.T) {
	var index, group, d, slope, beta2, beta3, beta4, plain, plainSlope reftable.Errors
	for _, r := range reftable.Read(t, "testdata/vector.csv", 200) {
		mode := vectorMode(t, r)
		x := r.Float("wavelength")
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
		d.Add(share("d", got.D, 1e-10, x*got.Slope), r)
		slope.Add(share("slope", got.Slope, 1e-10, curve), r)
		w := 2 * math.Pi * c / x
		beta2.Add(share("beta2", got.Beta2, 1e-10, w*got.Beta3), r)
		beta3.Add(share("beta3", got.Beta3, 1e-10, w*got.Beta4), r)

		p, err := mode.Solve(x)
		require.NoError(t, err)
		cut, err := modes.CutoffVectorV(p.Delta, p.Family, p.Nu, p.M)
		require.NoError(t, err)
		if p.V > 1.01*cut {
			beta4.Add(r.Relative("beta4", got.Beta4), r)
			if math.Abs(got.D) > 0.01*x*math.Abs(got.Slope) {
				plain.Add(r.Relative("d", got.D), r)
			}
			if math.Abs(got.Slope) > 0.01*curve {
				plainSlope.Add(r.Relative("slope", got.Slope), r)
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
	plain.Check(t, "d, 1 % above cut-off and away from its zero", 1e-10)
	plainSlope.Check(t, "slope, 1 % above cut-off and away from its zero", 1e-10)
}

// The split sums to D, and the waveguide part, whose glasses do not disperse, is all of D
// where they do not.
func TestSplitVector(t *testing.T) {
	plain := modes.Step{Radius: 0.4e-6, Core: materials.Constant(1.45), Cladding: materials.Constant(1)}
	p, err := Split(plain.Vector(modes.HE, 1, 1), 1e-6)
	require.NoError(t, err)
	assert.InEpsilon(t, p.D, p.Waveguide, 1e-12)
	assert.InDelta(t, 0, p.Material, 1e-15)

	// At weak guidance, the parts are those of the LP mode.
	weak := germaniaStep(t, 0.036, 4.1e-6)
	a, err := Split(weak.Vector(modes.HE, 1, 1), 1.55e-6)
	require.NoError(t, err)
	b, err := Split(weak.LP(0, 1), 1.55e-6)
	require.NoError(t, err)
	assert.InEpsilon(t, b.Material, a.Material, 0.01)
	assert.InEpsilon(t, b.Waveguide, a.Waveguide, 0.01)
	assert.NotEqual(t, b.Material, a.Material)
}
