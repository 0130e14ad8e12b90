package materials

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// Warming silica from any temperature to any other by SilicaThermoOptic is SilicaAt
// there, in every derivative.
func TestWarmedSilicaIsSilicaAt(t *testing.T) {
	worst := 0.0
	for _, from := range []float64{-60, 0, 20, 26, 471, 828} {
		for _, to := range []float64{-60, -40, 20, 60, 85, 300, 828} {
			cold, hot := asMedium[Sellmeier](t)(SilicaAt(Celsius(from))), asMedium[Sellmeier](t)(SilicaAt(Celsius(to)))
			warmed := Warmed{cold, SilicaThermoOptic{}, Celsius(from), Celsius(to)}
			for _, x := range grid(0.23e-6, 3.37e-6, 25) {
				got, want, size := seriesAt(t, warmed, x), seriesAt(t, hot, x), seriesAt(t, cold, x)
				for k := range got {
					share := math.Abs(got[k]-want[k]) / math.Max(math.Abs(want[k]), math.Abs(size[k]))
					worst = math.Max(worst, share)
				}
				if from == to {
					require.Equal(t, want, got)
				}
			}
		}
	}
	t.Logf("worst difference %.1e of a coefficient", worst)
	assert.Less(t, worst, 3e-15)
}

// A glass at 60 C: the index rises by what silica's does, 1.07e-5 per K (Ghosh et
// al. 1994, from memory), and the group index moves too.
func TestDopedGlassAt60(t *testing.T) {
	core := asMedium[Sellmeier](t)(GermaniaSilica(0.05))
	hot := Warmed{core, SilicaThermoOptic{}, Celsius(20), Celsius(60)}
	assert.InDelta(t, 40*1.07e-5, indexAt(t, hot, 1.55e-6)-indexAt(t, core, 1.55e-6), 40*0.5e-7)
	cold, warm := asMedium[Sellmeier](t)(SilicaAt(Celsius(20))), asMedium[Sellmeier](t)(SilicaAt(Celsius(60)))
	assert.InDelta(t, groupAt(t, warm, 1.55e-6)-groupAt(t, cold, 1.55e-6),
		groupAt(t, hot, 1.55e-6)-groupAt(t, core, 1.55e-6), 1e-14)
	// Warm media nest: there and back again.
	back := Warmed{hot, SilicaThermoOptic{}, Celsius(60), Celsius(20)}
	assert.InDelta(t, indexAt(t, core, 1.55e-6), indexAt(t, back, 1.55e-6), 1e-15)
}

func TestLinearThermoOptic(t *testing.T) {
	l := LinearThermoOptic{First: 2e-5, Second: 1e-7, About: 300}
	change, err := l.Change(1e-6, 290, 320)
	require.NoError(t, err)
	assert.InDelta(t, 2e-5*30+1e-7*(400-100), change[0], 1e-18)
	change[0] = 0
	assert.Equal(t, taylor.Series{}, change) // no dispersion of its own
	// No cancellation between far temperatures a step of 1e-9 K apart.
	change, err = l.Change(1e-6, 1e5, 1e5+0x1p-20)
	require.NoError(t, err)
	assert.InEpsilon(t, 0x1p-20*(2e-5+2e-7*(1e5-300)), change[0], 1e-10)
	// With no second order, About has no effect, whatever it is.
	for _, about := range append(nasty, math.MaxFloat64) {
		change, err = LinearThermoOptic{First: 1e-5, About: about}.Change(1e-6, 300, 310)
		require.NoError(t, err)
		assert.Equal(t, 1e-4, change[0])
	}
	// The zero value changes nothing, however far the temperatures.
	for _, to := range []float64{math.SmallestNonzeroFloat64, 300, math.MaxFloat64} {
		change, err = LinearThermoOptic{}.Change(1e-6, math.MaxFloat64, to)
		require.NoError(t, err)
		assert.Zero(t, change)
	}
	_, err = LinearThermoOptic{First: 1e300}.Change(1e-6, 1, 1e300)
	assert.ErrorContains(t, err, "index change (result) = +Inf")
}

