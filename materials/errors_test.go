package materials

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// kinds returns one medium of every kind.
func kinds(t testing.TB) map[string]Medium {
	table, _ := sampled(t, FusedSilica(), uneven)
	doped := asMedium[LorentzLorenz](t)(FluorineSilica(0.01))
	return map[string]Medium{
		"Sellmeier":     FusedSilica(),
		"LorentzLorenz": doped,
		"Gas":           Air(),
		"Powers":        PMMA(),
		"MeasuredGlass": MeasuredGlasses()[3],
		"Table":         table,
		"Constant":      Constant(1.45),
		"Warmed":        Warmed{doped, SilicaThermoOptic{}, Celsius(20), Celsius(60)},
		"Warmed linear": Warmed{PMMA(), PMMAThermoOptic(), Celsius(20), Celsius(40)},
		"Warmed doped":  Warmed{doped, GermaniaSilicaThermoOptic{0.01}, Celsius(20), Celsius(60)},
		"Warmed gas":    Warmed{Air(), AirThermoOptic(), Celsius(15), Celsius(60)},
		"own":           own(func(x float64) (taylor.Series, error) { return taylor.Series{1.5, -1e4, 1e10}, nil }),
	}
}

// A wavelength that is none is refused by every medium, directly and through Index.
func TestWavelengthThatIsNone(t *testing.T) {
	for name, m := range kinds(t) {
		for _, x := range nasty {
			for call, f := range map[string]func() (float64, error){
				"Index":      func() (float64, error) { return Index(m, x) },
				"GroupIndex": func() (float64, error) { return GroupIndex(m, x) },
				"Taylor":     func() (float64, error) { s, err := m.Taylor(x); return s[0], err },
			} {
				if name == "own" && call == "Taylor" {
					continue
				}
				got, err := f()
				var refusal *domain.Error
				require.ErrorAs(t, err, &refusal, "%s.%s(%v)", name, call, x)
				assert.Zero(t, got)
				assert.Equal(t, "wavelength", refusal.Argument)
				assert.Equal(t, math.Float64bits(x), math.Float64bits(refusal.Value))
				assert.Equal(t, "finite and above 0 (m)", refusal.Allowed)
				assert.True(t, strings.HasPrefix(refusal.Func, "materials"), refusal.Func)
				assert.False(t, errors.Is(err, ErrRange), "no wavelength at all is not out of range")
			}
		}
	}
}

func TestNilMedium(t *testing.T) {
	_, err := Index(nil, 1e-6)
	assert.EqualError(t, err, "materials: the medium is nil")
	_, err = GroupIndex(nil, 1e-6)
	assert.EqualError(t, err, "materials: the medium is nil")
}

// What a medium of the caller's own might return by mistake does not get through.
func TestOwnMediumIsNotTrusted(t *testing.T) {
	good := taylor.Series{1.5, -1e4, 1e10, -1e16, 1e22}
	fails := errors.New("own failure")
	mistakes := map[string]own{"zero series": func(float64) (taylor.Series, error) { return taylor.Series{}, nil }}
	for _, bad := range []float64{nan, inf, -inf} {
		for k := range good {
			s := good
			s[k] = bad
			mistakes[fmt.Sprintf("%v at order %d", bad, k)] = func(float64) (taylor.Series, error) { return s, nil }
		}
	}
	for _, value := range []float64{0, -1.5} {
		s := good
		s[0] = value
		mistakes[fmt.Sprintf("value %v", value)] = func(float64) (taylor.Series, error) { return s, nil }
	}
	for name, m := range mistakes {
		_, err := Index(m, 1e-6)
		assert.Error(t, err, name)
		ng, err := GroupIndex(m, 1e-6)
		assert.Error(t, err, name)
		assert.Zero(t, ng, name)
		_, err = Index(Warmed{m, LinearThermoOptic{}, 300, 310}, 1e-6)
		assert.Error(t, err, name)
	}
	_, err := Index(own(func(float64) (taylor.Series, error) { return good, fails }), 1e-6)
	assert.ErrorIs(t, err, fails)
	ng, err := GroupIndex(own(func(float64) (taylor.Series, error) { return good, nil }), 1e-6)
	require.NoError(t, err)
	assert.InDelta(t, 1.51, ng, 1e-15)
	_, err = GroupIndex(own(func(float64) (taylor.Series, error) { return taylor.Series{1, 1e300}, nil }), 1e300)
	assert.ErrorContains(t, err, "group index (result) = -Inf")
}

