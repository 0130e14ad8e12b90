package radial

import (
	"math"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/modes/bessel"
)

const (
	vectorNodes = vectorDegree + 1
	frontSize   = 2 * vectorNodes
)

// vectorElement is one element of the mesh: radii, weights and q = V^2 f at its nodes (n)
// and Gauss points (g).
type vectorElement struct {
	piece          int
	half           float64 // half its width
	rn, wn, qn     [vectorNodes]float64
	rg, wg, qg     [vectorDegree]float64
	front          *[frontSize][frontSize]float64 // the factors L and, on the diagonal, D
	nodes          [frontSize]float64             // of the vector found last
	gauss          [vectorDegree]float64
	loadN          [frontSize]float64
	loadG, pivotsG [vectorDegree]float64
}

// terms are the coefficients of the quadratic form at the nodes and Gauss points of an
// element, weights included, or a coefficient of their Taylor series.
type terms struct {
	zz, gg [vectorNodes]float64  // of z^2 and g^2
	ee     [vectorDegree]float64 // of e^2
	sz, sg [vectorDegree]float64 // of z'^2 and g'^2
}

// edge holds the exterior's blocks.
type edge struct{ zz, zg, gg float64 }

// vectorSystem is the discrete problem of one family of one order.
type vectorSystem struct {
	family   VectorFamily
	nu       float64
	fields   int     // unknown functions that are continuous: 2, or 1 for TE and TM
	cladding float64 // (k a n2)^2
	elements []vectorElement
}

// newVectorSystem sets a system up. HE and EH modes of an order have the same.
func newVectorSystem(mesh []vectorElement, family VectorFamily, nu int, cladding float64) *vectorSystem {
	s := &vectorSystem{family: family, nu: float64(nu), fields: 2, cladding: cladding, elements: mesh}
	if nu == 0 {
		s.fields = 1
	}
	return s
}

// maxVectorSplits is how often an element is halved at most for the sake of its profile.
const maxVectorSplits = 4

// vectorMesh cuts the profile into elements.
func (p Profile) vectorMesh(v, cladding float64) ([]vectorElement, error) {
	// Degree 16 resolves more than the mesh's own degree.
	cuts, err := p.mesh(v * (resolution / vectorResolution))
	if err != nil {
		return nil, err
	}
	list := make([]vectorElement, 0, len(cuts))
	for k := range cuts {
		c := &cuts[k]
		piece := p.Pieces[c.piece]
		splits := maxVectorSplits
		if c.r[0] == 0 && piece.Graded {
			splits = 0
		}
		list = piece.vectorElements(list, c.piece, c.r[0], c.r[degree], v*v, cladding, splits)
	}
	if len(list) > maxElements {
		return nil, &domain.Error{Func: "radial", Argument: "v", Value: v, Allowed: "less: the profile would take over 4096 elements"}
	}
	fronts := make([][frontSize][frontSize]float64, len(list))
	for k := range list {
		list[k].front = &fronts[k]
	}
	return list, nil
}

// vectorElements appends the element from a to b, or parts of it where it would not resolve the
// profile.
func (p Piece) vectorElements(list []vectorElement, piece int, a, b, v2, cladding float64, splits int) []vectorElement {
	e := vectorElement{piece: piece, half: (b - a) / 2}
	for i := range e.rn {
		e.rn[i] = a + e.half*(1+lobattoNodes[i])
		e.wn[i] = e.half * lobattoWeights[i]
	}
	e.rn[vectorDegree] = b
	for q := range e.rg {
		e.rg[q] = a + e.half*(1+gaussNodes[q])
		e.wg[q] = e.half * gaussWeights[q]
		e.qg[q] = v2 * p.F(e.rg[q])
	}
	for i := range e.rn {
		e.qn[i] = v2 * p.F(e.rn[i])
	}
	if m := a + e.half; splits > 0 && m > a && m < b && !e.resolved(cladding) {
		list = p.vectorElements(list, piece, a, m, v2, cladding, splits-1)
		return p.vectorElements(list, piece, m, b, v2, cladding, splits-1)
	}
	return append(list, e)
}

// resolved tells whether q and n2^2/n^2 at the Gauss points follow from those at the nodes,
// the error of an eigenvalue being of the order of the square of theirs.
func (e *vectorElement) resolved(cladding float64) bool {
	for q, exact := range e.qg {
		value, inverse, scale := 0.0, 0.0, 0.0
		for i, x := range e.qn {
			r := 1 / (1 + x/cladding)
			value += gaussValues[i][q] * x
			inverse += gaussValues[i][q] * r
			scale = math.Max(scale, math.Abs(r))
		}
		if math.Abs(value-exact)*e.half*e.half > 1e-6 || math.Abs(inverse-1/(1+exact/cladding)) > 1e-7*scale {
			return false
		}
	}
	return true
}

