package modes

import (
	"errors"
	"math"
	"testing"

	"glassthread/materials"
)

func FuzzRadialVector(f *testing.F) {
	for i, v := range seeds {
		f.Add(1e-6, 0.7e-6, 1.45, 1.3, 1.0, v, 0.6e-6, 2e-6, 2.0, i%4, i%3, 1)
		f.Add(v, 0.4e-6, 1.45, 1.5, 1.44, 1e-6, 0.6e-6, 2e-6, 1.5, 2, 1, 1)
		f.Add(0.5e-6, v, 1.45, 1.0, 1.2, 1e-6, 0.6e-6, 2e-6, v, i%4, i%3, 1)
		f.Add(0.5e-6, 0.2e-6, v, 1.2, 1.0, 1e-6, v, 2e-6, 100.0, 2, 2, 1)
		f.Add(0.5e-6, 0.2e-6, 1.45, v, 1.4, 1e-6, 1e-6, v, 0.5, 1, 0, 1)
	}
	f.Fuzz(func(t *testing.T, radius, inner, n0, n1, n2, x, from, to, alpha float64, fam, nu, m int) {
		fibres := []Radial{
			Layered{Layers: []Layer{{Outer: inner, Glass: materials.Constant(n0)}, {Outer: radius, Glass: materials.Constant(n1)}}, Cladding: materials.Constant(n2)},
			PowerLaw{Radius: radius, Core: materials.Constant(n0), Cladding: materials.Constant(n2), Alpha: alpha},
		}
		highest := n0
		if n1 > n0 {
			highest = n1
		}
		for _, fibre := range fibres {
			mode := RadialVector{fibre, Family(fam), nu, m}
			_, _ = mode.String(), mode.Group()
			p, _, err := mode.problem(x)
			if err == nil && p.v > 15 {
				continue // slow
			}
			n, err := mode.Taylor(x)
			if err == nil {
				if !n.Finite() || n[0] < n2*(1-1e-15) || n[0] > highest*(1+1e-14) {
					t.Errorf("%v at %v: %v", mode, x, n)
				}
				if _, err := mode.Solve(x); err != nil {
					t.Errorf("%v at %v: %v", mode, x, err)
				}
				if shift, err := mode.IndexShift(x); err == nil && !(math.Abs(shift) <= highest) {
					t.Errorf("%v at %v: shift %v", mode, x, shift)
				}
			}
			if p, _, err := mode.problem(from); err == nil && p.v < 15 {
				if y, err := mode.CutoffWavelength(from, to); err == nil && !(y >= from && y <= to) {
					t.Errorf("%v: cut-off %v", mode, y)
				} else if err != nil && !errors.Is(err, ErrNoCutoff) {
					explained(t, err)
				}
			}
			list, err := guidedRadialVector("fuzz", fibre, x)
			if err != nil {
				continue
			}
			for _, g := range list {
				if !(g.Index >= n2*(1-1e-15) && g.Index <= highest*(1+1e-14)) {
					t.Errorf("%+v", g)
				}
			}
		}
	})
}
