package modes

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/modes/radial"
	"glassthread/numap"
)

// depressed is a fibre with a depressed inner cladding, its core of radius 4 um and the
// inner cladding of radius b.
func depressed(b float64) Layered {
	return Layered{
		Layers: []Layer{
			{Outer: 4e-6, Glass: materials.Constant(1.449)},
			{Outer: b, Glass: materials.Constant(1.440)},
		},
		Cladding: materials.Constant(1.444),
	}
}

// Pure numbers turned into an index and decibels by the definitions.
func TestLeakyDefinitions(t *testing.T) {
	const b = 12e-6
	n1, low, n2 := 1.449, 1.440, 1.444
	contrast, hollow := (n1-n2)*(n1+n2), (low-n2)*(low+n2)
	for _, c := range []struct {
		x    float64
		l, m int
	}{{1.8e-6, 0, 1}, {1.3e-6, 1, 1}, {0.9e-6, 1, 1}} {
		mode, err := depressed(b).LP(c.l, c.m).Leaky(c.x)
		require.NoError(t, err, "%v", c)
		k := 2 * math.Pi / c.x
		v := k * b * math.Sqrt(contrast)
		pure, err := radial.Leaky(radial.Profile{Pieces: []radial.Piece{
			{From: 0, To: 4e-6 / b, F: func(float64) float64 { return 1 }},
			{From: 4e-6 / b, To: 1, F: func(float64) float64 { return hollow / contrast }},
		}}, v, c.l, c.m)
		require.NoError(t, err)
		assert.InEpsilon(t, v, mode.V, 1e-14)
		left := mode.Index*mode.Index - complex(n2*n2, 0)
		want := pure.Lambda / complex(k*k*b*b, 0)
		assert.InDelta(t, real(want), real(left), 1e-15)
		assert.InDelta(t, imag(want), imag(left), 1e-9*imag(want)+1e-300)
		// The power that is left after a metre, in decibels.
		power := math.Exp(-2 * k * imag(mode.Index) * 1e-3)
		assert.InDelta(t, -10*math.Log10(power), mode.Loss*1e-3, 1e-9*(mode.Loss*1e-3)+1e-14)
	}
}

// A guided mode has Taylor's index and no loss; beyond the cut-off, where Solve refuses, the
// real part goes on below the cladding's index and the loss rises with the wavelength.
func TestLeakyAcrossCutoffWavelength(t *testing.T) {
	for _, c := range []struct{ l, m int }{{0, 1}, {1, 1}} {
		mode := depressed(14e-6).LP(c.l, c.m)
		cut, err := mode.CutoffWavelength(0.4e-6, 3e-6)
		require.NoError(t, err)
		guided, err := mode.Leaky(cut * 0.97)
		require.NoError(t, err)
		n, err := materials.Index(mode, cut*0.97)
		require.NoError(t, err)
		assert.InDelta(t, n, real(guided.Index), 1e-15)
		assert.Zero(t, imag(guided.Index))
		assert.Zero(t, guided.Loss)
		loss, index := 0.0, real(guided.Index)
		for _, stretch := range []float64{1.03, 1.06, 1.1, 1.15} {
			leaky, err := mode.Leaky(cut * stretch)
			require.NoError(t, err, "%v at %v of cut-off", mode, stretch)
			assert.Less(t, real(leaky.Index), 1.444)
			assert.Less(t, real(leaky.Index), index)
			assert.Greater(t, leaky.Loss, loss)
			loss, index = leaky.Loss, real(leaky.Index)
			_, err = mode.Solve(cut * stretch)
			assert.ErrorIs(t, err, ErrCutoff)
		}
	}
}

// The outermost medium has the highest index: every mode leaks, the less the wider the cladding,
// by exp(-2 q) a unit of its width, q being the decay rate in it (A. W. Snyder and J. D. Love
// 1983, chapter 24). Losses far below rounding of the index included.
func TestLeakyHighIndexCoating(t *testing.T) {
	const x, core = 1.55e-6, 4.1e-6
	k := 2 * math.Pi / x
	before := 0.0
	for _, width := range []float64{20e-6, 30e-6, 40e-6, 60e-6} {
		f := Layered{
			Layers: []Layer{
				{Outer: core, Glass: materials.Constant(1.4497)},
				{Outer: core + width, Glass: materials.Constant(1.4440)},
			},
			Cladding: materials.Constant(1.48),
		}
		_, err := f.LP(0, 1).Solve(x)
		require.ErrorIs(t, err, numap.ErrNotGuiding)
		leaky, err := f.LP(0, 1).Leaky(x)
		require.NoError(t, err)
		// The same core in an unbounded cladding.
		guided, err := materials.Index(Step{core, materials.Constant(1.4497), materials.Constant(1.4440)}.LP(0, 1), x)
		require.NoError(t, err)
		q := k * math.Sqrt(guided*guided-1.4440*1.4440)
		assert.InDelta(t, guided, real(leaky.Index), 5*imag(leaky.Index)+1e-12)
		if before > 0 {
			// K_l's power falls as 1/r besides, the circle grows as r: corrections are left.
			step := width - map[float64]float64{30e-6: 20e-6, 40e-6: 30e-6, 60e-6: 40e-6}[width]
			assert.InDelta(t, -2*q*step, math.Log(leaky.Loss/before), 0.03)
		}
		before = leaky.Loss
	}
	assert.Less(t, before*math.Ln10/20/k, 1e-16) // Im(Index)
}

