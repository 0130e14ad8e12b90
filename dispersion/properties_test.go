package dispersion

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/taylor"
	"glassthread/modes"
)

// What At reports in two forms agrees: G. P. Agrawal, Nonlinear Fiber Optics, section
// 1.2.3: D = -(2 pi c/x^2) beta2, and S = (2 pi c/x^2)^2 beta3 + (4 pi c/x^3) beta2.
func TestFormsAgree(t *testing.T) {
	for _, m := range []materials.Medium{materials.FusedSilica(), materials.Water(), standardFibre(t).LP(0, 1)} {
		for _, x := range []float64{0.6e-6, 0.85e-6, 1.06e-6, 1.12e-6} {
			r, err := At(m, x)
			require.NoError(t, err)
			k := 2 * math.Pi * materials.SpeedOfLight / (x * x)
			assert.Equal(t, x, r.Wavelength)
			assert.InEpsilon(t, r.D, -k*r.Beta2, 1e-14)
			assert.InDelta(t, r.Slope, k*k*r.Beta3+2*k/x*r.Beta2, 1e-13*(math.Abs(k*k*r.Beta3)+math.Abs(2*k/x*r.Beta2)))
			n, err := materials.Index(m, x)
			require.NoError(t, err)
			assert.Equal(t, n, r.Index)
			group, err := materials.GroupIndex(m, x)
			require.NoError(t, err)
			assert.Equal(t, group, r.GroupIndex)
			delay, err := GroupDelay(m, x)
			require.NoError(t, err)
			assert.Equal(t, group/materials.SpeedOfLight, delay)
		}
	}
}

// Each quantity is the derivative of the one before: D of the group delay, S of D by
// wavelength, beta3 of beta2 and beta4 of beta3 by frequency; here by differences.
func TestDerivatives(t *testing.T) {
	for _, m := range []materials.Medium{materials.FusedSilica(), standardFibre(t).LP(0, 1), germaniaStep(t, 0.1, 5e-6).LP(2, 1)} {
		for _, x := range []float64{0.633e-6, 1.06e-6, 1.45e-6} {
			r := at(t, m, x)
			h := 1e-4 * x
			difference := func(f func(r Chromatic) float64, step func(k float64) float64) float64 {
				f2, f1, g1, g2 := f(at(t, m, step(2))), f(at(t, m, step(1))), f(at(t, m, step(-1))), f(at(t, m, step(-2)))
				return (g2 - 8*g1 + 8*f1 - f2) / 12
			}
			byWavelength := func(k float64) float64 { return x + k*h }
			w := 2 * math.Pi * materials.SpeedOfLight / x
			byFrequency := func(k float64) float64 { return 2 * math.Pi * materials.SpeedOfLight / (w * (1 + 1e-4*k)) }
			delay := func(r Chromatic) float64 { return r.GroupIndex / materials.SpeedOfLight }
			assert.InDelta(t, difference(delay, byWavelength)/h, r.D, 1e-9*math.Abs(r.D)+2e-15*delay(r)/h)
			assert.InEpsilon(t, difference(func(r Chromatic) float64 { return r.D }, byWavelength)/h, r.Slope, 1e-7)
			assert.InEpsilon(t, difference(func(r Chromatic) float64 { return r.Beta2 }, byFrequency)/(1e-4*w), r.Beta3, 1e-7)
			assert.InEpsilon(t, difference(func(r Chromatic) float64 { return r.Beta3 }, byFrequency)/(1e-4*w), r.Beta4, 1e-6)
		}
	}
}

// Without dispersion there is none.
func TestConstantMedium(t *testing.T) {
	r := at(t, materials.Constant(1.45), 1.3e-6)
	assert.Equal(t, 1.45, r.Index)
	assert.Equal(t, 1.45, r.GroupIndex)
	for _, x := range []float64{r.D, r.Slope, r.Beta2, r.Beta3, r.Beta4} {
		assert.Zero(t, x)
		assert.False(t, math.Signbit(x), "printed as %v", x)
	}
	delay, err := GroupDelay(materials.Constant(1.45), 1.3e-6)
	require.NoError(t, err)
	assert.InEpsilon(t, 4.83668e-9, delay, 1e-5) // 4.84 us/km
}

// Glasses that do not disperse leave the waveguide's part alone.
func TestSplitOfConstantGlasses(t *testing.T) {
	f := modes.Step{Radius: 4e-6, Core: materials.Constant(1.45), Cladding: materials.Constant(1.444)}
	for _, x := range []float64{0.8e-6, 1.31e-6, 2e-6} {
		p, err := Split(f.LP(0, 1), x)
		require.NoError(t, err)
		assert.Zero(t, p.Material)
		assert.InEpsilon(t, p.D, p.Waveguide, 1e-12)
		assert.InDelta(t, 0, p.Profile, 1e-12*math.Abs(p.D))
		assert.NotZero(t, p.D)
	}
}

