package radial

import (
	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/modes/bessel"
	"math"
)

// Series returns a mode and the Taylor series of its lambda = w^2 with respect to a
// parameter that the profile depends on (a wavelength, say). potential returns the series of
// V^2 f at a radius within a piece of the profile, whose value must be v^2 times the piece's F
// there. The error matches
// ErrCutoff where the mode is not guided.
//
// It is the perturbation series of the eigenvalue problem, term by term: with T_j the j-th
// coefficient of T, T_0 psi_k = -sum over j >= 1 of T_j psi_{k-j}, and lambda_k makes the
// right side orthogonal to psi_0.
func Series(p Profile, v float64, l, m int, potential func(piece int, r float64) (taylor.Series, error)) (Mode, taylor.Series, error) {
	const function = "radial.Series"
	if err := checkLabel(function, l, m); err != nil {
		return Mode{}, taylor.Series{}, err
	}
	if err := p.check(function, v); err != nil {
		return Mode{}, taylor.Series{}, err
	}
	mesh, err := p.mesh(v)
	if err != nil {
		return Mode{}, taylor.Series{}, err
	}
	s := newSystem(mesh, l, v, true)
	value, err := s.root(function, mesh, v, m)
	if err != nil {
		return Mode{}, taylor.Series{}, err
	}
	given := make([][degree + 1]taylor.Series, len(mesh))
	for k := range mesh {
		for i, r := range mesh[k].r {
			if given[k][i], err = potential(mesh[k].piece, r); err != nil {
				return Mode{}, taylor.Series{}, err
			}
		}
	}
	lambda := s.series(mesh, value, given)
	if !lambda.Finite() {
		return Mode{}, taylor.Series{}, domain.Result(function, "lambda's derivatives", math.NaN())
	}
	return newMode(l, m, v, value), lambda, nil
}

// field is a nodal field, the ends of neighbouring elements alike.
type field [][degree + 1]float64

func (s *system) series(mesh []element, value float64, given [][degree + 1]taylor.Series) taylor.Series {
	fixed := s.vector(value)
	lambda := taylor.Constant(value)
	outside := exteriorSeries(s.l, value)
	var psi [taylor.Order]field
	psi[0] = s.expand(value, s.x, nil)
	n := len(mesh) - 1
	edge := func(f field) float64 { return f[n][degree] }
	// inner product with psi_0 of what T_j, less its part in lambda_j, makes of a field.
	product := func(j int, f field, kappa float64) float64 {
		sum := kappa * edge(psi[0]) * edge(f)
		for k := range mesh {
			for i, mass := range mesh[k].mass {
				sum += mass * psi[0][k][i] * f[k][i] * (lambda[j] - given[k][i][j])
			}
		}
		return sum
	}
	norm := outside[1] * edge(psi[0]) * edge(psi[0])
	for k := range mesh {
		for i, mass := range mesh[k].mass {
			norm += mass * psi[0][k][i] * psi[0][k][i]
		}
	}
	for order := 1; order <= taylor.Order; order++ {
		kappa := outside.Compose(lambda) // right up to what lambda[order] adds
		sum := 0.0
		for j := 1; j <= order; j++ {
			sum += product(j, psi[order-j], kappa[j])
		}
		lambda[order] = -sum / norm
		if order == taylor.Order {
			break
		}
		kappa = outside.Compose(lambda)
		load := make(field, len(mesh))
		for j := 1; j <= order; j++ {
			f := psi[order-j]
			for k := range mesh {
				for i, mass := range mesh[k].mass {
					load[k][i] -= mass * f[k][i] * (lambda[j] - given[k][i][j])
				}
			}
			load[n][degree] -= kappa[j] * edge(f)
		}
		psi[order] = s.solve(value, fixed, load)
	}
	return lambda
}

// vector leaves the vector of the root in s.x, and the pivots, and returns the node at
// which it is 1.
func (s *system) vector(lambda float64) (fixed int) {
	s.evaluate(lambda)
	for i, x := range s.x {
		if i >= s.first && x == 1 {
			return i
		}
	}
	return s.first
}

