package materials

import (
	"errors"
	"math"
	"testing"

	"glassthread/materials/domain"
)

// sound fails the test when a medium gives, without an error, an index that is no
// index, or derivatives that are not finite.
func sound(t *testing.T, m Medium, wavelength float64) {
	t.Helper()
	s, err := m.Taylor(wavelength)
	if err == nil && !(s.Finite() && s[0] > 0) {
		t.Fatalf("%#v at %v: %v without an error", m, wavelength, s)
	}
	for _, f := range []func(Medium, float64) (float64, error){Index, GroupIndex} {
		n, err := f(m, wavelength)
		if err == nil && !finite(n) {
			t.Fatalf("%#v at %v: %v without an error", m, wavelength, n)
		}
		said(t, err)
	}
	if n, err := Index(m, wavelength); err == nil && n != s[0] {
		t.Fatalf("%#v at %v: index %v, series %v", m, wavelength, n, s)
	}
}

// said fails the test on an error that says nothing.
func said(t *testing.T, err error) {
	t.Helper()
	var refusal *domain.Error
	if errors.As(err, &refusal) && (refusal.Func == "" || refusal.Argument == "" || refusal.Allowed == "") {
		t.Fatalf("%#v", refusal)
	}
}

func finite(x float64) bool { return math.Abs(x) <= math.MaxFloat64 }

// seeds are floats that upset careless code, and a few sober ones.
var seeds = []float64{
	0, math.Copysign(0, -1), 1, -1, 1e-6, 1.55e-6, 9.896161e-6, 293.15, 0.036, 1.45, 1e300, -1e300, 1e-300, 1e154, 1e-154,
	math.MaxFloat64, -math.MaxFloat64, math.SmallestNonzeroFloat64, -math.SmallestNonzeroFloat64, 0x1p-1022,
	math.NaN(), math.Inf(1), math.Inf(-1),
}

// seed returns the i-th seed, counted round.
func seed(i int) float64 { return seeds[i%len(seeds)] }

func FuzzOscillators(f *testing.F) {
	f.Add(0.6961663, 0.0684043e-6, 0.8974794, 9.896161e-6, 0.0, 1.55e-6, 0.0, 0.0)
	f.Add(0.9, 1e-6, 0.0, 0.0, 0.0, 1e-6, 0.0, 0.0) // on resonance
	f.Add(0.9, 1e-6, 0.0, 0.0, 0.0, math.Nextafter(1e-6, 1), 0.0, 0.0)
	f.Add(-1.0, 0.0, 0.0, 0.0, 0.0, 1e-6, 0.0, 0.0) // n^2 = 0
	f.Add(1.0, 1e-6, -1.0, 1e-6, 0.5, 2e-6, 1e-6, 3e-6)
	for i := range seeds {
		f.Add(seed(i), seed(i+3), seed(i+5), seed(i+7), seed(i+11), seed(i+2), seed(i+13), seed(i+17))
		f.Add(0.7, seed(i), 0.4, 1e-7, 0.0, seed(i+5), 0.0, 0.0)
	}
	f.Fuzz(func(t *testing.T, a1, l1, a2, l2, offset, wavelength, from, to float64) {
		terms := [6]Term{{a1, l1}, {a2, l2}}
		r := Range{from, to}
		sound(t, Sellmeier{Offset: offset, Terms: terms, Range: r}, wavelength)
		sound(t, Sellmeier{Offset: offset, Terms: terms}.Extrapolate(r), wavelength)
		sound(t, LorentzLorenz{Terms: terms}.Extrapolate(r), wavelength)
		sound(t, Gas{Terms: terms}.Extrapolate(r), wavelength)
		sound(t, Gas{Terms: terms}, wavelength)
	})
}

func FuzzPowers(f *testing.F) {
	f.Add(2.1778, 0, 6.1209e9, 2, 2.3678e-14, -2, 0.65e-6)
	f.Add(1.0, math.MaxInt, 1.0, math.MinInt, 1.0, 1, 1.0)
	for i := range seeds {
		f.Add(seed(i), i-10, seed(i+3), 3*(i-10), seed(i+5), 100*(i-10), seed(i+7))
	}
	f.Fuzz(func(t *testing.T, a0 float64, p0 int, a1 float64, p1 int, a2 float64, p2 int, wavelength float64) {
		g := Powers{Terms: [8]PowerTerm{{a0, p0}, {a1, p1}, {a2, p2}}}
		sound(t, g, wavelength)
		sound(t, g.Extrapolate(Range{wavelength, wavelength}), wavelength)
	})
}