// On its resonance an oscillator has no index, and in the band below n^2 = 0 none either.
func TestResonance(t *testing.T) {
	const l = 1e-6
	term := Term{0.9, l}
	sellmeier := Sellmeier{Terms: [6]Term{term}}
	for name, m := range map[string]Medium{
		"Sellmeier":     sellmeier,
		"LorentzLorenz": LorentzLorenz{Terms: [6]Term{term}},
		"Gas":           Gas{Terms: [6]Term{term}},
	} {
		_, err := Index(m, l)
		assert.Error(t, err, name)
		for x, steps := l, 0; steps < 100; steps++ { // nothing but finite values or errors close by
			x = math.Nextafter(x, 2)
			for _, near := range []float64{x, 2*l - x} {
				if s, err := m.Taylor(near); err == nil {
					assert.True(t, s.Finite() && s[0] > 0, name)
				}
			}
		}
	}
	// n^2 = 1 + 0.9 x^2/(x^2 - 1) < 0 from x = 1/sqrt(1.9) to 1, in units of l.
	zero := l / math.Sqrt(1.9)
	for _, x := range []float64{zero * (1 + 1e-9), 0.8 * l, 0.99 * l} {
		_, err := Index(sellmeier, x)
		var refusal *domain.Error
		require.ErrorAs(t, err, &refusal)
		assert.Equal(t, x, refusal.Value)
		assert.False(t, errors.Is(err, ErrRange))
	}
	assert.Less(t, indexAt(t, sellmeier, zero*(1-1e-9)), 1e-3)
	assert.Greater(t, indexAt(t, sellmeier, l*(1+1e-9)), 1e3)
	// The sign of a resonance wavelength does not matter: the formula holds its square.
	mirrored := Sellmeier{Terms: [6]Term{{0.9, -l}}}
	assert.Equal(t, seriesAt(t, sellmeier, 2*l), seriesAt(t, mirrored, 2*l))
}

// Terms of the formulas in closed form, at arguments where they are exact.
func TestFormulas(t *testing.T) {
	// n^2 = 1 + 1.25 + 2 x^2/(x^2 - 1) at x = 3: 4.5; with L = 0 a term is a constant.
	s := Sellmeier{Offset: 1.25, Terms: [6]Term{{2, 1}}}
	assert.Equal(t, math.Sqrt(4.5), indexAt(t, s, 3))
	assert.Equal(t, taylor.Constant(1.5), seriesAt(t, Sellmeier{Terms: [6]Term{{1.25, 0}}}, 3))
	// (n^2 - 1)/(n^2 + 2) = 0.5 is n = 2, and y = 1 or more is no medium.
	assert.Equal(t, 2.0, indexAt(t, LorentzLorenz{Terms: [6]Term{{0.5, 0}}}, 3))
	for _, y := range []float64{1, 1.5, -0.5, -0.75} {
		_, err := Index(LorentzLorenz{Terms: [6]Term{{y, 0}}}, 3)
		assert.Error(t, err, "%v", y)
	}
	assert.Equal(t, 1.5625, indexAt(t, Gas{Terms: [6]Term{{0.5, 1}}}, 3))
	// n^2 = 4 x^2 is n = 2 x; n^2 = x^-4 is n = x^-2, with derivatives.
	assert.Equal(t, taylor.Series{6, 2, 0, 0, 0}, seriesAt(t, Powers{Terms: [8]PowerTerm{{4, 2}}}, 3))
	assert.Equal(t, taylor.Series{0.25, -0.25, 3. / 16, -0.125, 5. / 64}, seriesAt(t, Powers{Terms: [8]PowerTerm{{1, -4}}}, 2))
	// The same glass as one oscillator and as its powers at long wavelengths:
	// A/(1 - L^2/x^2) = A (1 + L^2/x^2 + ...).
	one := Sellmeier{Terms: [6]Term{{1.25, 0x1p-10}}}
	sum := Powers{Terms: [8]PowerTerm{{2.25, 0}, {1.25 * 0x1p-20, -2}, {1.25 * 0x1p-40, -4}, {1.25 * 0x1p-60, -6}}}
	got, want := seriesAt(t, sum, 1), seriesAt(t, one, 1)
	for k := range got {
		assert.InEpsilon(t, want[k], got[k], 1e-14, "order %d", k)
	}
}

// Zero values either work or give an error, as each type says.
func TestZeroValues(t *testing.T) {
	for name, m := range map[string]Medium{
		"Sellmeier": Sellmeier{}, "LorentzLorenz": LorentzLorenz{}, "Gas": Gas{}, "MeasuredGlass": MeasuredGlass{},
	} {
		for _, x := range []float64{math.SmallestNonzeroFloat64, 1e-6, 1, math.MaxFloat64} {
			assert.Equal(t, taylor.Constant(1), seriesAt(t, m, x), "%s is vacuum", name)
			assert.Equal(t, 1.0, groupAt(t, m, x), name)
		}
	}
	for name, m := range map[string]Medium{
		"Powers": Powers{}, "Table": Table{}, "Warmed": Warmed{}, "Constant": Constant(0),
	} {
		_, err := m.Taylor(1e-6)
		assert.Error(t, err, name)
		_, err = Index(m, 1e-6)
		assert.Error(t, err, name)
	}
	assert.True(t, Range{}.Contains(0) && Range{}.Contains(-math.MaxFloat64))
	change, err := SilicaThermoOptic{}.Change(1e-6, 300, 301)
	require.NoError(t, err)
	assert.NotZero(t, change)
}

