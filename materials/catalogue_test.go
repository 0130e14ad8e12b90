package materials

import (
	"math"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/domain"
)

// fractions returns compositions across an entry's range, both ends included.
func fractions(e Entry, count int) []float64 {
	if e.Fractions == (Range{}) {
		return []float64{0}
	}
	x := make([]float64, count)
	for i := range x {
		x[i] = e.Fractions.From + (e.Fractions.To-e.Fractions.From)*float64(i)/float64(count-1)
	}
	return x
}

func families(t testing.TB) []Entry {
	var found []Entry
	for _, e := range Catalogue() {
		if e.Fractions != (Range{}) {
			found = append(found, e)
		}
	}
	require.Len(t, found, 3)
	return found
}

func TestCatalogueIsComplete(t *testing.T) {
	year := regexp.MustCompile(`\b(18|19|20)\d\d\b`)
	// Degrees Celsius of Ciddor's standard air, and as the papers of the others state.
	temperatures := map[string]float64{"air": 15, "pmma": 20.1, "arsenic-trisulfide": 25}
	seen := map[string]bool{}
	for _, e := range Catalogue() {
		assert.Regexp(t, `^[a-z0-9.-]+$`, e.Name)
		assert.False(t, seen[strings.ToLower(e.Name)], "%s twice", e.Name)
		seen[e.Name] = true
		assert.NotEmpty(t, e.Composition, e.Name)
		assert.Regexp(t, year, e.Source.Citation, e.Name)
		assert.NotEmpty(t, e.Source.Conditions, e.Name)
		assert.Greater(t, e.Wavelengths.From, 0.1e-6, e.Name)
		assert.Less(t, e.Wavelengths.To, 20e-6, e.Name)
		assert.Less(t, e.Wavelengths.From, e.Wavelengths.To, e.Name)
		celsius, otherwise := temperatures[e.Name]
		if !otherwise {
			celsius = 20
		}
		assert.Equal(t, Celsius(celsius), e.Temperature, e.Name)
		found, err := Lookup(e.Name)
		require.NoError(t, err)
		assert.Equal(t, e.Name, found.Name)
	}
	assert.Len(t, seen, 14+len(MeasuredGlasses()))
	for _, name := range []string{"silica", "germania", "germania-silica", "fluorine-silica", "air", "water", "pmma", "arsenic-trisulfide"} {
		assert.True(t, seen[name], name)
	}
}

// Recalled coefficients say so, copied ones do not.
func TestSourcesMarkMemory(t *testing.T) {
	fromMemory := func(name string) bool {
		return strings.HasSuffix(name, "-measured") || strings.Contains(name, "sunak") ||
			name == "fluorine-silica" || name == "silica-with-temperature"
	}
	for _, e := range Catalogue() {
		assert.Equal(t, fromMemory(e.Name), e.Source.FromMemory, e.Name)
	}
	assert.True(t, PMMAThermoOptic().Source.FromMemory)
	assert.True(t, WaterThermoOptic().Source.FromMemory)
	assert.True(t, GermaniaSilicaThermoOptic{}.Source().FromMemory)
}

// Solids are measured in air; the two fluids are relative to vacuum. The claim about
// water is what its agreement with handbooks in air says, TestHandbookIndices.
func TestSourcesNameTheirReference(t *testing.T) {
	for _, e := range Catalogue() {
		assert.Equal(t, e.Name != "air" && e.Name != "water", e.Source.InAir, e.Name)
		if !e.Source.InAir {
			assert.Contains(t, e.Source.Conditions, "vacuum", e.Name)
		} else {
			assert.Contains(t, e.Source.Conditions, "air", e.Name)
		}
	}
	// The error of mixing the two that Air, Water and the package name.
	air := indexAt(t, Air(), 1.55e-6)
	assert.InDelta(t, 2.7e-4, air-1, 0.05e-4)
	silica := indexAt(t, FusedSilica(), 1.55e-6)
	assert.InDelta(t, 4e-4, silica*air-silica, 0.1e-4)
}

