package radial_test

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/reftable"
	"glassthread/materials/taylor"
	"glassthread/modes"
	"glassthread/modes/radial"
)

// power is f = 1 - R^alpha.
func power(alpha float64) radial.Profile {
	f := func(r float64) float64 {
		if r == 0 {
			return 1
		}
		return -math.Expm1(alpha * math.Log(r))
	}
	return radial.Profile{Pieces: []radial.Piece{{To: 1, F: f, Graded: alpha != math.Trunc(alpha)}}}
}

// layers is a profile of constant f up to each outer radius.
func layers(ends, f []float64) (p radial.Profile) {
	at := 0.0
	for i, end := range ends {
		p.Pieces = append(p.Pieces, radial.Piece{From: at, To: end, F: func(float64) float64 { return f[i] }})
		at = end
	}
	return p
}

func step() radial.Profile { return layers([]float64{1}, []float64{1}) }

// named reads a profile as the tables write it.
func named(t testing.TB, name string) radial.Profile {
	number := func(s string) float64 {
		x, err := strconv.ParseFloat(s, 64)
		require.NoError(t, err, name)
		return x
	}
	if alpha, ok := strings.CutPrefix(name, "power:"); ok {
		return power(number(alpha))
	}
	switch name {
	case "parabola":
		return power(2)
	case "triangle":
		return power(1)
	}
	var ends, f []float64
	for _, layer := range strings.Split(name, ";") {
		end, value, _ := strings.Cut(layer, ":")
		ends, f = append(ends, number(end)), append(f, number(value))
	}
	return layers(ends, f)
}

func guided(t testing.TB, p radial.Profile, v float64) []radial.Mode {
	list, err := radial.Guided(p, v)
	require.NoError(t, err)
	return list
}

func entry(list []radial.Mode, l, m int) (radial.Mode, bool) {
	for _, e := range list {
		if e.L == l && e.M == m {
			return e, true
		}
	}
	return radial.Mode{}, false
}

// b of every row of the tables of testdata, by Solve and by Guided alike. The tables are made
// by testdata/radial.py in arbitrary precision by other methods: Kummer and cylinder
// functions and power series.
func TestBAgainstTables(t *testing.T) {
	for _, table := range []struct {
		file     string
		rows     int
		complete float64 // the v up to which the table has every mode
		limit    float64 // of the error of b
	}{
		{"parabola", 290, 0, 1e-13},
		{"layers", 490, 19.9, 1e-12},
		{"power", 170, 6, 1e-12},
	} {
		type key struct {
			profile string
			v       float64
		}
		lists := map[key][]radial.Mode{}
		seen := map[key]int{}
		var solved, listed reftable.Errors
		for _, r := range reftable.Read(t, "testdata/"+table.file+".csv", table.rows) {
			k := key{"parabola", r.Float("v")}
			switch table.file {
			case "layers":
				k.profile = r.Text("profile")
			case "power":
				k.profile = "power:" + r.Text("alpha")
			}
			p := named(t, k.profile)
			l, m := r.Int("l"), r.Int("m")
			if lists[k] == nil {
				lists[k] = guided(t, p, k.v)
			}
			if r.Float("b") < 2e-13 {
				continue // as good as at cut-off
			}
			seen[k]++
			one, err := radial.Solve(p, k.v, l, m)
			require.NoError(t, err, r)
			solved.Add(math.Abs(r.Difference("b", one.B)), r)
			other, ok := entry(lists[k], l, m)
			require.True(t, ok, r)
			listed.Add(math.Abs(r.Difference("b", other.B)), r)
		}
		solved.Check(t, table.file+", b by Solve", table.limit)
		listed.Check(t, table.file+", b by Guided", table.limit)
		whole := 0
		for k, n := range seen {
			if k.v <= table.complete {
				assert.Len(t, lists[k], n, "%+v", k)
				whole++
			}
		}
		if table.complete > 0 {
			assert.Greater(t, whole, 5)
		}
	}
}

// The table has every mode of the parabola at these v.
func TestParabolaListIsComplete(t *testing.T) {
	seen := map[float64]int{}
	for _, r := range reftable.Read(t, "testdata/parabola.csv", 290) {
		seen[r.Float("v")]++
	}
	for _, v := range []float64{3.6, 5, 7.3, 10, 15, 20, 27} {
		assert.Len(t, guided(t, power(2), v), seen[v], "V = %v", v)
	}
}

