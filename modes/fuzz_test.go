package modes

import (
	"errors"
	"math"
	"testing"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/numap"
)

var seeds = []float64{0, math.Copysign(0, -1), 5e-324, 1e-310, 1e-160, 1e-20, 1e-12, 3e-10, 0.0516, 0.05, 0.073, 0.5, 1.2, 1.6, 2.4,
	2.404825557695773, 2.405, 2.9048255576957, 3.8317059702075125, 3.831705970207513, 5.135622301840683, 100, 1e4, 1e5, 1e5 + 1, 1e160,
	math.MaxFloat64, -1, math.NaN(), math.Inf(1), math.Inf(-1)}

// explained fails unless the error names what was refused.
func explained(t *testing.T, err error) {
	t.Helper()
	var refused *domain.Error
	if !errors.As(err, &refused) || refused.Func == "" || refused.Argument == "" || refused.Allowed == "" {
		t.Errorf("error %v", err)
	}
}

func FuzzSolveLP(f *testing.F) {
	for _, v := range seeds {
		for _, c := range [][2]int{{0, 1}, {1, 1}, {0, 2}, {2, 1}, {30, 2}, {99000, 1}, {0, 30000}, {-1, 1}, {0, 0}, {math.MaxInt, math.MinInt}} {
			f.Add(v, c[0], c[1])
		}
	}
	f.Fuzz(func(t *testing.T, v float64, l, m int) {
		p, err := SolveLP(v, l, m)
		if err == nil {
			checkMode(t, p)
			if p.L != l || p.M != m || p.V != v {
				t.Errorf("%+v is not LP(%d,%d) at %v", p, l, m, v)
			}
			if b := p.B; v > 1 && v*1.001 <= MaxV {
				if q, err := SolveLP(v*1.001, l, m); err != nil || !(q.B > b) && b > 0 {
					t.Errorf("b does not rise: %+v, %+v, %v", p, q, err)
				}
			}
		} else {
			explained(t, err)
		}
		cut, err := CutoffV(l, m)
		if err != nil {
			explained(t, err)
		} else if math.IsNaN(cut) || cut < 0 || cut > 1e6 {
			t.Errorf("cut-off of LP(%d,%d): %v", l, m, cut)
		} else if _, err := SolveLP(v, l, m); v <= MaxV && v > cut != (err == nil) && v != cut && v > 0 {
			t.Errorf("LP(%d,%d) at %v, cut-off %v: %v", l, m, v, cut, err)
		}
	})
}

// Larger V would only take longer.
const fuzzListV = 60

func FuzzGuidedLP(f *testing.F) {
	for _, v := range seeds {
		f.Add(v)
	}
	f.Fuzz(func(t *testing.T, v float64) {
		if v > fuzzListV && v <= MaxListV {
			v = math.Mod(v, fuzzListV)
		}
		list, err := GuidedLP(v)
		if err != nil {
			explained(t, err)
			return
		}
		for i, p := range list {
			checkMode(t, p)
			if i > 0 && list[i-1].B < p.B {
				t.Errorf("V = %v: %+v before %+v", v, list[i-1], p)
			}
		}
		// At a cut-off itself the count by signs may err by rounding.
		least, _ := count(v * (1 - 1e-12))
		most, _ := count(v * (1 + 1e-12))
		if len(list) < least || len(list) > most {
			t.Errorf("V = %v: %d labels, not %d to %d", v, len(list), least, most)
		}
	})
}

// Curves of any LP, solved or made up: no panic.
func FuzzCurves(f *testing.F) {
	for i, v := range seeds {
		f.Add(i%4-1, 1, v, v/2, v/3, 0.3)
		f.Add(math.MaxInt, math.MinInt, 2.0, v, v, v)
	}
	f.Fuzz(func(t *testing.T, l, m int, v, u, w, b float64) {
		p := LP{l, m, v, u, w, b}
		_, _, _, _ = p.Series(), p.GroupCurve(), p.DispersionCurve(), p.CorePower()
		if d := p.Degeneracy(); d != 2 && d != 4 {
			t.Error(d)
		}
	})
}

