package radial

import "math"

// Solution is a mode with its field inside R = 1, normalised so that the integral of psi^2
// R over the whole cross-section, the exterior included, is 1.
type Solution struct {
	Mode
	Nodes []Node // in the order of R; the ends of elements stand twice
	// Outside is the share of power beyond R = 1, kappa' psi(1)^2.
	Outside float64
}

// Node is the field at one radius.
type Node struct {
	Piece  int     // of the profile
	R, Psi float64 // radius and field
	Weight float64 // the sum over nodes of Weight g(R) is the integral of g psi^2 R up to R = 1
}

// SolveField returns a mode with its field. The field has a relative error of about 1e-8 of its
// largest value between nodes' own errors of 1e-11; integrals of it converge like b does. The
// error matches ErrCutoff where the mode is not guided.
func SolveField(p Profile, v float64, l, m int) (Solution, error) {
	const function = "radial.SolveField"
	if err := checkLabel(function, l, m); err != nil {
		return Solution{}, err
	}
	if err := p.check(function, v); err != nil {
		return Solution{}, err
	}
	mesh, err := p.mesh(v)
	if err != nil {
		return Solution{}, err
	}
	s := newSystem(mesh, l, v, true)
	lambda, err := s.root(function, mesh, v, m)
	if err != nil {
		return Solution{}, err
	}
	s.vector(lambda)
	psi := s.expand(lambda, s.x, nil)
	edge := psi[len(mesh)-1][degree]
	_, slope := exterior(l, lambda)
	out := slope * edge * edge
	norm := out
	for k := range mesh {
		for i, mass := range mesh[k].mass {
			norm += mass * psi[k][i] * psi[k][i]
		}
	}
	scale := math.Copysign(1/math.Sqrt(norm), edge)
	sol := Solution{Mode: newMode(l, m, v, lambda), Outside: out / norm}
	for k := range mesh {
		for i, mass := range mesh[k].mass {
			y := scale * psi[k][i]
			sol.Nodes = append(sol.Nodes, Node{mesh[k].piece, mesh[k].r[i], y, mass * y * y})
		}
	}
	return sol, nil
}

// Mean returns the integral of g psi^2 R over R < 1: the first-order change of lambda when
// V^2 f changes by g.
func (s *Solution) Mean(g func(piece int, r float64) float64) float64 {
	sum := 0.0
	for _, n := range s.Nodes {
		if n.Weight != 0 {
			sum += n.Weight * g(n.Piece, n.R)
		}
	}
	return sum
}

// Edge returns psi^2 R where a piece ends: the first-order change of lambda for a unit jump
// of V^2 f whose place moves outwards there.
func (s *Solution) Edge(piece int) float64 {
	for i := len(s.Nodes) - 1; i >= 0; i-- {
		if n := s.Nodes[i]; n.Piece == piece {
			return n.Psi * n.Psi * n.R
		}
	}
	return 0
}
