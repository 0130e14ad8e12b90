package radial_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/modes/radial"
)

// every calls every function of the package.
func every(p radial.Profile, v float64, l, m int) map[string]error {
	out := map[string]error{}
	_, out["Solve"] = radial.Solve(p, v, l, m)
	_, out["SolveField"] = radial.SolveField(p, v, l, m)
	_, _, out["Series"] = radial.Series(p, v, l, m, func(piece int, r float64) (taylor.Series, error) {
		return taylor.Constant(v * v * p.Pieces[piece].F(r)), nil
	})
	if l == 0 && m == 1 {
		_, out["Guided"] = radial.Guided(p, v)
	}
	if v == 1 {
		_, out["CutoffV"] = radial.CutoffV(p, l, m)
	}
	return out
}

func TestErrorsNameTheArgument(t *testing.T) {
	one := func(float64) float64 { return 1 }
	pieces := func(p ...radial.Piece) radial.Profile { return radial.Profile{Pieces: p} }
	for _, c := range []struct {
		p        radial.Profile
		v        float64
		l, m     int
		argument string
	}{
		{step(), 1, -1, 1, "l"},
		{step(), 1, 10001, 1, "l"},
		{step(), 1, 0, 0, "m"},
		{step(), 1, 0, 10001, "m"},
		{step(), 0, 0, 1, "v"},
		{step(), -2, 0, 1, "v"},
		{step(), math.NaN(), 0, 1, "v"},
		{step(), math.Inf(1), 0, 1, "v"},
		{step(), 1000.5, 0, 1, "v"},
		{pieces(), 1, 0, 1, "len(Pieces)"},
		{pieces(radial.Piece{From: 0.1, To: 1, F: one}), 1, 0, 1, "Pieces[0].From"},
		{pieces(radial.Piece{From: 0, To: 2, F: one}), 1, 0, 1, "Pieces[0].From"},
		{pieces(radial.Piece{From: 0, To: math.NaN(), F: one}), 1, 0, 1, "Pieces[0].From"},
		{pieces(radial.Piece{To: 0.5, F: one}, radial.Piece{From: 0.6, To: 1, F: one}), 1, 0, 1, "Pieces[1].From"},
		{pieces(radial.Piece{To: 0.5, F: one}), 1, 0, 1, "the last piece's To"},
		{pieces(radial.Piece{To: 1, F: math.Log}), 1, 0, 1, "Pieces[0].F(0)"},
	} {
		for name, err := range every(c.p, c.v, c.l, c.m) {
			var e *domain.Error
			require.ErrorAs(t, err, &e, name)
			assert.Equal(t, c.argument, e.Argument, name)
			assert.NotEmpty(t, e.Func, name)
			assert.NotErrorIs(t, err, radial.ErrCutoff, name)
		}
	}
	for name, err := range every(pieces(radial.Piece{To: 1}), 1, 0, 1) {
		assert.ErrorContains(t, err, "Pieces[0].F is nil", name)
	}
}

func TestNotGuided(t *testing.T) {
	for name, err := range every(step(), 3, 3, 1) {
		assert.ErrorIs(t, err, radial.ErrCutoff, name)
	}
	for _, f := range []float64{0, -1} {
		p := layers([]float64{1}, []float64{f})
		list, err := radial.Guided(p, 20)
		assert.NoError(t, err)
		assert.Empty(t, list)
		_, err = radial.Solve(p, 20, 0, 1)
		assert.ErrorIs(t, err, radial.ErrCutoff)
		_, err = radial.CutoffV(p, 1, 1)
		assert.ErrorIs(t, err, radial.ErrCutoff)
	}
}

// The error of potential is the error of Series.
func TestSeriesPassesErrorsOn(t *testing.T) {
	_, _, err := radial.Series(step(), 3, 0, 1, func(int, float64) (taylor.Series, error) { return taylor.Series{}, assert.AnError })
	assert.ErrorIs(t, err, assert.AnError)
}

// V from 1e-3 to 1000.
func TestExtremeV(t *testing.T) {
	for _, p := range []radial.Profile{step(), power(2), power(0.5), power(100)} {
		for _, v := range []float64{1e-300, 1e-3, 0.1} {
			assert.Empty(t, guided(t, p, v), "b is below 1e-13")
		}
		e, err := radial.Solve(p, 1000, 0, 1)
		require.NoError(t, err)
		assert.Greater(t, e.B, 0.9)
		_, err = radial.Solve(p, 1000, 500, 1)
		if err != nil {
			assert.ErrorIs(t, err, radial.ErrCutoff)
		}
	}
	// Laguerre-Gauss modes, as in TestUnboundedParabola.
	for _, lm := range [][2]int{{0, 1}, {7, 3}, {60, 20}} {
		e, err := radial.Solve(power(2), 1000, lm[0], lm[1])
		require.NoError(t, err)
		assert.InDelta(t, 1-2*float64(2*lm[1]+lm[0]-1)/1000, e.B, 1e-12)
	}
}