// eta returns 1/beta^2, in units of the squared radius.
func (s *vectorSystem) eta(lambda float64) float64 { return 1 / (s.cladding + lambda) }

// at returns the coefficients that depend on lambda or the profile, and their derivatives
// with respect to lambda.
func (s *vectorSystem) at(e *vectorElement, lambda float64) (t terms) {
	if s.fields == 1 {
		for i, r := range e.rn {
			if r > 0 {
				t.gg[i] = e.wn[i] * (lambda - e.qn[i]) / r * s.rho(e.qn[i])
			}
		}
		for q, r := range e.rg {
			t.sg[q] = e.wg[q] / r * s.rho(e.qg[q])
		}
		return t
	}
	eta, nu2 := s.eta(lambda), s.nu*s.nu
	for i, r := range e.rn {
		if r > 0 {
			d := lambda - e.qn[i]
			t.zz[i] = e.wn[i] * (eta*nu2/r - (1-eta*d)*r)
			t.gg[i] = e.wn[i] * d / r
		}
	}
	for q, r := range e.rg {
		t.ee[q] = e.wg[q] * (r*(lambda-e.qg[q]) + nu2/r)
		t.sz[q] = e.wg[q] * eta * r
		t.sg[q] = e.wg[q] / r
	}
	return t
}

// rho returns n2^2/n^2 for TM modes, 1 for TE modes.
func (s *vectorSystem) rho(q float64) float64 {
	if s.family == VectorTE || math.IsInf(s.cladding, 1) {
		return 1
	}
	return s.cladding / (s.cladding + q)
}

// slope returns the derivative of at with respect to lambda.
func (s *vectorSystem) slope(e *vectorElement, lambda float64) (t terms) {
	if s.fields == 1 {
		for i, r := range e.rn {
			if r > 0 {
				t.gg[i] = e.wn[i] / r * s.rho(e.qn[i])
			}
		}
		return t
	}
	eta, nu2 := s.eta(lambda), s.nu*s.nu
	for i, r := range e.rn {
		if r > 0 {
			// eta' = -eta^2
			t.zz[i] = e.wn[i] * eta * (r*(1-eta*(lambda-e.qn[i])) - eta*nu2/r)
			t.gg[i] = e.wn[i] / r
		}
	}
	for q, r := range e.rg {
		t.ee[q] = e.wg[q] * r
		t.sz[q] = -e.wg[q] * eta * eta * r
	}
	return t
}

// decayRatio returns K_{l-1}(w)/(w K_l(w)), l >= 1, as a series in lambda = w^2. It obeys
//
//	q dc/dq = (q c^2 + 2 (l - 1) c - 1)/2,   c_l = 1/(2 (l - 1) + q c_{l-1}),
//
// where the equation serves some orders below l and the recurrence from there: next to
// cut-off its right side is all cancellation otherwise.
func decayRatio(l int, lambda float64) taylor.Series {
	w := math.Sqrt(lambda)
	q := taylor.Variable(lambda)
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
	return c
}

// outside returns the exterior's blocks as series, for lambda and eta as series in a
// variable. With kappa = -w K'(w)/K(w) = nu + lambda c and s = beta^2 - (k n2)^2,
//
//	Y_zz = nu^2/kappa - (k n2)^2 (kappa^2 - nu^2)/(kappa s),  Y_zg = -beta nu/kappa,  Y_gg = s/kappa
//
// in z/beta and g. For TE and TM it is G_1 = lambda c_1.
func (s *vectorSystem) outside(lambda, eta taylor.Series) (zz, zg, gg taylor.Series) {
	if s.fields == 1 {
		c := decayRatio(1, lambda[0]).Compose(lambda)
		return zz, zg, lambda.Mul(c)
	}
	c := decayRatio(int(s.nu), lambda[0]).Compose(lambda)
	lc := lambda.Mul(c)
	kappa := lc.Shift(s.nu).Inv()
	one := eta.Mul(lambda).Neg().Shift(1)
	zz = eta.Scale(s.nu * s.nu).Sub(one.Mul(c).Mul(lc.Shift(2 * s.nu))).Mul(kappa)
	return zz, kappa.Scale(-s.nu), lambda.Mul(kappa)
}