// Every entry answers over the whole of its ranges, ends included, with the direct
// constructor's numbers, and refuses beyond.
func TestCatalogueRanges(t *testing.T) {
	for _, e := range Catalogue() {
		for _, fraction := range fractions(e, 11) {
			g, err := e.Glass(fraction)
			require.NoError(t, err, "%s at %v", e.Name, fraction)
			for _, x := range grid(e.Wavelengths.From, e.Wavelengths.To, 60) {
				n := indexAt(t, g, x)
				assert.True(t, n >= 1 && n < 3.5, "%s: %v at %v", e.Name, n, x)
				ng := groupAt(t, g, x)
				assert.True(t, ng > n || e.Wavelengths.To > 6e-6, "%s: group index %v, index %v at %v", e.Name, ng, n, x)
			}
			for _, x := range []float64{math.Nextafter(e.Wavelengths.From, 0), math.Nextafter(e.Wavelengths.To, 1), 1e-9, 1} {
				_, err := Index(g, x)
				assert.ErrorIs(t, err, ErrRange, "%s at %v m", e.Name, x)
				_, err = GroupIndex(g, x)
				assert.ErrorIs(t, err, ErrRange, "%s at %v m", e.Name, x)
			}
			for _, x := range nasty {
				_, err := Index(g, x)
				assert.Error(t, err, "%s at %v m", e.Name, x)
			}
		}
		beyond := []float64{math.Nextafter(e.Fractions.From, -1), math.Nextafter(e.Fractions.To, 2), 1.5, nan, inf, -inf}
		for _, fraction := range beyond {
			_, err := e.Glass(fraction)
			assert.ErrorIs(t, err, ErrRange, "%s, fraction %v", e.Name, fraction)
		}
	}
	for _, x := range []float64{-5e-324, math.Nextafter(1, 2), 7.9, nan, inf, -inf} { // 7.9: meant in per cent
		_, err := GermaniaSilica(x)
		assert.ErrorIs(t, err, ErrRange, "%v", x)
		_, err = GermaniaSilicaBySunak(x)
		assert.ErrorIs(t, err, ErrRange, "%v", x)
		_, err = FluorineSilica(x)
		assert.ErrorIs(t, err, ErrRange, "%v", x)
	}
}

func TestGlassAt(t *testing.T) {
	var unknown []string
	for _, e := range Catalogue() {
		same, err := e.GlassAt(e.Fractions.To, e.Temperature)
		require.NoError(t, err, e.Name)
		g, err := e.Glass(e.Fractions.To)
		require.NoError(t, err)
		x := math.Sqrt(e.Wavelengths.From * e.Wavelengths.To)
		assert.Equal(t, seriesAt(t, g, x), seriesAt(t, same, x), e.Name)

		for _, kelvin := range nasty {
			_, err = e.GlassAt(0, kelvin)
			assert.Error(t, err, "%s at %v K", e.Name, kelvin)
		}
		_, err = e.GlassAt(1.5, e.Temperature)
		assert.ErrorIs(t, err, ErrRange, e.Name)
		assert.True(t, e.Temperatures.Contains(e.Temperature), e.Name)
		fraction := e.Fractions.To
		if e.Name == "fluorine-silica" {
			fraction = 0.03
		}
		behaviour, err := e.ThermoOptic(fraction)
		if err != nil {
			unknown = append(unknown, e.Name)
			assert.ErrorIs(t, err, ErrNoThermoOptic, e.Name)
			assert.ErrorContains(t, err, e.Name)
			assert.Equal(t, Range{e.Temperature, e.Temperature}, e.Temperatures, e.Name)
			_, err = e.GlassAt(fraction, e.Temperature+5)
			assert.ErrorIs(t, err, ErrNoThermoOptic, e.Name)
			assert.ErrorContains(t, err, "materials.Entry.GlassAt: temperature = ")
			continue
		}
		g, err = e.Glass(fraction)
		require.NoError(t, err)
		for _, kelvin := range []float64{e.Temperatures.From, e.Temperature + 5, e.Temperatures.To} {
			warm, err := e.GlassAt(fraction, kelvin)
			require.NoError(t, err, e.Name)
			change, err := behaviour.Change(x, e.Temperature, kelvin)
			require.NoError(t, err)
			assert.NotZero(t, change)
			assert.Equal(t, seriesAt(t, g, x).Add(change), seriesAt(t, warm, x), e.Name)
		}
		for _, kelvin := range []float64{math.Nextafter(e.Temperatures.From, 0), math.Nextafter(e.Temperatures.To, 1e9), 5000} {
			_, err = e.GlassAt(fraction, kelvin)
			assert.ErrorIs(t, err, ErrRange, e.Name)
			var refusal *domain.Error
			require.ErrorAs(t, err, &refusal)
			assert.Equal(t, "temperature", refusal.Argument)
		}
		_, err = e.ThermoOptic(1.5)
		assert.ErrorIs(t, err, ErrRange, e.Name)
	}
	assert.Equal(t, []string{"phosphorus-silica-9.1-measured", "boron-silica-13.3-measured",
		"polycarbonate", "fluoride-glass", "arsenic-trisulfide"}, unknown)
	// The catalogue's silica with temperature is SilicaAt.
	e, err := Lookup("silica-with-temperature")
	require.NoError(t, err)
	warm, err := e.GlassAt(0, Celsius(60))
	require.NoError(t, err)
	assert.InDelta(t, indexAt(t, asMedium[Sellmeier](t)(SilicaAt(Celsius(60))), 1.55e-6), indexAt(t, warm, 1.55e-6), 1e-15)
}

