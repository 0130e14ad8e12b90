package modes

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/numap"
)

// medium is a materials.Medium made of a function.
type medium func(x float64) (taylor.Series, error)

func (m medium) Taylor(x float64) (taylor.Series, error) { return m(x) }

// straight is a glass whose index changes by slope (1/m) from n at 1 um.
func straight(n, slope float64) medium {
	return func(x float64) (taylor.Series, error) { return taylor.Series{n + slope*(x-1e-6), slope}, nil }
}

func constantStep(radius, core, cladding float64) Step {
	return Step{Radius: radius, Core: materials.Constant(core), Cladding: materials.Constant(cladding)}
}

func germaniaStep(t testing.TB, fraction, radius float64) Step {
	core, err := materials.GermaniaSilica(fraction)
	require.NoError(t, err)
	return Step{Radius: radius, Core: core, Cladding: materials.FusedSilica()}
}

// A mode of an actual fibre is the mode of pure numbers at its V.
func TestStepIsSolveLP(t *testing.T) {
	f := germaniaStep(t, 0.05, 6e-6)
	for _, x := range []float64{0.5e-6, 0.85e-6, 1.31e-6, 1.55e-6} {
		n1, err := materials.Index(f.Core, x)
		require.NoError(t, err)
		n2, err := materials.Index(f.Cladding, x)
		require.NoError(t, err)
		na, err := f.NA(x)
		require.NoError(t, err)
		assert.InEpsilon(t, math.Sqrt((n1-n2)*(n1+n2)), na, 1e-15)
		v, err := f.V(x)
		require.NoError(t, err)
		assert.InEpsilon(t, 2*math.Pi*6e-6*na/x, v, 1e-15)

		list, err := f.Guided(x)
		require.NoError(t, err)
		pure, err := GuidedLP(v)
		require.NoError(t, err)
		require.Len(t, list, len(pure))
		for i, g := range list {
			assert.Equal(t, pure[i], g.Solution)
			assert.Equal(t, pure[i].Degeneracy(), g.Degeneracy)
			assert.Equal(t, f.LP(g.Solution.L, g.Solution.M), g.Mode)
			p, err := g.Mode.Solve(x)
			require.NoError(t, err)
			same(t, g.Solution, p)
			n, err := materials.Index(g.Mode, x)
			require.NoError(t, err)
			assert.InEpsilon(t, g.Index, n, 4e-16)
			assert.True(t, n > n2 && n < n1, "%v: %v", g.Mode, n)
			assert.InEpsilon(t, math.Sqrt(n2*n2+p.B*(n1*n1-n2*n2)), n, 4e-16)
			if i > 0 {
				assert.GreaterOrEqual(t, list[i-1].Index, n)
			}
		}
	}
}

// With no contrast left, a mode is its glass: index and derivatives.
func TestModeOfFaintFibre(t *testing.T) {
	const x = 1.3e-6
	glass := materials.FusedSilica()
	want, err := glass.Taylor(x)
	require.NoError(t, err)
	core := medium(func(x float64) (taylor.Series, error) {
		s, err := glass.Taylor(x)
		return s.Shift(1e-14), err
	})
	got, err := Step{50e-6, core, glass}.LP(0, 1).Taylor(x)
	require.NoError(t, err)
	for k := range want {
		assert.InDelta(t, want[k], got[k], 1e-12*math.Abs(want[k]), "coefficient %d", k)
	}
}

// Far from cut-off u tends to j01 (1 - 1/V) (Gloge 1971, the limit of du/dV = u/V^2), so
// that a very wide core has n^2 = n1^2 - (u x/(2 pi a))^2.
func TestModeOfWideFibre(t *testing.T) {
	const x, radius = 1.3e-6, 3e-3
	f := germaniaStep(t, 0.05, radius)
	core, err := f.Core.Taylor(x)
	require.NoError(t, err)
	v, err := f.V(x)
	require.NoError(t, err)
	k := 2.404825557695773 * (1 - 1/v) / (2 * math.Pi * radius)
	want := core.Square().Sub(taylor.Variable(x).Square().Scale(k * k)).Sqrt()
	got, err := f.LP(0, 1).Taylor(x)
	require.NoError(t, err)
	for k := range want {
		assert.InDelta(t, want[k], got[k], 2e-7*math.Abs(want[k]), "coefficient %d", k)
	}
}