func TestTemperatureOutOfRange(t *testing.T) {
	for name, c := range map[string]struct {
		behaviour ThermoOptic
		ends      Range
	}{
		"silica": {SilicaThermoOptic{}, Range{Celsius(-60), Celsius(828)}},
		"water":  {WaterThermoOptic(), Range{Celsius(0), Celsius(30)}},
		"pmma":   {PMMAThermoOptic(), Range{Celsius(0), Celsius(60)}},
		"doped":  {GermaniaSilicaThermoOptic{0.05}, Range{Celsius(-60), Celsius(828)}},
		"air":    {AirThermoOptic(), Range{Celsius(-40), Celsius(80)}},
	} {
		inside := []float64{c.ends.From, (c.ends.From + c.ends.To) / 2, c.ends.To}
		outside := []float64{math.Nextafter(c.ends.From, 0), math.Nextafter(c.ends.To, 1e9), 20, -1, inf, nan}
		for _, a := range inside {
			for _, b := range inside {
				_, err := c.behaviour.Change(1e-6, a, b)
				assert.NoError(t, err, "%s: %v to %v", name, a, b)
			}
			for _, b := range outside {
				for _, pair := range [][2]float64{{a, b}, {b, a}} {
					_, err := c.behaviour.Change(1e-6, pair[0], pair[1])
					assert.ErrorIs(t, err, ErrRange, "%s: %v", name, pair)
					_, err = Index(Warmed{Constant(1.4), c.behaviour, pair[0], pair[1]}, 1e-6)
					assert.ErrorIs(t, err, ErrRange, "%s: %v", name, pair)
				}
			}
		}
		for _, x := range nasty {
			_, err := c.behaviour.Change(x, inside[0], inside[1])
			assert.Error(t, err, "%s at %v", name, x)
		}
	}
	for _, celsius := range []float64{-60, 20, 828} {
		_, err := SilicaAt(Celsius(celsius))
		assert.NoError(t, err)
	}
	for _, kelvin := range []float64{math.Nextafter(Celsius(-60), 0), math.Nextafter(Celsius(828), 1e9), 20, 0, nan, inf, -inf} {
		_, err := SilicaAt(kelvin)
		assert.ErrorIs(t, err, ErrRange, "%v", kelvin)
	}
	for _, x := range []float64{0.22e-6, 3.38e-6} { // outside the fit, inside FusedSilica's
		_, err := Index(Warmed{FusedSilica(), SilicaThermoOptic{}, 293.15, 300}, x)
		assert.ErrorIs(t, err, ErrRange)
	}
	assert.Equal(t, Range{0.23e-6, 3.37e-6}, SilicaThermoOptic{}.Wavelengths())
	assert.Contains(t, SilicaThermoOptic{}.Source().Citation, "Ghosh")
}

// A forgotten Reference is 0 K, and is caught even where no range is stated.
func TestWarmedRefuses(t *testing.T) {
	l := LinearThermoOptic{First: 1e-5}
	for name, w := range map[string]Warmed{
		"reference forgotten":   {Glass: FusedSilica(), ThermoOptic: l, Temperature: 300},
		"temperature forgotten": {Glass: FusedSilica(), ThermoOptic: l, Reference: 300},
		"below 0 K":             {FusedSilica(), l, 300, -1},
		"not a number":          {FusedSilica(), l, nan, 300},
		"infinite":              {FusedSilica(), l, 300, inf},
	} {
		_, err := Index(w, 1.55e-6)
		var refusal *domain.Error
		require.ErrorAs(t, err, &refusal, name)
		assert.Equal(t, "materials.LinearThermoOptic", refusal.Func, name)
		assert.Contains(t, []string{"from", "to"}, refusal.Argument, name)
	}
	_, err := Index(Warmed{Glass: FusedSilica(), Reference: 300, Temperature: 300}, 1.55e-6)
	assert.EqualError(t, err, "materials.Warmed: the thermo-optic behaviour is nil")
	_, err = Index(Warmed{ThermoOptic: l, Reference: 300, Temperature: 300}, 1.55e-6)
	assert.EqualError(t, err, "materials: the medium is nil")
	_, err = Warmed{Constant(1.5), LinearThermoOptic{First: -0.01}, 100, 300}.Taylor(1.55e-6)
	assert.Error(t, err, "an index below 0")
	_, err = Warmed{Constant(1.5), brokenThermoOptic{}, 100, 300}.Taylor(1.55e-6)
	assert.Error(t, err, "a behaviour of the caller's own that returns NaN")
}

type brokenThermoOptic struct{}

func (brokenThermoOptic) Change(_, _, _ float64) (taylor.Series, error) {
	return taylor.Series{0, 0, 0, nan}, nil
}

func TestCelsius(t *testing.T) {
	assert.Equal(t, 273.15, Celsius(0))
	assert.Equal(t, 293.15, Celsius(20))
	assert.Equal(t, 0.0, Celsius(-273.15))
	assert.True(t, math.IsNaN(Celsius(nan))) // plain arithmetic, as documented
	assert.Equal(t, inf, Celsius(inf))
	_, err := SilicaAt(Celsius(nan))
	assert.ErrorIs(t, err, ErrRange)
}