// Cut-offs against mpmath (testdata/radial.py).
func TestCutoffVAgainstTable(t *testing.T) {
	var err reftable.Errors
	for _, r := range reftable.Read(t, "testdata/cutoff.csv", 130) {
		v, e := radial.CutoffV(named(t, r.Text("profile")), r.Int("l"), r.Int("m"))
		require.NoError(t, e, r)
		err.Add(r.Relative("v", v), r)
	}
	err.Check(t, "cut-off V", 2e-12)
}

// inV is the series in v of V^2 f.
func inV(p radial.Profile, v float64) func(int, float64) (taylor.Series, error) {
	square := taylor.Variable(v).Square()
	return func(piece int, r float64) (taylor.Series, error) { return square.Scale(p.Pieces[piece].F(r)), nil }
}

// derivatives returns d(Vb)/dV and V d2(Vb)/dV2.
func derivatives(t testing.TB, p radial.Profile, v float64, l, m int) (b1, b2 float64) {
	_, lambda, err := radial.Series(p, v, l, m, inV(p, v))
	require.NoError(t, err)
	vb := lambda.Quo(taylor.Variable(v))
	return vb[1], 2 * v * vb[2]
}

// d(Vb)/dV and V d2(Vb)/dV2 of the parabola against mpmath (testdata/radial.py).
func TestSeriesAgainstTable(t *testing.T) {
	var first, second, near1, near2 reftable.Errors
	for _, r := range reftable.Read(t, "testdata/parabola.csv", 290) {
		b := r.Float("b")
		if b < 1e-10 {
			continue
		}
		b1, b2 := derivatives(t, power(2), r.Float("v"), r.Int("l"), r.Int("m"))
		e1 := math.Abs(r.Difference("vb1", b1)) / math.Max(1, math.Abs(r.Float("vb1")))
		e2 := math.Abs(r.Difference("vb2", b2)) / math.Max(1, math.Abs(r.Float("vb2")))
		if b > 1e-4 {
			first.Add(e1, r)
			second.Add(e2, r)
		} else {
			// The error of b, some 1e-14, is all the more of so small a b.
			near1.Add(e1*b, r)
			near2.Add(e2*b, r)
		}
	}
	first.Check(t, "parabola, d(Vb)/dV", 1e-11)
	second.Check(t, "parabola, V d2(Vb)/dV2, relative above 1", 1e-10)
	near1.Check(t, "parabola, d(Vb)/dV times b, b below 1e-4", 1e-15)
	near2.Check(t, "parabola, V d2(Vb)/dV2 times b, b below 1e-4", 1e-14)
}

// One layer of f = 1 against the Bessel functions of the step-index fibre.
func TestStepAgainstSolveLP(t *testing.T) {
	var row reftable.Row
	var b, b1, b2 reftable.Errors
	for _, v := range []float64{0.5, 0.9, 1.7, 2.4, 2.5, 4, 7, 12, 25, 40, 64, 100} {
		want, err := modes.GuidedLP(v)
		require.NoError(t, err)
		got := guided(t, step(), v)
		if v > 0.7 {
			require.Len(t, got, len(want), "V = %v", v)
		}
		for i, w := range want {
			if w.B < 1e-11 {
				continue
			}
			g, ok := entry(got, w.L, w.M)
			require.True(t, ok, "%+v", w)
			require.InDelta(t, w.B, g.B, 1e-12, "%+v", w)
			b.Add(math.Abs(w.B-g.B), row)
			if v < 30 && i%3 == 0 && w.B > 1e-4 {
				d1, d2 := derivatives(t, step(), v, w.L, w.M)
				b1.Add(math.Abs(d1-w.GroupCurve()), row)
				b2.Add(math.Abs(d2-w.DispersionCurve())/math.Max(1, math.Abs(w.DispersionCurve())), row)
			}
		}
	}
	b.Check(t, "step, b", 2e-13)
	b1.Check(t, "step, d(Vb)/dV", 1e-12)
	b2.Check(t, "step, V d2(Vb)/dV2, relative above 1", 1e-12)
}

