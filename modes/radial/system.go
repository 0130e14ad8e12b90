package radial

import (
	"math"

	"glassthread/modes/bessel"
)

// condensed is an element with its inside eliminated for one order l. In the basis that
// diagonalises the inside, the couplings of the two ends at any lambda are sums over its
// eigenvalues theta:
//
//	T_aa = aa + lambda ma - sum a_i^2/(theta_i + lambda), and likewise bb and ab.
type condensed struct {
	theta, a, b        row
	aa, bb, ab, ma, mb float64
	rows               []row // the transformation, if it was asked for
	scale              row   // 1/sqrt(mass) of the inner nodes
}

// condense eliminates the inside of an element.
func (e *element) condense(l int, v float64, keep bool) (c condensed) {
	l2 := float64(l) * float64(l)
	v2 := v * v
	var s square
	for i := range inner {
		c.scale[i] = 1 / math.Sqrt(e.mass[i+1])
	}
	for i := range inner {
		for j := 0; j <= i; j++ {
			s[i][j] = e.stiff[i+1][j+1] * c.scale[i] * c.scale[j]
		}
		r := e.r[i+1]
		s[i][i] += l2/(r*r) - v2*e.f[i+1]
	}
	var rows []row
	if keep {
		rows = make([]row, inner+2)
		for i := range inner {
			rows[i+2][i] = 1
		}
		c.rows = rows[2:]
	} else {
		var two [2]row
		rows = two[:]
	}
	for i := range inner {
		rows[0][i] = e.stiff[0][i+1] * c.scale[i]
		rows[1][i] = e.stiff[degree][i+1] * c.scale[i]
	}
	c.theta = diagonalise(&s, rows)
	c.a, c.b = rows[0], rows[1]
	at := func(i int) float64 {
		d := e.stiff[i][i] - v2*e.f[i]*e.mass[i]
		if l > 0 && e.r[i] > 0 {
			d += l2 * e.mass[i] / (e.r[i] * e.r[i])
		}
		return d
	}
	c.aa, c.bb, c.ab = at(0), at(degree), e.stiff[0][degree]
	c.ma, c.mb = e.mass[0], e.mass[degree]
	return c
}

// system is the condensed problem of one order: a symmetric tridiagonal matrix over the
// ends of the elements, whose entries depend on lambda.
type system struct {
	l        int
	elements []condensed
	first    int // 1 for l > 0, whose field vanishes on the axis, else 0

	// Workspace of evaluate: diagonal and off-diagonal, their derivatives, pivots from
	// either end, and the vector.
	d, o, dd, do, up, down, x []float64
}

func newSystem(mesh []element, l int, v float64, keep bool) *system {
	n := len(mesh) + 1
	s := &system{l: l, elements: make([]condensed, len(mesh))}
	if l > 0 {
		s.first = 1
	}
	for i := range mesh {
		s.elements[i] = mesh[i].condense(l, v, keep)
	}
	work := make([]float64, 7*n)
	for i, w := range []*[]float64{&s.d, &s.o, &s.dd, &s.do, &s.up, &s.down, &s.x} {
		*w = work[i*n : (i+1)*n]
	}
	return s
}

// exterior returns kappa and its derivative with respect to lambda (DLMF 10.29.2 and
// the Riccati equation of K's ratio). At lambda = 0 the derivative is not used.
func exterior(l int, lambda float64) (kappa, slope float64) {
	if lambda <= 0 {
		return float64(l), 0
	}
	g, _ := bessel.Decay(l, math.Sqrt(lambda))
	return float64(l) + g, (g*(g+2*float64(l))/lambda - 1) / 2
}

// fill sets the tridiagonal matrix at lambda, and counts the negative pivots inside the
// elements.
func (s *system) fill(lambda float64) (count int) {
	for i := range s.d {
		s.d[i], s.dd[i] = 0, 0
	}
	for k := range s.elements {
		c := &s.elements[k]
		aa, bb, ab := c.aa+lambda*c.ma, c.bb+lambda*c.mb, c.ab
		daa, dbb, dab := c.ma, c.mb, 0.0
		for i := range inner {
			t := c.theta[i] + lambda
			if t < 0 {
				count++
			}
			if math.Abs(t) < 1e-18*math.Abs(lambda) {
				t = 1e-18 * (math.Abs(lambda) + 1)
			}
			r := 1 / t
			a, b := c.a[i]*r, c.b[i]*r
			aa -= c.a[i] * a
			bb -= c.b[i] * b
			ab -= c.a[i] * b
			daa += a * a
			dbb += b * b
			dab += a * b
		}
		s.d[k] += aa
		s.dd[k] += daa
		s.d[k+1] += bb
		s.dd[k+1] += dbb
		s.o[k], s.do[k] = ab, dab
	}
	kappa, slope := exterior(s.l, lambda)
	n := len(s.d) - 1
	s.d[n] += kappa
	s.dd[n] += slope
	return count
}

