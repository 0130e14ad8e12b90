package materials

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"glassthread/materials/domain"
	"glassthread/materials/root"
)

// ErrUnknown says that the catalogue has no entry of that name.
var ErrUnknown = errors.New("no such medium in the catalogue")

// ErrNoFraction says that no composition within range gives what was asked for.
var ErrNoFraction = errors.New("no composition within range gives it")

// ErrNoThermoOptic says that a medium's behaviour with temperature is not known here.
var ErrNoThermoOptic = errors.New("no thermo-optic behaviour is known")

// Entry is one medium of the catalogue, or one family of glasses with a mole
// fraction to choose.
type Entry struct {
	Name        string // what Lookup finds it by
	Composition string
	Wavelengths Range       // vacuum wavelengths (m)
	Fractions   Range       // mole fraction of the dopant; the zero Range when fixed
	Temperature float64     // at which the index holds (K)
	ThermoOptic ThermoOptic // nil where none is known here
	Source      Source

	build func(fraction float64) (Medium, error)
}

// Glass returns the medium of the given mole fraction, which must be 0 for an
// entry of fixed composition. The error of a fraction out of range matches
// ErrRange.
func (e Entry) Glass(fraction float64) (Medium, error) {
	if e.build == nil {
		return nil, fmt.Errorf("materials.Entry.Glass: the entry is empty: %w", ErrUnknown)
	}
	if e.Fractions == (Range{}) && fraction != 0 {
		return nil, &domain.Error{Func: "materials.Entry.Glass", Argument: "fraction", Value: fraction,
			Allowed: "0, since the composition of " + e.Name + " is fixed", Kind: ErrRange}
	}
	if err := e.Fractions.check("materials.Entry.Glass", "fraction", fraction, "mole fraction"); err != nil {
		return nil, err
	}
	return e.build(fraction)
}

// GlassAt returns the medium of the given mole fraction at a temperature (K), by the
// entry's ThermoOptic, which for doped silica is that of pure silica and answers from
// 0.23 to 3.37 um only. The error matches ErrRange when the temperature is out of
// range, and ErrNoThermoOptic when it is not the entry's own and no behaviour is
// known.
func (e Entry) GlassAt(fraction, temperature float64) (Medium, error) {
	const function = "materials.Entry.GlassAt"
	if err := domain.Positive(function, "temperature", temperature, "K"); err != nil {
		return nil, err
	}
	g, err := e.Glass(fraction)
	if err != nil || temperature == e.Temperature {
		return g, err
	}
	if e.ThermoOptic == nil {
		return nil, &domain.Error{Func: function, Argument: "temperature", Value: temperature,
			Allowed: fmt.Sprintf("%v (K) for %s", e.Temperature, e.Name), Kind: ErrNoThermoOptic}
	}
	if _, err := e.ThermoOptic.Change(e.anyWavelength(), e.Temperature, temperature); err != nil {
		return nil, err
	}
	return Warmed{Glass: g, ThermoOptic: e.ThermoOptic, Reference: e.Temperature, Temperature: temperature}, nil
}

// anyWavelength is one within range, to try a behaviour at.
func (e Entry) anyWavelength() float64 { return math.Sqrt(e.Wavelengths.From * e.Wavelengths.To) }

// FractionForIndex returns the mole fraction at which the glass has the given
// index at a vacuum wavelength (m), to the last place or two that the index
// itself fixes. The error matches ErrNoFraction when no fraction in range does.
func (e Entry) FractionForIndex(index, wavelength float64) (float64, error) {
	if err := domain.Positive("materials.Entry.FractionForIndex", "index", index, ""); err != nil {
		return 0, err
	}
	return e.fraction("materials.Entry.FractionForIndex", "index", index, wavelength,
		func(n, _ float64) float64 { return n - index })
}

// FractionForDelta returns the mole fraction at which the glass has the given
// relative index difference (n^2 - n0^2)/(2 n^2) over the undoped glass of index
// n0, at a vacuum wavelength (m). It is below zero for a dopant that lowers the
// index. The error matches ErrNoFraction when no fraction in range does.
func (e Entry) FractionForDelta(delta, wavelength float64) (float64, error) {
	if err := domain.Finite("materials.Entry.FractionForDelta", "delta", delta, ""); err != nil {
		return 0, err
	}
	return e.fraction("materials.Entry.FractionForDelta", "delta", delta, wavelength,
		func(n, n0 float64) float64 { return (n-n0)*(n+n0)/(2*n*n) - delta })
}

