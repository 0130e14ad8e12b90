package radial_test

import (
	"math"
	"testing"

	"glassthread/materials/taylor"
	"glassthread/modes/radial"
)

func FuzzGuidedVector(f *testing.F) {
	for _, x := range []float64{math.NaN(), math.Inf(1), 0, -1, 5e-324, 1e-9, 1, 2.5, 30, 1e308} {
		f.Add(x, 3.0, 0.5, 1.0, -0.2, 2, 1, 1)
		f.Add(3.0, x, 0.5, 1.0, -0.2, 3, 1, 1)
		f.Add(4.0, 3.0, x, 1.0, -0.2, 1, 0, 1)
		f.Add(4.0, 3.0, 0.9, x, 1.0, 0, 0, 1)
		f.Add(4.0, 300.0, 0.9, 1.0, x, 2, 2, 1)
	}
	f.Fuzz(func(t *testing.T, v, cladding, edge, inner, outer float64, family, nu, m int) {
		p := radial.Profile{Pieces: []radial.Piece{
			{From: 0, To: edge, F: func(r float64) float64 { return inner - outer*r*r }},
			{From: edge, To: 1, F: func(float64) float64 { return outer }}}}
		if v*v*math.Max(math.Abs(inner), math.Abs(outer)) > 900 {
			return // slow
		}
		list, err := radial.GuidedVector(p, v, cladding)
		if err == nil {
			for i, s := range list {
				if !(s.B >= 0 && s.U >= 0 && s.W > 0) || i > 0 && s.B > list[i-1].B {
					t.Errorf("%+v", s)
				}
			}
		}
		s, err := radial.SolveVector(p, v, cladding, radial.VectorFamily(family), nu, m)
		if err != nil {
			return
		}
		if !(s.W > 0 && s.W < math.MaxFloat64) {
			t.Errorf("%+v", s)
		}
		v2 := taylor.Variable(v).Square()
		_, lambda, err := radial.VectorSeries(p, v, v2.Scale(cladding/v*cladding/v), radial.VectorFamily(family), nu, m, func(piece int, r float64) (taylor.Series, error) {
			return v2.Scale(p.Pieces[piece].F(r)), nil
		})
		if err == nil && !lambda.Finite() {
			t.Errorf("%+v: %v", s, lambda)
		}
		_, shift, err := radial.VectorShift(p, v, cladding, radial.VectorFamily(family), nu, m)
		if err == nil && !(math.Abs(shift) <= s.W*s.W+v*v*100) {
			t.Errorf("%+v: shift %v", s, shift)
		}
		rank, err := radial.VectorRank(p, v, cladding, radial.VectorFamily(family), nu, m)
		if err != nil || rank < m {
			t.Errorf("%+v: rank %v %v", s, rank, err)
		}
		n, err := radial.CountVector(p, v, cladding, radial.VectorFamily(family), nu)
		if err != nil || n < rank {
			t.Errorf("%+v: rank %v of %v, %v", s, rank, n, err)
		}
	})
}