// count returns the number of modes above lambda.
func (s *system) count(lambda float64) int {
	n := s.fill(lambda)
	pivot := 0.0
	for i := s.first; i < len(s.d); i++ {
		p := s.d[i]
		if i > s.first {
			p -= s.o[i-1] * s.o[i-1] / pivot
		}
		if p == 0 {
			p = 1e-18 * (math.Abs(s.d[i]) + math.SmallestNonzeroFloat64)
		}
		if p < 0 {
			n++
		}
		pivot = p
	}
	return n
}

// evaluate returns the count at lambda and the Newton step towards the nearest root, by the
// Rayleigh quotient of the vector that the smallest twisted pivot gives (J. W. Demmel,
// Applied Numerical Linear Algebra, 1997, section 5.3.4, for twisted factors).
func (s *system) evaluate(lambda float64) (count int, step float64) {
	count = s.fill(lambda)
	n := len(s.d) - 1
	tiny := func(p, scale float64) float64 {
		if p == 0 {
			return 1e-18 * (math.Abs(scale) + 1e-300)
		}
		return p
	}
	for i := s.first; i <= n; i++ {
		p := s.d[i]
		if i > s.first {
			p -= s.o[i-1] * s.o[i-1] / s.up[i-1]
		}
		s.up[i] = tiny(p, s.d[i])
		if s.up[i] < 0 {
			count++
		}
	}
	best, at := math.Inf(1), n
	for i := n; i >= s.first; i-- {
		p := s.d[i]
		if i < n {
			p -= s.o[i] * s.o[i] / s.down[i+1]
		}
		s.down[i] = tiny(p, s.d[i])
		gamma := s.up[i] + (s.down[i] - s.d[i])
		// Relative to the derivative there, so that ends of thin elements do not win.
		if g := math.Abs(gamma) / s.dd[i]; g < best {
			best, at = g, i
		}
	}
	gamma := s.up[at] + (s.down[at] - s.d[at])
	s.x[at] = 1
	norm := s.dd[at]
	for i := at; i > s.first; i-- {
		s.x[i-1] = -s.o[i-1] * s.x[i] / s.up[i-1]
		norm += s.dd[i-1]*s.x[i-1]*s.x[i-1] + 2*s.do[i-1]*s.x[i-1]*s.x[i]
	}
	for i := at; i < n; i++ {
		s.x[i+1] = -s.o[i] * s.x[i] / s.down[i+1]
		norm += s.dd[i+1]*s.x[i+1]*s.x[i+1] + 2*s.do[i]*s.x[i+1]*s.x[i]
	}
	return count, -gamma / norm
}

// roots appends to list the lambda of the modes above low, in falling order, given their
// number and a bound high above them all.
func (s *system) roots(low, high float64, n int, list []float64) []float64 {
	return s.between(low, n, high, 0, list)
}

// between finds the roots of the counts nHigh+1 to nLow, which lie between low and high.
func (s *system) between(low float64, nLow int, high float64, nHigh int, list []float64) []float64 {
	if nLow <= nHigh {
		return list
	}
	if nLow == nHigh+1 {
		return append(list, s.polish(low, high, nHigh))
	}
	middle := s.middle(low, high)
	if !(middle > low && middle < high) { // as good as equal
		for range nLow - nHigh {
			list = append(list, middle)
		}
		return list
	}
	n := min(max(s.count(middle), nHigh), nLow)
	list = s.between(middle, n, high, nHigh, list)
	return s.between(low, nLow, middle, n, list)
}

// middle halves an interval, by its ratio where that is large: for l = 0 the modes next to
// cut-off lie at exponentially small lambda.
func (s *system) middle(low, high float64) float64 {
	if high > 64*low {
		return high / 16
	}
	return low + (high-low)/2
}

// polish finds the one root between low and high, above which there are nHigh.
func (s *system) polish(low, high float64, nHigh int) float64 {
	x := s.middle(low, high)
	for range 200 {
		n, step := s.evaluate(x)
		if n > nHigh {
			low = x
		} else {
			high = x
		}
		if math.Abs(step) <= 1e-9*x {
			// The step after this one is of the order of its cube.
			if y := x + step; y > 0 {
				return y
			}
		}
		next := x + step
		if !(next > low && next < high) {
			next = s.middle(low, high)
			if !(next > low && next < high) {
				return x
			}
		}
		x = next
	}
	return x
}
