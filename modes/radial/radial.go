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

// resolution is the largest V h sqrt(max |f|) on an element of width h: with degree 12 it
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

// mesh cuts the profile into elements for a given v.
func (p Profile) mesh(v float64) ([]element, error) {
	var list []element
	for i, q := range p.Pieces {
		steep := 0.0
		for k := range 65 {
			x := q.From + (q.To-q.From)*float64(k)/64
			f := q.F(x)
			if !(math.Abs(f) <= math.MaxFloat64) {
				return nil, &domain.Error{Func: "radial", Argument: fmt.Sprintf("Pieces[%d].F(%v)", i, x), Value: f, Allowed: "finite"}
			}
			steep = math.Max(steep, math.Abs(f))
		}
		cuts := []float64{q.To}
		low := q.From
		if low == 0 && q.Graded {
			// Towards the axis each element is a fifth of the one outside it.
			for x := q.To / 5; x > q.To*2e-3; x /= 5 {
				cuts = append(cuts, x)
			}
		} else if low > 0 {
			// Next to a small hole the field is like r^-l or ln r.
			for x := q.To / 4; x > low; x /= 4 {
				cuts = append(cuts, x)
			}
		}
		for j := len(cuts) - 1; j >= 0; j-- {
			high := cuts[j]
			n := max(1, int(math.Ceil(v*(high-low)*math.Sqrt(steep)/resolution)))
			if len(list)+n > maxElements {
				return nil, &domain.Error{Func: "radial", Argument: "v", Value: v, Allowed: "less: the profile would take over 4096 elements"}
			}
			for k := range n {
				a := low + (high-low)*float64(k)/float64(n)
				b := low + (high-low)*float64(k+1)/float64(n)
				if k == n-1 {
					b = high
				}
				list = append(list, newElement(i, a, b, q.F))
			}
			low = high
		}
	}
	return list, nil
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
