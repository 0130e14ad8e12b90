package main

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"errors"
	"io"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/dispersion"
	"glassthread/materials"
	"glassthread/materials/reftable"
	"glassthread/numap"
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
	x, err := strconv.ParseFloat(rows[1][11], 64)
	require.NoError(t, err)
	assert.Equal(t, "effective_index", rows[0][11])
	assert.Equal(t, r.At[0].Modes[0].Index, x)
}

// Every figure of the invented fibre against testdata/sheet.csv, which mpmath made from
// the published decimals; through JSON and, by the names of the columns, through CSV.
func TestFiguresAgainstReference(t *testing.T) {
	args := []string{"-wavelengths", "850,1310,1550"}
	r := reportOf(t, args...)
	code, out, errOut := do(append(args, "-format", "csv")...)
	require.Zero(t, code, errOut)
	rows, err := csv.NewReader(strings.NewReader(out)).ReadAll()
	require.NoError(t, err)
	var index, exact, dispersive reftable.Errors
	i := 0
	want := reftable.Read(t, "testdata/sheet.csv", 4)
	for _, a := range r.At {
		for _, m := range a.Modes {
			require.Less(t, i, len(want))
			w := want[i]
			i++
			require.Equal(t, w.Float("wavelength_m"), a.Wavelength)
			require.Equal(t, w.Text("mode"), m.Mode)
			assert.Equal(t, 2+2*min(w.Int("l"), 1), m.Degeneracy)
			figures := map[string]float64{
				"core_index": a.Core, "cladding_index": a.Cladding, "delta": a.Delta, "na": a.NA,
				"acceptance_angle_rad": a.AcceptanceAngle, "critical_angle_rad": a.CriticalAngle, "v": a.V,
				"b": m.B, "effective_index": m.Index, "group_index": m.Group, "group_delay_s_per_m": m.Delay,
				"d_s_per_m2": m.D, "d_material_s_per_m2": m.Material, "d_waveguide_s_per_m2": m.Waveguide,
				"d_profile_s_per_m2": m.Profile, "slope_s_per_m3": m.Slope, "beta2_s2_per_m": m.Beta2,
				"core_power_share": m.CorePower,
			}
			require.Len(t, rows[i], len(figures)+3)
			for column, heading := range rows[0] {
				switch cell := rows[i][column]; heading {
				case "wavelength_m":
					assert.Equal(t, w.Float("wavelength_m"), number64(t, cell))
				case "mode":
					assert.Equal(t, m.Mode, cell)
				case "degeneracy":
					assert.Equal(t, strconv.Itoa(m.Degeneracy), cell)
				default:
					figure, known := figures[heading]
					require.True(t, known, heading)
					assert.Equal(t, strconv.FormatFloat(figure, 'g', -1, 64), cell, heading)
					delete(figures, heading)
					e := w.Relative(heading, figure)
					switch {
					case strings.Contains(heading, "index"):
						index.Add(e, w)
					case strings.HasPrefix(heading, "d_") || heading == "slope_s_per_m3" || heading == "beta2_s2_per_m":
						// The parts and D cancel one another near the zero of D.
						dispersive.Add(e, w)
					default:
						exact.Add(e, w)
					}
				}
			}
			assert.Empty(t, figures, "figures that CSV lacks")
		}
	}
	require.Equal(t, len(want), i)
	index.Check(t, "indices and group indices", 5e-16)
	exact.Check(t, "aperture, angles, V, b, delay, core power", 2e-13)
	dispersive.Check(t, "D, its parts, slope, beta2", 1e-12)

	// As the head of the table has them.
	require.Len(t, r.Zeros, 1)
	assert.InEpsilon(t, 1.3278766483308627616e-6, r.Zeros[0], 1e-12)
	assert.Equal(t, []span{{0.8e-6, 3.37e-6}}, r.Searched)
	assert.Equal(t, span{0.36e-6, 3.37e-6}, r.Wavelength)
	require.Equal(t, "LP11", r.Cutoffs[0].Mode)
	assert.InEpsilon(t, 1.2502605627148150629e-6, r.Cutoffs[0].Wavelength, 1e-12)
	assert.InEpsilon(t, 2.404825557695773, r.Cutoffs[0].V, 1e-15) // j_{0,1}, DLMF 10.21
	assert.Empty(t, r.Notes)
}

