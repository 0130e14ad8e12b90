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
	Wavelengths Range   // vacuum wavelengths (m)
	Fractions   Range   // mole fraction of the dopant; the zero Range when fixed
	Temperature float64 // at which the index holds (K)
	// Temperatures is where GlassAt answers (K): Temperature alone where no behaviour
	// with temperature is known here.
	Temperatures Range
	Source       Source

	build     func(fraction float64) (Medium, error)
	behaviour func(fraction float64) ThermoOptic // nil where none is known, its result too
}

// Glass returns the medium of the given mole fraction, which must be 0 for an
// entry of fixed composition. The error of a fraction out of range matches
// ErrRange.
func (e Entry) Glass(fraction float64) (Medium, error) {
	if err := e.check("materials.Entry.Glass", fraction); err != nil {
		return nil, err
	}
	return e.build(fraction)
}

func (e Entry) check(function string, fraction float64) error {
	if e.build == nil {
		return fmt.Errorf("%s: the entry is empty: %w", function, ErrUnknown)
	}
	if e.Fractions == (Range{}) && fraction != 0 {
		return &domain.Error{Func: function, Argument: "fraction", Value: fraction,
			Allowed: "0, since the composition of " + e.Name + " is fixed", Kind: ErrRange}
	}
	return e.Fractions.check(function, "fraction", fraction, "mole fraction")
}

// ThermoOptic returns how the glass of the given mole fraction behaves with
// temperature; the fraction must be 0 for an entry of fixed composition. The error
// matches ErrRange when the fraction is out of range, and ErrNoThermoOptic where no
// behaviour is known here.
func (e Entry) ThermoOptic(fraction float64) (ThermoOptic, error) {
	return e.thermoOptic("materials.Entry.ThermoOptic", fraction)
}

func (e Entry) thermoOptic(function string, fraction float64) (ThermoOptic, error) {
	if err := e.check(function, fraction); err != nil {
		return nil, err
	}
	if e.behaviour == nil {
		return nil, fmt.Errorf("%s: %s: %w", function, e.Name, ErrNoThermoOptic)
	}
	if b := e.behaviour(fraction); b != nil {
		return b, nil
	}
	return nil, &domain.Error{Func: function, Argument: "fraction", Value: fraction,
		Allowed: fmt.Sprintf("at most %v for %s", fluorineLimit, e.Name), Kind: ErrNoThermoOptic}
}

// fluorineLimit is the mole fraction of fluorine up to which silica's behaviour with
// temperature is taken, the most that claddings and trenches hold.
const fluorineLimit = 0.03