// The exact derivatives of a mode against differences of its index.
func TestModeSeriesAgainstDifferences(t *testing.T) {
	for _, c := range []struct {
		fraction, radius, x float64
		l, m                int
	}{{0.036, 4.1e-6, 1.31e-6, 0, 1}, {0.05, 2e-6, 1.55e-6, 0, 1}, {0.1, 5e-6, 0.85e-6, 2, 2}, {0.1, 5e-6, 0.85e-6, 1, 1}} {
		mode := germaniaStep(t, c.fraction, c.radius).LP(c.l, c.m)
		s, err := mode.Taylor(c.x)
		require.NoError(t, err)
		h := 0.004 * c.x
		n := func(k float64) float64 {
			n, err := materials.Index(mode, c.x+k*h)
			require.NoError(t, err)
			return n
		}
		first := (n(-2) - 8*n(-1) + 8*n(1) - n(2)) / (12 * h)
		second := (-n(-2) + 16*n(-1) - 30*n(0) + 16*n(1) - n(2)) / (12 * h * h)
		third := (n(-3) - 8*n(-2) + 13*n(-1) - 13*n(1) + 8*n(2) - n(3)) / (8 * h * h * h)
		assert.InEpsilon(t, first, s.Derivative(1), 1e-7, "%v", mode)
		assert.InDelta(t, second, s.Derivative(2), 1e-4*math.Abs(s.Derivative(2))+2e-15/(h*h), "%v", mode)
		assert.InDelta(t, third, s.Derivative(3), 1e-2*math.Abs(s.Derivative(3))+2e-15/(h*h*h), "%v", mode)
		// The series itself tells the index nearby.
		assert.InDelta(t, n(1), s.At(h), 1e-10)
	}
}

// Just below its cut-off wavelength a mode is guided, just above it is not.
func TestCutoffWavelength(t *testing.T) {
	for _, f := range []Step{germaniaStep(t, 0.036, 4.1e-6), germaniaStep(t, 0.1, 6e-6), constantStep(9e-6, 1.46, 1.45)} {
		for _, c := range [][2]int{{1, 1}, {2, 1}, {0, 2}, {3, 1}} {
			mode := f.LP(c[0], c[1])
			x, err := mode.CutoffWavelength(0.37e-6, 4.2e-6)
			require.NoError(t, err, "%v", mode)
			_, err = mode.Solve(x * (1 - 1e-13))
			assert.NoError(t, err, "%v", mode)
			_, err = mode.Solve(x * (1 + 1e-13))
			assert.ErrorIs(t, err, ErrCutoff, "%v", mode)
			v, err := f.V(x)
			require.NoError(t, err)
			cut, err := CutoffV(c[0], c[1])
			require.NoError(t, err)
			assert.InEpsilon(t, cut, v, 1e-13)
			// The list at a wavelength gains the label there, and no other way.
			for _, near := range []struct {
				x    float64
				want bool
			}{{x * (1 - 1e-9), true}, {x * (1 + 1e-9), false}} {
				list, err := f.Guided(near.x)
				require.NoError(t, err)
				found := false
				for _, g := range list {
					found = found || g.Mode == mode
				}
				assert.Equal(t, near.want, found, "%v at %v", mode, near.x)
			}
			_, err = mode.CutoffWavelength(x*1.01, 4.2e-6)
			assert.ErrorIs(t, err, ErrNoCutoff)
			_, err = mode.CutoffWavelength(0.37e-6, x*0.99)
			assert.ErrorIs(t, err, ErrNoCutoff)
		}
	}
	_, err := germaniaStep(t, 0.036, 4.1e-6).LP(0, 1).CutoffWavelength(0.4e-6, 4e-6)
	assert.ErrorIs(t, err, ErrNoCutoff)
}

