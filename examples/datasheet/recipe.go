package main

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"
	"os"
	"reflect"
	"slices"
	"strings"

	"glassthread/materials"
	"glassthread/modes"
)

// recipe is what a fibre is made of, in the units of the workshop.
type recipe struct {
	Name        string    `json:"name"`
	Core        glass     `json:"core"`
	Cladding    glass     `json:"cladding"`
	CoreRadius  float64   `json:"core_radius_um"`
	Temperature float64   `json:"temperature_c"`
	Wavelengths []float64 `json:"wavelengths_nm"`
}

// glass is an entry of the catalogue and the mole fraction of its dopant.
type glass struct {
	Glass    string  `json:"glass"`
	Fraction float64 `json:"fraction"`
}

func (g glass) String() string {
	if g.Fraction == 0 {
		return g.Glass
	}
	return fmt.Sprintf("%s, mole fraction %v", g.Glass, g.Fraction)
}

// demo is the short pigtail inside the housing of a Tarnwater buoy. The buoys, the
// lake and the fibre are invented.
func demo() recipe {
	return recipe{
		Name:        "Tarnwater pigtail (an invented fibre)",
		Core:        glass{"germania-silica", 0.042},
		Cladding:    glass{"silica", 0},
		CoreRadius:  3.55,
		Temperature: 12,
		Wavelengths: []float64{1310, 1550},
	}
}

func (r recipe) json() string {
	text, err := json.MarshalIndent(r, "  ", "  ")
	if err != nil { // only for numbers that JSON lacks, which demo has not
		return err.Error()
	}
	return "  " + string(text)
}

func readRecipe(file string) (recipe, error) {
	text, err := os.ReadFile(file)
	if err != nil {
		return recipe{}, err
	}
	r := demo()
	r.Name = file
	if err := r.read(text); err != nil {
		return recipe{}, fmt.Errorf("%s: %w", file, err)
	}
	return r, nil
}

// read changes the entries that the text has. A glass and the wavelengths are taken
// whole: a fraction that is not given is 0, not that of the glass it replaces.
func (r *recipe) read(text []byte) error {
	if len(bytes.TrimSpace(text)) == 0 {
		return errors.New("the file is empty")
	}
	var whole any
	d := json.NewDecoder(bytes.NewReader(text))
	if err := d.Decode(&whole); err != nil {
		return plain(err)
	}
	if _, err := d.Token(); err != io.EOF {
		return errors.New("text after the recipe")
	}
	entries, ok := whole.(map[string]any)
	if !ok {
		return errors.New("a recipe is an object, { and } with entries between")
	}
	if err := refuseNull("", whole); err != nil {
		return err
	}
	for name := range entries { // as encoding/json matches them
		switch {
		case strings.EqualFold(name, "core"):
			r.Core = glass{}
		case strings.EqualFold(name, "cladding"):
			r.Cladding = glass{}
		case strings.EqualFold(name, "wavelengths_nm"):
			r.Wavelengths = nil
		}
	}
	d = json.NewDecoder(bytes.NewReader(text))
	d.DisallowUnknownFields()
	return plain(d.Decode(r))
}

// refuseNull refuses a null anywhere: encoding/json would pass over it.
func refuseNull(path string, value any) error {
	switch v := value.(type) {
	case nil:
		return fmt.Errorf("%s is null; leave it out or give it a value", path)
	case []any:
		for i, x := range v {
			if err := refuseNull(fmt.Sprintf("%s[%d]", path, i), x); err != nil {
				return err
			}
		}
	case map[string]any:
		for name, x := range v {
			if path != "" {
				name = path + "." + name
			}
			if err := refuseNull(name, x); err != nil {
				return err
			}
		}
	}
	return nil
}