func FuzzConstant(f *testing.F) {
	for i := range seeds {
		f.Add(seed(i), seed(i+3))
		f.Add(1.45, seed(i))
	}
	f.Fuzz(func(t *testing.T, index, wavelength float64) {
		sound(t, Constant(index), wavelength)
		if finite(index) && !finite(Celsius(index)) {
			t.Fatalf("Celsius(%v) = %v", index, Celsius(index))
		}
	})
}

// All glasses with a composition or a temperature, and all without.
func FuzzGlasses(f *testing.F) {
	f.Add(0.05, 300.0, 1.55e-6)
	for i := range seeds {
		f.Add(seed(i), seed(i+3), 1.55e-6)
		f.Add(0.05, 300.0, seed(i))
	}
	fixed := []Medium{FusedSilica(), SilicaByGroupIndex(), Germania(), Air(), Water(), PMMA(), PMMAByOscillator(),
		Polycarbonate(), FluorideGlass(), ArsenicTrisulfide()}
	for _, g := range MeasuredGlasses() {
		fixed = append(fixed, g)
	}
	f.Fuzz(func(t *testing.T, fraction, temperature, wavelength float64) {
		for _, m := range fixed {
			sound(t, m, wavelength)
		}
		made := func(m Medium, err error) {
			if err == nil {
				sound(t, m, wavelength)
			} else if !errors.Is(err, ErrRange) {
				t.Fatal(err)
			}
		}
		for _, f := range []func() (Medium, error){
			func() (Medium, error) { return GermaniaSilica(fraction) },
			func() (Medium, error) { return GermaniaSilicaBySunak(fraction) },
			func() (Medium, error) { return FluorineSilica(fraction) },
			func() (Medium, error) { return SilicaAt(temperature) },
		} {
			made(f())
		}
	})
}

func FuzzThermoOptic(f *testing.F) {
	f.Add(1e-5, 1e-8, 293.15, 273.15, 333.15, 293.15, 300.0, 1.55e-6)
	for i := range seeds {
		f.Add(seed(i), seed(i+3), seed(i+5), seed(i+7), seed(i+11), seed(i+2), seed(i+13), seed(i+17))
		f.Add(1e-5, 0.0, seed(i), 0.0, 0.0, 293.15, seed(i+3), 1.55e-6)
	}
	f.Fuzz(func(t *testing.T, first, second, about, low, high, from, to, wavelength float64) {
		for _, behaviour := range []ThermoOptic{
			LinearThermoOptic{First: first, Second: second, About: about, Temperatures: Range{low, high}},
			LinearThermoOptic{First: first, Second: second, About: about},
			WaterThermoOptic(), PMMAThermoOptic(), SilicaThermoOptic{}, AirThermoOptic(),
			GermaniaSilicaThermoOptic{first}, GermaniaSilicaThermoOptic{math.Abs(math.Mod(first, 1))},
			GasThermoOptic{Gas: Air(), Reference: about, Temperatures: Range{low, high}},
			GasThermoOptic{Gas: Gas{Terms: [6]Term{{first, second}}}, Reference: about},
		} {
			change, err := behaviour.Change(wavelength, from, to)
			if err == nil && !change.Finite() {
				t.Fatalf("%#v from %v to %v: %v without an error", behaviour, from, to, change)
			}
			said(t, err)
			sound(t, Warmed{FusedSilica(), behaviour, from, to}, wavelength)
		}
	})
}

