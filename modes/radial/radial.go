// Package radial finds the scalar (LP) modes of a round fibre with any radial profile, in
// pure numbers.
//
// With the radius R in units of the outermost layer's, f(R) = (n^2 - n2^2)/(n1^2 - n2^2),
// and lambda = w^2 = V^2 b, the scalar field obeys
//
//	psi'' + psi'/R + (V^2 f - l^2/R^2 - lambda) psi = 0,   0 < R < 1,
//
// and beyond R = 1, where f = 0, it is K_l(w R) (A. W. Snyder and J. D. Love, Optical
// Waveguide Theory, 1983, chapter 14). Multiplied by a trial function and integrated by
// parts this is the symmetric form
//
//	T(lambda) = S + l^2 Q - V^2 F + lambda M + kappa(lambda) e e',
//	kappa = -w K_l'(w)/K_l(w),
//
// in which the cladding is exact and nothing is truncated. The field is a polynomial of
// degree 12 on each element, with nodes at Gauss-Lobatto-Legendre points and an end of an
// element at each jump of the profile (spectral elements: A. T. Patera, J. Comput. Phys.
// 54, 468, 1984).
//
// T increases with lambda, so the number of modes above any lambda is the number of
// negative pivots of T there (Sylvester's law of inertia): every mode is bracketed by
// counts, and none can be missed or listed twice. The count belongs to the discrete
// problem; it is that of the fibre as soon as the elements resolve the field.
//
// # Errors and times
//
// Against tables of mpmath at 62 to 90 digits (testdata/radial.py), and SolveLP for the step:
//
//	quantity                                values   mean     worst
//	b, truncated parabola                      287   5e-15    4e-14
//	b, 16 layered profiles                     498   7e-15    3e-13
//	b, powers 1 to 10                          173   1e-14    4e-13
//	b, step, V 0.5 to 100                     2134   1e-15    5e-14
//	cut-off V, relative                        142   2e-14    7e-13
//	d(Vb)/dV, parabola                         251   3e-14    1e-12
//	V d2(Vb)/dV2, parabola                     251   4e-13    6e-12
//
// "go test -v ./modes/radial" prints them. Weak corners: layers thinner than a thousandth of
// the radius, where the rounding of the elements' large entries costs up to 4e-11 in b; steep
// layers, where the weak-guidance limit of the vector modes differs by up to 2.4e-11 (1200
// random profiles); and modes with b below 1e-13, which are not listed. All modes of a profile in
// one call take 8 to 17 us each; Solve at V = 40 takes 0.1 ms and CutoffV 2 ms.
//
// Guided, Solve, Series, SolveField and CutoffV are scalar; GuidedVector and its like are the
// exact vector modes by the same means, and Leaky finds the scalar modes beyond cut-off.
package radial

import (
	"errors"
	"fmt"
	"math"

	"glassthread/materials/domain"
)

// ErrCutoff says that the mode asked for is not guided.
var ErrCutoff = errors.New("the mode is not guided")

// Piece is a stretch of a profile on which F is smooth, ends included.
type Piece struct {
	From, To float64
	F        func(r float64) float64 // (n^2 - n2^2)/(n1^2 - n2^2) at radius r, R = 1 being the last To
	// Graded tells that F is smooth but for a power r^alpha at the axis; the elements then
	// shrink towards it. It matters for a piece that starts at 0 only.
	Graded bool
}

// Profile is f(R) from the axis to R = 1 in adjoining pieces.
type Profile struct{ Pieces []Piece }

// Mode is one scalar mode.
type Mode struct {
	L, M int     // azimuthal order, from 0; radial number, from 1
	V    float64 // normalised frequency
	U, W float64 // U^2 + W^2 = V^2
	B    float64 // W^2/V^2
}

// MaxV is the largest V accepted.
const MaxV = 1000

// maxElements bounds the elements of a mesh.
const maxElements = 4096

// resolution is the largest V h sqrt(max |f - b|) on an element of width h: with degree 12 it
// leaves an error of 1e-12 in b or below (measured, see the tests).
const resolution = 6

// leastB is the b below which rounding decides whether a mode exists; it is then taken as
// at cut-off and not listed.
const leastB = 1e-13

func (p Profile) check(function string, v float64) error {
	if err := domain.Positive(function, "v", v, ""); err != nil {
		return err
	}
	if v > MaxV {
		return &domain.Error{Func: function, Argument: "v", Value: v, Allowed: "at most 1000"}
	}
	if len(p.Pieces) == 0 {
		return &domain.Error{Func: function, Argument: "len(Pieces)", Value: 0, Allowed: "at least 1"}
	}
	at := 0.0
	for i, q := range p.Pieces {
		if q.F == nil {
			return fmt.Errorf("%s: Pieces[%d].F is nil", function, i)
		}
		if q.From != at || !(q.To > q.From) || q.To > 1 {
			return &domain.Error{Func: function, Argument: fmt.Sprintf("Pieces[%d].From", i), Value: q.From,
				Allowed: fmt.Sprintf("%v, where the piece before ends, and below To = %v, which is at most 1", at, q.To)}
		}
		at = q.To
	}
	if at != 1 {
		return &domain.Error{Func: function, Argument: "the last piece's To", Value: at, Allowed: "1"}
	}
	return nil
}

// element is one element of the mesh, with the integrals that do not depend on l.
type element struct {
	piece      int
	r, mass, f [degree + 1]float64
	stiff      [degree + 1][degree + 1]float64
}

// samples is at how many radii a piece's F is looked at for the mesh, ends included.
const samples = 65

// ratio is the largest ratio of the radii at the ends of an element that does not reach the
// axis: next to a small hole the field is like r^-l or ln r.
const ratio = 2.5