func TestConstant(t *testing.T) {
	for _, n := range []float64{math.SmallestNonzeroFloat64, 1, 1.45, math.MaxFloat64} {
		m := Constant(n)
		assert.Equal(t, n, indexAt(t, m, 1e-6))
		assert.Equal(t, n, groupAt(t, m, 1e-6))
		assert.Equal(t, taylor.Constant(n), seriesAt(t, m, 1e-6))
	}
	for _, n := range nasty {
		_, err := Index(Constant(n), 1e-6)
		var refusal *domain.Error
		require.ErrorAs(t, err, &refusal)
		assert.Equal(t, "index", refusal.Argument)
	}
}

func TestRange(t *testing.T) {
	r := Range{1, 2}
	for x, want := range map[float64]bool{1: true, 1.5: true, 2: true, math.Nextafter(1, 0): false, math.Nextafter(2, 3): false, inf: false, -inf: false} {
		assert.Equal(t, want, r.Contains(x), "%v", x)
	}
	assert.False(t, r.Contains(nan))
	for _, x := range []float64{nan, inf, -inf} {
		assert.False(t, Range{}.Contains(x))
		assert.Error(t, Range{}.check("f", "x", x, "m"))
	}
	for _, empty := range []Range{{2, 1}, {nan, 2}, {1, nan}, {nan, nan}} {
		for _, x := range []float64{0, 1, 1.5, 2, nan} {
			assert.False(t, empty.Contains(x))
			assert.ErrorIs(t, empty.check("f", "x", x, "m"), ErrRange)
		}
	}
	err := r.check("materials.X", "wavelength", 3, "m")
	assert.EqualError(t, err, "materials.X: wavelength = 3: must be from 1 to 2 (m) (outside the range of the glass's data)")
	// No digits that the limit does not mean: Celsius(-60) is 213.14999999999998.
	_, err = SilicaAt(20)
	assert.EqualError(t, err, "materials.SilicaAt: temperature = 20: must be from 213.15 to 1101.15 (K) (outside the range of the glass's data)")
	_, err = Index(FusedSilica().Extrapolate(Range{2e-6, 1e-6}), 1.5e-6)
	assert.EqualError(t, err, "materials.Sellmeier: wavelength = 1.5e-06: must be in a range that is not empty: "+
		"nothing lies from 2e-06 to 1e-06 (m) (outside the range of the glass's data)")
}

// Extrapolating is by name, gives another value, and leaves the formula alone.
func TestExtrapolate(t *testing.T) {
	wide := Range{0.2e-6, 12e-6}
	silica, doped, gas, polymer := FusedSilica(), asMedium[LorentzLorenz](t)(FluorineSilica(0.01)).(LorentzLorenz), Air(), PMMA()
	for name, c := range map[string]struct {
		narrow, wide, everywhere Medium
		inside, outside          float64
	}{
		"Sellmeier":     {silica, silica.Extrapolate(wide), silica.Extrapolate(Range{}), 1e-6, 7e-6},
		"LorentzLorenz": {doped, doped.Extrapolate(wide), doped.Extrapolate(Range{}), 1e-6, 2e-6},
		"Gas":           {gas, gas.Extrapolate(wide), gas.Extrapolate(Range{}), 1e-6, 2e-6},
		"Powers":        {polymer, polymer.Extrapolate(wide), polymer.Extrapolate(Range{}), 1e-6, 1.7e-6},
	} {
		_, err := Index(c.narrow, c.outside)
		assert.ErrorIs(t, err, ErrRange, name)
		assert.Positive(t, indexAt(t, c.wide, c.outside), name)
		assert.Equal(t, seriesAt(t, c.wide, c.outside), seriesAt(t, c.everywhere, c.outside), name)
		assert.Equal(t, seriesAt(t, c.narrow, c.inside), seriesAt(t, c.wide, c.inside), name)
		_, err = Index(c.wide, 13e-6)
		assert.ErrorIs(t, err, ErrRange, name)
	}
	_, err := Index(silica.Extrapolate(Range{nan, nan}), 1e-6)
	assert.ErrorIs(t, err, ErrRange)
	_, err = Index(silica.Extrapolate(Range{}), 9.896161e-6)
	assert.Error(t, err, "on the resonance")
	assert.Equal(t, Range{0.21e-6, 6.7e-6}, silica.Range)
}