// outsideAt returns the blocks' values and derivatives with respect to lambda.
func (s *vectorSystem) outsideAt(lambda float64) (value, slope edge) {
	l := taylor.Series{lambda, 1}
	eta := s.eta(lambda)
	zz, zg, gg := s.outside(l, taylor.Series{eta, -eta * eta})
	return edge{zz[0], zg[0], gg[0]}, edge{zz[1], zg[1], gg[1]}
}

// outsideCutoff returns the blocks' limits at lambda = 0. For nu = 1, Y_zz falls without end:
// z is then held at 0 on the edge, and one more pivot negative.
func (s *vectorSystem) outsideCutoff() (y edge, held bool) {
	if s.fields == 1 {
		return y, false
	}
	if s.nu == 1 {
		return edge{zg: -1}, true
	}
	return edge{zz: s.eta(0)*s.nu - 1/(s.nu-1), zg: -1}, false
}

// tinyPivot is what a vanishing pivot is replaced by, relative to its scale.
const tinyPivot = 1e-18

// factor factorises T at lambda, from 0, element by element, each adding the Schur complement of
// those before it, and returns the number of modes above lambda: negative pivots, less the
// dimension of the space of gradients, on which T is negative for want of a curl.
func (s *vectorSystem) factor(lambda float64) (count int) {
	f := s.fields
	var y edge
	held := false
	if lambda > 0 {
		y, _ = s.outsideAt(lambda)
	} else {
		y, held = s.outsideCutoff()
	}
	for k := range s.elements {
		e := &s.elements[k]
		t := s.at(e, lambda)
		e.assemble(s, lambda, &t)
		a := e.front
		if k > 0 {
			b := s.elements[k-1].front
			for i := range f {
				for j := 0; j <= i; j++ {
					a[i][j] += b[vectorDegree*f+i][vectorDegree*f+j]
				}
			}
		}
		if f == 2 {
			count -= vectorDegree
			for _, p := range e.pivotsG {
				if p < 0 {
					count++
				}
			}
		}
		first, last := 0, vectorDegree*f
		if k == 0 {
			first = f // the fields vanish on the axis
		}
		if k == len(s.elements)-1 {
			last += f
			n := vectorDegree * f
			if f == 1 {
				a[n][n] += y.gg
			} else {
				a[n][n] += y.zz
				a[n+1][n] += y.zg
				a[n+1][n+1] += y.gg
			}
			if held {
				for j := range n {
					a[n][j] = 0
				}
				a[n][n], a[n+1][n] = -1, 0
			}
		}
		count += eliminate(a, first, last, vectorNodes*f)
	}
	return count
}

// assemble sets the lower triangle of the front to the element's matrix, e eliminated.
func (e *vectorElement) assemble(s *vectorSystem, lambda float64, t *terms) {
	a, f := e.front, s.fields
	var zz, zg, gg [vectorDegree]float64
	w := 1 / (e.half * e.half)
	if f == 1 {
		for q := range gg {
			gg[q] = w * t.sg[q]
		}
		for i := range vectorNodes {
			var u [vectorDegree]float64
			for q := range u {
				u[q] = gg[q] * gaussSlopes[i][q]
			}
			for j := 0; j <= i; j++ {
				d := &gaussSlopes[j]
				sum := 0.0
				for q := range u {
					sum += u[q] * d[q]
				}
				a[i][j] = sum
			}
			a[i][i] += t.gg[i]
		}
		return
	}
	for q, r := range e.rg {
		d := lambda - e.qg[q]
		p := t.ee[q]
		if scale := e.wg[q] * (s.nu*s.nu/r + r*math.Abs(d)); math.Abs(p) < 1e-12*scale {
			p = math.Copysign(1e-12*scale, p)
		}
		e.pivotsG[q] = p
		b, c := e.wg[q]*r, e.wg[q]*s.nu/r
		zz[q] = w * (t.sz[q]*p - b*b) / p
		zg[q] = -w * b * c / p
		gg[q] = w * e.wg[q] * e.wg[q] * d / p // t.sg - c^2/p
	}
	for i := range vectorNodes {
		var uz, ug, um [vectorDegree]float64
		for q := range uz {
			d := gaussSlopes[i][q]
			uz[q], um[q], ug[q] = zz[q]*d, zg[q]*d, gg[q]*d
		}
		r0, r1 := &a[2*i], &a[2*i+1]
		for j := 0; j <= i; j++ {
			d := &gaussSlopes[j]
			sz, sm, sg := 0.0, 0.0, 0.0
			for q := range uz {
				x := d[q]
				sz += uz[q] * x
				sm += um[q] * x
				sg += ug[q] * x
			}
			r0[2*j], r1[2*j], r1[2*j+1] = sz, sm, sg
			r0[2*j+1] = sm // not of the lower triangle for j = i
		}
		r0[2*i] += t.zz[i]
		r1[2*i+1] += t.gg[i]
		if e.rn[i] > 0 {
			r1[2*i] -= e.wn[i] * s.nu / e.rn[i]
		}
	}
}