func TestSplitSums(t *testing.T) {
	for _, c := range []struct {
		fraction, radius, x float64
		l, m                int
	}{{0.03, 4.2e-6, 1.31e-6, 0, 1}, {0.1, 1.5e-6, 1.55e-6, 0, 1}, {0.2, 8e-6, 0.85e-6, 3, 2}, {0.1, 8e-6, 1.55e-6, 0, 2}} {
		mode := germaniaStep(t, c.fraction, c.radius).LP(c.l, c.m)
		p, err := Split(mode, c.x)
		require.NoError(t, err)
		assert.Equal(t, at(t, mode, c.x).D, p.D)
		assert.InDelta(t, p.D, p.Material+p.Waveguide+p.Profile, 4e-16*(math.Abs(p.Material)+math.Abs(p.Waveguide)))
		t.Logf("%v at %v: D %.3f = material %.3f + waveguide %.3f + profile %.3f ps/(nm km)", mode, c.x,
			p.D/PsPerNmKm, p.Material/PsPerNmKm, p.Waveguide/PsPerNmKm, p.Profile/PsPerNmKm)
	}
}

// A fibre of next to no contrast disperses like its glass; a doped core whose index
// difference does not change with wavelength has no profile part to speak of.
func TestFaintFibreIsBulkGlass(t *testing.T) {
	silica := materials.FusedSilica()
	shifted := medium(func(x float64) (taylor.Series, error) {
		s, err := silica.Taylor(x)
		return s.Shift(1e-12), err
	})
	mode := modes.Step{Radius: 40e-6, Core: shifted, Cladding: silica}.LP(0, 1)
	for _, x := range []float64{0.633e-6, 1.06e-6, 1.55e-6} {
		want, got := at(t, silica, x), at(t, mode, x)
		assert.InEpsilon(t, want.GroupIndex, got.GroupIndex, 1e-11)
		assert.InDelta(t, want.D, got.D, 1e-5*math.Abs(want.D))
		p, err := Split(mode, x)
		require.NoError(t, err)
		assert.InDelta(t, want.D, p.Material, 1e-5*math.Abs(want.D))
	}
	a, err := ZeroDispersion(silica, 1.1e-6, 1.5e-6)
	require.NoError(t, err)
	b, err := ZeroDispersion(mode, 1.1e-6, 1.5e-6)
	require.NoError(t, err)
	assert.InDelta(t, a, b, 1e-11)
}

// zeroAt is a medium whose n" is a polynomial with the given zeros (m).
func zeroAt(zeros ...float64) medium {
	return func(x float64) (taylor.Series, error) {
		second := taylor.Constant(1e10)
		for _, z := range zeros {
			second = second.Mul(taylor.Variable(x - z).Scale(1e6))
		}
		return taylor.Series{1.45, 0, second[0] / 2, second[1] / 6, second[2] / 12}, nil
	}
}

// Zeros known in advance: one, a close pair, three, at the ends, none.
func TestKnownZeros(t *testing.T) {
	for _, zeros := range [][]float64{
		{1.31e-6}, {1.3e-6, 1.62e-6}, {1.4e-6, 1.4001e-6}, {1.4e-6, 1.40000001e-6}, {1.1e-6, 1.3e-6, 1.7e-6}, {1e-6, 2e-6}, {},
		{1.4e-6, 1.43e-6, 1.46e-6}, {1.36e-6, 1.4e-6, 1.401e-6, 1.45e-6, 1.48e-6},
	} {
		m := zeroAt(zeros...)
		got, err := ZeroDispersions(m, 1e-6, 2e-6)
		require.NoError(t, err)
		require.Len(t, got, len(zeros), "%v", zeros)
		for i := range zeros {
			assert.InEpsilon(t, zeros[i], got[i], 1e-12)
		}
		first, err := ZeroDispersion(m, 1e-6, 2e-6)
		if len(zeros) == 0 {
			assert.ErrorIs(t, err, ErrNoZero)
			continue
		}
		require.NoError(t, err)
		assert.Equal(t, got[0], first)
	}
}

// ripple is the index 1.45 - height sin(k (x - 1 um)), k such that it has the given number
// of half waves in 1 um. D is zero at the ends of each.
func ripple(height float64, halves int) medium {
	k := math.Pi * float64(halves) / 1e-6
	return func(x float64) (taylor.Series, error) {
		s, c := math.Sincos(k * (x - 1e-6))
		sin := taylor.Series{s, k * c, -k * k * s / 2, -k * k * k * c / 6, k * k * k * k * s / 24}
		return sin.Scale(-height).Shift(1.45), nil
	}
}

// Many zeros close together: none is missed while a cell of the search, a 48th of the
// range, is narrower than their distance.
func TestManyZeros(t *testing.T) {
	for _, halves := range []int{10, 20, 31, 45} {
		got, err := ZeroDispersions(ripple(1e-6, halves), 1.0001e-6, 1.9999e-6)
		require.NoError(t, err)
		require.Len(t, got, halves-1)
		for i, x := range got {
			assert.InEpsilon(t, 1e-6+1e-6*float64(i+1)/float64(halves), x, 1e-14)
		}
	}
}

// D has opposite signs on the two sides of what is returned.
func TestZeroChangesSign(t *testing.T) {
	for _, m := range []materials.Medium{materials.FusedSilica(), standardFibre(t).LP(0, 1), germaniaStep(t, 0.08, 2.5e-6).LP(0, 1)} {
		x, err := ZeroDispersion(m, 1e-6, 2e-6)
		require.NoError(t, err)
		below, above := at(t, m, x*(1-1e-11)).D, at(t, m, x*(1+1e-11)).D
		assert.True(t, below < 0 && above > 0, "%v and %v", below, above)
		assert.InDelta(t, 0, at(t, m, x).D, 1e-13*PsPerNm2Km*x) // slope 0.1 ps/(nm^2 km), x known to 1e-12
	}
}