// expand returns the nodal field with the given values at the ends, and a load inside in
// the diagonal basis (nil for none).
func (s *system) expand(lambda float64, ends []float64, load []row) field {
	f := make(field, len(s.elements))
	for k := range s.elements {
		c := &s.elements[k]
		left, right := ends[k], ends[k+1]
		if k < s.first {
			left = 0
		}
		var z row
		for i := range inner {
			z[i] = -(c.a[i]*left + c.b[i]*right)
			if load != nil {
				z[i] += load[k][i]
			}
			z[i] /= c.theta[i] + lambda
		}
		f[k][0], f[k][degree] = left, right
		for i := range inner {
			sum := 0.0
			for j := range inner {
				sum += c.rows[i][j] * z[j]
			}
			f[k][i+1] = c.scale[i] * sum
		}
	}
	return f
}

// solve returns the field that T_0 makes the load of, with value 0 at the fixed node. The
// load must be orthogonal to the vector of the root; loads at ends that elements share are
// added.
func (s *system) solve(lambda float64, fixed int, load field) field {
	n := len(s.elements)
	right := make([]float64, n+1)
	inside := make([]row, n)
	for k := range s.elements {
		c := &s.elements[k]
		right[k] += load[k][0]
		right[k+1] += load[k][degree]
		for i := range inner {
			sum := 0.0
			for j := range inner {
				sum += c.rows[j][i] * c.scale[j] * load[k][j+1]
			}
			inside[k][i] = sum
			sum /= c.theta[i] + lambda
			right[k] -= c.a[i] * sum
			right[k+1] -= c.b[i] * sum
		}
	}
	ends := make([]float64, n+1)
	// The pivots from the axis hold below the fixed node, those from the edge above it.
	for i := s.first + 1; i < fixed; i++ {
		right[i] -= s.o[i-1] / s.up[i-1] * right[i-1]
	}
	for i := fixed - 1; i >= s.first; i-- {
		ends[i] = (right[i] - s.o[i]*ends[i+1]) / s.up[i]
	}
	for i := n - 1; i > fixed; i-- {
		right[i] -= s.o[i] / s.down[i+1] * right[i+1]
	}
	for i := fixed + 1; i <= n; i++ {
		ends[i] = (right[i] - s.o[i-1]*ends[i-1]) / s.down[i]
	}
	return s.expand(lambda, ends, inside)
}

// exteriorSeries returns kappa as a Taylor series in lambda. With q = lambda and kappa = l +
// q c_l, c_l = K_{l-1}/(w K_l),
//
//	q dc/dq = (q c^2 + 2 (l - 1) c - 1)/2,   c_l = 1/(2 (l - 1) + q c_{l-1}),
//
// where the equation serves some orders below l and the recurrence from there: next to
// cut-off its right side is all cancellation otherwise. For l = 0, q dG/dq = (G^2 - q)/2.
func exteriorSeries(l int, lambda float64) taylor.Series {
	w := math.Sqrt(lambda)
	q := taylor.Variable(lambda)
	if l == 0 {
		g := taylor.Series{}
		g[0], _ = bessel.Decay(0, w)
		for k := 0; k < taylor.Order; k++ {
			rise := g.Square().Sub(q)[k] / 2
			g[k+1] = (rise - float64(k)*g[k]) / (float64(k+1) * lambda)
		}
		return g
	}
	first := l
	if w < 2*float64(l) {
		first = max(1, l-taylor.Order)
	}
	c := taylor.Series{}
	g, _ := bessel.Decay(first, w)
	c[0] = g / lambda
	for k := 0; k < taylor.Order; k++ {
		rise := q.Mul(c.Square()).Add(c.Scale(2 * float64(first-1)))[k]
		if k == 0 {
			rise--
		}
		c[k+1] = (rise/2 - float64(k)*c[k]) / (float64(k+1) * lambda)
	}
	for j := first; j < l; j++ {
		c = q.Mul(c).Shift(2 * float64(j)).Inv()
	}
	return q.Mul(c).Shift(float64(l))
}