// Glasses whose indices cross at 1 um: below it nothing is guided, then LP11 appears at
// one wavelength and dies at a longer one. Only that is its cut-off.
func TestCrossingGlasses(t *testing.T) {
	f := Step{Radius: 10e-6, Core: straight(1.45, 5e3), Cladding: materials.Constant(1.45)}
	_, err := f.V(0.99e-6)
	assert.ErrorIs(t, err, numap.ErrNotGuiding)
	mode := f.LP(1, 1)
	// V^2 = (20 pi um/x)^2 (n1 - n2)(n1 + n2) is 0 at 1 um, largest near 2 um and falls.
	onset, gone := 0.0, 0.0
	for x := 1.001e-6; x < 60e-6; x *= 1.001 {
		_, err := mode.Solve(x)
		switch {
		case err == nil && onset == 0:
			onset = x
		case err != nil && onset != 0 && gone == 0:
			gone = x
		}
		if err != nil {
			assert.True(t, errors.Is(err, ErrCutoff), "%v", err)
		}
	}
	require.True(t, onset > 1e-6 && gone > onset)
	x, err := mode.CutoffWavelength(0.5e-6, 60e-6)
	require.NoError(t, err)
	assert.InEpsilon(t, gone, x, 1.1e-3)
	_, err = mode.CutoffWavelength(0.5e-6, (onset+gone)/2) // it only appears there
	assert.ErrorIs(t, err, ErrNoCutoff)
	t.Logf("LP11 guided from %.4g m to %.4g m, cut-off wavelength %.6g m", onset, gone, x)
}

// A core whose V^2 swings about the cut-off of LP11, made so that V^2/V_c^2 = 1 + 3 sin(k
// (x - 1 um)) with 30 half waves in 1 um; a third of the time its index is below the
// cladding's. LP11 dies at the end of every first half wave; the longest one counts.
func TestManyCutoffs(t *testing.T) {
	const radius, cladding, halves = 4e-6, 1.45, 30
	cut, err := CutoffV(1, 1)
	require.NoError(t, err)
	k := math.Pi * halves / 1e-6
	core := medium(func(x float64) (taylor.Series, error) {
		s, c := math.Sincos(k * (x - 1e-6))
		v2 := taylor.Series{3 * s, 3 * k * c, -3 * k * k * s / 2, -k * k * k * c / 2, k * k * k * k * s / 8}.Shift(1)
		perV := taylor.Variable(x).Scale(cut / (2 * math.Pi * radius))
		return perV.Square().Mul(v2).Shift(cladding * cladding).Sqrt(), nil
	})
	mode := Step{radius, core, materials.Constant(cladding)}.LP(1, 1)
	for i := 1; i < halves; i++ {
		want := 1e-6 + 1e-6*float64((i-1)/2*2+1)/halves // i = 1, 2: the first; 3, 4: the second
		x, err := mode.CutoffWavelength(1.001e-6, 1e-6+1e-6*(float64(i)+0.5)/halves)
		require.NoError(t, err)
		assert.InEpsilon(t, want, x, 1e-14, "%d half waves", i)
		_, err = mode.Solve(x * (1 - 1e-12))
		assert.NoError(t, err)
		_, err = mode.Solve(x * (1 + 1e-12))
		assert.ErrorIs(t, err, ErrCutoff)
	}
}

func TestLabels(t *testing.T) {
	for want, label := range map[string][2]int{"LP01": {0, 1}, "LP11": {1, 1}, "LP99": {9, 9},
		"LP(10,1)": {10, 1}, "LP(2,10)": {2, 10}, "LP(-1,1)": {-1, 1}} {
		assert.Equal(t, want, Step{}.LP(label[0], label[1]).String())
		assert.Equal(t, want, fmt.Sprint(StepLP{L: label[0], M: label[1]}))
	}
}

func refused(t *testing.T, err error, argument string) {
	t.Helper()
	var e *domain.Error
	if assert.ErrorAs(t, err, &e) {
		assert.Equal(t, argument, e.Argument, "%v", err)
		assert.NotEmpty(t, e.Func)
		assert.NotEmpty(t, e.Allowed)
		assert.Contains(t, err.Error(), argument)
	}
}

var nasty = []float64{math.NaN(), math.Inf(1), math.Inf(-1), -1, 0}

