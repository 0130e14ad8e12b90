package main

import (
	"bytes"
	"encoding/json"
	"fmt"
	"math"
	"os"

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

// UnmarshalJSON takes a glass whole: a fraction that is not given is 0, not that of the
// glass it replaces.
func (g *glass) UnmarshalJSON(text []byte) error {
	type plain glass
	var p plain
	d := json.NewDecoder(bytes.NewReader(text))
	d.DisallowUnknownFields()
	if err := d.Decode(&p); err != nil {
		return err
	}
	*g = glass(p)
	return nil
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
	d := json.NewDecoder(bytes.NewReader(text))
	d.DisallowUnknownFields()
	if err := d.Decode(&r); err != nil {
		return recipe{}, fmt.Errorf("%s: %w", file, err)
	}
	if d.More() {
		return recipe{}, fmt.Errorf("%s: text after the recipe", file)
	}
	return r, nil
}

// positive refuses what JSON and flags may bring.
func positive(name string, x float64) error {
	if x > 0 && !math.IsInf(x, 0) {
		return nil
	}
	return fmt.Errorf("%s = %v: must be finite and above 0", name, x)
}

// fibre makes the step-index fibre of the recipe, and says over which wavelengths (m)
// both glasses answer.
func (r recipe) fibre() (modes.Step, materials.Range, error) {
	var none materials.Range
	if err := positive("core radius (um)", r.CoreRadius); err != nil {
		return modes.Step{}, none, err
	}
	core, a, err := r.medium(r.Core)
	if err != nil {
		return modes.Step{}, none, fmt.Errorf("core: %w", err)
	}
	cladding, b, err := r.medium(r.Cladding)
	if err != nil {
		return modes.Step{}, none, fmt.Errorf("cladding: %w", err)
	}
	both := materials.Range{From: math.Max(a.From, b.From), To: math.Min(a.To, b.To)}
	if both.To <= both.From {
		return modes.Step{}, none, fmt.Errorf("the data of %s and %s have no wavelength in common", r.Core.Glass, r.Cladding.Glass)
	}
	return modes.Step{Radius: r.CoreRadius / 1e6, Core: core, Cladding: cladding}, both, nil
}

func (r recipe) medium(g glass) (materials.Medium, materials.Range, error) {
	e, err := materials.Lookup(g.Glass)
	if err != nil {
		return nil, materials.Range{}, err
	}
	m, err := e.GlassAt(g.Fraction, materials.Celsius(r.Temperature))
	if err != nil {
		return nil, materials.Range{}, err
	}
	rng := e.Wavelengths
	if w, ok := m.(materials.Warmed); ok {
		if s, ok := w.ThermoOptic.(interface{ Wavelengths() materials.Range }); ok {
			t := s.Wavelengths()
			rng = materials.Range{From: math.Max(rng.From, t.From), To: math.Min(rng.To, t.To)}
		}
	}
	return m, rng, nil
}