// dn/dT of doped silica at 1.55 um: silica's 1.07e-5 per K (Ghosh et al. 1994) and
// germania's 1.94e-5 (both from memory) in proportion.
func TestDopedSilicaWarms(t *testing.T) {
	const x = 1.55e-6
	rate := func(name string, fraction float64) float64 {
		e, err := Lookup(name)
		require.NoError(t, err)
		cold, err := e.GlassAt(fraction, Celsius(15))
		require.NoError(t, err)
		warm, err := e.GlassAt(fraction, Celsius(25))
		require.NoError(t, err)
		return (indexAt(t, warm, x) - indexAt(t, cold, x)) / 10
	}
	silica := rate("silica", 0)
	assert.InDelta(t, 1.07e-5, silica, 0.5e-7)
	for _, c := range []struct {
		name                 string
		argument, moleOfGeO2 float64
	}{
		{"germania-silica", 0, 0}, {"germania-silica", 0.036, 0.036}, {"germania-silica", 0.5, 0.5},
		{"germania-silica", 1, 1}, {"germania", 0, 1}, {"germania-silica-by-sunak", 0.1, 0.1},
		{"germania-silica-3.1-measured", 0, 0.031}, {"germania-silica-13.5-measured", 0, 0.135},
		{"fluorine-silica", 0.03, 0}, {"fluorine-silica-1-measured", 0, 0}, {"quenched-silica-measured", 0, 0},
	} {
		want := silica + c.moleOfGeO2*(1.94e-5-silica)
		assert.InDelta(t, want, rate(c.name, c.argument), 1e-16, "%s, %v", c.name, c.argument)
	}
	// Pure germania by both names is one glass, in every derivative, warm or cold.
	alone, err := Lookup("germania")
	require.NoError(t, err)
	family, err := Lookup("germania-silica")
	require.NoError(t, err)
	for _, celsius := range []float64{-60, 12, 20, 85} {
		a, err := alone.GlassAt(0, Celsius(celsius))
		require.NoError(t, err)
		b, err := family.GlassAt(1, Celsius(celsius))
		require.NoError(t, err)
		got, want := seriesAt(t, b, x), seriesAt(t, a, x)
		for k := range want {
			assert.InEpsilon(t, want[k], got[k], 1e-13, "%v C, order %d", celsius, k)
		}
	}
	// Above its limit fluorine-silica stays at its own temperature.
	fluorine, err := Lookup("fluorine-silica")
	require.NoError(t, err)
	_, err = fluorine.GlassAt(0.031, Celsius(20))
	assert.NoError(t, err)
	_, err = fluorine.GlassAt(0.031, Celsius(21))
	assert.ErrorIs(t, err, ErrNoThermoOptic)
	assert.EqualError(t, err, "materials.Entry.GlassAt: fraction = 0.031: must be at most 0.03 for fluorine-silica (no thermo-optic behaviour is known)")
}

