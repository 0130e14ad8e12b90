package radial

import (
	"math"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// VectorSeries returns a vector mode and the Taylor series of its lambda = w^2 with respect to a
// parameter that the fibre depends on (a wavelength, say). potential returns the series of V^2 f at a
// radius within a piece of the profile, whose value must be v^2 times the piece's F there;
// cladding is that of (k a n2)^2, whose value must be above 0. The error matches ErrCutoff where
// the mode is not guided.
//
// It is the perturbation series of the eigenvalue problem, term by term: with T_j the j-th
// coefficient of T, T_0 x_k = -sum over j >= 1 of T_j x_{k-j}, and lambda_k makes the right
// side orthogonal to x_0.
func VectorSeries(p Profile, v float64, cladding taylor.Series, family VectorFamily, nu, m int, potential func(piece int, r float64) (taylor.Series, error)) (VectorMode, taylor.Series, error) {
	const function = "radial.VectorSeries"
	q, root, err := p.vectorRoot(function, v, math.Sqrt(cladding[0]), family, nu, m)
	if err != nil {
		return VectorMode{}, taylor.Series{}, err
	}
	given := make([]vectorPotential, len(q.mesh))
	for k := range q.mesh {
		e := &q.mesh[k]
		for i, r := range e.rn {
			if given[k].nodes[i], err = potential(e.piece, r); err != nil {
				return VectorMode{}, taylor.Series{}, err
			}
		}
		for i, r := range e.rg {
			if given[k].gauss[i], err = potential(e.piece, r); err != nil {
				return VectorMode{}, taylor.Series{}, err
			}
		}
	}
	s := newVectorSystem(q.mesh, family, nu, q.cladding)
	lambda := s.series(root.lambda, cladding, given)
	if !lambda.Finite() {
		return VectorMode{}, taylor.Series{}, domain.Result(function, "lambda's derivatives", math.NaN())
	}
	return newVectorMode(family, nu, m, v, root.lambda), lambda, nil
}

// vectorPotential is V^2 f on an element.
type vectorPotential struct {
	nodes [vectorNodes]taylor.Series
	gauss [vectorDegree]taylor.Series
}

// vectorField is a vector, or a load, on an element.
type vectorField struct {
	nodes [frontSize]float64
	gauss [vectorDegree]float64
}

// settle leaves in the elements the vector of a root, of norm x'(dT/dlambda) x = 1, and
// returns it.
func (s *vectorSystem) settle(root float64) []vectorField {
	s.factor(root)
	s.loadRandom()
	for range 3 {
		s.solve()
		_, slope := s.form(root)
		s.scale(1 / math.Sqrt(math.Abs(slope)))
		s.loadSlope(root, 1)
	}
	return s.vector()
}

func (s *vectorSystem) scale(by float64) {
	for k := range s.elements {
		e := &s.elements[k]
		for i := range e.nodes {
			e.nodes[i] *= by
		}
		for q := range e.gauss {
			e.gauss[q] *= by
		}
	}
}

func (s *vectorSystem) vector() []vectorField {
	f := make([]vectorField, len(s.elements))
	for k := range s.elements {
		f[k] = vectorField{s.elements[k].nodes, s.elements[k].gauss}
	}
	return f
}

// series returns lambda's series about a root.
func (s *vectorSystem) series(root float64, cladding taylor.Series, given []vectorPotential) taylor.Series {
	lambda := taylor.Constant(root)
	var x [taylor.Order][]vectorField
	x[0] = s.settle(root)
	s.loadSlope(root, 1)
	dual := s.loads() // x'(dT/dlambda), for taking x_0 out of a vector
	// A little off the root the factors are not singular; refinement makes up for it.
	s.factor(root * (1 + 1e-9))
	load := make([]vectorField, len(s.elements))
	var t [taylor.Order + 1][]terms
	for j := range t {
		t[j] = make([]terms, len(s.elements))
	}
	for order := 1; order <= taylor.Order; order++ {
		var y [taylor.Order + 1]edge
		set := func() {
			eta := cladding.Add(lambda).Inv()
			zz, zg, gg := s.outside(lambda, eta)
			for j := range y {
				y[j] = edge{zz[j], zg[j], gg[j]}
			}
			for k := range s.elements {
				s.expand(k, lambda, eta, cladding, &given[k], &t)
			}
		}
		fill := func() {
			clear(load)
			for j := 1; j <= order; j++ {
				s.apply(load, x[order-j], t[j], y[j], false)
			}
		}
		set()
		fill()
		lambda[order] = -dot(x[0], load)
		if order == taylor.Order {
			break
		}
		set()
		fill()
		x[order] = s.refined(root, load, x[0], dual)
	}
	return lambda
}

// refined solves T_0 x = -load without its part along x_0.
func (s *vectorSystem) refined(root float64, load, x0, dual []vectorField) []vectorField {
	t := make([]terms, len(s.elements))
	for k := range s.elements {
		t[k] = s.at(&s.elements[k], root)
	}
	y, _ := s.outsideAt(root)
	sum := make([]vectorField, len(load))
	rest := make([]vectorField, len(load))
	for range 4 {
		copy(rest, load)
		s.apply(rest, sum, t, y, true)
		for k := range s.elements {
			e := &s.elements[k]
			for i, r := range rest[k].nodes {
				e.loadN[i] = -r
			}
			for q, r := range rest[k].gauss {
				e.loadG[q] = -r
			}
		}
		s.solve()
		for k := range s.elements {
			for i, r := range s.elements[k].nodes {
				sum[k].nodes[i] += r
			}
			for q, r := range s.elements[k].gauss {
				sum[k].gauss[q] += r
			}
		}
		part := dot(dual, sum)
		for k := range sum {
			for i := range sum[k].nodes {
				sum[k].nodes[i] -= part * x0[k].nodes[i]
			}
			for q := range sum[k].gauss {
				sum[k].gauss[q] -= part * x0[k].gauss[q]
			}
		}
	}
	return sum
}

func (s *vectorSystem) loads() []vectorField {
	f := make([]vectorField, len(s.elements))
	for k := range s.elements {
		f[k] = vectorField{s.elements[k].loadN, s.elements[k].loadG}
		if s.fields == 1 {
			f[k].gauss = [vectorDegree]float64{}
		}
	}
	return f
}

func dot(a, b []vectorField) float64 {
	sum := 0.0
	for k := range a {
		for i, x := range a[k].nodes {
			sum += x * b[k].nodes[i]
		}
		for q, x := range a[k].gauss {
			sum += x * b[k].gauss[q]
		}
	}
	return sum
}

// expand sets the coefficients of an element's terms.
func (s *vectorSystem) expand(k int, lambda, eta, cladding taylor.Series, given *vectorPotential, t *[taylor.Order + 1][]terms) {
	e := &s.elements[k]
	rho := func(q taylor.Series) taylor.Series {
		if s.family == VectorTE {
			return taylor.Constant(1)
		}
		return cladding.Quo(cladding.Add(q))
	}
	nu2 := s.nu * s.nu
	for i, r := range e.rn {
		if r == 0 {
			continue
		}
		d := lambda.Sub(given.nodes[i])
		if s.fields == 1 {
			d = d.Mul(rho(given.nodes[i]))
		}
		zz := eta.Scale(nu2 / r).Add(eta.Mul(d).Shift(-1).Scale(r))
		for j := range t {
			t[j][k].gg[i] = e.wn[i] / r * d[j]
			if s.fields == 2 {
				t[j][k].zz[i] = e.wn[i] * zz[j]
			}
		}
	}
	for q, r := range e.rg {
		if s.fields == 1 {
			p := rho(given.gauss[q])
			for j := range t {
				t[j][k].sg[q] = e.wg[q] / r * p[j]
			}
			continue
		}
		for j := range t {
			t[j][k].ee[q] = e.wg[q] * r * (lambda[j] - given.gauss[q][j])
			t[j][k].sz[q] = e.wg[q] * r * eta[j]
		}
	}
}

// apply adds what a matrix makes of a vector to the loads; whole adds the terms that do not
// depend on anything, of T_0, whose ee holds nu^2/r.
func (s *vectorSystem) apply(load, x []vectorField, t []terms, y edge, whole bool) {
	n := vectorDegree
	for k := range s.elements {
		e, to, from, t := &s.elements[k], &load[k], &x[k], &t[k]
		w := 1 / e.half
		if s.fields == 1 {
			for i := range vectorNodes {
				to.nodes[i] += t.gg[i] * from.nodes[i]
			}
			for q := range e.rg {
				g := 0.0
				for i := range vectorNodes {
					g += gaussSlopes[i][q] * from.nodes[i]
				}
				g *= w * w * t.sg[q]
				for i := range vectorNodes {
					to.nodes[i] += g * gaussSlopes[i][q]
				}
			}
			continue
		}
		for i, r := range e.rn {
			z, g := from.nodes[2*i], from.nodes[2*i+1]
			to.nodes[2*i] += t.zz[i] * z
			to.nodes[2*i+1] += t.gg[i] * g
			if whole && r > 0 {
				c := e.wn[i] * s.nu / r
				to.nodes[2*i] -= c * g
				to.nodes[2*i+1] -= c * z
			}
		}
		for q, r := range e.rg {
			z, g := 0.0, 0.0
			for i := range vectorNodes {
				z += gaussSlopes[i][q] * from.nodes[2*i]
				g += gaussSlopes[i][q] * from.nodes[2*i+1]
			}
			z, g = w*z, w*g
			a := from.gauss[q]
			to.gauss[q] += t.ee[q] * a
			fz, fg := t.sz[q]*z, 0.0
			if whole {
				b, c := e.wg[q]*r, e.wg[q]*s.nu/r
				to.gauss[q] += b*z + c*g
				fz += b * a
				fg = t.sg[q]*g + c*a
			}
			for i := range vectorNodes {
				to.nodes[2*i] += w * fz * gaussSlopes[i][q]
				to.nodes[2*i+1] += w * fg * gaussSlopes[i][q]
			}
		}
	}
	e, f := &load[len(load)-1], &x[len(load)-1]
	if s.fields == 1 {
		e.nodes[n] += y.gg * f.nodes[n]
		return
	}
	z, g := f.nodes[2*n], f.nodes[2*n+1]
	e.nodes[2*n] += y.zz*z + y.zg*g
	e.nodes[2*n+1] += y.zg*z + y.gg*g
}