// b = 1 - 2(2m + l - 1)/V for an unbounded parabola: Laguerre-Gauss modes (M. J. Adams, An
// Introduction to Optical Waveguides, 1981). The cut at R = 1 is not felt by the lowest
// modes, whose power there is of the order of exp(-V).
func TestUnboundedParabola(t *testing.T) {
	for _, v := range []float64{50, 80, 150} {
		for l := range 4 {
			for m := 1; m <= 3; m++ {
				p, err := radial.Solve(power(2), v, l, m)
				require.NoError(t, err)
				assert.InDelta(t, 1-2*float64(2*m+l-1)/v, p.B, 1e-12, "V = %v, LP(%d,%d)", v, l, m)
			}
		}
	}
}

// W. A. Gambling, D. N. Payne and H. Matsumura, Electron. Lett. 13, 139 (1977) (from memory,
// the parabola recomputed with Kummer functions); 2.405 sqrt(1 + 2/alpha) is their
// approximation.
func TestPublishedCutoffs(t *testing.T) {
	for _, c := range []struct{ alpha, v, delta float64 }{{2, 3.518, 6e-4}, {1, 4.381, 6e-4}} {
		v, err := radial.CutoffV(power(c.alpha), 1, 1)
		require.NoError(t, err)
		assert.InDelta(t, c.v, v, c.delta)
	}
	for _, alpha := range []float64{1, 1.5, 2, 3, 6, 10, 30, 100} {
		v, err := radial.CutoffV(power(alpha), 1, 1)
		require.NoError(t, err)
		assert.InEpsilon(t, 2.405*math.Sqrt(1+2/alpha), v, 0.055, "alpha = %v", alpha)
	}
}

// A power-law core guides [alpha/(alpha + 2)] V^2/2 modes when many (D. Gloge and E. A. J.
// Marcatili, Bell Syst. Tech. J. 52, 1563, 1973), counting polarisations and orientations. The
// rest falls like 1/V.
func TestModeCountAtLargeV(t *testing.T) {
	for _, alpha := range []float64{1, 2, 4, 10} {
		for _, v := range []float64{30, 60, 90} {
			n := 0
			for _, e := range guided(t, power(alpha), v) {
				n += modes.LP(e).Degeneracy()
			}
			assert.InEpsilon(t, alpha/(alpha+2)*v*v/2, n, 5/v, "alpha = %v, V = %v: %d", alpha, v, n)
		}
	}
}

// The fundamental mode of a W fibre is cut off where the mean of f R is negative, and only there.
func TestFundamentalCutoff(t *testing.T) {
	// 0.5^2 - 0.75 depth changes sign at 1/3.
	v, err := radial.CutoffV(layers([]float64{0.5, 1}, []float64{1, -0.3}), 0, 1)
	require.NoError(t, err)
	assert.Zero(t, v)
	before := 0.0
	for _, depth := range []float64{0.35, 0.4, 0.6, 0.9} {
		p := layers([]float64{0.5, 1}, []float64{1, -depth})
		v, err := radial.CutoffV(p, 0, 1)
		require.NoError(t, err)
		assert.Greater(t, v, before)
		before = v
		_, err = radial.Solve(p, v*0.999, 0, 1)
		assert.ErrorIs(t, err, radial.ErrCutoff)
		assert.Empty(t, guided(t, p, v*0.999))
		// LP01 rises from its cut-off like exp(-1/(V - cut-off)): b passes 1e-13 well above.
		_, err = radial.Solve(p, v+1, 0, 1)
		assert.NoError(t, err)
		// At b = 0 the field is J_0(V R) up to R = 1/2 and flat at R = 1.
		s := v * math.Sqrt(depth)
		inside := -v * math.J1(v/2) / math.J0(v/2)
		assert.InDelta(t, flat(s), inside, 1e-9*math.Abs(inside)+1e-9, "depth %v", depth)
	}
}

// flat integrates psi” + psi'/R = s^2 psi from R = 1, psi' = 0, in to R = 1/2 and returns
// psi'/psi there (Runge-Kutta of fourth order).
func flat(s float64) float64 {
	const n = 4000
	h := -0.5 / n
	r, y, d := 1.0, 1.0, 0.0
	f := func(r, y, d float64) (float64, float64) { return d, s*s*y - d/r }
	for range n {
		a, b := f(r, y, d)
		a2, b2 := f(r+h/2, y+h/2*a, d+h/2*b)
		a3, b3 := f(r+h/2, y+h/2*a2, d+h/2*b2)
		a4, b4 := f(r+h, y+h*a3, d+h*b3)
		y += h / 6 * (a + 2*a2 + 2*a3 + a4)
		d += h / 6 * (b + 2*b2 + 2*b3 + b4)
		r += h
	}
	return d / y
}
