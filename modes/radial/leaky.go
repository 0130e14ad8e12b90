package radial

import (
	"errors"
	"math"
	"math/cmplx"

	"glassthread/materials/domain"
)

// ErrNoResonance says that a mode beyond its cut-off has no resonance narrow enough to be
// called a mode: its field leaks away as fast as it goes round the fibre.
var ErrNoResonance = errors.New("no narrow leaky resonance")

// LeakyMode is a scalar mode with a loss by leakage through the layers around it, in pure
// numbers. With the time factor exp(-i omega t) and the field psi(R) exp(i beta z), beta^2 a^2
// = k^2 a^2 n2^2 + Lambda: the imaginary part of Lambda is positive, and the mode's power
// falls as exp(-2 Im(beta) z). Where the mode is guided, Lambda is real and positive.
type LeakyMode struct {
	L, M   int        // azimuthal order, from 0; radial number, from 1
	V      float64    // normalised frequency
	Lambda complex128 // w^2 = V^2 b = -u^2, u being the transverse wave number outside
}

// Limits of the search for a leaky mode.
const (
	leastDepth    = 1.0 / 64 // the depth below lambda = 0 that is searched first
	windingPoints = 512      // the most points on the circle of the proof
)

// Leaky returns the mode LP(l, m) of the profile at v on either side of its cut-off. Beyond
// cut-off the field outside R = 1 is continued from K_l(w R) to an outgoing wave H_l^(1)(u R)
// that grows with R, and lambda is complex (A. W. Snyder and J. D. Love, Optical Waveguide
// Theory, 1983, chapter 24). F may have either sign, and need not exceed 0 anywhere: the
// outer medium may have the highest index of all.
//
// The label is that of the guided mode by continuity. With the real part of kappa alone the
// problem is real, and its m-th eigenvalue from above, found by counts like a guided mode's,
// passes through 0 at the cut-off of LP(l, m); its field has m - 1 nodes. Newton's method
// leads from there to the complex lambda. The answer is given if it lies within a quarter
// of the distance from the real eigenvalue to its neighbours, or to 0, and if the winding
// number of the determinant round the circle of that radius shows that no other lies within
// it; else the error matches ErrNoResonance. That happens to modes with l = 0 next to their
// cut-off (and l = 1 behind a weak barrier), and to all that no barrier holds: a layer with f
// < 0, or, while -lambda is below l^2, the centrifugal term. Modes of a layer outside the
// barrier, as far as f there is not 0, count with the rest.
//
// The real part has an error of about 1e-13 V^2, as for guided modes, and like theirs loses
// digits to rounding where layers are thin. The imaginary part has a relative one, 1e-11 or
// below for layers of constant index, however small it is: its arithmetic runs apart from
// the real part's, and where it lies far below the rounding of that it is, to first order
// and without cancellation, -Im(kappa) psi(1)^2/(int R psi^2 + Re(kappa') psi(1)^2). One that
// is below the range of a float64 is returned as 0.
//
// v is above 0, at most 1000; l from 0 to 10000, m from 1 to 10000. Within 1e-13 V^2 of
// cut-off the error matches ErrCutoff.
func Leaky(p Profile, v float64, l, m int) (LeakyMode, error) {
	const function = "radial.Leaky"
	if err := checkLabel(function, l, m); err != nil {
		return LeakyMode{}, err
	}
	if err := p.check(function, v); err != nil {
		return LeakyMode{}, err
	}
	if edge := p.edge(); edge < 1 {
		mode, err := Leaky(p.within(edge), v*edge, l, m)
		mode.V = v
		mode.Lambda /= complex(edge*edge, 0)
		return mode, err
	}
	mesh, err := p.mesh(v)
	if err != nil {
		return LeakyMode{}, err
	}
	edge := math.Max(leastB*v*v, 1e-290)
	s := newSystem(mesh, l, v, false)
	if s.count(edge) >= m {
		lambda, err := s.root(function, mesh, v, m)
		if err != nil {
			return LeakyMode{}, err
		}
		return LeakyMode{l, m, v, complex(lambda, 0)}, domain.Result(function, "lambda", lambda)
	}
	refused := &domain.Error{Func: function, Argument: "v", Value: v,
		Allowed: "such that the mode is guided or leaks slowly", Kind: ErrNoResonance}
	if s.countClosed(-edge) >= m {
		refused.Kind = ErrCutoff
		refused.Allowed = "further from the cut-off of the mode"
		return LeakyMode{}, refused
	}
	// Below the least f and below -l^2 nothing holds the field back.
	order := float64(l)
	deepest := 4 * (math.Max(-lowest(mesh), 0)*v*v + (order+2)*(order+2))
	depth := leastDepth * deepest
	for {
		if mesh, err = p.split(v, depth).mesh(v); err != nil {
			return LeakyMode{}, err
		}
		s = newSystem(mesh, l, v, false)
		n := s.countClosed(-depth)
		if n > m || n == m && depth >= deepest {
			break
		}
		if depth >= deepest {
			return LeakyMode{}, refused
		}
		depth *= 2
	}
	closed, apart := s.closed(-depth, -edge, m)
	lambda, ok := s.resonance(closed, apart)
	if !ok {
		return LeakyMode{}, refused
	}
	return LeakyMode{l, m, v, lambda}, nil
}

