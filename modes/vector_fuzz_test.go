package modes

import (
	"errors"
	"math"
	"testing"

	"glassthread/materials"
)

func checkVector(t *testing.T, p Vector) {
	t.Helper()
	if !(p.U > 0 && p.U <= p.V && p.W >= 0 && p.W <= p.V && p.B >= 0 && p.B <= 1 && p.Shift <= 0 && p.Shift >= -1) ||
		math.Abs(math.Hypot(p.U, p.W)-p.V) > 1e-13*p.V || math.Abs((p.W/p.V)*(p.W/p.V)-p.B) > 1e-13*p.B+1e-300 {
		t.Errorf("%#v", p)
	}
	l, m := p.Group()
	lp, err := SolveLP(p.V, l, m)
	if err != nil {
		t.Errorf("%v without %v", p, err)
	}
	if math.Abs(p.B-lp.B-p.Shift) > 1e-15 {
		t.Errorf("%#v, LP mode %+v", p, lp)
	}
}

func FuzzVector(f *testing.F) {
	for _, v := range seeds {
		for _, c := range []struct {
			delta     float64
			fam, n, m int
		}{{0.003, 2, 1, 1}, {0.49, 2, 1, 1}, {1e-300, 3, 1, 1}, {0.495, 2, 1, 2}, {0.3, 1, 0, 1}, {0.3, 0, 0, 2}, {0.2, 2, 30, 2}, {5e-324, 3, 98000, 1},
			{math.NaN(), 2, 1, 1}, {0.5, 2, 1, 1}, {-1, 0, 0, 1}, {0.1, 7, math.MaxInt, math.MinInt}} {
			f.Add(v, c.delta, c.fam, c.n, c.m)
		}
	}
	f.Fuzz(func(t *testing.T, v, delta float64, fam, nu, m int) {
		p, err := SolveVector(v, delta, Family(fam), nu, m)
		if err == nil {
			checkVector(t, p)
			if q, err := SolveVector(v*1.001, delta, Family(fam), nu, m); v > 1 && v*1.001 <= MaxV && (err != nil || !(q.B > p.B) && p.B > 0) {
				t.Errorf("b does not rise: %#v, %#v, %v", p, q, err)
			}
		} else {
			explained(t, err)
		}
		cut, err2 := CutoffVectorV(delta, Family(fam), nu, m)
		if err2 != nil {
			explained(t, err2)
			if err == nil {
				t.Errorf("%v without a cut-off: %v", p, err2)
			}
		} else if v > 0 && v <= MaxV && v != cut && v > cut != (err == nil) {
			t.Errorf("%v(%d,%d) at %v, cut-off %v: %v", Family(fam), nu, m, v, cut, err)
		}
		if v > 30 {
			return
		}
		list, err := GuidedVector(v, delta)
		if err != nil {
			explained(t, err)
		}
		for _, p := range list {
			checkVector(t, p)
		}
	})
}

func FuzzStepVector(f *testing.F) {
	for i, v := range seeds {
		f.Add(1e-6, 1.45, 1.0, v, 0.4e-6, 2e-6, i%4, i%3, 1)
		f.Add(v, 1.45, 1.44, 1e-6, 0.4e-6, 2e-6, 2, 1, 1)
		f.Add(0.5e-6, 1.45, v, 1e-6, 0.4e-6, 2e-6, i%4, i%3, 1)
		f.Add(0.5e-6, v, 1.0, 1e-6, v, 2e-6, 2, 2, 1)
		f.Add(v, 1.4+v, 1.4, 1e-6, 1e-6, v, 1, 0, 1)
	}
	f.Fuzz(func(t *testing.T, radius, n1, n2, x, from, to float64, fam, nu, m int) {
		s := Step{Radius: radius, Core: materials.Constant(n1), Cladding: materials.Constant(n2)}
		mode := s.Vector(Family(fam), nu, m)
		n, err := mode.Taylor(x)
		if err == nil {
			if !n.Finite() || n[0] < n2*(1-1e-15) || n[0] > n1*(1+1e-15) {
				t.Errorf("%v at %v: %v", mode, x, n)
			}
			shift, err := mode.IndexShift(x)
			if err != nil || !(shift <= 0 && shift >= n2-n1) {
				t.Errorf("%v at %v: shift %v %v", mode, x, shift, err)
			}
			p, err := mode.Solve(x)
			if err != nil {
				t.Error(err)
			}
			checkVector(t, p)
		}
		if a, b, err := mode.Parts(x); err == nil && !(a.Finite() && b.Finite()) {
			t.Errorf("%v at %v: %v, %v", mode, x, a, b)
		}
		if y, err := mode.CutoffWavelength(from, to); err == nil && !(y >= from && y <= to) {
			t.Errorf("%v: cut-off %v", mode, y)
		} else if err != nil && !errors.Is(err, ErrNoCutoff) {
			explained(t, err)
		}
		if v, err := s.V(x); err == nil && v < 20 {
			list, err := s.GuidedVector(x)
			for _, g := range list {
				if err != nil || !(g.Index >= n2*(1-1e-15) && g.Index <= n1*(1+1e-15)) {
					t.Errorf("%+v %v", g, err)
				}
			}
		}
		_, _ = mode.String(), mode.Group()
	})
}
