package modes

import (
	"bytes"
	"errors"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
)

// pair returns the glasses of a fraction of germania (above 0) or fluorine (below).
func pair(t *testing.T, x float64) materials.Medium {
	t.Helper()
	if x < 0 {
		g, err := materials.FluorineSilica(-x)
		require.NoError(t, err)
		return g
	}
	g, err := materials.GermaniaSilicaBySunak(x)
	require.NoError(t, err)
	return g
}

func indexOf(t *testing.T, m materials.Medium, wavelength float64) float64 {
	t.Helper()
	n, err := materials.Index(m, wavelength)
	require.NoError(t, err)
	return n
}

// A table of a known composition, measured at 633 nm, is that fibre at every wavelength.
func TestMeasuredSteps(t *testing.T) {
	const x = 633e-9
	core, trench, host := pair(t, 0.05), pair(t, -0.01), pair(t, 0)
	a, b, c := indexOf(t, core, x), indexOf(t, trench, x), indexOf(t, host, x)
	want := Layered{Layers: []Layer{{Outer: 4e-6, Glass: core}, {Outer: 8e-6, Glass: host}, {Outer: 11e-6, Glass: trench}}, Cladding: host}
	marked := Measured{Wavelength: x, Points: []MeasuredPoint{{0, a}, {4e-6, a}, {4e-6, c}, {8e-6, c}, {8e-6, b}, {11e-6, b}, {11e-6, c}}}
	found := Measured{Wavelength: x, Jump: 2e-3, Points: []MeasuredPoint{{0, a}, {2e-6, a}, {3.9e-6, a}, {4.1e-6, c}, {7.9e-6, c}, {8.1e-6, b},
		{10.9e-6, b}, {11.1e-6, c}}}
	for _, table := range []Measured{marked, found} {
		f, err := table.Fibre()
		require.NoError(t, err)
		for _, w := range []float64{0.85e-6, 1.31e-6, 1.55e-6} {
			p, err := want.LP(0, 1).Taylor(w)
			require.NoError(t, err)
			q, err := f.LP(0, 1).Taylor(w)
			require.NoError(t, err)
			assert.InDelta(t, p[0], q[0], 1e-12)
			assert.InEpsilon(t, p[1], q[1], 1e-9)
		}
	}
}

// graded is a core whose composition falls as a parabola from germania to fluorine, in n
// intervals; its glasses are those of the table.
func graded(t *testing.T, wavelength float64, n int) (Measured, Layered) {
	composition := func(r float64) float64 { return 0.08 - 0.09*(r/10e-6)*(r/10e-6) }
	table := Measured{Wavelength: wavelength}
	for i := range n + 1 {
		r := 10e-6 * float64(i) / float64(n)
		table.Points = append(table.Points, MeasuredPoint{r, indexOf(t, pair(t, composition(r)), wavelength)})
	}
	vary := func(r float64) (materials.Medium, error) {
		if x := composition(r); x < 0 {
			return materials.FluorineSilica(-x)
		} else {
			return materials.GermaniaSilicaBySunak(x)
		}
	}
	zero := 10e-6 * math.Sqrt(0.08/0.09)
	return table, Layered{Layers: []Layer{{Outer: zero, Vary: vary}, {Outer: 10e-6, Vary: vary}}, Cladding: pair(t, composition(10e-6))}
}

// The effective index tends to that of the composition the table was taken from, at least
// in the second order of the spacing, and the estimate covers the error.
func TestMeasuredConverges(t *testing.T) {
	before := 0.0
	for _, n := range []int{8, 16, 32, 64} {
		table, exact := graded(t, 633e-9, n)
		f, err := table.Fibre()
		require.NoError(t, err)
		worst := 0.0
		for _, lm := range [][2]int{{0, 1}, {1, 1}, {0, 2}, {2, 1}} {
			p, err := exact.LP(lm[0], lm[1]).Taylor(1.31e-6)
			require.NoError(t, err)
			q, err := f.LP(lm[0], lm[1]).Taylor(1.31e-6)
			require.NoError(t, err)
			e, err := table.Error(lm[0], lm[1], 1.31e-6, 1e-4)
			require.NoError(t, err)
			off := math.Abs(p[0] - q[0])
			worst = math.Max(worst, off)
			assert.Greater(t, e.Interpolation, off)
		}
		t.Logf("%3d intervals: %.1e", n, worst)
		if before > 0 {
			assert.Greater(t, before/worst, 3.5)
		}
		before = worst
	}
}

