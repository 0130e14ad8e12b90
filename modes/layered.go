package modes

import (
	"fmt"
	"math"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/modes/radial"
)

// Layer is one layer of a Layered fibre, from the radius where the one inside it ends (the
// axis, for the first) to Outer. It has either a uniform Glass or a glass that varies with
// the radius.
type Layer struct {
	Outer float64 // radius (m)
	Glass materials.Medium
	// Vary returns the glass at a radius (m) within the layer, ends included: for example
	// germania-silica of a mole fraction that falls outwards. It must be smooth over the
	// layer, and safe to call from several goroutines if the fibre is. With a fractional
	// power of the radius at the axis set Cusp.
	Vary func(radius float64) (materials.Medium, error)
	Cusp bool
}

// Layered is a fibre of concentric layers in an unbounded cladding: steps, depressed
// claddings, trenches, rings, graded layers. The zero Layered gives errors.
type Layered struct {
	Layers   []Layer
	Cladding materials.Medium
}

// LP returns the mode LP(l, m) of the fibre, l from 0, m from 1. It can be asked at any
// wavelength; where it is not guided, or with labels out of range, it answers with an
// error.
func (f Layered) LP(l, m int) RadialLP { return RadialLP{f, l, m} }

// Guided returns all guided LP modes at a vacuum wavelength (m) in falling effective index.
// None is missed: see package radial.
func (f Layered) Guided(wavelength float64) ([]GuidedRadial, error) {
	return guidedRadial(f, wavelength)
}

// profileSamples is at how many radii of a graded layer its highest index is looked for.
const profileSamples = 64

func (f Layered) section(function string, wavelength float64) (s section, err error) {
	if len(f.Layers) == 0 {
		return s, &domain.Error{Func: function, Argument: "len(Layers)", Value: 0, Allowed: "at least 1"}
	}
	inside := 0.0
	for i, l := range f.Layers {
		if !(l.Outer > inside && l.Outer <= math.MaxFloat64) {
			return s, &domain.Error{Func: function, Argument: fmt.Sprintf("Layers[%d].Outer", i), Value: l.Outer,
				Allowed: fmt.Sprintf("finite and above %v, where the layer begins (m)", inside)}
		}
		if (l.Glass == nil) == (l.Vary == nil) {
			return s, fmt.Errorf("%s: Layers[%d] must have either a Glass or a Vary", function, i)
		}
		inside = l.Outer
	}
	s.radius = inside
	var square taylor.Series
	if s.cladding, square, err = indexSquare(f.Cladding, function, "cladding", wavelength); err != nil {
		return
	}
	above := func(n taylor.Series) taylor.Series {
		e := n.Square().Sub(square)
		e[0] = (n[0] - s.cladding[0]) * (n[0] + s.cladding[0])
		return e
	}
	// Of each layer: where it ends, in units of the radius, and its uniform excess.
	ends := make([]float64, len(f.Layers))
	uniform := make([]taylor.Series, len(f.Layers))
	start := 0.0
	for i, l := range f.Layers {
		what := fmt.Sprintf("layer %d", i)
		ends[i] = l.Outer / s.radius
		if i == len(f.Layers)-1 {
			ends[i] = 1
		}
		if !(ends[i] > start) {
			return s, &domain.Error{Func: function, Argument: fmt.Sprintf("Layers[%d].Outer", i), Value: l.Outer,
				Allowed: "further from the layer inside it (m)"}
		}
		s.pieces = append(s.pieces, radial.Piece{From: start, To: ends[i], Graded: l.Cusp})
		if l.Glass != nil {
			n, _, err := indexSquare(l.Glass, function, what, wavelength)
			if err != nil {
				return s, err
			}
			uniform[i] = above(n)
			s.highest = math.Max(s.highest, uniform[i][0])
		}
		start = ends[i]
	}
	at := func(i int, r float64) (taylor.Series, error) {
		l := &f.Layers[i]
		if l.Glass != nil {
			return uniform[i], nil
		}
		g, err := l.Vary(math.Min(r*s.radius, l.Outer))
		if err != nil {
			return taylor.Series{}, fmt.Errorf("layer %d at radius %v m: %w", i, r*s.radius, err)
		}
		n, _, err := indexSquare(g, function, fmt.Sprintf("layer %d", i), wavelength)
		return above(n), err
	}
	start = 0
	for i, l := range f.Layers {
		for k := 0; l.Vary != nil && k <= profileSamples; k++ {
			e, err := at(i, start+(ends[i]-start)*float64(k)/profileSamples)
			if err != nil {
				return s, err
			}
			s.highest = math.Max(s.highest, e[0])
		}
		start = ends[i]
	}
	s.excess = at
	// n of a layer, and what n^2 of a layer moved as a whole changes by.
	n2 := s.cladding[0]
	index := func(i int, r float64) float64 {
		e, err := at(i, r)
		if err != nil {
			return 0 // at has answered there before
		}
		return effectiveOf(n2, e[0])
	}
	for i := range f.Layers {
		outside := 0.0
		if i+1 < len(f.Layers) {
			e, err := at(i+1, ends[i])
			if err != nil {
				return s, err
			}
			outside = e[0]
		}
		e, err := at(i, ends[i])
		if err != nil {
			return s, err
		}
		s.radii = append(s.radii, change{edge: i, jump: (e[0] - outside) / s.radius})
		s.indices = append(s.indices, change{inside: func(piece int, r float64) float64 {
			if piece != i {
				return 0
			}
			return 2 * index(i, r)
		}})
	}
	s.indices = append(s.indices, change{cladding: 2 * n2})
	return s, nil
}