// fraction solves for the composition at which miss is zero; the index is a
// monotonic function of the fraction for every family of the catalogue.
func (e Entry) fraction(function, argument string, wanted, wavelength float64, miss func(n, n0 float64) float64) (float64, error) {
	if e.build == nil {
		return 0, fmt.Errorf("%s: the entry is empty: %w", function, ErrUnknown)
	}
	if e.Fractions == (Range{}) {
		return 0, fmt.Errorf("%s: the composition of %q is fixed: %w", function, e.Name, ErrNoFraction)
	}
	index := func(x float64) (float64, error) {
		g, err := e.Glass(x)
		if err != nil {
			return 0, err
		}
		return Index(g, wavelength)
	}
	n0, err := index(e.Fractions.From)
	if err != nil {
		return 0, err
	}
	n1, err := index(e.Fractions.To)
	if err != nil {
		return 0, err
	}
	x, err := root.Find(func(x float64) (float64, error) {
		n, err := index(x)
		return miss(n, n0), err
	}, e.Fractions.From, e.Fractions.To, 0)
	if errors.Is(err, root.ErrNoBracket) {
		return 0, &domain.Error{Func: function, Argument: argument, Value: wanted,
			Allowed: fmt.Sprintf("what an index from %.6g to %.6g gives at this wavelength",
				math.Min(n0, n1), math.Max(n0, n1)), Kind: ErrNoFraction}
	}
	return x, err
}

// Lookup returns the entry of the catalogue with that name, whose letters may be of
// either case. The error matches ErrUnknown and lists the names.
func Lookup(name string) (Entry, error) {
	all := Catalogue()
	names := make([]string, len(all))
	for i, e := range all {
		if strings.EqualFold(e.Name, name) {
			return e, nil
		}
		names[i] = e.Name
	}
	return Entry{}, fmt.Errorf("materials.Lookup: name = %q: must be one of %s: %w", name, strings.Join(names, ", "), ErrUnknown)
}

// Catalogue returns every medium of the package, each with its ranges and its
// source. The slice is the caller's own.
func Catalogue() []Entry {
	room := Celsius(20)
	fixed := func(g Sellmeier, name, composition string, behaviour ThermoOptic) Entry {
		return Entry{Name: name, Composition: composition, Wavelengths: g.Range, Source: g.Source,
			Temperature: room, ThermoOptic: behaviour,
			build: func(float64) (Medium, error) { return g, nil }}
	}
	silica := SilicaThermoOptic{}
	air, pmma := Air(), PMMA()
	all := []Entry{
		fixed(FusedSilica(), "silica", "SiO2", silica),
		fixed(SilicaByGroupIndex(), "silica-by-group-index", "SiO2", silica),
		fixed(ghoshSilica(room), "silica-with-temperature", "SiO2", silica),
		fixed(Germania(), "germania", "GeO2", nil),
		{Name: "germania-silica", Composition: "x GeO2 + (1 - x) SiO2", Wavelengths: Germania().Range,
			Fractions: Range{0, 1}, Source: fleming, Temperature: room, ThermoOptic: silica,
			build: func(x float64) (Medium, error) { return GermaniaSilica(x) }},
		{Name: "germania-silica-by-sunak", Composition: "x GeO2 + (1 - x) SiO2", Wavelengths: sunakRange,
			Fractions: sunakFractions, Source: sunak, Temperature: room, ThermoOptic: silica,
			build: func(x float64) (Medium, error) { return GermaniaSilicaBySunak(x) }},
		{Name: "fluorine-silica", Composition: "x F + (1 - x) SiO2", Wavelengths: sunakRange,
			Fractions: sunakFractions, Source: sunak, Temperature: room, ThermoOptic: silica,
			build: func(x float64) (Medium, error) { return FluorineSilica(x) }},
	}
	for _, g := range MeasuredGlasses() {
		composition := g.Composition
		if g.Fraction > 0 {
			composition = fmt.Sprintf("%s, mole fraction %v", g.Composition, g.Fraction)
		}
		name := strings.NewReplacer(" ", "-", "%", "").Replace(g.Name) + "-measured"
		all = append(all, fixed(g.Sellmeier, name, composition, silica))
	}
	warmed := func(e Entry, celsius float64) Entry {
		e.Temperature = Celsius(celsius)
		return e
	}
	return append(all,
		Entry{Name: "air", Composition: "dry air", Wavelengths: air.Range, Source: air.Source,
			Temperature: Celsius(15),
			build:       func(float64) (Medium, error) { return air, nil }},
		fixed(Water(), "water", "H2O", WaterThermoOptic()),
		Entry{Name: "pmma", Composition: "poly(methyl methacrylate)", Wavelengths: pmma.Range, Source: pmma.Source,
			Temperature: Celsius(20.1), ThermoOptic: PMMAThermoOptic(),
			build: func(float64) (Medium, error) { return pmma, nil }},
		fixed(PMMAByOscillator(), "pmma-by-oscillator", "poly(methyl methacrylate)", PMMAThermoOptic()),
		fixed(Polycarbonate(), "polycarbonate", "polycarbonate", nil),
		fixed(FluorideGlass(), "fluoride-glass", "ZrF4-BaF2-LaF3-AlF3-NaF", nil),
		warmed(fixed(ArsenicTrisulfide(), "arsenic-trisulfide", "As2S3", nil), 25),
	)
}
