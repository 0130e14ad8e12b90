package radial

import (
	"bufio"
	"math"
	"math/cmplx"
	"math/rand"
	"os"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// leakyRows calls f with the fields of each line of a table.
func leakyRows(t *testing.T, name string, f func(fields []string, number func(int) float64)) (rows int) {
	file, err := os.Open(name)
	require.NoError(t, err)
	defer file.Close()
	s := bufio.NewScanner(file)
	for s.Scan() {
		if strings.HasPrefix(s.Text(), "#") {
			continue
		}
		fields := strings.Split(s.Text(), ",")
		f(fields, func(i int) float64 {
			x, err := strconv.ParseFloat(fields[i], 64)
			require.NoError(t, err)
			return x
		})
		rows++
	}
	require.NoError(t, s.Err())
	return rows
}

// uniformLayers is the profile of layers that end at the given radii.
func uniformLayers(ends, f []float64) (p Profile) {
	at := 0.0
	for i, end := range ends {
		p.Pieces = append(p.Pieces, Piece{From: at, To: end, F: func(float64) float64 { return f[i] }})
		at = end
	}
	return p
}

// kappa against mpmath at 60 digits, each part by itself (testdata/outgoing.py).
func TestOutgoingAgainstTable(t *testing.T) {
	worst := [2]float64{}
	rows := leakyRows(t, "testdata/outgoing.csv", func(_ []string, number func(int) float64) {
		l := int(number(0))
		lambda := complex(number(1), number(2))
		want := complex(number(3), number(4))
		got, slope := outgoing(l, lambda)
		along := math.Abs(real(got)-real(want)) / cmplx.Abs(want)
		worst[0] = max(worst[0], along)
		if imag(want) == 0 { // below the range
			assert.Zero(t, imag(got))
		} else {
			worst[1] = max(worst[1], math.Abs(imag(got)/imag(want)-1))
		}
		// The Riccati equation with the table's kappa.
		riccati := (want*want - lambda - complex(float64(l*l), 0)) / (2 * lambda)
		size := (real(want)*real(want) + cmplx.Abs(lambda) + float64(l*l)) / cmplx.Abs(lambda)
		assert.Less(t, cmplx.Abs(slope-riccati), 1e-13*(size+cmplx.Abs(riccati)), "slope of %d, %v", l, lambda)
	})
	t.Logf("%d rows: worst error of Re(kappa) over |kappa| %.1e, of Im(kappa) %.1e", rows, worst[0], worst[1])
	assert.Equal(t, 280, rows)
	assert.Less(t, worst[0], 5e-15)
	assert.Less(t, worst[1], 2e-14)
}

// Leaky modes of uniform layers, losses down to those far below a float64's rounding of
// lambda included, against zeros of determinants of Bessel and Hankel functions at 80
// digits (testdata/leaky.py).
func TestLeakyAgainstTable(t *testing.T) {
	worst := [2]float64{}
	least := 1.0
	rows := leakyRows(t, "testdata/leaky.csv", func(fields []string, number func(int) float64) {
		list := func(s string) (x []float64) {
			for _, field := range strings.Fields(s) {
				y, err := strconv.ParseFloat(field, 64)
				require.NoError(t, err)
				x = append(x, y)
			}
			return x
		}
		v, l, m := number(3), int(number(4)), int(number(5))
		got, err := Leaky(uniformLayers(list(fields[1]), list(fields[2])), v, l, m)
		if !assert.NoError(t, err, "%v", fields) {
			return
		}
		along := math.Abs(real(got.Lambda)-number(6)) / (v * v)
		across := math.Abs(imag(got.Lambda)/number(7) - 1)
		assert.Less(t, along, 3e-13, "%v", fields)
		assert.Less(t, across, 1e-11, "%v", fields)
		worst[0], worst[1] = max(worst[0], along), max(worst[1], across)
		least = min(least, number(7)/math.Abs(number(6)))
	})
	t.Logf("%d rows: worst error of Re(lambda)/V^2 %.1e, of Im(lambda) %.1e relative; least Im/Re %.1e",
		rows, worst[0], worst[1], least)
	assert.GreaterOrEqual(t, rows, 60)
	assert.Less(t, least, 1e-20)
}

// A graded core in a trench, against the differential equation integrated with lambda fixed by
// classical Runge-Kutta steps: at R = 1 the logarithmic slope is the outgoing wave's.
func TestLeakyGradedProfile(t *testing.T) {
	const core = 0.6
	inside := func(r float64) float64 { return 1 - 1.3*(r/core)*(r/core) }
	p := Profile{[]Piece{{From: 0, To: core, F: inside}, {From: core, To: 1, F: func(float64) float64 { return -0.5 }}}}
	for _, c := range []struct {
		v    float64
		l, m int
	}{{8, 2, 1}, {12, 1, 2}, {16, 0, 3}, {20, 5, 1}} {
		mode, err := Leaky(p, c.v, c.l, c.m)
		require.NoError(t, err, "%v", c)
		require.Less(t, real(mode.Lambda), 0.0)
		order := float64(c.l)
		// psi = R^l y: y'' = -(2l + 1) y'/R - (V^2 f - lambda) y, y(0) = 1.
		y, s := complex(1, 0), complex(0, 0)
		nodes := 0
		integrate := func(from, to float64, f func(float64) float64) {
			const steps = 4000
			h := (to - from) / steps
			slope := func(r float64, y, s complex128) complex128 {
				q := complex(c.v*c.v*f(r), 0) - mode.Lambda
				if r == 0 {
					return -q * y / complex(2*order+2, 0)
				}
				return -complex((2*order+1)/r, 0)*s - q*y
			}
			hc := complex(h, 0)
			for i := range steps {
				r := from + float64(i)*h
				a1, b1 := s, slope(r, y, s)
				a2, b2 := s+hc/2*b1, slope(r+h/2, y+hc/2*a1, s+hc/2*b1)
				a3, b3 := s+hc/2*b2, slope(r+h/2, y+hc/2*a2, s+hc/2*b2)
				a4, b4 := s+hc*b3, slope(r+h, y+hc*a3, s+hc*b3)
				before := real(y)
				y += hc / 6 * (a1 + 2*a2 + 2*a3 + a4)
				if before*real(y) < 0 {
					nodes++
				}
				s += hc / 6 * (b1 + 2*b2 + 2*b3 + b4)
			}
		}
		integrate(0, core, inside)
		integrate(core, 1, p.Pieces[1].F)
		assert.Equal(t, c.m-1, nodes, "nodes of the field of %v", c)
		kappa, _ := outgoing(c.l, mode.Lambda)
		left := s/y + complex(order, 0)
		// By the flux, an error of lambda comes out as many times larger as Im(kappa) is than
		// Im(lambda).
		within := 1e-8*cmplx.Abs(kappa) + 2e-13*c.v*c.v*math.Abs(imag(kappa)/imag(mode.Lambda))
		assert.Less(t, cmplx.Abs(left+kappa), within, "%v: %v and %v", c, left, -kappa)
	}
}

// Across cut-off the mode goes on smoothly: for l >= 2 lambda passes through 0 with one slope,
// and the loss begins there from nothing.
func TestLeakyContinuesAcrossCutoff(t *testing.T) {
	for _, p := range []Profile{uniformLayers([]float64{1}, []float64{1}), uniformLayers([]float64{0.5, 1}, []float64{1, -0.5})} {
		for _, label := range [][2]int{{2, 1}, {3, 1}, {3, 2}, {6, 2}} {
			l, m := label[0], label[1]
			cut, err := CutoffV(p, l, m)
			require.NoError(t, err)
			const step = 1e-3
			above, err := Leaky(p, cut*(1+step), l, m)
			require.NoError(t, err)
			below, err := Leaky(p, cut*(1-step), l, m)
			require.NoError(t, err)
			assert.Positive(t, real(above.Lambda))
			assert.Zero(t, imag(above.Lambda))
			assert.Negative(t, real(below.Lambda))
			assert.Positive(t, imag(below.Lambda))
			assert.Less(t, imag(below.Lambda), 0.05*math.Abs(real(below.Lambda)), "%v", label)
			assert.InEpsilon(t, real(above.Lambda), -real(below.Lambda), 0.06, "%v", label)
			_, err = Leaky(p, cut, l, m)
			assert.ErrorIs(t, err, ErrCutoff)
		}
	}
}

// A guided mode is Solve's.
func TestLeakyOfGuidedMode(t *testing.T) {
	p := uniformLayers([]float64{0.5, 1}, []float64{1, -0.5})
	guided, err := Guided(p, 15)
	require.NoError(t, err)
	for _, g := range guided {
		mode, err := Leaky(p, 15, g.L, g.M)
		require.NoError(t, err)
		assert.Equal(t, LeakyMode{g.L, g.M, 15, mode.Lambda}, mode)
		assert.Zero(t, imag(mode.Lambda))
		assert.InEpsilon(t, g.B, real(mode.Lambda)/(15*15), 1e-12)
	}
}

// A layer like the outer medium changes nothing, nor does where pieces are cut.
func TestLeakyOuterLayerOfTheMedium(t *testing.T) {
	plain := uniformLayers([]float64{0.5, 1}, []float64{1, -0.8})
	inside := uniformLayers([]float64{0.2, 0.4, 0.9, 1}, []float64{1, -0.8, 0, 0})
	cut := uniformLayers([]float64{0.25, 0.5, 0.75, 1}, []float64{1, 1, -0.8, -0.8})
	for _, label := range [][2]int{{0, 3}, {1, 2}, {2, 2}} {
		want, err := Leaky(plain, 12, label[0], label[1])
		require.NoError(t, err)
		require.Positive(t, imag(want.Lambda))
		for i, p := range []Profile{inside, cut} {
			scale := []float64{0.4, 1}[i]
			got, err := Leaky(p, 12/scale, label[0], label[1])
			require.NoError(t, err)
			assert.Equal(t, 12/scale, got.V)
			assert.InDelta(t, real(want.Lambda), real(got.Lambda)*scale*scale, 1e-13*12*12)
			assert.InEpsilon(t, imag(want.Lambda), imag(got.Lambda)*scale*scale, 1e-10)
		}
	}
}

// With a wider trench the loss falls by exp(-2 q) a unit of width, q^2 = lambda - V^2 f in
// it (Snyder and Love 1983, chapter 24), till far below the rounding of lambda; no mode is
// answered twice.
func TestLeakyWideTrench(t *testing.T) {
	const v, depth = 10.0, 0.8 // of the core, whose radius is the unit
	before := 0.0
	for width := 1.0; width <= 8; width++ {
		outer := 1 + width
		p := uniformLayers([]float64{1 / outer, 1}, []float64{1, -depth})
		mode, err := Leaky(p, v*outer, 0, 4)
		require.NoError(t, err)
		lambda := mode.Lambda / complex(outer*outer, 0)
		require.Less(t, real(lambda), 0.0)
		if width > 1 {
			q := math.Sqrt(real(lambda) + v*v*depth)
			assert.InEpsilon(t, math.Exp(-2*q), imag(lambda)/before, 0.02)
		}
		before = imag(lambda)
	}
	assert.Less(t, before, 1e-30)
}

// Whatever the layers: an answer beyond cut-off leaks outwards, falls with m, and lies where a
// barrier can be.
func TestLeakyOfRandomLayers(t *testing.T) {
	const seed = 7
	r := rand.New(rand.NewSource(seed))
	found := 0
	for range 150 {
		n := 1 + r.Intn(4)
		ends, f := make([]float64, n), make([]float64, n)
		at := 0.0
		for i := range n {
			at += 0.1 + r.Float64()
			ends[i], f[i] = at, 2*r.Float64()-1
		}
		for i := range ends {
			ends[i] /= at
		}
		p := uniformLayers(ends, f)
		v := 2 + 20*r.Float64()
		for l := range 4 {
			before := math.Inf(1)
			for m := 1; m <= 6; m++ {
				mode, err := Leaky(p, v, l, m)
				if err != nil {
					assert.True(t, assert.ErrorIs(t, err, ErrNoResonance) || assert.ErrorIs(t, err, ErrCutoff), "%v %v", ends, f)
					continue
				}
				assert.Less(t, real(mode.Lambda), before, "seed %d: %v %v V %v l %d m %d", seed, ends, f, v, l, m)
				before = real(mode.Lambda)
				if before < 0 {
					found++
					assert.Positive(t, imag(mode.Lambda))
				}
			}
		}
	}
	assert.Greater(t, found, 100)
}

func TestLeakyRefusals(t *testing.T) {
	p := uniformLayers([]float64{1}, []float64{1})
	for _, c := range []struct {
		v    float64
		l, m int
		arg  string
	}{
		{math.NaN(), 0, 1, "v"}, {0, 0, 1, "v"}, {1001, 0, 1, "v"}, {5, -1, 1, "l"}, {5, 10001, 1, "l"},
		{5, 0, 0, "m"}, {5, 0, 10001, "m"},
	} {
		_, err := Leaky(p, c.v, c.l, c.m)
		require.Error(t, err)
		assert.Contains(t, err.Error(), "radial.Leaky: "+c.arg+" = ")
	}
	_, err := Leaky(Profile{}, 5, 0, 1)
	assert.ErrorContains(t, err, "len(Pieces)")
	// Without a barrier: LP02 of a step next below its cut-off 3.832; and no fibre at all.
	_, err = Leaky(p, 3.5, 0, 2)
	assert.ErrorIs(t, err, ErrNoResonance)
	_, err = Leaky(uniformLayers([]float64{1}, []float64{0}), 5, 0, 1)
	assert.ErrorIs(t, err, ErrNoResonance)
	_, err = Leaky(p, 1e-200, 3, 2)
	assert.ErrorIs(t, err, ErrNoResonance)
	_, err = Leaky(uniformLayers([]float64{1}, []float64{math.Inf(-1)}), 5, 0, 1)
	assert.ErrorContains(t, err, "finite")
}

func TestOutgoingDoesNotAllocate(t *testing.T) {
	var sink complex128
	assert.Zero(t, testing.AllocsPerRun(100, func() {
		for _, l := range []int{0, 5} {
			a, _ := outgoing(l, complex(-3, 1e-9))
			b, _ := outgoing(l, complex(-300, 1e-9))
			sink += a + b
		}
	}))
}

func FuzzLeaky(f *testing.F) {
	for _, x := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), 0, -1, 5e-324, 1e308, 0.5, 1} {
		f.Add(12.0, x, 0.5, -0.8, uint16(1), uint16(2))
		f.Add(x, 1.0, 0.5, -0.8, uint16(3), uint16(1))
		f.Add(12.0, 1.0, x, -0.8, uint16(0), uint16(1))
		f.Add(12.0, -0.9, 0.3, x, uint16(0), uint16(1))
	}
	f.Add(700.0, -0.9, 0.3, -1.0, uint16(700), uint16(1))
	f.Fuzz(func(t *testing.T, v, core, end, around float64, l, m uint16) {
		if math.Abs(v) > 100 && math.Abs(v) <= MaxV {
			v /= 10 // time
		}
		mode, err := Leaky(uniformLayers([]float64{end, 1}, []float64{core, around}), v, int(l%600), int(m%40))
		if err == nil {
			require.False(t, cmplx.IsNaN(mode.Lambda) || cmplx.IsInf(mode.Lambda), "%v", mode)
			require.GreaterOrEqual(t, imag(mode.Lambda), 0.0)
			require.Equal(t, v, mode.V)
		}
	})
}

func BenchmarkLeaky(b *testing.B) {
	p := uniformLayers([]float64{0.5, 1}, []float64{1, -0.8})
	for b.Loop() {
		if _, err := Leaky(p, 12, 0, 3); err != nil {
			b.Fatal(err)
		}
	}
}