// Noise against the scatter of the effective index over noisy tables.
func TestMeasuredNoise(t *testing.T) {
	const noise = 2e-5
	table, _ := graded(t, 633e-9, 20)
	e, err := table.Error(0, 1, 1.55e-6, noise)
	require.NoError(t, err)
	random := rand.New(rand.NewPCG(1, 2))
	sum, square := 0.0, 0.0
	const trials = 300
	for range trials {
		other := table
		other.Points = append([]MeasuredPoint(nil), table.Points...)
		for i := range other.Points {
			other.Points[i].Index += noise * random.NormFloat64()
		}
		f, err := other.Fibre()
		require.NoError(t, err)
		n, err := f.LP(0, 1).Solve(1.55e-6)
		require.NoError(t, err)
		s, err := f.section("", 1.55e-6)
		require.NoError(t, err)
		index := effectiveOf(s.cladding[0], n.B*s.highest)
		sum, square = sum+index, square+index*index
	}
	mean := sum / trials
	scatter := math.Sqrt(square/trials - mean*mean)
	// 4 % is one standard deviation of the scatter of 300.
	assert.InEpsilon(t, scatter, e.Noise, 0.16)
}

// No composition leaves the interval of the two points around it.
func TestMeasuredInventsNothing(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 4))
	table := Measured{Wavelength: 1.55e-6}
	r := 0.0
	for range 60 {
		table.Points = append(table.Points, MeasuredPoint{r, 1.443 + 0.012*random.Float64()})
		r += (0.02 + random.Float64()) * 1e-7
	}
	f, between, err := table.fibre("")
	require.NoError(t, err)
	inside := 0.0
	for i, l := range f.Layers {
		a, b := table.Points[between[i][0]].Index, table.Points[between[i][1]].Index
		for k := range 21 {
			g, err := l.Vary(inside + (l.Outer-inside)*float64(k)/20)
			require.NoError(t, err)
			n := indexOf(t, g, 1.55e-6)
			assert.GreaterOrEqual(t, n, math.Min(a, b)-2e-14)
			assert.LessOrEqual(t, n, math.Max(a, b)+2e-14)
		}
		inside = l.Outer
	}
}

func TestMeasuredSmoothing(t *testing.T) {
	const noise = 1e-4
	table, exact := graded(t, 633e-9, 200)
	random := rand.New(rand.NewPCG(5, 6))
	for i := range table.Points {
		table.Points[i].Index += noise * random.NormFloat64()
	}
	table.Points = append(table.Points, MeasuredPoint{10e-6, 1.457}, MeasuredPoint{12e-6, 1.457})
	// The amount is the rms move; what is left is nearer to the truth than the noise.
	list := table.stretches()
	require.Len(t, list, 2)
	require.NoError(t, smooth(list, noise))
	moved, off := 0.0, 0.0
	inside := 0
	for i, n := range list[0].n {
		moved += math.Pow(n-table.Points[i].Index, 2)
		if r := list[0].r[i]; r > 0 && r < 9e-6 {
			g, err := exact.Layers[0].Vary(r)
			require.NoError(t, err)
			off += math.Pow(n-indexOf(t, g, 633e-9), 2)
			inside++
		}
	}
	assert.InEpsilon(t, noise, math.Sqrt(moved/float64(len(table.Points))), 1e-4)
	assert.Less(t, math.Sqrt(off/float64(inside)), noise/3)
	assert.Equal(t, []float64{1.457, 1.457}, list[1].n)

	// A large amount leaves the line of least squares: through 0, 1, 0, 1 it rises from
	// 1/5 to 4/5.
	line := []stretch{{r: []float64{0, 1, 2, 3}, n: []float64{0, 1, 0, 1}, end: 3}}
	require.NoError(t, smooth(line, 10))
	for i, want := range []float64{0.2, 0.4, 0.6, 0.8} {
		assert.InDelta(t, want, line[0].n[i], 1e-14)
	}
}