func number64(t *testing.T, cell string) float64 {
	x, err := strconv.ParseFloat(cell, 64)
	require.NoError(t, err)
	return x
}

// Lines of the text in the units of the trade, and a row of the CSV, as they must stand:
// the figures of testdata/sheet.csv, rounded by hand.
func TestLinesLiterally(t *testing.T) {
	code, out, errOut := do()
	require.Zero(t, code, errOut)
	for _, line := range []string{
		"  core              germania-silica, mole fraction 0.042",
		"  core radius       3.55 um",
		"  temperature       12 C",
		"  glass data hold   360 to 3370 nm",
		"  core index                                1.4529872   1.4502409",
		"  cladding index                            1.4467189   1.4439384",
		"  relative index difference (%)             0.4305      0.4336",
		"  numerical aperture                        0.13482     0.13506",
		"  acceptance angle in air (deg from axis)   7.748       7.762",
		"  critical angle at the core wall (deg)     84.676      84.656",
		"  V                                         2.29557     1.94355",
		"  effective index                  1.4498768   1.4464470",
		"  group index                      1.4684518   1.4689632",
		"  group delay (ns/km)              4898.228    4899.934",
		"  share of power in the core (%)   80.85       72.44",
		"  dispersion D (ps/(nm km))        -1.4549     +14.5984",
		"    material part                  +2.1751     +20.8178",
		"    waveguide part                 -3.9719     -6.9475",
		"    profile part                   +0.3419     +0.7281",
		"  slope of D (ps/(nm^2 km))        0.08301     0.05571",
		"  beta2 (ps^2/km)                  +1.3255     -18.6195",
		"Zero dispersion of LP01   1327.877 nm",
		"  (searched from 800 to 3370 nm, where the core guides)",
		"  LP11                1250.261   2.40483",
		"  LP01   2            1.4498768         1.4684518     0.50324   -1.4549",
	} {
		assert.Contains(t, out, "\n"+line+"\n")
	}
	code, out, errOut = do("-format", "csv")
	require.Zero(t, code, errOut)
	lines := strings.Split(out, "\n")
	assert.Equal(t, "wavelength_m,core_index,cladding_index,delta,na,acceptance_angle_rad,critical_angle_rad,v,mode,degeneracy,b,"+
		"effective_index,group_index,group_delay_s_per_m,d_s_per_m2,d_material_s_per_m2,d_waveguide_s_per_m2,d_profile_s_per_m2,"+
		"slope_s_per_m3,beta2_s2_per_m,core_power_share", lines[0])
	// The last digits are the computer's; the row of 1550 nm to 12 digits.
	want := "1.55e-06,1.45024088731,1.44393836725,0.00433640041447,0.135057849947,0.135471847121,1.47753331192,1.9435528512,LP01,2," +
		"0.397509941471,1.4464469701,1.46896320005,4.89993380706e-09,1.45983684647e-05,2.08178103175e-05,-6.94754957735e-06," +
		"7.281077245e-07,55.709824794,-1.86194627738e-26,0.724398652648"
	cells := strings.Split(lines[2], ",")
	for i, cell := range cells {
		if x, err := strconv.ParseFloat(cell, 64); err == nil {
			cells[i] = strconv.FormatFloat(x, 'g', 12, 64)
		}
	}
	assert.Equal(t, want, strings.Join(cells, ","))
}