// A table of points in steps that grow, and one of the numbers as they come.
func FuzzTable(f *testing.F) {
	f.Add(uint8(14), 0.5e-6, 0.1e-6, 1.1, 1.46, 1.45, 1.44, 1.0e-6)
	f.Add(uint8(0), 1e-6, 1e-7, 1.0, 1.5, 1.5, 1.5, 1.2e-6)
	f.Add(uint8(100), 1e-6, 1e-22, 1.0, 1.5, 1.5, 1.5, 1e-6) // neighbours
	f.Add(uint8(60), 1e-300, 1e-300, 10.0, 1e300, 1e-300, 1.5, 1.0)
	f.Add(uint8(60), 1.0, 1e10, 1e5, 1e-300, 1e300, 5e-324, 1e50)
	for i := range seeds {
		f.Add(uint8(10*i), seed(i), seed(i+3), seed(i+5), seed(i+7), seed(i+11), seed(i+13), seed(i+17))
		f.Add(uint8(i), 1e-6, 1e-7, 1.0, seed(i), 1.45, 1.44, 1.2e-6)
		f.Add(uint8(i), 1e-6, 1e-7, 1.0, 1.46, 1.45, 1.44, seed(i))
	}
	f.Fuzz(func(t *testing.T, count uint8, start, step, growth, n0, n1, n2, wavelength float64) {
		x, n := make([]float64, count), make([]float64, count)
		for i := range x {
			x[i] = start
			start, step = start+step, step*growth
			n[i] = [3]float64{n0, n1, n2}[i%3]
		}
		for _, points := range [][]float64{x, {start, step, growth, n0, n1, n2, wavelength}} {
			table, err := NewTable(points, n[:min(len(n), len(points))], Source{})
			said(t, err)
			sound(t, table, wavelength)
			if err != nil {
				continue
			}
			r := table.Range()
			for _, at := range []float64{r.From, r.To, r.From/2 + r.To/2, points[len(points)/2]} {
				sound(t, table, at)
			}
		}
	})
}

func FuzzCatalogue(f *testing.F) {
	f.Add("germania-silica", 0.05, 300.0, 1.4495, 0.0036, 1.55e-6)
	f.Add("fluorine-silica", 0.01, 260.0, 1.4424, -0.0036, 1.55e-6)
	for i, e := range Catalogue() {
		f.Add(e.Name, e.Fractions.To, e.Temperature, 1.45, 0.0, e.Wavelengths.From)
		f.Add(e.Name, 0.0, seed(i), seed(i+3), seed(i+5), e.Wavelengths.To)
		f.Add(e.Name, seed(i), seed(i+3), seed(i+5), seed(i+7), 1e-6)
		f.Add(e.Name, 0.0, seed(i), 1.45, 0.001, seed(i+7))
	}
	f.Add("", 0.0, 0.0, 0.0, 0.0, 0.0)
	f.Add("\xff\x00", 0.0, 0.0, 0.0, 0.0, 0.0)
	f.Fuzz(func(t *testing.T, name string, fraction, temperature, index, delta, wavelength float64) {
		e, err := Lookup(name)
		if (err != nil) != errors.Is(err, ErrUnknown) {
			t.Fatal(err)
		}
		if g, err := e.Glass(fraction); err == nil {
			sound(t, g, wavelength)
		} else {
			said(t, err)
		}
		if g, err := e.GlassAt(fraction, temperature); err == nil {
			sound(t, g, wavelength)
			if !e.Temperatures.Contains(temperature) {
				t.Fatalf("%s at %v K", e.Name, temperature)
			}
		} else {
			said(t, err)
		}
		if b, err := e.ThermoOptic(fraction); (err == nil) != (b != nil) {
			t.Fatal(e.Name, b, err)
		}
		for _, answer := range []func() (float64, error){
			func() (float64, error) { return e.FractionForIndex(index, wavelength) },
			func() (float64, error) { return e.FractionForDelta(delta, wavelength) },
		} {
			x, err := answer()
			if err == nil && !(x >= e.Fractions.From && x <= e.Fractions.To) {
				t.Fatalf("%s: fraction %v for index %v, delta %v at %v", e.Name, x, index, delta, wavelength)
			}
			said(t, err)
		}
		if x, err := e.FractionForIndex(index, wavelength); err == nil {
			g, err := e.Glass(x)
			if err != nil {
				t.Fatal(err)
			}
			if n, err := Index(g, wavelength); err != nil || math.Abs(n-index) > 1e-15 {
				t.Fatalf("%s at %v: index %v (%v), asked for %v", e.Name, wavelength, n, err, index)
			}
		}
	})
}

func FuzzRange(f *testing.F) {
	for i := range seeds {
		f.Add(seed(i), seed(i+3), seed(i+5))
	}
	f.Fuzz(func(t *testing.T, from, to, x float64) {
		r := Range{from, to}
		inside := x >= from && x <= to || r == (Range{}) && finite(x)
		if r.Contains(x) != inside || (r.check("f", "x", x, "m") == nil) != inside {
			t.Fatalf("%v contains %v: %v, %v", r, x, r.Contains(x), r.check("f", "x", x, "m"))
		}
	})
}