func TestRefusalsOfPureNumbers(t *testing.T) {
	for _, v := range append(nasty, 1.001*MaxV) {
		_, err := SolveLP(v, 0, 1)
		refused(t, err, "v")
		assert.NotErrorIs(t, err, ErrCutoff)
		_, err = GuidedLP(v)
		refused(t, err, "v")
	}
	_, err := GuidedLP(1.001 * MaxListV)
	refused(t, err, "v")
	for _, l := range []int{-1, math.MinInt, math.MaxInt, 100001} {
		_, err := SolveLP(5, l, 1)
		refused(t, err, "l")
		_, err = CutoffV(l, 1)
		refused(t, err, "l")
	}
	for _, m := range []int{-1, 0, math.MinInt, math.MaxInt, 100001} {
		_, err := SolveLP(5, 0, m)
		refused(t, err, "m")
		_, err = CutoffV(1, m)
		refused(t, err, "m")
	}
	for _, c := range [][2]int{{1, 1}, {0, 2}, {7, 1}, {100000, 100000}, {0, 100000}} {
		_, err := SolveLP(2.4, c[0], c[1])
		refused(t, err, "v")
		assert.ErrorIs(t, err, ErrCutoff)
	}
	_, err = SolveLP(2.4, 1, 1)
	assert.EqualError(t, err, "modes.SolveLP: v = 2.4: must be above the cut-off of the mode 2.404825558 (the mode is not guided)")
}

// calls are all questions that a step answers at a wavelength.
func calls(f Step, x float64) map[string]error {
	mode := f.LP(0, 1)
	_, v := f.V(x)
	_, na := f.NA(x)
	_, guided := f.Guided(x)
	_, series := mode.Taylor(x)
	_, solve := mode.Solve(x)
	_, _, parts := mode.Parts(x)
	return map[string]error{"V": v, "NA": na, "Guided": guided, "Taylor": series, "Solve": solve, "Parts": parts}
}

func TestRefusalsOfStep(t *testing.T) {
	good := constantStep(4e-6, 1.45, 1.444)
	for name, err := range calls(good, 1.3e-6) {
		assert.NoError(t, err, name)
	}
	silica := germaniaStep(t, 0.05, 4e-6)
	own := errors.New("own")
	broken := medium(func(float64) (taylor.Series, error) { return taylor.Series{}, own })
	for _, x := range nasty {
		for name, err := range calls(good, x) {
			assert.Error(t, err, name)
			refused(t, err, "wavelength")
		}
		for name, err := range calls(constantStep(x, 1.45, 1.444), 1.3e-6) {
			assert.Error(t, err, name)
			refused(t, err, "Radius")
		}
		for name, err := range calls(constantStep(4e-6, x, 1.444), 1.3e-6) {
			assert.ErrorContains(t, err, "core: ", name)
			refused(t, err, "index")
		}
		for name, err := range calls(constantStep(4e-6, 1.45, x), 1.3e-6) {
			assert.ErrorContains(t, err, "cladding: ", name)
			refused(t, err, "index")
		}
		_, err := good.LP(1, 1).CutoffWavelength(x, 2e-6)
		refused(t, err, "from")
		_, err = good.LP(1, 1).CutoffWavelength(1e-6, x)
		refused(t, err, "to")
		_, err = constantStep(x, 1.45, 1.444).LP(1, 1).CutoffWavelength(1e-6, 2e-6)
		refused(t, err, "Radius")
	}
	for _, f := range []Step{{}, {Radius: 4e-6}, {Radius: 4e-6, Core: materials.Constant(1.45)}, {Radius: 4e-6, Cladding: materials.Constant(1.45)}} {
		for name, err := range calls(f, 1.3e-6) {
			assert.Error(t, err, name)
		}
		_, err := f.LP(1, 1).CutoffWavelength(1e-6, 2e-6)
		assert.Error(t, err)
	}
	for _, pair := range [][2]float64{{1.444, 1.45}, {1.45, 1.45}} {
		for name, err := range calls(constantStep(4e-6, pair[0], pair[1]), 1.3e-6) {
			assert.ErrorIs(t, err, numap.ErrNotGuiding, name)
			refused(t, err, "core")
		}
		_, err := constantStep(4e-6, pair[0], pair[1]).LP(1, 1).CutoffWavelength(1e-6, 2e-6)
		assert.ErrorIs(t, err, ErrNoCutoff)
	}
	for _, x := range []float64{0.3e-6, 5e-6, 7e-6} { // of the core, and at last of both
		for name, err := range calls(silica, x) {
			assert.ErrorIs(t, err, materials.ErrRange, name)
			assert.ErrorContains(t, err, "core: ", name)
		}
	}
	_, err := silica.LP(1, 1).CutoffWavelength(0.3e-6, 2e-6)
	assert.ErrorIs(t, err, materials.ErrRange)
	silica.Core, silica.Cladding = silica.Cladding, silica.Core
	for name, err := range calls(silica, 5e-6) {
		assert.ErrorIs(t, err, materials.ErrRange, name)
		assert.ErrorContains(t, err, "cladding: ", name)
	}
	for name, err := range calls(Step{4e-6, broken, materials.Constant(1)}, 1e-6) {
		assert.ErrorIs(t, err, own, name)
	}
	_, err = Step{4e-6, broken, materials.Constant(1)}.LP(1, 1).CutoffWavelength(1e-6, 2e-6)
	assert.ErrorIs(t, err, own)
	// from must lie below to.
	for _, to := range []float64{1e-6, 0.9e-6} {
		_, err = good.LP(1, 1).CutoffWavelength(1e-6, to)
		refused(t, err, "to")
	}
	// More modes than a list holds.
	_, err = constantStep(1e-2, 1.5, 1.4).Guided(1e-6)
	refused(t, err, "v")
}

