package modes

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"
	"regexp"
	"strings"

	"glassthread/materials"
	"glassthread/materials/domain"
)

// Profile is a fibre of layers whose glasses are named: what a file can hold. The zero
// Profile gives errors.
type Profile struct {
	Name     string // free text
	Layers   []ProfileLayer
	Cladding ProfileGlass
}

// ProfileGlass is a glass of the package's catalogue by its name, and the mole fraction of
// its dopant, 0 for one of fixed composition.
type ProfileGlass struct {
	Glass    string
	Fraction float64
}

// ProfileLayer is one layer of a Profile. With Exponent 0 it is uniform. With one from 0.5 to
// 100 its mole fraction goes by a power law from Fraction where the layer begins, at radius
// a, to OuterFraction at Outer,
//
//	Fraction + (OuterFraction - Fraction) ((r - a)/(Outer - a))^Exponent.
type ProfileLayer struct {
	Outer float64 // radius (m)
	ProfileGlass
	Exponent      float64
	OuterFraction float64
}

// Fibre returns the profile as layers. The error names the layer that cannot be; it matches
// materials.ErrUnknown for a glass that the catalogue lacks and materials.ErrRange for a
// fraction out of its range.
func (p Profile) Fibre() (Layered, error) {
	const function = "modes.Profile.Fibre"
	var f Layered
	if len(p.Layers) == 0 {
		return f, &domain.Error{Func: function, Argument: "len(Layers)", Value: 0, Allowed: "at least 1"}
	}
	inside := 0.0
	for i, l := range p.Layers {
		made, err := l.layer(function, fmt.Sprintf("Layers[%d]", i), inside)
		if err != nil {
			return Layered{}, err
		}
		f.Layers = append(f.Layers, made)
		inside = l.Outer
	}
	var err error
	if f.Cladding, err = p.Cladding.medium(); err != nil {
		return Layered{}, fmt.Errorf("%s: Cladding: %w", function, err)
	}
	return f, nil
}

func (g ProfileGlass) medium() (materials.Medium, error) {
	e, err := materials.Lookup(g.Glass)
	if err != nil {
		return nil, err
	}
	return e.Glass(g.Fraction)
}

func (l ProfileLayer) layer(function, name string, inside float64) (Layer, error) {
	if !(l.Outer > inside && l.Outer <= math.MaxFloat64) {
		return Layer{}, &domain.Error{Func: function, Argument: name + ".Outer", Value: l.Outer,
			Allowed: fmt.Sprintf("finite and above %v, where the layer begins (m)", inside)}
	}
	g, err := l.medium()
	if err != nil {
		return Layer{}, fmt.Errorf("%s: %s: %w", function, name, err)
	}
	if l.Exponent == 0 {
		if l.OuterFraction != 0 {
			return Layer{}, &domain.Error{Func: function, Argument: name + ".OuterFraction", Value: l.OuterFraction,
				Allowed: "0 in a layer without an Exponent"}
		}
		return Layer{Outer: l.Outer, Glass: g}, nil
	}
	if err := domain.Within(function, name+".Exponent", l.Exponent, 0.5, 100, ""); err != nil {
		return Layer{}, err
	}
	if inside > 0 && l.Exponent != math.Trunc(l.Exponent) {
		return Layer{}, &domain.Error{Func: function, Argument: name + ".Exponent", Value: l.Exponent,
			Allowed: "a whole number in a layer that does not begin at the axis"}
	}
	e, err := materials.Lookup(l.Glass)
	if err != nil {
		return Layer{}, fmt.Errorf("%s: %s: %w", function, name, err)
	}
	if _, err := e.Glass(l.OuterFraction); err != nil {
		return Layer{}, fmt.Errorf("%s: %s.OuterFraction: %w", function, name, err)
	}
	low, high := math.Min(l.Fraction, l.OuterFraction), math.Max(l.Fraction, l.OuterFraction)
	return Layer{Outer: l.Outer, Cusp: l.Exponent != math.Trunc(l.Exponent),
		Vary: func(r float64) (materials.Medium, error) {
			x := math.Min(math.Max((r-inside)/(l.Outer-inside), 0), 1)
			return e.Glass(math.Min(math.Max(l.Fraction+(l.OuterFraction-l.Fraction)*math.Pow(x, l.Exponent), low), high))
		}}, nil
}

// The file, in the units of the workshop.
type profileFile struct {
	Name     string           `json:"name,omitempty"`
	Layers   []profileLayer   `json:"layers"`
	Cladding profileFileGlass `json:"cladding"`
}

type profileFileGlass struct {
	Glass    string  `json:"glass"`
	Fraction float64 `json:"fraction"`
}

type profileLayer struct {
	Outer json.Number `json:"outer_radius_um"`
	profileFileGlass
	Exponent      float64 `json:"exponent,omitempty"`
	OuterFraction float64 `json:"outer_fraction,omitempty"`
}