// A small hole in the axis and a thin shell at the edge change b in proportion to their area,
// by the mean of f over the field.
func TestSmallHolesAndThinShells(t *testing.T) {
	const v = 8
	for _, lm := range [][2]int{{0, 1}, {1, 2}, {3, 1}} {
		whole, err := radial.SolveField(step(), v, lm[0], lm[1])
		require.NoError(t, err)
		axis := whole.Nodes[0].Psi
		for _, a := range []float64{1e-2, 1e-3, 1e-5} {
			e, err := radial.Solve(layers([]float64{a, 1}, []float64{0, 1}), v, lm[0], lm[1])
			require.NoError(t, err)
			want := -axis * axis * a * a / 2
			assert.InDelta(t, want, e.B-whole.B, 0.02*math.Abs(want)+2*a*a*a+1e-12, "hole of %v", a)
			// f = 0 there: the core ends at 1 - a.
			e, err = radial.Solve(layers([]float64{1 - a, 1}, []float64{1, 0}), v, lm[0], lm[1])
			require.NoError(t, err)
			same, err := radial.Solve(step(), v*(1-a), lm[0], lm[1])
			require.NoError(t, err)
			assert.InDelta(t, same.B, e.B, 1e-12+1e-15/a, "shell of %v", a)
		}
	}
}

func FuzzRadial(f *testing.F) {
	odd := []float64{0, math.Copysign(0, -1), 5e-324, 1e-310, 1e-160, 1e-9, 0.3, 0.5, 1, 2.4, 40, 999, 1000, 1e160, math.MaxFloat64, -1, math.NaN(), math.Inf(1), math.Inf(-1)}
	for i, x := range odd {
		y := odd[(i+7)%len(odd)]
		f.Add(2.4, 0.5, 1.0, x, 2.0, 0, 1)
		f.Add(x, 0.5, 1.0, -0.5, 2.0, 1, 1)
		f.Add(5.0, x, y, 0.5, 2.0, 0, 2)
		f.Add(5.0, 0.3, 1.0, 0.5, x, -1, 0)
	}
	f.Fuzz(func(t *testing.T, v, end, inside, outside, alpha float64, l, m int) {
		if v > 30 && v <= radial.MaxV { // more would only take longer
			v = math.Mod(v, 30)
		}
		if math.Abs(inside) > 1e3 && !math.IsInf(inside, 0) {
			inside = math.Mod(inside, 1e3)
		}
		if math.Abs(outside) > 1e3 && !math.IsInf(outside, 0) {
			outside = math.Mod(outside, 1e3)
		}
		p := radial.Profile{Pieces: []radial.Piece{
			{To: end, Graded: true, F: func(r float64) float64 { return inside * (1 - math.Pow(r, alpha)) }},
			{From: end, To: 1, F: func(float64) float64 { return outside }},
		}}
		e, err := radial.Solve(p, v, l, m)
		if err == nil && !(e.B > 0 && e.W > 0 && e.U >= 0 && e.L == l && e.M == m && !math.IsInf(e.B, 0)) {
			t.Errorf("%+v", e)
		}
		s, err2 := radial.SolveField(p, v, l, m)
		if (err == nil) != (err2 == nil) {
			t.Errorf("Solve %v, SolveField %v", err, err2)
		}
		if err2 == nil {
			total := s.Outside + s.Mean(func(int, float64) float64 { return 1 })
			if !(math.Abs(total-1) < 1e-9) || math.IsNaN(s.Edge(0)) {
				t.Errorf("power %v, edge %v", total, s.Edge(0))
			}
		}
		if list, err := radial.Guided(p, v); err == nil {
			for i, e := range list {
				if !(e.B > 0) || i > 0 && list[i-1].B < e.B {
					t.Errorf("%d: %+v", i, e)
				}
			}
		}
		if _, lambda, err := radial.Series(p, v, l, m, inV(p, v)); err == nil && !lambda.Finite() {
			t.Errorf("%v", lambda)
		}
		if cut, err := radial.CutoffV(p, l, m); err == nil && !(cut >= 0 && cut <= radial.MaxV) {
			t.Errorf("cut-off %v", cut)
		}
	})
}