// plain says what encoding/json says without the language's own words.
func plain(err error) error {
	var kind *json.UnmarshalTypeError
	switch {
	case err == nil:
		return nil
	case errors.Is(err, io.ErrUnexpectedEOF):
		return errors.New("the recipe breaks off")
	case errors.As(err, &kind) && strings.HasPrefix(kind.Value, "number "):
		return fmt.Errorf("%s does not fit", kind.Value)
	case errors.As(err, &kind):
		wanted := map[reflect.Kind]string{reflect.Float64: "a number", reflect.String: "a text in quotes",
			reflect.Struct: `an object such as {"glass": "silica"}`, reflect.Slice: "a list of numbers in brackets"}[kind.Type.Kind()]
		return fmt.Errorf("%s is of type %s and must be %s", kind.Field, kind.Value, wanted)
	}
	return errors.New(strings.TrimPrefix(err.Error(), "json: "))
}

// positive refuses what JSON and flags may bring.
func positive(name string, x float64) error {
	if x > 0 && !math.IsInf(x, 0) {
		return nil
	}
	return fmt.Errorf("%s = %v: must be finite and above 0", name, x)
}

// fibre is the recipe made into a fibre.
type fibre struct {
	modes.Step
	glasses materials.Range // wavelengths (m) over which both glasses answer
	notes   []string
}

func (r recipe) fibre() (*fibre, error) {
	if err := positive("core radius (um)", r.CoreRadius); err != nil {
		return nil, err
	}
	if !(materials.Celsius(r.Temperature) > 0) || math.IsInf(r.Temperature, 0) {
		return nil, fmt.Errorf("temperature = %v C: must be finite and above -273.15 C", r.Temperature)
	}
	f := &fibre{notes: []string{}}
	core, a, err := f.medium(r.Core, r.Temperature)
	if err != nil {
		return nil, fmt.Errorf("core: %w", err)
	}
	cladding, b, err := f.medium(r.Cladding, r.Temperature)
	if err != nil {
		return nil, fmt.Errorf("cladding: %w", err)
	}
	f.Step = modes.Step{Radius: r.CoreRadius / 1e6, Core: core, Cladding: cladding}
	f.glasses = materials.Range{From: math.Max(a.Wavelengths.From, b.Wavelengths.From), To: math.Min(a.Wavelengths.To, b.Wavelengths.To)}
	if f.glasses.To <= f.glasses.From {
		return nil, fmt.Errorf("the data of %s and %s have no wavelength in common", a.Name, b.Name)
	}
	if a.Source.InAir != b.Source.InAir {
		solid, fluid := a.Name, b.Name
		if b.Source.InAir {
			solid, fluid = fluid, solid
		}
		f.notes = append(f.notes, fmt.Sprintf("The index of %s is relative to air, that of %s to vacuum, and both are "+
			"taken as published: their difference is off by 2.7e-4 of the index.", solid, fluid))
	}
	return f, nil
}

// medium returns a glass at a temperature (C), and its entry with the wavelengths over
// which it answers there.
func (f *fibre) medium(g glass, celsius float64) (materials.Medium, materials.Entry, error) {
	e, err := materials.Lookup(g.Glass)
	if err != nil {
		return nil, e, err
	}
	m, err := e.GlassAt(g.Fraction, materials.Celsius(celsius))
	switch {
	case errors.Is(err, materials.ErrNoThermoOptic):
		note := fmt.Sprintf("%s is taken at %.4g C, its own temperature: how it moves with temperature is not known here.",
			g, inCelsius(e.Temperature))
		if !slices.Contains(f.notes, note) {
			f.notes = append(f.notes, note)
		}
		m, err = e.Glass(g.Fraction)
	case err != nil && !e.Temperatures.Contains(materials.Celsius(celsius)):
		err = fmt.Errorf("temperature = %v C: %s is known from %.4g to %.4g C", celsius, e.Name,
			inCelsius(e.Temperatures.From), inCelsius(e.Temperatures.To))
	}
	if err != nil {
		return nil, e, err
	}
	if w, ok := m.(materials.Warmed); ok {
		if s, ok := w.ThermoOptic.(interface{ Wavelengths() materials.Range }); ok {
			t := s.Wavelengths()
			e.Wavelengths = materials.Range{From: math.Max(e.Wavelengths.From, t.From), To: math.Min(e.Wavelengths.To, t.To)}
		}
	}
	return m, e, nil
}

func inCelsius(kelvin float64) float64 { return kelvin - materials.Celsius(0) }