// Layers of the cladding's own glass, and a graded core.
func TestLeakyOtherFibres(t *testing.T) {
	f := depressed(14e-6)
	want, err := f.LP(1, 1).Leaky(1.2e-6)
	require.NoError(t, err)
	f.Layers = append(f.Layers, Layer{Outer: 30e-6, Glass: f.Cladding})
	got, err := f.LP(1, 1).Leaky(1.2e-6)
	require.NoError(t, err)
	assert.InDelta(t, real(want.Index), real(got.Index), 1e-14)
	assert.InEpsilon(t, want.Loss, got.Loss, 1e-9)

	// LP(3, 1) of a parabola tunnels next below its cut-off.
	p := PowerLaw{Radius: 10e-6, Core: materials.Constant(1.46), Cladding: materials.Constant(1.444), Alpha: 2}
	cut, err := p.LP(3, 1).CutoffWavelength(0.6e-6, 4e-6)
	require.NoError(t, err)
	mode, err := p.LP(3, 1).Leaky(cut * 1.02)
	require.NoError(t, err)
	assert.Less(t, real(mode.Index), 1.444)
	assert.Positive(t, mode.Loss)
	_, err = p.LP(0, 3).Leaky(1.02 * cut)
	assert.ErrorIs(t, err, ErrNoResonance)
}

func TestLeakyRefusals(t *testing.T) {
	for _, x := range []float64{0, -1, math.NaN(), math.Inf(1)} {
		_, err := depressed(12e-6).LP(0, 1).Leaky(x)
		var refusal *domain.Error
		require.ErrorAs(t, err, &refusal)
		assert.Equal(t, "wavelength", refusal.Argument)
		assert.Equal(t, "modes.RadialLP.Leaky", refusal.Func)
	}
	_, err := RadialLP{}.Leaky(1e-6)
	assert.ErrorIs(t, err, errNoFibre)
	_, err = Layered{}.LP(0, 1).Leaky(1e-6)
	assert.ErrorContains(t, err, "len(Layers)")
	_, err = depressed(12e-6).LP(0, 0).Leaky(1e-6)
	assert.ErrorContains(t, err, "m = 0")
	same := materials.Constant(1.444)
	_, err = Layered{[]Layer{{Outer: 4e-6, Glass: same}}, same}.LP(0, 1).Leaky(1e-6)
	assert.ErrorIs(t, err, numap.ErrNotGuiding)
	_, err = Layered{[]Layer{{Outer: 4e-6, Glass: materials.FusedSilica()}}, same}.LP(0, 1).Leaky(50e-6)
	assert.Error(t, err) // outside the glass's range
	// A core whose glass fails within the layer.
	vary := func(r float64) (materials.Medium, error) {
		return materials.GermaniaSilica(r / 1e-6) // a mole fraction up to 4
	}
	_, err = Layered{[]Layer{{Outer: 4e-6, Vary: vary}}, same}.LP(0, 1).Leaky(1e-6)
	assert.ErrorContains(t, err, "layer 0 at radius")
	// So low an index outside that the wave does not run there: LP(1, 1) of air in glass.
	_, err = Layered{[]Layer{{Outer: 1e-7, Glass: materials.Constant(1.0)}}, materials.Constant(1.5)}.LP(1, 1).Leaky(1e-6)
	assert.ErrorIs(t, err, ErrNoResonance)
}

func FuzzLeakyRadial(f *testing.F) {
	for _, x := range []float64{math.NaN(), math.Inf(1), 0, -1, 5e-324, 1e308, 1.5} {
		f.Add(x, 4e-6, 12e-6, 1.449, 1.44, 1.444, 0, 1)
		f.Add(1e-6, x, 12e-6, 1.449, 1.44, 1.444, 1, 1)
		f.Add(1e-6, 4e-6, x, 1.449, 1.44, 1.444, 1, 1)
		f.Add(1e-6, 4e-6, 12e-6, x, 1.44, 1.444, 1, 1)
		f.Add(1e-6, 4e-6, 12e-6, 1.449, x, 1.444, 2, 1)
		f.Add(1e-6, 4e-6, 12e-6, 1.449, 1.44, x, 0, 1)
	}
	f.Add(1e-6, 4e-6, 60e-6, 1.449, 1.44, 1.48, 0, 1)
	f.Fuzz(func(t *testing.T, x, a, b, n1, n2, n3 float64, l, m int) {
		fibre := Layered{[]Layer{{Outer: a, Glass: materials.Constant(n1)}, {Outer: b, Glass: materials.Constant(n2)}}, materials.Constant(n3)}
		mode, err := fibre.LP(l%300, m%30).Leaky(x)
		if err != nil {
			return
		}
		for _, y := range []float64{real(mode.Index), imag(mode.Index), mode.Loss, mode.V} {
			require.False(t, math.IsNaN(y) || math.IsInf(y, 0), "%+v", mode)
		}
		require.GreaterOrEqual(t, mode.Loss, 0.0)
		require.Positive(t, real(mode.Index))
	})
}