// eliminate takes the unknowns from first to last-1 out of the lower triangle of a matrix of n
// unknowns, leaving the columns of L below the pivots, and counts negative pivots.
func eliminate(a *[frontSize][frontSize]float64, first, last, n int) (negative int) {
	var column, diagonal [frontSize]float64
	for j := first; j < n; j++ {
		diagonal[j] = math.Abs(a[j][j])
	}
	for j := first; j < last; j++ {
		p := a[j][j]
		scale := diagonal[j]
		for i := j + 1; i < n; i++ {
			column[i] = a[i][j]
			scale += math.Abs(column[i])
		}
		if math.Abs(p) <= tinyPivot*scale || p == 0 {
			p = tinyPivot*scale + math.SmallestNonzeroFloat64
			a[j][j] = p
		}
		if p < 0 {
			negative++
		}
		r := 1 / p
		for i := j + 1; i < n; i++ {
			l := column[i] * r
			row, c := a[i][j+1:i+1], column[j+1:i+1]
			c = c[:len(row)]
			for k := range row {
				row[k] -= l * c[k]
			}
			a[i][j] = l
		}
	}
	return negative
}

// solve sets the vector to what T at the lambda factorised last maps to the loads, which it
// destroys. Loads of nodes that elements share are added; their values are alike.
func (s *vectorSystem) solve() {
	f := s.fields
	n, m := vectorNodes*f, vectorDegree*f
	last := len(s.elements) - 1
	for k := range s.elements {
		e := &s.elements[k]
		if f == 2 {
			w := 1 / e.half
			for i := range vectorNodes {
				sz, sg := 0.0, 0.0
				for q, r := range e.rg {
					x := e.wg[q] * e.loadG[q] / e.pivotsG[q] * gaussSlopes[i][q]
					sz += x * r
					sg += x * s.nu / r
				}
				e.loadN[2*i] -= w * sz
				e.loadN[2*i+1] -= w * sg
			}
		}
		first, end := 0, m
		if k == 0 {
			first = f
			for i := range f {
				e.loadN[i] = 0
			}
		} else {
			for i := range f {
				e.loadN[i] += s.elements[k-1].loadN[m+i]
			}
		}
		if k == last {
			end = n
		}
		for j := first; j < end; j++ {
			y := e.loadN[j]
			for i := j + 1; i < n; i++ {
				e.loadN[i] -= e.front[i][j] * y
			}
		}
	}
	for k := last; k >= 0; k-- {
		e := &s.elements[k]
		first, end := 0, m
		if k == 0 {
			first = f
			for i := range f {
				e.nodes[i] = 0
			}
		}
		if k == last {
			end = n
		} else {
			for i := range f {
				e.nodes[m+i] = s.elements[k+1].nodes[i]
			}
		}
		for j := end - 1; j >= first; j-- {
			x := e.loadN[j] / e.front[j][j]
			for i := j + 1; i < n; i++ {
				x -= e.front[i][j] * e.nodes[i]
			}
			e.nodes[j] = x
		}
		if f == 2 {
			for q, r := range e.rg {
				z, g := e.slopes(q)
				e.gauss[q] = (e.loadG[q] - e.wg[q]*(r*z+s.nu/r*g)) / e.pivotsG[q]
			}
		}
	}
}

// slopes returns z' and g' of the vector at a Gauss point of a hybrid mode.
func (e *vectorElement) slopes(q int) (z, g float64) {
	for i := range vectorNodes {
		z += gaussSlopes[i][q] * e.nodes[2*i]
		g += gaussSlopes[i][q] * e.nodes[2*i+1]
	}
	return z / e.half, g / e.half
}

// slope1 returns the slope of the vector at a Gauss point of a TE or TM mode.
func (e *vectorElement) slope1(q int) (g float64) {
	for i := range vectorNodes {
		g += gaussSlopes[i][q] * e.nodes[i]
	}
	return g / e.half
}