func TestRefusalsOfModes(t *testing.T) {
	f := constantStep(4e-6, 1.45, 1.444)
	for _, x := range []float64{1.3e-6} {
		for argument, label := range map[string][2]int{"l": {-1, 1}, "m": {0, 0}} {
			mode := f.LP(label[0], label[1])
			_, err := mode.Taylor(x)
			refused(t, err, argument)
			_, err = mode.Solve(x)
			refused(t, err, argument)
			_, _, err = mode.Parts(x)
			refused(t, err, argument)
			_, err = mode.CutoffWavelength(1e-6, 2e-6)
			refused(t, err, argument)
		}
	}
	mode := f.LP(2, 1)
	_, err := mode.Taylor(1.3e-6)
	assert.ErrorIs(t, err, ErrCutoff)
	assert.ErrorContains(t, err, "LP21 at wavelength 1.3e-06 m")
	_, err = mode.Solve(1.3e-6)
	assert.ErrorIs(t, err, ErrCutoff)
	_, _, err = mode.Parts(1.3e-6)
	assert.ErrorIs(t, err, ErrCutoff)
	_, err = materials.Index(mode, 1.3e-6)
	assert.ErrorIs(t, err, ErrCutoff)
}

// Media of the caller's own that answer with nonsense give errors, not nonsense.
func TestNonsenseMedia(t *testing.T) {
	for _, s := range []taylor.Series{{math.NaN()}, {math.Inf(1)}, {-1}, {}, {1.5, math.NaN()}, {1.5, 0, math.Inf(1)}, {1.5, 0, 0, 0, math.NaN()}} {
		nonsense := medium(func(float64) (taylor.Series, error) { return s, nil })
		for _, f := range []Step{{4e-6, nonsense, materials.Constant(1.444)}, {4e-6, materials.Constant(1.45), nonsense}} {
			mode := f.LP(0, 1)
			n, err := mode.Taylor(1e-6)
			assert.Error(t, err, "%v in %+v gives %v", s, f, n)
			_, _, err = mode.Parts(1e-6)
			assert.Error(t, err, "%v in %+v", s, f)
			if s[0] == s[0] && s[0] > 0 && s[0] < 10 {
				continue // the value alone is sound
			}
			_, err = mode.Solve(1e-6)
			assert.Error(t, err)
			_, err = f.Guided(1e-6)
			assert.Error(t, err)
			_, err = f.LP(1, 1).CutoffWavelength(1e-6, 2e-6)
			assert.Error(t, err, "%v", s)
		}
	}
}