func FuzzStep(f *testing.F) {
	for _, x := range seeds {
		f.Add(x, 1.45, 1.444, 1.3e-6, 1e-6, 2e-6, 0, 1)
		f.Add(4e-6, x, 1.444, 1.3e-6, 1e-6, 2e-6, 1, 1)
		f.Add(4e-6, 1.45, x, 1.3e-6, 1e-6, 2e-6, 0, 2)
		f.Add(4e-6, 1.45, 1.444, x, 1e-6, 2e-6, 0, 1)
		f.Add(4e-6, 1.45, 1.444, 0.5e-6, x, 2e-6, 1, 1)
		f.Add(4e-6, 1.45, 1.444, 0.5e-6, 1e-7, x, 1, 1)
		f.Add(x, x, x/2, x, x, 2*x, 0, 1)
	}
	f.Add(4e-6, 0.05, 0.0, 1.3e-6, 0.4e-6, 4e-6, 1, 1)
	f.Add(10e-6, 0.2, 0.1, 0.6e-6, 0.4e-6, 4e-6, 5, 2)
	f.Fuzz(func(t *testing.T, radius, n1, n2, x, from, to float64, l, m int) {
		fibres := []Step{constantStep(radius, n1, n2)}
		core, err := materials.GermaniaSilica(n1)
		cladding, err2 := materials.GermaniaSilica(n2)
		if err == nil && err2 == nil {
			fibres = append(fibres, Step{radius, core, cladding})
		}
		for _, f := range fibres {
			checkStep(t, f, x, from, to, l, m)
		}
	})
}

func checkStep(t *testing.T, f Step, x, from, to float64, l, m int) {
	positive := func(y float64, err error) {
		t.Helper()
		if err != nil {
			explained(t, err)
		} else if !(y >= 0 && y <= math.MaxFloat64) {
			t.Errorf("%+v at %v gives %v", f, x, y)
		}
	}
	v, err := f.V(x)
	positive(v, err)
	positive(f.NA(x))
	if err != nil || v < fuzzListV || v > MaxListV {
		list, err := f.Guided(x)
		if err != nil {
			explained(t, err)
		}
		for i, g := range list {
			positive(g.Index, nil)
			if i > 0 && list[i-1].Index < g.Index || g.Index <= 0 {
				t.Errorf("%+v at %v: %v", f, x, list)
			}
		}
	}
	mode := f.LP(l, m)
	_ = mode.String()
	s, err := mode.Taylor(x)
	if err != nil {
		explained(t, err)
	} else if !s.Finite() || s[0] <= 0 {
		t.Errorf("%v of %+v at %v: %v", mode, f, x, s)
	}
	material, waveguide, err := mode.Parts(x)
	if err != nil {
		explained(t, err)
	} else if !material.Finite() || !waveguide.Finite() || math.Abs(material[0]-s[0]) > 1e-15*s[0] && s[0] > 1e-100 {
		t.Errorf("%v of %+v at %v: %v and %v beside %v", mode, f, x, material, waveguide, s)
	}
	if p, err := mode.Solve(x); err == nil {
		checkMode(t, p)
	} else {
		explained(t, err)
		if errors.Is(err, ErrCutoff) && errors.Is(err, numap.ErrNotGuiding) {
			t.Errorf("two causes: %v", err)
		}
	}
	if cut, err := mode.CutoffWavelength(from, to); err == nil {
		if !(cut >= from && cut <= to) {
			t.Errorf("%v of %+v: cut-off wavelength %v, not from %v to %v", mode, f, cut, from, to)
		}
		// An index below 1e-100 has a square of few digits.
		n1, _ := materials.Index(f.Core, cut)
		if _, err := mode.Solve(cut * (1 + 1e-9)); err == nil && n1 > 1e-100 && n1 < 1e100 {
			t.Errorf("%v of %+v: guided above its cut-off wavelength %v", mode, f, cut)
		}
	} else if !errors.Is(err, ErrNoCutoff) {
		explained(t, err)
	}
}