// The numerical aperture of a doped core in silica drifts with temperature by the
// dopant: d(NA^2)/dT = 2 (n1 dn1/dT - n2 dn2/dT), with dn1/dT above dn2/dT by 0.036 of
// the difference between germania's and silica's.
func TestApertureDriftsWithTemperature(t *testing.T) {
	core, err := Lookup("germania-silica")
	require.NoError(t, err)
	squared := func(celsius float64) float64 {
		n1, err := core.GlassAt(0.036, Celsius(celsius))
		require.NoError(t, err)
		n2 := asMedium[Warmed](t)(Warmed{FusedSilica(), SilicaThermoOptic{}, Celsius(20), Celsius(celsius)}, nil)
		a, b := indexAt(t, n1, 1.55e-6), indexAt(t, n2, 1.55e-6)
		return (a - b) * (a + b)
	}
	const n1, n2, silica, dopant = 1.44943, 1.44402, 1.0655e-5, 0.036 * (1.94e-5 - 1.0655e-5)
	assert.InEpsilon(t, 2*((n1-n2)*silica+n1*dopant), (squared(40)-squared(0))/40, 2e-3)
}

func TestLookup(t *testing.T) {
	for _, name := range []string{"germania-silica", "GERMANIA-SILICA", "Germania-Silica"} {
		e, err := Lookup(name)
		require.NoError(t, err)
		assert.Equal(t, "germania-silica", e.Name)
	}
	for _, name := range []string{"", " ", "silica ", "butter", "germania-silic"} {
		e, err := Lookup(name)
		require.ErrorIs(t, err, ErrUnknown)
		assert.Empty(t, e.Name)
		for _, known := range Catalogue() {
			assert.Contains(t, err.Error(), known.Name)
		}
	}
	_, err := Lookup("butter")
	assert.Contains(t, err.Error(), `name = "butter"`)
	// The slices are the caller's own.
	Catalogue()[0].Name = "spoilt"
	assert.Equal(t, "silica", Catalogue()[0].Name)
	MeasuredGlasses()[0].Terms[0].A = 0
	assert.Equal(t, 0.696750, MeasuredGlasses()[0].Terms[0].A)
}

// FractionForIndex and FractionForDelta rest on the index being monotonic.
func TestIndexIsMonotonicInFraction(t *testing.T) {
	for _, e := range families(t) {
		for _, x := range grid(e.Wavelengths.From, e.Wavelengths.To, 60) {
			var before, direction float64
			for i, fraction := range fractions(e, 401) {
				g, err := e.Glass(fraction)
				require.NoError(t, err)
				n := indexAt(t, g, x)
				switch i {
				case 0:
				case 1:
					direction = math.Copysign(1, n-before)
					fallthrough
				default:
					require.Positive(t, direction*(n-before), "%s, fraction %v at %v m", e.Name, fraction, x)
				}
				before = n
			}
			assert.Equal(t, e.Name != "fluorine-silica", direction > 0, e.Name)
		}
	}
}

func TestFractionRoundTrip(t *testing.T) {
	worst := 0.0
	for _, e := range families(t) {
		for _, x := range grid(e.Wavelengths.From, e.Wavelengths.To, 9) {
			undoped, err := e.Glass(0)
			require.NoError(t, err)
			n0 := indexAt(t, undoped, x)
			for _, fraction := range append(fractions(e, 21), 1e-12, 1e-6, 0.036) {
				g, err := e.Glass(fraction)
				require.NoError(t, err)
				n := indexAt(t, g, x)
				got, err := e.FractionForIndex(n, x)
				require.NoError(t, err, "%s, %v at %v", e.Name, fraction, x)
				back, err := e.Glass(got)
				require.NoError(t, err)
				assert.InDelta(t, n, indexAt(t, back, x), 4.5e-16) // two units in the last place
				worst = math.Max(worst, math.Abs(got-fraction))

				delta := (n - n0) * (n + n0) / (2 * n * n)
				assert.Equal(t, e.Name == "fluorine-silica", delta < 0 || fraction == 0 && e.Name == "fluorine-silica")
				got, err = e.FractionForDelta(delta, x)
				require.NoError(t, err, "%s, %v at %v", e.Name, fraction, x)
				worst = math.Max(worst, math.Abs(got-fraction))
			}
		}
	}
	t.Logf("worst error of a mole fraction %.1e", worst)
	assert.Less(t, worst, 2e-14) // an index known to 2e-16 over a slope of 0.05 or more
}