// ReadProfile reads a profile from JSON:
//
//	{
//	  "name": "a graded core in a trench",
//	  "layers": [
//	    {"outer_radius_um": 5, "glass": "germania-silica-by-sunak", "fraction": 0.08, "exponent": 2, "outer_fraction": 0.01},
//	    {"outer_radius_um": 8, "glass": "fluorine-silica", "fraction": 0.01}
//	  ],
//	  "cladding": {"glass": "fluorine-silica", "fraction": 0}
//	}
//
// exponent and outer_fraction make a layer graded, see ProfileLayer. The errors name the
// line where the text is not of this form, or where a layer that Fibre would refuse ends.
func ReadProfile(from io.Reader) (Profile, error) {
	const function = "modes.ReadProfile"
	text, err := io.ReadAll(from)
	if err != nil {
		return Profile{}, fmt.Errorf("%s: %w", function, err)
	}
	var file profileFile
	d := json.NewDecoder(bytes.NewReader(text))
	d.DisallowUnknownFields()
	err = d.Decode(&file)
	at := d.InputOffset()
	if err == nil {
		if _, e := d.Token(); e != io.EOF {
			err = errors.New("text after the profile")
		}
	}
	if err != nil {
		var syntax *json.SyntaxError
		var kind *json.UnmarshalTypeError
		message := strings.TrimPrefix(err.Error(), "json: ")
		switch {
		case err == io.EOF:
			message = "the text is empty"
		case errors.Is(err, io.ErrUnexpectedEOF):
			message, at = "the profile breaks off", int64(len(text))
		case errors.As(err, &syntax):
			at = syntax.Offset
		case errors.As(err, &kind):
			at, message = kind.Offset, fmt.Sprintf("%s cannot be a %s", kind.Field, kind.Value)
		}
		if name, ok := strings.CutPrefix(message, "unknown field "); ok {
			if found := regexp.MustCompile(regexp.QuoteMeta(name) + `\s*:`).FindIndex(text); found != nil {
				at = int64(found[0])
			}
		}
		return Profile{}, fmt.Errorf("%s: line %d: %s", function, lineAt(text, at), message)
	}
	lines := layerLines(text)
	lineOf := func(layer int) int { return lines[min(layer, len(lines)-1)] }
	p := Profile{Name: file.Name, Cladding: ProfileGlass(file.Cladding)}
	for i, l := range file.Layers {
		outer, ok := decimal(l.Outer.String(), -6)
		if !ok {
			return Profile{}, fmt.Errorf("%s: line %d: outer_radius_um is %.80q and must be a number", function, lineOf(i), l.Outer.String())
		}
		layer := ProfileLayer{outer, ProfileGlass(l.profileFileGlass), l.Exponent, l.OuterFraction}
		inside := 0.0
		if i > 0 {
			inside = p.Layers[i-1].Outer
		}
		if _, err := layer.layer(function, fmt.Sprintf("Layers[%d]", i), inside); err != nil {
			return Profile{}, fmt.Errorf("line %d: %w", lineOf(i), err)
		}
		p.Layers = append(p.Layers, layer)
	}
	if _, err := p.Fibre(); err != nil {
		return Profile{}, err
	}
	return p, nil
}

func lineAt(text []byte, offset int64) int {
	return 1 + bytes.Count(text[:min(max(offset, 0), int64(len(text)))], []byte("\n"))
}

// layerLines returns the line where each layer ends, of text that has been decoded. Of keys
// that stand twice the last counts, as in encoding/json.
func layerLines(text []byte) (lines []int) {
	d := json.NewDecoder(bytes.NewReader(text))
	var skip json.RawMessage
	if t, _ := d.Token(); t != json.Delim('{') {
		return nil
	}
	for d.More() {
		key, err := d.Token()
		if name, ok := key.(string); err != nil || !ok || !strings.EqualFold(name, "layers") {
			if err != nil || d.Decode(&skip) != nil {
				return lines
			}
			continue
		}
		if t, _ := d.Token(); t != json.Delim('[') {
			continue // null
		}
		lines = nil
		for d.More() {
			if d.Decode(&skip) != nil {
				return lines
			}
			lines = append(lines, lineAt(text, d.InputOffset()))
		}
		if _, err := d.Token(); err != nil {
			return lines
		}
	}
	return lines
}

// Write writes the profile as ReadProfile reads it, its numbers exactly. One that Fibre
// refuses is not written.
func (p Profile) Write(to io.Writer) error {
	if _, err := p.Fibre(); err != nil {
		return err
	}
	file := profileFile{Name: p.Name, Cladding: profileFileGlass(p.Cladding)}
	for _, l := range p.Layers {
		file.Layers = append(file.Layers, profileLayer{json.Number(decimalText(l.Outer, 6)), profileFileGlass(l.ProfileGlass), l.Exponent, l.OuterFraction})
	}
	text, err := json.MarshalIndent(file, "", "  ")
	if err != nil {
		return err
	}
	_, err = to.Write(append(text, '\n'))
	return err
}