// A glass of unknown behaviour is taken at its own temperature, with a note in Celsius
// and in every form that has notes.
func TestGlassesOfUnknownBehaviour(t *testing.T) {
	for _, args := range [][]string{
		{"-core", "arsenic-trisulfide", "-cladding", "fluoride-glass"},
		{"-core", "arsenic-trisulfide", "-cladding", "fluoride-glass", "-temperature", "25"},
		{"-core", "silica", "-cladding", "boron-silica-13.3-measured"},
		{"-core", "silica", "-cladding", "fluorine-silica", "-cladding-fraction", "0.05"},
	} {
		r := reportOf(t, args...)
		code, out, errOut := do(args...)
		require.Zero(t, code, errOut)
		assert.NotEmpty(t, r.Notes, args)
		assert.Contains(t, r.Notes[0], "its own temperature", args)
		assert.NotContains(t, out, " K", args)
		assert.Contains(t, strings.Join(strings.Fields(out), " "), r.Notes[0])
	}
	r := reportOf(t, "-core", "arsenic-trisulfide", "-cladding", "fluoride-glass")
	assert.Equal(t, "arsenic-trisulfide is taken at 25 C, its own temperature: how it moves with temperature is not known here.", r.Notes[0])
	assert.Equal(t, "fluoride-glass is taken at 20 C, its own temperature: how it moves with temperature is not known here.", r.Notes[1])
	own := reportOf(t, "-core", "arsenic-trisulfide", "-cladding", "fluoride-glass", "-temperature", "20")
	assert.Equal(t, r.At[0].Core, own.At[0].Core)
	assert.Len(t, reportOf(t, "-core", "fluoride-glass", "-temperature", "20").Notes, 2) // weak guidance twice
}

// Every pair of glasses of which one guides in the other makes a sheet at the default
// temperature.
func TestEveryGlassServes(t *testing.T) {
	sheets := 0
	for _, core := range materials.Catalogue() {
		for _, cladding := range materials.Catalogue() {
			fraction := func(e materials.Entry) string { return strconv.FormatFloat(e.Fractions.To/8, 'g', -1, 64) }
			from := max(core.Wavelengths.From, cladding.Wavelengths.From, 0.3e-6)
			to := min(core.Wavelengths.To, cladding.Wavelengths.To, 3.3e-6)
			require.Less(t, from, to)
			nm := strconv.FormatFloat((from+to)/2*1e9, 'f', 0, 64)
			code, out, errOut := do("-core", core.Name, "-fraction", fraction(core), "-cladding", cladding.Name,
				"-cladding-fraction", fraction(cladding), "-radius", "2", "-wavelengths", nm)
			if code != 0 {
				assert.Contains(t, errOut, "guides no light", "%s in %s", core.Name, cladding.Name)
				continue
			}
			sheets++
			assert.NotContains(t, out, "NaN")
			assert.NotContains(t, out, "Inf")
		}
	}
	assert.Greater(t, sheets, 200)
}

// Air at the default temperature, and a note that its index is relative to vacuum.
func TestSilicaInAir(t *testing.T) {
	r := reportOf(t, "-core", "silica", "-cladding", "air", "-radius", "0.5")
	require.NotEmpty(t, r.Notes)
	assert.Contains(t, r.Notes[0], "relative to air")
	// 15 C against 12 C, ideal gas: n - 1 in proportion to 1/T. Ciddor's formula (1996)
	// at 1.31 um and 15 C: 0.05792105/(238.0185 - 1/1.31^2) + 0.00167917/(57.362 - 1/1.31^2).
	assert.InEpsilon(t, 2.735177e-4*288.15/285.15, r.At[0].Cladding-1, 1e-6)
	assert.Equal(t, span{0.23e-6, 1.69e-6}, r.Wavelength)
	assert.Equal(t, []span{{0.8e-6, 1.69e-6}}, r.Searched)
	// Both relative to vacuum: no note.
	for _, note := range reportOf(t, "-core", "water", "-cladding", "air", "-wavelengths", "600").Notes {
		assert.NotContains(t, note, "vacuum")
	}
}