// GlassAt returns the medium of the given mole fraction at a temperature (K), by the
// entry's ThermoOptic:
//
//   - pure silica as Ghosh et al. (1994) measured it, see SilicaThermoOptic;
//   - germania-silica and germania by the sum in proportion of silica's behaviour and
//     germania's, see GermaniaSilicaThermoOptic;
//   - fluorine-silica by silica's, up to a mole fraction of 0.03 and to within some 10 %;
//   - air, water and PMMA by their own, see AirThermoOptic, WaterThermoOptic and
//     PMMAThermoOptic;
//   - the other glasses, those with boron or phosphorus among them, at the entry's own
//     Temperature only.
//
// Warmed glasses answer from 0.23 to 3.37 um at most. The error matches ErrRange when
// the temperature is outside Temperatures, and ErrNoThermoOptic when it is not the
// entry's own and no behaviour is known. The fraction is that of Glass.
func (e Entry) GlassAt(fraction, temperature float64) (Medium, error) {
	const function = "materials.Entry.GlassAt"
	if err := domain.Positive(function, "temperature", temperature, "K"); err != nil {
		return nil, err
	}
	g, err := e.Glass(fraction)
	if err != nil || temperature == e.Temperature {
		return g, err
	}
	if e.behaviour == nil {
		return nil, &domain.Error{Func: function, Argument: "temperature", Value: temperature,
			Allowed: fmt.Sprintf("%.10g (K) for %s", e.Temperature, e.Name), Kind: ErrNoThermoOptic}
	}
	behaviour, err := e.thermoOptic(function, fraction)
	if err != nil {
		return nil, err
	}
	if err := e.Temperatures.check(function, "temperature", temperature, "K"); err != nil {
		return nil, err
	}
	return Warmed{Glass: g, ThermoOptic: behaviour, Reference: e.Temperature, Temperature: temperature}, nil
}

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
// index. The fraction is good to 2e-14 absolute, which is what an index known to its
// last place leaves of it, and 3e-15 for germania at 1.55 um. So relative to itself it loses
// digits as 1/delta: 1e-13 at a delta of 0.003, 2e-10 at 1e-6. The error matches
// ErrNoFraction when no fraction in range does.
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
	fixed := func(g Sellmeier, name, composition string, temperatures Range, b ThermoOptic) Entry {
		e := Entry{Name: name, Composition: composition, Wavelengths: g.Range, Source: g.Source,
			Temperature: room, Temperatures: temperatures,
			build: func(float64) (Medium, error) { return g, nil }}
		if b != nil {
			e.behaviour = func(float64) ThermoOptic { return b }
		}
		return e
	}
	unknown := func(g Sellmeier, name, composition string, temperature float64) Entry {
		e := fixed(g, name, composition, Range{temperature, temperature}, nil)
		e.Temperature = temperature
		return e
	}
	silica := SilicaThermoOptic{}
	doped := func(x float64) ThermoOptic { return GermaniaSilicaThermoOptic{x} }
	air, pmma, warmAir, warmWater, warmPMMA := Air(), PMMA(), AirThermoOptic(), WaterThermoOptic(), PMMAThermoOptic()
	all := []Entry{
		fixed(FusedSilica(), "silica", "SiO2", ghoshTemperatures, silica),
		fixed(SilicaByGroupIndex(), "silica-by-group-index", "SiO2", ghoshTemperatures, silica),
		fixed(ghoshSilica(room), "silica-with-temperature", "SiO2", ghoshTemperatures, silica),
		fixed(Germania(), "germania", "GeO2", ghoshTemperatures, doped(1)),
		{Name: "germania-silica", Composition: "x GeO2 + (1 - x) SiO2", Wavelengths: Germania().Range,
			Fractions: anyFraction, Source: fleming, Temperature: room, Temperatures: ghoshTemperatures,
			build: func(x float64) (Medium, error) { return GermaniaSilica(x) }, behaviour: doped},
		{Name: "germania-silica-by-sunak", Composition: "x GeO2 + (1 - x) SiO2", Wavelengths: sunakRange,
			Fractions: sunakFractions, Source: sunak, Temperature: room, Temperatures: ghoshTemperatures,
			build: func(x float64) (Medium, error) { return GermaniaSilicaBySunak(x) }, behaviour: doped},
		{Name: "fluorine-silica", Composition: "x F + (1 - x) SiO2", Wavelengths: sunakRange,
			Fractions: sunakFractions, Source: sunak, Temperature: room, Temperatures: ghoshTemperatures,
			build: func(x float64) (Medium, error) { return FluorineSilica(x) },
			behaviour: func(x float64) ThermoOptic {
				if x > fluorineLimit {
					return nil
				}
				return silica
			}},
	}
	for _, g := range MeasuredGlasses() {
		composition := g.Composition
		if g.Fraction > 0 {
			composition = fmt.Sprintf("%s, mole fraction %v", g.Composition, g.Fraction)
		}
		name := strings.NewReplacer(" ", "-", "%", "").Replace(g.Name) + "-measured"
		switch g.dopant() {
		case "", "F":
			all = append(all, fixed(g.Sellmeier, name, composition, ghoshTemperatures, silica))
		case "GeO2":
			all = append(all, fixed(g.Sellmeier, name, composition, ghoshTemperatures, doped(g.Fraction)))
		default: // boron and phosphorus: far from silica, and not known here
			all = append(all, unknown(g.Sellmeier, name, composition, room))
		}
	}
	return append(all,
		Entry{Name: "air", Composition: "dry air", Wavelengths: air.Range, Source: air.Source,
			Temperature: airTemperature, Temperatures: warmAir.Temperatures,
			build:     func(float64) (Medium, error) { return air, nil },
			behaviour: func(float64) ThermoOptic { return warmAir }},
		fixed(Water(), "water", "H2O", warmWater.Temperatures, warmWater),
		Entry{Name: "pmma", Composition: "poly(methyl methacrylate)", Wavelengths: pmma.Range, Source: pmma.Source,
			Temperature: Celsius(20.1), Temperatures: warmPMMA.Temperatures,
			build:     func(float64) (Medium, error) { return pmma, nil },
			behaviour: func(float64) ThermoOptic { return warmPMMA }},
		fixed(PMMAByOscillator(), "pmma-by-oscillator", "poly(methyl methacrylate)", warmPMMA.Temperatures, warmPMMA),
		unknown(Polycarbonate(), "polycarbonate", "polycarbonate", room),
		unknown(FluorideGlass(), "fluoride-glass", "ZrF4-BaF2-LaF3-AlF3-NaF", room),
		unknown(ArsenicTrisulfide(), "arsenic-trisulfide", "As2S3", Celsius(25)),
	)
}