// Small index differences, as FractionForDelta documents. The fractions were computed by
// mpmath at 40 digits from the decimals of Fleming (1984) and Malitson (1965) at 1.55 um:
// findroot(lambda p: (n2(p) - n2(0))/(2*n2(p)) - delta, 10*delta), n2 the squared index.
func TestFractionForSmallDelta(t *testing.T) {
	e, err := Lookup("germania-silica")
	require.NoError(t, err)
	for _, c := range []struct{ delta, want, relative float64 }{
		{0.003, 0.028964900384976919976, 1e-13},
		{0.0057, 0.055339706728623367444, 1e-13},
		{0.0001, 0.00095978548862337748272, 3e-12},
		{1e-6, 9.5959164786497464188e-6, 3e-10},
		{1e-8, 9.5958970983114263048e-8, 3e-8},
		{1e-10, 9.5958969045084169264e-10, 3e-6},
	} {
		got, err := e.FractionForDelta(c.delta, 1.55e-6)
		require.NoError(t, err)
		assert.InDelta(t, c.want, got, 3e-15, "%v", c.delta)
		assert.InEpsilon(t, c.want, got, c.relative, "%v", c.delta)
	}
}

func TestFractionRefuses(t *testing.T) {
	for _, e := range Catalogue() {
		inside := math.Sqrt(e.Wavelengths.From * e.Wavelengths.To)
		if e.Fractions == (Range{}) {
			_, err := e.FractionForIndex(1.45, inside)
			assert.ErrorIs(t, err, ErrNoFraction, e.Name)
			assert.ErrorContains(t, err, e.Name)
			_, err = e.FractionForDelta(0.003, inside)
			assert.ErrorIs(t, err, ErrNoFraction, e.Name)
			continue
		}
		for _, index := range []float64{5e-324, 1, 1.3, 1.7, 1e300} {
			_, err := e.FractionForIndex(index, inside)
			assert.ErrorIs(t, err, ErrNoFraction, "%s, index %v", e.Name, index)
			assert.ErrorContains(t, err, "an index from 1.4")
		}
		for _, delta := range []float64{-1e300, -0.5, 0.3, 0.5, 1, 1e300} {
			_, err := e.FractionForDelta(delta, inside)
			assert.ErrorIs(t, err, ErrNoFraction, "%s, delta %v", e.Name, delta)
		}
		other := 0.001 // the sign that the dopant cannot give
		if e.Name != "fluorine-silica" {
			other = -other
		}
		_, err := e.FractionForDelta(other, inside)
		assert.ErrorIs(t, err, ErrNoFraction, e.Name)
		_, err = e.FractionForDelta(-other, inside)
		assert.NoError(t, err, e.Name)

		for _, x := range nasty {
			_, err := e.FractionForIndex(x, inside)
			assert.Error(t, err)
			_, err = e.FractionForIndex(1.45, x)
			assert.Error(t, err)
			_, err = e.FractionForDelta(0, x)
			assert.Error(t, err)
			if math.IsNaN(x) || math.IsInf(x, 0) {
				var refusal *domain.Error
				_, err = e.FractionForDelta(x, inside)
				require.ErrorAs(t, err, &refusal)
				assert.Equal(t, "delta", refusal.Argument)
			}
		}
		_, err = e.FractionForIndex(1.45, 100e-6)
		assert.ErrorIs(t, err, ErrRange)
		_, err = e.FractionForDelta(0, 100e-6)
		assert.ErrorIs(t, err, ErrRange)
	}
}

func TestEmptyEntry(t *testing.T) {
	_, err := Entry{}.Glass(0)
	assert.ErrorIs(t, err, ErrUnknown)
	_, err = Entry{}.GlassAt(0, 300)
	assert.ErrorIs(t, err, ErrUnknown)
	_, err = Entry{}.FractionForIndex(1.45, 1e-6)
	assert.ErrorIs(t, err, ErrUnknown)
	_, err = Entry{Name: "own", Fractions: Range{0, 1}}.FractionForDelta(0.01, 1e-6)
	assert.ErrorIs(t, err, ErrUnknown)
}

// Fluorine lowers the index in both sources, though they differ by a factor of two
// on how far, as MeasuredGlasses documents.
func TestFluorineBySources(t *testing.T) {
	silica := indexAt(t, FusedSilica(), 1.55e-6)
	glasses := MeasuredGlasses()
	measured := glasses[len(glasses)-1]
	require.Equal(t, "F:SiO2", measured.Composition)
	assert.InDelta(t, 4.6e-3, silica-indexAt(t, measured, 1.55e-6), 0.05e-3)
	assert.InDelta(t, 2.4e-3, silica-indexAt(t, asMedium[LorentzLorenz](t)(FluorineSilica(measured.Fraction)), 1.55e-6), 0.05e-3)
}