// A mode that is guided in theory only is not shown without a word.
func TestBarelyGuided(t *testing.T) {
	r := reportOf(t, "-radius", "0.1")
	require.Len(t, r.Notes, 2)
	assert.Contains(t, r.Notes[0], "At 1310 nm V is 0.0647")
	assert.Contains(t, r.Notes[0], "barely guided")
	assert.NotEmpty(t, r.Zeros)
	assert.Contains(t, r.Notes[0], "less than 0.01 %")
	_, out, _ := do("-radius", "0.1", "-wavelengths", "1310")
	assert.Contains(t, strings.Join(strings.Fields(out), " "), r.Notes[0])
	assert.Contains(t, reportOf(t, "-radius", "0.9", "-wavelengths", "1310").Notes[0], " 0.054 %")
	assert.Empty(t, reportOf(t, "-radius", "1.5", "-wavelengths", "1310").Notes)
}

// Where the indices of core and cladding cross, the zero of dispersion is searched where
// the core guides and the sheet says where that is.
func TestCoreThatStopsGuiding(t *testing.T) {
	for _, c := range []struct {
		args     []string
		from, to bool // the core's index crosses the cladding's at that end
		zeros    int
	}{
		{[]string{"-core", "phosphorus-silica-9.1-measured", "-cladding", "germania-silica", "-cladding-fraction", "0.1"}, false, true, 1},
		{[]string{"-core", "germania-silica", "-fraction", "0.1", "-cladding", "phosphorus-silica-9.1-measured", "-wavelengths", "1800"}, true, false, 0},
		{[]string{"-core", "silica-by-group-index", "-cladding", "silica", "-wavelengths", "1000"}, false, true, 0},
	} {
		args := append([]string{"-temperature", "20", "-radius", "8", "-wavelengths", "1000"}, c.args...)
		r := reportOf(t, args...)
		require.Len(t, r.Searched, 1, args)
		assert.Len(t, r.Zeros, c.zeros, args)
		fibre, err := r.Recipe.fibre()
		require.NoError(t, err)
		guides := func(x float64) bool {
			_, err := fibre.V(x)
			if err != nil {
				require.ErrorIs(t, err, numap.ErrNotGuiding)
			}
			return err == nil
		}
		s := r.Searched[0]
		assert.True(t, guides(s.From) && guides(s.To), args)
		assert.Equal(t, c.from, s.From > max(zeroFrom, r.Wavelength.From), args)
		assert.Equal(t, c.to, s.To < r.Wavelength.To, args)
		assert.Equal(t, c.from, !guides(s.From*(1-3e-6)) && s.From > zeroFrom, args)
		if c.to {
			assert.False(t, guides(s.To*(1+3e-6)), args)
		}
		for _, x := range r.Zeros {
			assert.True(t, x > s.From && x < s.To)
			found, err := dispersion.At(fibre.LP(0, 1), x)
			require.NoError(t, err)
			assert.InDelta(t, 0, found.D, 1e-15)
		}
	}
}

// No zero in the range is an empty list, not null.
func TestNoZeros(t *testing.T) {
	_, out, _ := do("-core", "polycarbonate", "-cladding", "pmma", "-wavelengths", "650", "-format", "json")
	assert.Contains(t, out, `"zero_dispersion_wavelengths_m": [],`)
	_, out, _ = do("-core", "polycarbonate", "-cladding", "pmma", "-wavelengths", "650")
	assert.Contains(t, out, "none\n  (searched from 800 to 1052 nm, where the core guides)")
	_, out, _ = do("-format", "json")
	assert.Contains(t, out, `"notes": []`)
}

