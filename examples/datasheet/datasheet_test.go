package main

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"io"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func do(args ...string) (code int, out, errOut string) {
	var o, e bytes.Buffer
	code = run(args, &o, &e)
	return code, o.String(), e.String()
}

func reportOf(t *testing.T, args ...string) report {
	code, out, errOut := do(append(args, "-format", "json")...)
	require.Zero(t, code, errOut)
	var r report
	require.NoError(t, json.Unmarshal([]byte(out), &r))
	return r
}

func TestDefaultSheetNamesEverything(t *testing.T) {
	code, out, errOut := do()
	require.Zero(t, code, errOut)
	assert.Empty(t, errOut)
	for _, figure := range []string{"invented", "core index", "cladding index", "relative index difference",
		"numerical aperture", "acceptance angle", "critical angle", "  V ", "effective index", "group index",
		"dispersion D", "material part", "waveguide part", "slope", "Zero dispersion", "Cut-off wavelengths",
		"LP11", "Modes guided at 1310 nm: 1", "Modes guided at 1550 nm: 1"} {
		assert.Contains(t, out, figure)
	}
	assert.NotContains(t, out, "NaN")
	assert.NotContains(t, out, "Inf")
}

// The figures of a fibre at 20 C against the row 0.036, 4.1e-06 of the tables made by
// mpmath, dispersion/testdata/step.py.
func TestSheetAgainstReference(t *testing.T) {
	r := reportOf(t, "-fraction", "0.036", "-radius", "4.1", "-temperature", "20", "-wavelengths", "1550")
	require.Len(t, r.Zeros, 1)
	assert.InEpsilon(t, 1.306571056393404377e-6, r.Zeros[0], 1e-12)
	assert.Equal(t, "LP11", r.Cutoffs[0].Mode)
	assert.InEpsilon(t, 1.337610126956087700e-6, r.Cutoffs[0].Wavelength, 1e-12)
	assert.Equal(t, 1.55e-6, r.At[0].Wavelength)
	assert.InEpsilon(t, 1.4440236, r.At[0].Cladding, 1e-7) // Malitson 1965 at 1.55 um
}

// A standard single-mode fibre: ITU-T G.652 (2016; from memory) allows a zero of
// dispersion from 1300 to 1324 nm, a slope there up to 0.092 ps/(nm^2 km), and a cable
// cut-off (below the theoretical one) up to 1260 nm; about 17 ps/(nm km) at 1550 nm is
// common practice.
func TestStandardSingleModeFibre(t *testing.T) {
	r := reportOf(t, "-fraction", "0.036", "-radius", "4.1", "-temperature", "20", "-wavelengths", "1310,1550")
	require.Len(t, r.Zeros, 1)
	assert.Greater(t, r.Zeros[0], 1300e-9)
	assert.Less(t, r.Zeros[0], 1324e-9)
	assert.Less(t, r.At[0].Modes[0].Slope, 0.092e3)
	assert.InDelta(t, 17e-6, r.At[1].Modes[0].D, 1e-6)
	for _, m := range []mode{r.At[0].Modes[0], r.At[1].Modes[0]} {
		assert.InDelta(t, m.D, m.Material+m.Waveguide+m.Profile, 1e-18)
	}
}

func TestCSV(t *testing.T) {
	code, out, errOut := do("-radius", "25", "-fraction", "0.1", "-wavelengths", "850,1300", "-format", "csv")
	require.Zero(t, code, errOut)
	rows, err := csv.NewReader(strings.NewReader(out)).ReadAll()
	require.NoError(t, err)
	assert.Equal(t, "wavelength_m", rows[0][0])
	r := reportOf(t, "-radius", "25", "-fraction", "0.1", "-wavelengths", "850,1300")
	assert.Len(t, rows, 1+len(r.At[0].Modes)+len(r.At[1].Modes))
	x, err := strconv.ParseFloat(rows[1][7], 64)
	require.NoError(t, err)
	assert.Equal(t, r.At[0].Modes[0].Index, x)
}

func TestRecipeFile(t *testing.T) {
	file := filepath.Join(t.TempDir(), "fibre.json")
	require.NoError(t, os.WriteFile(file, []byte(`{"name": "test", "core": {"glass": "silica"},
		"cladding": {"glass": "fluorine-silica", "fraction": 0.02}, "wavelengths_nm": [1064]}`), 0o600))
	r := reportOf(t, "-recipe", file)
	assert.Equal(t, "test", r.Recipe.Name)
	assert.Less(t, r.At[0].Cladding, r.At[0].Core)
	assert.Equal(t, demo().CoreRadius, r.Recipe.CoreRadius)

	require.NoError(t, os.WriteFile(file, []byte(demo().json()), 0o600))
	assert.Equal(t, reportOf(t), reportOf(t, "-recipe", file))
}

func TestWrongInputIsOneLineAndExitCode2(t *testing.T) {
	dir := t.TempDir()
	file := func(name, text string) string {
		path := filepath.Join(dir, name)
		require.NoError(t, os.WriteFile(path, []byte(text), 0o600))
		return path
	}
	for _, c := range []struct {
		args []string
		says string
	}{
		{[]string{"-radius", "-1"}, "radius"},
		{[]string{"-radius", "NaN"}, "radius"},
		{[]string{"-radius", "wide"}, "radius"},
		{[]string{"-fraction", "1.5"}, "fraction"},
		{[]string{"-fraction", "0"}, "above the index of the cladding"},
		{[]string{"-core", "unobtainium"}, "unobtainium"},
		{[]string{"-core", "fluoride-glass", "-temperature", "60"}, "temperature"},
		{[]string{"-temperature", "-300"}, "temperature"},
		{[]string{"-wavelengths", "1310,x"}, "x"},
		{[]string{"-wavelengths", "0"}, "wavelength"},
		{[]string{"-wavelengths", "12000"}, "wavelength"},
		{[]string{"-radius", "30000"}, "v"},
		{[]string{"-format", "xml"}, "xml"},
		{[]string{"-modes", "-1"}, "modes"},
		{[]string{"-nonsense"}, "nonsense"},
		{[]string{"more"}, "more"},
		{[]string{"-recipe", filepath.Join(dir, "absent.json")}, "absent.json"},
		{[]string{"-recipe", file("broken.json", "{")}, "broken.json"},
		{[]string{"-recipe", file("extra.json", `{"colour": "red"}`)}, "colour"},
		{[]string{"-recipe", file("two.json", `{} {}`)}, "after"},
		{[]string{"-recipe", file("none.json", `{"wavelengths_nm": []}`)}, "wavelengths"},
	} {
		code, out, errOut := do(c.args...)
		assert.Equal(t, 2, code, c.args)
		assert.Empty(t, out, c.args)
		assert.Equal(t, 1, strings.Count(errOut, "\n"), "%v: %q", c.args, errOut)
		assert.Contains(t, errOut, c.says, c.args)
	}
}

func TestHelpAndGlasses(t *testing.T) {
	code, out, errOut := do("-h")
	assert.Zero(t, code)
	assert.Empty(t, errOut)
	assert.Contains(t, out, "core_radius_um")
	assert.Contains(t, out, "-wavelengths")
	code, out, _ = do("-glasses")
	assert.Zero(t, code)
	assert.Contains(t, out, "Fleming")
	assert.Contains(t, out, "from memory")
}

func BenchmarkSheet(b *testing.B) {
	for range b.N {
		if run(nil, io.Discard, io.Discard) != 0 {
			b.Fatal("failed")
		}
	}
}