// Undoped it is silica, in every derivative; a fraction that is none is refused.
func TestGermaniaSilicaThermoOptic(t *testing.T) {
	for _, x := range grid(0.23e-6, 3.37e-6, 12) {
		want, err := SilicaThermoOptic{}.Change(x, 280, 330)
		require.NoError(t, err)
		got, err := GermaniaSilicaThermoOptic{}.Change(x, 280, 330)
		require.NoError(t, err)
		assert.Equal(t, want, got)
		pure, err := GermaniaSilicaThermoOptic{1}.Change(x, 280, 330)
		require.NoError(t, err)
		assert.InDelta(t, 50*1.94e-5, pure[0], 1e-18)
		half, err := GermaniaSilicaThermoOptic{0.5}.Change(x, 280, 330)
		require.NoError(t, err)
		for k := range half {
			assert.InEpsilon(t, (want[k]+pure[k])/2, half[k], 1e-14, "order %d", k)
		}
	}
	for _, fraction := range []float64{-5e-324, math.Nextafter(1, 2), 3.6, nan, inf, -inf} {
		_, err := GermaniaSilicaThermoOptic{fraction}.Change(1e-6, 280, 330)
		var refusal *domain.Error
		require.ErrorAs(t, err, &refusal, "%v", fraction)
		assert.Equal(t, "MoleFraction", refusal.Argument)
		assert.ErrorIs(t, err, ErrRange)
	}
	for _, x := range []float64{0.22e-6, 3.38e-6} {
		_, err := GermaniaSilicaThermoOptic{0.1}.Change(x, 280, 330)
		assert.ErrorIs(t, err, ErrRange)
	}
	assert.Equal(t, Range{0.23e-6, 3.37e-6}, GermaniaSilicaThermoOptic{}.Wavelengths())
	assert.Contains(t, GermaniaSilicaThermoOptic{}.Source().Citation, "Ghosh")
}

// Air with temperature: 2.926e-4 at 0 C and 589 nm (common handbook value, from memory),
// and the temperature term of B. Edlen's formula as revised by K. P. Birch and M. J.
// Downs, Metrologia 30, 155 (1993; from memory): n - 1 in proportion to
// (1 + 1e-8 (0.601 - 0.00972 t) p)/(1 + 0.0036610 t), t in C and p in Pa.
func TestAirWithTemperature(t *testing.T) {
	at := func(celsius, x float64) float64 {
		n, err := Index(Warmed{Air(), AirThermoOptic(), Celsius(15), Celsius(celsius)}, x)
		require.NoError(t, err)
		return n - 1
	}
	assert.InEpsilon(t, 2.926e-4, at(0, 0.5893e-6), 2e-3)
	birch := func(celsius float64) float64 {
		return (1 + 1e-8*(0.601-0.00972*celsius)*101325) / (1 + 0.0036610*celsius)
	}
	worst := 0.0
	for celsius := -40.0; celsius <= 80; celsius += 5 {
		for _, x := range []float64{0.23e-6, 0.5893e-6, 1.55e-6, 1.69e-6} {
			want := (indexAt(t, Air(), x) - 1) * birch(celsius) / birch(15)
			worst = math.Max(worst, math.Abs(at(celsius, x)-want))
		}
	}
	t.Logf("ideal gas against Birch and Downs: %.1e in n", worst)
	assert.Less(t, worst, 2.1e-7) // as AirThermoOptic documents
	// Density to the dot: twice the temperature is half of n - 1, derivatives too.
	g := AirThermoOptic()
	g.Temperatures = Range{}
	change, err := g.Change(1e-6, g.Reference, 2*g.Reference)
	require.NoError(t, err)
	whole := seriesAt(t, Air(), 1e-6).Shift(-1)
	for k := range change {
		assert.InEpsilon(t, -whole[k]/2, change[k], 1e-11, "order %d", k) // n - 1 of n
	}
	// There and back again, between any two.
	there, err := g.Change(1e-6, 250, 330)
	require.NoError(t, err)
	back, err := g.Change(1e-6, 330, 250)
	require.NoError(t, err)
	assert.InDelta(t, 0, there[0]+back[0], 1e-19)
	assert.Equal(t, Air().Range, g.Wavelengths())

	_, err = GasThermoOptic{Gas: Air()}.Change(1e-6, 300, 310)
	assert.ErrorContains(t, err, "Reference = 0")
	_, err = g.Change(1e-6, 5e-324, 300)
	assert.ErrorContains(t, err, "index change (result)")
	_, err = g.Change(2e-6, 300, 310)
	assert.ErrorIs(t, err, ErrRange)
}
