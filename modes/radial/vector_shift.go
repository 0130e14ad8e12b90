package radial

import (
	"math"

	"glassthread/materials/taylor"
)

// VectorShift returns a vector mode and by how much its lambda = w^2 exceeds that of the
// scalar mode of its group, LP(1, m) for TE and TM, LP(nu-1, m) for HE, LP(nu+1, m) for EH.
// The error matches ErrCutoff where either is not guided.
//
// The scalar mode x_0 belongs to T_0, the limit of T for an infinite cladding index, and as
// x_0'T(lambda) x = 0 = x_0'T_0(lambda_0) x,
//
//	lambda - lambda_0 = -x_0'(T - T_0)(lambda) x / x_0'[T_0(lambda) - T_0(lambda_0)] x (lambda - lambda_0),
//
// exactly, where T - T_0 is of the order of the contrast and has no cancellation: the shift
// has about the relative error of lambda however small it is.
func VectorShift(p Profile, v, cladding float64, family VectorFamily, nu, m int) (mode VectorMode, shift float64, err error) {
	const function = "radial.VectorShift"
	q, root, err := p.vectorRoot(function, v, cladding, family, nu, m)
	if err != nil {
		return mode, 0, err
	}
	mode = newVectorMode(family, nu, m, v, root.lambda)
	if family == VectorTE {
		return mode, 0, nil // the scalar equation of order 1
	}
	s := newVectorSystem(q.mesh, family, nu, q.cladding)
	x := s.settle(root.lambda)
	_, base, err := p.vectorRoot(function, v, math.Inf(1), family, nu, m)
	if err != nil {
		return mode, 0, err
	}
	weak := newVectorSystem(q.mesh, family, nu, math.Inf(1))
	x0 := weak.settle(base.lambda)
	difference, overlap := s.difference(root.lambda, base.lambda, x0, x)
	if shift = root.lambda - base.lambda; math.Abs(shift) < 0.03*base.lambda && math.Abs(overlap) > 0.1 {
		shift = -difference / overlap
	}
	return mode, shift, nil
}

// difference returns x_0'(T - T_0) x at lambda, and x_0'(T_0(lambda) - T_0(base)) x over
// lambda - base.
func (s *vectorSystem) difference(lambda, base float64, x0, x []vectorField) (difference, overlap float64) {
	change, mass := make([]terms, len(x)), make([]terms, len(x))
	eta, nu2 := s.eta(lambda), s.nu*s.nu
	weak := newVectorSystem(s.elements, s.family, int(s.nu), math.Inf(1))
	for k := range s.elements {
		e, c, w := &s.elements[k], &change[k], &mass[k]
		less := func(q float64) float64 { return -q / (s.cladding + q) } // rho - 1
		for i, r := range e.rn {
			if r == 0 {
				continue
			}
			w.gg[i] = e.wn[i] / r
			if d := lambda - e.qn[i]; s.fields == 1 {
				c.gg[i] = e.wn[i] * d / r * less(e.qn[i])
			} else {
				c.zz[i] = e.wn[i] * eta * (nu2/r + d*r)
			}
		}
		for q, r := range e.rg {
			if s.fields == 1 {
				c.sg[q] = e.wg[q] / r * less(e.qg[q])
			} else {
				c.sz[q], w.ee[q] = e.wg[q]*eta*r, e.wg[q]*r
			}
		}
	}
	var outer edge
	if s.fields == 2 {
		lc := lambda * decayRatio(int(s.nu), lambda)[0]
		outer.zz = eta * (nu2 + lc*(lc+2*s.nu)) / (s.nu + lc)
	}
	load := make([]vectorField, len(x))
	s.apply(load, x, change, outer, false)
	difference = dot(x0, load)
	clear(load)
	s.apply(load, x, mass, weak.outsideQuotient(lambda, base), false)
	return difference, dot(x0, load)
}

// outsideQuotient returns the difference quotient of the exterior's blocks at weak guidance.
func (s *vectorSystem) outsideQuotient(a, b float64) edge {
	if h := (a - b) / 2; math.Abs(h) < 1e-3*b {
		zz, zg, gg := s.outside(taylor.Variable(b+h), taylor.Series{})
		h2 := h * h
		return edge{zz[1] + h2*zz[3], zg[1] + h2*zg[3], gg[1] + h2*gg[3]}
	}
	x, _ := s.outsideAt(a)
	y, _ := s.outsideAt(b)
	d := 1 / (a - b)
	return edge{(x.zz - y.zz) * d, (x.zg - y.zg) * d, (x.gg - y.gg) * d}
}