// form returns x'T x at lambda and x'(dT/dlambda) x, of the vector, with e from its own
// values: no error of the factors enters.
func (s *vectorSystem) form(lambda float64) (value, slope float64) {
	y, dy := s.outsideAt(lambda)
	for k := range s.elements {
		e := &s.elements[k]
		t, d := s.at(e, lambda), s.slope(e, lambda)
		if s.fields == 1 {
			for i, x := range e.nodes[:vectorNodes] {
				value += t.gg[i] * x * x
				slope += d.gg[i] * x * x
			}
			for q := range e.rg {
				g := e.slope1(q)
				value += t.sg[q] * g * g
			}
			continue
		}
		for i, r := range e.rn {
			if r > 0 {
				z, g := e.nodes[2*i], e.nodes[2*i+1]
				value += t.zz[i]*z*z + t.gg[i]*g*g - 2*e.wn[i]*s.nu/r*z*g
				slope += d.zz[i]*z*z + d.gg[i]*g*g
			}
		}
		for q, r := range e.rg {
			z, g := e.slopes(q)
			x, w := e.gauss[q], e.wg[q]
			curl := g + s.nu*x
			// t.ee holds nu^2/r of the curl.
			value += w*(r*(lambda-e.qg[q])*x*x+2*r*x*z+curl*curl/r) + t.sz[q]*z*z
			slope += d.ee[q]*x*x + d.sz[q]*z*z
		}
	}
	e := &s.elements[len(s.elements)-1]
	if s.fields == 1 {
		g := e.nodes[vectorDegree]
		return value + y.gg*g*g, slope + dy.gg*g*g
	}
	z, g := e.nodes[2*vectorDegree], e.nodes[2*vectorDegree+1]
	value += y.zz*z*z + 2*y.zg*z*g + y.gg*g*g
	slope += dy.zz*z*z + 2*dy.zg*z*g + dy.gg*g*g
	return value, slope
}

// loadSlope sets the loads to (dT/dlambda) x, divided by a number.
func (s *vectorSystem) loadSlope(lambda, divisor float64) {
	_, dy := s.outsideAt(lambda)
	w := 1 / divisor
	for k := range s.elements {
		e := &s.elements[k]
		d := s.slope(e, lambda)
		if s.fields == 1 {
			for i := range vectorNodes {
				e.loadN[i] = w * d.gg[i] * e.nodes[i]
			}
			continue
		}
		var z [vectorDegree]float64
		for q := range e.rg {
			zq, _ := e.slopes(q)
			z[q] = w * d.sz[q] * zq / e.half
			e.loadG[q] = w * d.ee[q] * e.gauss[q]
		}
		for i := range vectorNodes {
			sum := 0.0
			for q := range z {
				sum += z[q] * gaussSlopes[i][q]
			}
			e.loadN[2*i] = sum + w*d.zz[i]*e.nodes[2*i]
			e.loadN[2*i+1] = w * d.gg[i] * e.nodes[2*i+1]
		}
	}
	e := &s.elements[len(s.elements)-1]
	n := vectorDegree
	if s.fields == 1 {
		e.loadN[n] += w * dy.gg * e.nodes[n]
		return
	}
	z, g := e.nodes[2*n], e.nodes[2*n+1]
	e.loadN[2*n] += w * (dy.zz*z + dy.zg*g)
	e.loadN[2*n+1] += w * (dy.zg*z + dy.gg*g)
}

// loadRandom sets the loads to numbers without pattern, always the same.
func (s *vectorSystem) loadRandom() {
	x := uint64(1)
	for k := range s.elements {
		e := &s.elements[k]
		for i := range vectorNodes * s.fields {
			// Knuth's linear congruential generator.
			x = x*6364136223846793005 + 1442695040888963407
			e.loadN[i] = float64(int64(x)) * 0x1p-63
		}
		e.loadG = [vectorDegree]float64{}
	}
}

// longitudinal returns the integral of r z times the curl along the axis, (g' + nu e)/r, which
// is E_z times H_z: above 0 for HE modes, below for EH modes.
func (s *vectorSystem) longitudinal() float64 {
	sum := 0.0
	for k := range s.elements {
		e := &s.elements[k]
		for q := range e.rg {
			z := 0.0
			for i := range vectorNodes {
				z += gaussValues[i][q] * e.nodes[2*i]
			}
			_, g := e.slopes(q)
			sum += e.wg[q] * z * (g + s.nu*e.gauss[q])
		}
	}
	return sum
}