// The search goes as far as both glasses do. Germania's own zero, 1.74 um (J. W. Fleming,
// Appl. Opt. 23, 4486, 1984; from memory), is near that of a wide core of it.
func TestZeroSearchReachesAsFarAsTheGlasses(t *testing.T) {
	r := reportOf(t, "-core", "arsenic-trisulfide", "-cladding", "fluoride-glass", "-radius", "1")
	assert.Equal(t, []span{{0.8e-6, 3.5e-6}}, r.Searched)
	require.Len(t, r.Zeros, 1)
	assert.Greater(t, r.Zeros[0], 2e-6)
	thin := reportOf(t, "-core", "germania", "-radius", "1.2", "-temperature", "20")
	assert.Len(t, thin.Zeros, 3) // two of them beyond 2 um
	wide := reportOf(t, "-core", "germania", "-radius", "80", "-temperature", "20")
	require.Len(t, wide.Zeros, 1)
	assert.InDelta(t, 1.74e-6, wide.Zeros[0], 0.01e-6)
}

func TestPrintable(t *testing.T) {
	assert.Equal(t, "plain name 50 % äμ", printable("plain name 50 % äμ"))
	assert.Equal(t, `a\tb\n\x1b[31m\u202e\u0085`, printable("a\tb\n\x1b[31m\u202e\u0085"))
	file := filepath.Join(t.TempDir(), "fibre.json")
	require.NoError(t, os.WriteFile(file, []byte(`{"name": "red \u001b[31m\nname"}`), 0o600))
	_, out, _ := do("-recipe", file)
	assert.True(t, strings.HasPrefix(out, `red \x1b[31m\nname`+"\n"), out[:40])
	_, _, errOut := do("-recipe", "absent\x1b.json")
	assert.Contains(t, errOut, `absent\x1b.json`)
}

type full struct{}

func (full) Write([]byte) (int, error) { return 0, errors.New("no space left") }

// Whatever is to be written, failing at it is exit code 1.
func TestOutputFailure(t *testing.T) {
	for _, args := range [][]string{nil, {"-format", "json"}, {"-format", "csv"}, {"-glasses"}, {"-h"}} {
		var errOut bytes.Buffer
		assert.Equal(t, 1, run(args, full{}, &errOut), args)
		assert.Equal(t, "datasheet: no space left\n", errOut.String())
	}
}