func TestMeasuredErrors(t *testing.T) {
	good := []MeasuredPoint{{0, 1.45}, {4e-6, 1.45}, {4e-6, 1.444}}
	fleming, err := materials.Lookup("germania-silica")
	require.NoError(t, err)
	fluorine, err := materials.Lookup("fluorine-silica")
	require.NoError(t, err)
	for want, table := range map[string]Measured{
		"Wavelength = 0":               {Points: good},
		"len(Points) = 1":              {Wavelength: 1e-6, Points: good[:1]},
		"Jump = -1":                    {Wavelength: 1e-6, Points: good, Jump: -1},
		"Smoothing = NaN":              {Wavelength: 1e-6, Points: good, Smoothing: math.NaN()},
		"Points[0].Radius = 1e-06":     {Wavelength: 1e-6, Points: []MeasuredPoint{{1e-6, 1.45}, {2e-6, 1.45}}},
		"Points[1].Radius = 0":         {Wavelength: 1e-6, Points: []MeasuredPoint{{0, 1.45}, {0, 1.45}}},
		"Points[2].Radius = 1e-06":     {Wavelength: 1e-6, Points: []MeasuredPoint{{0, 1.45}, {2e-6, 1.45}, {1e-6, 1.45}}},
		"Points[1].Index = 0":          {Wavelength: 1e-6, Points: []MeasuredPoint{{0, 1.45}, {2e-6, 0}}},
		"Points[1], index 2":           {Wavelength: 1e-6, Points: []MeasuredPoint{{0, 1.45}, {2e-6, 2}}},
		"outside":                      {Wavelength: 3e-6, Points: good},
		"they must be the same":        {Wavelength: 1.5e-6, Points: good, Raising: fleming, Lowering: fluorine},
		"no family is given for an in": {Wavelength: 1.55e-6, Points: []MeasuredPoint{{0, 1.45}, {2e-6, 1.44}}, Raising: fleming},
	} {
		_, err := table.Fibre()
		assert.ErrorContains(t, err, want)
		_, err = table.Error(0, 1, 1.55e-6, 1e-5)
		assert.Error(t, err)
	}
	_, err = Measured{Wavelength: 1e-6, Points: good}.Error(0, 1, 1.55e-6, -1)
	assert.ErrorContains(t, err, "noise = -1")
	_, err = Measured{Wavelength: 1e-6, Points: []MeasuredPoint{{0, 1.45}, {2e-6, 2}}}.Fibre()
	assert.ErrorIs(t, err, materials.ErrNoFraction)
	_, err = Measured{Wavelength: 3e-6, Points: good}.Fibre()
	assert.ErrorIs(t, err, materials.ErrRange)
	_, err = Measured{Wavelength: 1e-6, Points: good, Raising: fleming}.Fibre()
	assert.ErrorIs(t, err, materials.ErrNoFraction) // 1.444 is below silica at 1 um
}