func lowest(mesh []element) float64 {
	low := math.Inf(1)
	for i := range mesh {
		for _, f := range mesh[i].f {
			low = math.Min(low, f)
		}
	}
	return low
}

// edge returns the radius beyond which the profile's pieces are 0 throughout and so belong to
// the outer medium; 1 where they are all 0.
func (p Profile) edge() float64 {
	for i := len(p.Pieces) - 1; i >= 0; i-- {
		q := p.Pieces[i]
		for k := range 65 {
			if q.F(q.From+(q.To-q.From)*float64(k)/64) != 0 {
				return q.To
			}
		}
	}
	return 1
}

// within returns the part of the profile up to a radius where a piece ends, in units of it.
func (p Profile) within(edge float64) Profile {
	var part Profile
	for _, q := range p.Pieces {
		if q.To > edge {
			break
		}
		part.Pieces = append(part.Pieces, Piece{From: q.From / edge, To: q.To / edge,
			F: func(r float64) float64 { return q.F(math.Min(r*edge, q.To)) }, Graded: q.Graded})
	}
	return part
}

// split returns the profile with its pieces cut so that a mesh of it resolves the field at any
// lambda from 0 down to -depth, where its wave number is sqrt(v^2 f - lambda).
func (p Profile) split(v, depth float64) Profile {
	var cut Profile
	for _, q := range p.Pieces {
		width := q.To - q.From
		steep := 0.0
		for k := range 65 {
			f := v * v * q.F(q.From+width*float64(k)/64)
			steep = math.Max(steep, math.Max(-f, f+depth))
		}
		n := int(math.Min(math.Ceil(width*math.Sqrt(steep)/resolution), maxElements))
		at := q.From
		for k := 1; k <= max(1, n); k++ {
			to := q.From + width*float64(k)/float64(n)
			if k >= n {
				to = q.To
			}
			if to > at {
				cut.Pieces = append(cut.Pieces, Piece{From: at, To: to, F: q.F, Graded: q.Graded})
				at = to
			}
		}
	}
	return cut
}