func TestRecipeFile(t *testing.T) {
	file := filepath.Join(t.TempDir(), "fibre.json")
	require.NoError(t, os.WriteFile(file, []byte(`{"name": "test", "core": {"glass": "silica"},
		"cladding": {"glass": "fluorine-silica", "fraction": 0.02}, "wavelengths_nm": [1064]}`), 0o600))
	r := reportOf(t, "-recipe", file)
	assert.Equal(t, "test", r.Recipe.Name)
	assert.Less(t, r.At[0].Cladding, r.At[0].Core)
	assert.Equal(t, demo().CoreRadius, r.Recipe.CoreRadius)

	// A glass is taken whole.
	require.NoError(t, os.WriteFile(file, []byte(`{"core": {"glass": "germania"}, "wavelengths_nm": [1064, 1550]}`), 0o600))
	r = reportOf(t, "-recipe", file)
	assert.Zero(t, r.Recipe.Core.Fraction)
	assert.Equal(t, []float64{1064, 1550}, r.Recipe.Wavelengths)
	assert.Equal(t, file, r.Recipe.Name)

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
		{[]string{"-fraction", "0"}, "the core (germania-silica) guides no light: its index 1.446719 is not above the 1.446719 of the cladding (silica)"},
		{[]string{"-core", "silica", "-cladding", "germania"}, "cladding (germania)"},
		{[]string{"-core", "unobtainium"}, "unobtainium"},
		{[]string{"-cladding", "water", "-temperature", "60"}, "temperature = 60 C: water is known from 0 to 30 C"},
		{[]string{"-temperature", "-300"}, "temperature = -300 C: must be finite and above -273.15 C"},
		{[]string{"-temperature", "NaN"}, "temperature = NaN C"},
		{[]string{"-temperature", "+Inf"}, "temperature = +Inf C"},
		{[]string{"-wavelengths", "1310,x"}, "\"x\" is not a number"},
		{[]string{"-wavelengths", "1310,"}, "a number is missing"},
		{[]string{"-wavelengths", ""}, "a number is missing"},
		{[]string{"-wavelengths", "0"}, "wavelength"},
		{[]string{"-wavelengths", "12000"}, "wavelength = 12000 nm: the data of germania-silica and silica hold from 360 to 3370 nm together"},
		{[]string{"-radius", "30000"}, "v"},
		{[]string{"-format", "xml"}, "xml"},
		{[]string{"-modes", "-1"}, "modes"},
		{[]string{"-nonsense"}, "nonsense"},
		{[]string{"more"}, "more"},
		{[]string{"-recipe", filepath.Join(dir, "absent.json")}, "absent.json"},
		{[]string{"-recipe", file("broken.json", "{")}, "broken.json: the recipe breaks off"},
		{[]string{"-recipe", file("empty.json", "")}, "empty.json: the file is empty"},
		{[]string{"-recipe", file("blank.json", " \n")}, "the file is empty"},
		{[]string{"-recipe", file("null.json", "null")}, "a recipe is an object"},
		{[]string{"-recipe", file("list.json", "[1]")}, "a recipe is an object"},
		{[]string{"-recipe", file("syntax.json", "{radius}")}, "syntax.json: invalid character"},
		{[]string{"-recipe", file("bracket.json", `{"core_radius_um":4}]`)}, "text after the recipe"},
		{[]string{"-recipe", file("brace.json", `{"core_radius_um":4}}`)}, "text after the recipe"},
		{[]string{"-recipe", file("nulls.json", `{"wavelengths_nm":[1200,null]}`)}, "wavelengths_nm[1] is null"},
		{[]string{"-recipe", file("nullr.json", `{"core_radius_um":null}`)}, "core_radius_um is null"},
		{[]string{"-recipe", file("nullc.json", `{"core":{"glass":null}}`)}, "core.glass is null"},
		{[]string{"-recipe", file("kind.json", `{"core": "silica"}`)}, "core is of type string and must be an object"},
		{[]string{"-recipe", file("kind2.json", `{"core_radius_um": "4"}`)}, "core_radius_um is of type string and must be a number"},
		{[]string{"-recipe", file("kind3.json", `{"core": {"fraction": []}}`)}, "core.fraction is of type array and must be a number"},
		{[]string{"-recipe", file("kind4.json", `{"wavelengths_nm": 1550}`)}, "wavelengths_nm is of type number and must be a list"},
		{[]string{"-recipe", file("kind5.json", `{"name": 5}`)}, "name is of type number and must be a text"},
		{[]string{"-recipe", file("huge.json", `{"core_radius_um": 1e999}`)}, "number 1e999 does not fit"},
		{[]string{"-recipe", file("inner.json", `{"core": {"colour": "red"}}`)}, "colour"},
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
	for _, line := range strings.Split(out, "\n") {
		assert.LessOrEqual(t, len(line), 80, line)
	}
	help := out
	code, out, _ = do("-glasses")
	assert.Zero(t, code)
	for _, e := range materials.Catalogue() {
		assert.Contains(t, help, e.Name)
		assert.Contains(t, out, e.Name)
	}
	rows := map[string][]string{}
	for _, line := range strings.Split(strings.TrimSpace(out), "\n") {
		cells := regexp.MustCompile(" {2,}").Split(line, -1)
		require.Len(t, cells, 7, line)
		rows[cells[0]] = cells
	}
	assert.Equal(t, []string{"index at (C)", "and at (C)"}, rows["glass"][3:5])
	assert.Equal(t, []string{"20", "-60 to 828"}, rows["germania-silica"][3:5])
	assert.Equal(t, []string{"25", "not known"}, rows["arsenic-trisulfide"][3:5])
	assert.Equal(t, []string{"15", "-40 to 80"}, rows["air"][3:5])
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