// leastHole is the radius, over that of the piece around it, of a hole whose area, 1e-18 of
// the whole, is not felt.
const leastHole = 1e-9

// mesh cuts the profile into elements for a given v.
func (p Profile) mesh(v float64) ([]element, error) {
	// With b from 0 to the highest f of all, the wave number is at most v sqrt(|f - b|).
	type span struct{ low, high float64 }
	spans := make([]span, len(p.Pieces))
	top := 0.0
	for i, q := range p.Pieces {
		s := span{math.Inf(1), math.Inf(-1)}
		for k := range samples {
			x := q.From + (q.To-q.From)*float64(k)/(samples-1)
			f := q.F(x)
			if !(math.Abs(f) <= math.MaxFloat64) {
				return nil, &domain.Error{Func: "radial", Argument: fmt.Sprintf("Pieces[%d].F(%v)", i, x), Value: f, Allowed: "finite"}
			}
			s.low, s.high = math.Min(s.low, f), math.Max(s.high, f)
		}
		spans[i] = s
		top = math.Max(top, s.high)
	}
	var list []element
	for i, q := range p.Pieces {
		wave := v * math.Sqrt(math.Max(top-spans[i].low, spans[i].high))
		cuts := []float64{q.To}
		low := q.From
		if low > 0 {
			for x := q.To / ratio; x > math.Max(low, leastHole*q.To); x /= ratio {
				cuts = append(cuts, x)
			}
		}
		for j := len(cuts) - 1; j >= 0; j-- {
			high := cuts[j]
			n := max(1, int(math.Ceil(math.Min(wave*(high-low)/resolution, maxElements+1))))
			for k := range n {
				a := low + (high-low)*float64(k)/float64(n)
				b := low + (high-low)*float64(k+1)/float64(n)
				if k == n-1 {
					b = high
				}
				list = refine(list, i, a, b, wave, &q, 0)
				if len(list) > maxElements {
					return nil, &domain.Error{Func: "radial", Argument: "v", Value: v, Allowed: "less: the profile would take over 4096 elements"}
				}
			}
			low = high
		}
	}
	return list, nil
}

// maxHalvings bounds how often refine halves an element.
const maxHalvings = 10

// refine appends an element, or two parts where F varies too fast for it. Towards a cusp at the
// axis each element is a fifth of the one outside it.
func refine(list []element, piece int, a, b, wave float64, q *Piece, depth int) []element {
	e := newElement(piece, a, b, q.F)
	middle, least := a+(b-a)/2, leastAliasing
	if q.Graded && a == 0 {
		middle, least = b/5, leastAliasing/100 // the parts not seen fall slowly
	}
	if depth < maxHalvings && len(list) <= maxElements && aliasing(&e.f, wave*(b-a))*(b-a)*b > least {
		list = refine(list, piece, a, middle, wave, q, depth+1)
		return refine(list, piece, middle, b, wave, q, depth+1)
	}
	return append(list, e)
}

// leastAliasing is the error of b from the quadrature over one element that is let stand.
const leastAliasing = 3e-14

// aliasing estimates the error of the quadrature of f psi^2 over an element that is x wave
// lengths over 2 pi wide. The rule being exact up to degree 2 degree - 1, what f holds of the
// Legendre polynomial of degree j meets the part of psi^2 of degree n = 2 degree - j, which
// is at most (2n + 1) j_n(x) or about x^n/(2n - 1)!! for an oscillating psi.
func aliasing(f *[degree + 1]float64, x float64) float64 {
	low, high := f[0], f[0]
	for _, y := range f {
		low, high = math.Min(low, y), math.Max(high, y)
	}
	if high-low <= 1e-15*math.Max(high, -low) {
		return 0 // what resolution allows for
	}
	var c [degree + 1]float64 // Legendre coefficients times their norms
	for i, y := range f {
		y *= gllWeights[i]
		z, before, now := gllNodes[i], 0.0, 1.0
		for j := range c {
			c[j] += y * now
			before, now = now, (float64(2*j+1)*z*now-float64(j)*before)/float64(j+1)
		}
	}
	top, tail := 0.0, 0.0
	for j := range c {
		c[j] = (float64(j) + 0.5) * math.Abs(c[j])
		top = math.Max(top, c[j])
		if j >= degree-1 {
			tail = math.Max(tail, c[j])
		}
	}
	fall := math.Pow(tail/top, 1.0/degree)
	// From degree 2 degree down, those that are not seen as if they fell like the ones seen.
	for range degree {
		tail *= fall
	}
	sum, part := tail, 1.0
	for n := 1; n < 2*degree; n++ {
		part *= x / float64(2*n-1)
		if j := 2*degree - n; j > degree {
			tail /= fall
			sum += tail * math.Min(part, 1)
		} else {
			sum += c[j] * math.Min(part, 1)
		}
	}
	return sum
}

func newElement(piece int, a, b float64, f func(float64) float64) (e element) {
	e.piece = piece
	half := (b - a) / 2
	for i := range e.r {
		e.r[i] = a + half*(1+gllNodes[i])
	}
	e.r[degree] = b
	for i, r := range e.r {
		e.f[i] = f(r)
		e.mass[i] = gllWeights[i] * half * r
	}
	for q, r := range e.r {
		c := gllWeights[q] * r / half
		for i := range e.r {
			for j := 0; j <= i; j++ {
				e.stiff[i][j] += c * gllSlopes[q][i] * gllSlopes[q][j]
			}
		}
	}
	for i := range e.r {
		for j := i + 1; j <= degree; j++ {
			e.stiff[i][j] = e.stiff[j][i]
		}
	}
	return e
}