func TestReadMeasured(t *testing.T) {
	table, err := ReadMeasured(strings.NewReader("\ufeffradius_um,index_at_1550_nm\r\n0, 1.45\r\n\r\n 4.1 ,1.445\n4.1,1.44e0"))
	require.NoError(t, err)
	assert.Equal(t, Measured{Wavelength: 1550e-9, Points: []MeasuredPoint{{0, 1.45}, {4.1e-6, 1.445}, {4.1e-6, 1.44}}}, table)
	const head = "radius_um,index_at_633_nm\n"
	for text, want := range map[string]string{
		"":                                   "the text is empty",
		"\n\nradius,index\n":                 "line 3: the header",
		"radius_um,index_at__nm":             `line 1: the wavelength is ""`,
		"radius_um,index_at_0_nm":            `line 1: the wavelength is "0"`,
		head + "0":                           "line 2: \"0\" must be two numbers",
		head + "0,1,2":                       "line 2: \"0,1,2\" must be two numbers",
		head + "0,1.45\nx,1":                 `line 3: the radius is "x"`,
		head + "0,1.45\n1,NaN":               `line 3: the index is "NaN"`,
		head + "0,1.45\n1,1e9999":            `line 3: the index is "1e9999"`,
		head + "0,1.45\n1,0x1p3":             `line 3: the index is "0x1p3"`,
		head + "0,1.45":                      "len(Points) = 1",
		head + "0,1.45\n\n2,1.4\n1,1.4":      "line 5: Points[2].Radius",
		head + "0,1.45\n2,-1.4":              "line 3: Points[1].Index",
		head + strings.Repeat("x", 1e5):      "line 2: ",
		head + strings.Repeat("0,1\n", 1001): "line 1002: more than 1000 points",
	} {
		_, err := ReadMeasured(strings.NewReader(text))
		assert.ErrorContains(t, err, want)
		if err != nil {
			assert.NotContains(t, err.Error(), "\n")
		}
	}
	assert.Error(t, Measured{}.Write(&bytes.Buffer{}))
	assert.ErrorIs(t, Measured{Wavelength: 1e-6, Points: []MeasuredPoint{{0, 1}, {1e-6, 1}}}.Write(broken{}), errBroken)
}

var errBroken = errors.New("broken")

type broken struct{}

func (broken) Write([]byte) (int, error) { return 0, errBroken }

// Any table comes back as it was, bit for bit.
func TestMeasuredRoundTrip(t *testing.T) {
	random := rand.New(rand.NewPCG(7, 8))
	for range 200 {
		table := Measured{Wavelength: math.Exp(random.NormFloat64()*100 - 13)}
		r := 0.0
		for range 10 {
			table.Points = append(table.Points, MeasuredPoint{r, 1 + random.Float64()})
			r += math.Exp(random.NormFloat64()*20 - 13)
		}
		var text bytes.Buffer
		if table.check("") != nil {
			continue
		}
		require.NoError(t, table.Write(&text))
		back, err := ReadMeasured(&text)
		require.NoError(t, err)
		require.Equal(t, table, back)
	}
}

func FuzzReadMeasured(f *testing.F) {
	for _, s := range []string{"", "radius_um,index_at_1550_nm\n0,1.45\n4,1.45\n4,1.444\n", "radius_um,index_at_5e-324_nm\n0,1\n1e-300,1e300",
		"radius_um,index_at_1e3_nm\n0,1.46\n1,1.45\n2,1.452\n-1,2", "radius_um,index_at_NaN_nm\n+Inf,-0"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		table, err := ReadMeasured(strings.NewReader(s))
		if err != nil {
			return
		}
		var text bytes.Buffer
		require.NoError(t, table.Write(&text))
		back, err := ReadMeasured(&text)
		require.NoError(t, err)
		require.Equal(t, table, back)
	})
}

func FuzzMeasured(f *testing.F) {
	for _, x := range seeds {
		f.Add(1.55e-6, 4e-6, 1.45, 1.444, x, 0.0, 1e-5)
		f.Add(x, 4e-6, 1.45, 1.444, 0.0, 0.0, 1e-5)
		f.Add(1.3e-6, x, 1.45, 1.44, 0.0, 1e-3, 1e-5)
		f.Add(1.3e-6, 4e-6, x, 1.44, 0.0, 0.0, 1e-5)
		f.Add(1.3e-6, 4e-6, 1.46, 1.44, 0.0, x, x)
	}
	f.Fuzz(func(t *testing.T, wavelength, r, a, b, smoothing, jump, noise float64) {
		table := Measured{Wavelength: wavelength, Smoothing: smoothing, Jump: jump,
			Points: []MeasuredPoint{{0, a}, {r / 2, b}, {r / 1.5, a}, {r, a}, {r, b}, {2 * r, b}}}
		e, err := table.Error(0, 1, 1.55e-6, noise)
		if err == nil && !(e.Interpolation >= 0 && e.Noise >= 0 && e.Interpolation+e.Noise <= math.MaxFloat64) {
			t.Errorf("%+v", e)
		}
	})
}