// countClosed returns the number of eigenvalues above lambda < 0 of the real problem in which
// kappa is replaced by its real part.
func (s *system) countClosed(lambda float64) int {
	n := s.fill(lambda)
	kappa, _ := outgoing(s.l, complex(lambda, 0))
	s.d[len(s.d)-1] += real(kappa) - float64(s.l) // fill took kappa(0)
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

// closed returns the m-th eigenvalue of that real problem, known to lie between low and high,
// and about how far the nearest other is, or 0.
func (s *system) closed(low, high float64, m int) (lambda, apart float64) {
	find := func(low, high float64, rank int, within func(low, high float64) float64) (float64, float64) {
		for range 200 {
			middle := low + (high-low)/2
			if low < 64*high {
				middle = high * 16
			}
			if !(middle > low && middle < high) || high-low <= within(low, high) {
				break
			}
			if s.countClosed(middle) >= rank {
				low = middle
			} else {
				high = middle
			}
		}
		return low, high
	}
	a, b := find(low, high, m, func(_, high float64) float64 { return -1e-10 * high })
	lambda = a + (b-a)/2
	apart = -lambda
	// The end of the interval that is nearer to lambda serves.
	_, next := find(low, a, m+1, func(_, high float64) float64 { return (lambda - high) / 16 })
	apart = math.Min(apart, lambda-next)
	if s.countClosed(high) < m-1 {
		next, _ = find(b, high, m-1, func(low, _ float64) float64 { return (low - lambda) / 16 })
		apart = math.Min(apart, next-lambda)
	}
	return lambda, apart
}

// leaking is the condensed problem at a complex lambda: a complex symmetric tridiagonal matrix
// and its derivative.
type leaking struct {
	*system
	d, o, dd, do, up, down, x []complex128
}

func (s *system) leaking() *leaking {
	n := len(s.d)
	work := make([]complex128, 7*n)
	g := &leaking{system: s}
	for i, w := range []*[]complex128{&g.d, &g.o, &g.dd, &g.do, &g.up, &g.down, &g.x} {
		*w = work[i*n : (i+1)*n]
	}
	return g
}

// fill sets the matrix, and returns the determinant of the inside of all elements divided by
// its modulus.
func (g *leaking) fill(lambda complex128) (phase complex128) {
	clear(g.d)
	clear(g.dd)
	phase = 1
	for k := range g.elements {
		c := &g.elements[k]
		ma, mb := complex(c.ma, 0), complex(c.mb, 0)
		aa, bb, ab := complex(c.aa, 0)+lambda*ma, complex(c.bb, 0)+lambda*mb, complex(c.ab, 0)
		daa, dbb, dab := ma, mb, complex(0, 0)
		for i := range inner {
			t := complex(c.theta[i], 0) + lambda
			if t == 0 {
				t = complex(1e-18*(cmplx.Abs(lambda)+1e-300), 0)
			}
			phase *= t / complex(cmplx.Abs(t), 0)
			ci, cj := complex(c.a[i], 0), complex(c.b[i], 0)
			a, b := ci/t, cj/t
			aa -= ci * a
			bb -= cj * b
			ab -= ci * b
			daa += a * a
			dbb += b * b
			dab += a * b
		}
		g.d[k] += aa
		g.dd[k] += daa
		g.d[k+1] += bb
		g.dd[k+1] += dbb
		g.o[k], g.do[k] = ab, dab
	}
	kappa, slope := outgoing(g.l, lambda)
	n := len(g.d) - 1
	g.d[n] += kappa
	g.dd[n] += slope
	return phase
}

func apartFromZero(p, scale complex128) complex128 {
	if p == 0 {
		return complex(1e-18*(cmplx.Abs(scale)+1e-300), 0)
	}
	return p
}

// phase returns the determinant divided by its modulus. It has no poles but kappa's, which lie
// at the zeros of H_l^(1)(u), about l^(1/3) below the real u axis or further.
func (g *leaking) phase(lambda complex128) complex128 {
	phase := g.fill(lambda)
	for i := g.first; i < len(g.d); i++ {
		p := g.d[i]
		if i > g.first {
			p -= g.o[i-1] * g.o[i-1] / g.up[i-1]
		}
		g.up[i] = apartFromZero(p, g.d[i])
		phase *= g.up[i] / complex(cmplx.Abs(g.up[i]), 0)
	}
	return phase
}

// step returns the step towards the nearest root, like evaluate. The matrix being complex
// symmetric, the quotient is the bilinear one, without conjugates.
func (g *leaking) step(lambda complex128) complex128 {
	g.phase(lambda)
	n := len(g.d) - 1
	best, at := math.Inf(1), n
	for i := n; i >= g.first; i-- {
		p := g.d[i]
		if i < n {
			p -= g.o[i] * g.o[i] / g.down[i+1]
		}
		g.down[i] = apartFromZero(p, g.d[i])
		gamma := g.up[i] + (g.down[i] - g.d[i])
		if q := cmplx.Abs(gamma) / cmplx.Abs(g.dd[i]); q < best {
			best, at = q, i
		}
	}
	gamma := g.up[at] + (g.down[at] - g.d[at])
	g.x[at] = 1
	norm := g.dd[at]
	for i := at; i > g.first; i-- {
		g.x[i-1] = -g.o[i-1] * g.x[i] / g.up[i-1]
		norm += g.dd[i-1]*g.x[i-1]*g.x[i-1] + 2*g.do[i-1]*g.x[i-1]*g.x[i]
	}
	for i := at; i < n; i++ {
		g.x[i+1] = -g.o[i] * g.x[i] / g.down[i+1]
		norm += g.dd[i+1]*g.x[i+1]*g.x[i+1] + 2*g.do[i]*g.x[i+1]*g.x[i]
	}
	return -gamma / norm
}

// resonance returns the complex root next to the real eigenvalue closed, and whether it is
// proved to be alone within a quarter of the distance apart.
func (s *system) resonance(closed, apart float64) (complex128, bool) {
	g := s.leaking()
	radius := apart / 4
	lambda := complex(closed, 0)
	// The step after one below 1e-5 of the distance is of the order of its cube.
	for last, k := 2, 0; last > 0; k++ {
		step := g.step(lambda)
		lambda += step
		if k == 40 || !(cmplx.Abs(lambda-complex(closed, 0)) < radius) { // or NaN
			return 0, false
		}
		if cmplx.Abs(step) <= 1e-5*apart {
			last--
		}
	}
	if !(imag(lambda) >= 0) {
		return 0, false
	}
	return lambda, g.winding(closed, radius) == 1
}

// winding returns how often the determinant goes round 0 on a circle: the number of roots
// within. It returns -1 where that cannot be told.
func (g *leaking) winding(centre, radius float64) int {
	const most = math.Pi / 3 // per point
	for n := 32; n <= windingPoints; n *= 2 {
		total, safe := 0.0, true
		first := g.phase(complex(centre+radius, 0))
		before := first
		for k := 1; k <= n && safe; k++ {
			next := first
			if k < n {
				sin, cos := math.Sincos(2 * math.Pi * float64(k) / float64(n))
				next = g.phase(complex(centre+radius*cos, radius*sin))
			}
			turn := cmplx.Phase(next / before)
			total += turn
			safe = math.Abs(turn) < most
			before = next
		}
		if safe {
			return int(math.Round(total / (2 * math.Pi)))
		}
	}
	return -1
}
