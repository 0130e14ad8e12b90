package modes

import (
	"bytes"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
)

func trenchProfile() Profile {
	return Profile{Name: "a trench", Cladding: ProfileGlass{"fluorine-silica", 0}, Layers: []ProfileLayer{
		{Outer: 5e-6, ProfileGlass: ProfileGlass{"germania-silica-by-sunak", 0.08}, Exponent: 2, OuterFraction: 0.01},
		{Outer: 8e-6, ProfileGlass: ProfileGlass{"fluorine-silica", 0.01}}}}
}

// Against the same fibre written out in glasses.
func TestProfileFibre(t *testing.T) {
	f, err := trenchProfile().Fibre()
	require.NoError(t, err)
	want := Layered{Cladding: pair(t, 0), Layers: []Layer{
		{Outer: 5e-6, Vary: func(r float64) (materials.Medium, error) {
			return materials.GermaniaSilicaBySunak(0.08 - 0.07*(r/5e-6)*(r/5e-6))
		}},
		{Outer: 8e-6, Glass: pair(t, -0.01)}}}
	p, err := f.LP(0, 1).Taylor(1.31e-6)
	require.NoError(t, err)
	q, err := want.LP(0, 1).Taylor(1.31e-6)
	require.NoError(t, err)
	assert.InDelta(t, q[0], p[0], 1e-13)
	assert.InEpsilon(t, q[1], p[1], 1e-10)
}

func TestProfileErrors(t *testing.T) {
	for want, change := range map[string]func(*Profile){
		"len(Layers) = 0":            func(p *Profile) { p.Layers = nil },
		"Layers[1].Outer = 5e-06":    func(p *Profile) { p.Layers[1].Outer = 5e-6 },
		"Layers[0].Outer = NaN":      func(p *Profile) { p.Layers[0].Outer = math.NaN() },
		"Layers[1].Exponent = 1.5":   func(p *Profile) { p.Layers[1].Exponent = 1.5 },
		"Layers[0].Exponent = 0.1":   func(p *Profile) { p.Layers[0].Exponent = 0.1 },
		"Layers[0].OuterFraction: ":  func(p *Profile) { p.Layers[0].OuterFraction = 0.9 },
		"Layers[1].OuterFraction = ": func(p *Profile) { p.Layers[1].OuterFraction = 0.01 },
		"Layers[0]: ":                func(p *Profile) { p.Layers[0].Fraction = -1 },
		"Cladding: ":                 func(p *Profile) { p.Cladding.Glass = "cheese" },
	} {
		p := trenchProfile()
		change(&p)
		_, err := p.Fibre()
		assert.ErrorContains(t, err, want)
		assert.Error(t, p.Write(&bytes.Buffer{}))
	}
	p := trenchProfile()
	p.Layers[0].Glass = "cheese"
	_, err := p.Fibre()
	assert.ErrorIs(t, err, materials.ErrUnknown)
	p.Layers[0].Glass, p.Layers[0].Fraction = "fluorine-silica", 0.9
	_, err = p.Fibre()
	assert.ErrorIs(t, err, materials.ErrRange)
	assert.ErrorIs(t, trenchProfile().Write(broken{}), errBroken)
}

func TestReadProfileErrors(t *testing.T) {
	for text, want := range map[string]string{
		"":                    "the text is empty",
		"{\n\"layers\": [\n":  "line 3: the profile breaks off",
		"{\n\"layers\": ]}":   "line 2: ",
		"{\n\"name\": 3}":     "line 2: name cannot be a number",
		"{\n\"cheese\": 3\n}": `line 2: unknown field "cheese"`,
		"{} {}":               "line 1: text after the profile",
		"{\"layers\": [\n{\"outer_radius_um\": 2, \"glass\": \"silica\"},\n{\"outer_radius_um\": 1, \"glass\": \"silica\"}]}": "line 3: modes.ReadProfile: Layers[1].Outer",
		"{}":               "len(Layers) = 0",
		`{"layers": [{}]}`: `line 1: outer_radius_um is ""`,
		`{"layers": [{"glass": "a", "outer_radius_um": 1}]}`:                     "no such medium",
		`{"layers": [{"glass": "silica", "fraction": 1, "outer_radius_um": 1}]}`: "Layers[0]: ",
	} {
		_, err := ReadProfile(strings.NewReader(text))
		assert.ErrorContains(t, err, want)
		if err != nil {
			assert.NotContains(t, err.Error(), "\n")
		}
	}
}

func TestProfileRoundTrip(t *testing.T) {
	random := rand.New(rand.NewPCG(9, 10))
	for range 200 {
		p := trenchProfile()
		p.Layers[0].Outer = random.Float64() * 1e-5
		p.Layers[1].Outer = p.Layers[0].Outer + math.Exp(20*random.NormFloat64()-13)
		p.Layers[0].Fraction, p.Layers[0].OuterFraction = random.Float64()*0.2, random.Float64()*0.2
		p.Layers[0].Exponent = 0.5 + random.Float64()*9
		if _, err := p.Fibre(); err != nil {
			continue
		}
		var text bytes.Buffer
		require.NoError(t, p.Write(&text))
		back, err := ReadProfile(&text)
		require.NoError(t, err)
		require.Equal(t, p, back)
	}
}

func FuzzReadProfile(f *testing.F) {
	var text bytes.Buffer
	if err := trenchProfile().Write(&text); err != nil {
		f.Fatal(err)
	}
	f.Add(text.String())
	for _, s := range []string{"", "{}", "null", `{"layers": [{}], "layers": null, "Layers": [{"outer_radius_um": 1}, {}]}`, `{"layers": [{"outer_radius_um": 1e-400, "glass": "silica"}], "cladding": {"glass": "air"}}`,
		`{"layers": [{"outer_radius_um": 1e300, "glass": "Silica", "fraction": -0}], "cladding": {"glass": "air"}}`} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		p, err := ReadProfile(strings.NewReader(s))
		if err != nil {
			return
		}
		var text bytes.Buffer
		require.NoError(t, p.Write(&text))
		back, err := ReadProfile(&text)
		require.NoError(t, err)
		require.Equal(t, p, back)
		if fibre, err := p.Fibre(); err == nil {
			if n, err := fibre.LP(0, 1).Taylor(1.55e-6); err == nil && !(n[0] > 0 && n[0] <= math.MaxFloat64) {
				t.Errorf("index %v", n[0])
			}
		}
	})
}
