package modes

import (
	"fmt"

	"glassthread/modes/radial"
)

// Sensitivity says how the effective index of a mode moves, to first order, with what the
// fibre is made of at a fixed wavelength.
type Sensitivity struct {
	// Radius holds the derivative of the effective index with respect to the outer radius of
	// each layer (1/m), the other radii held. A graded Layer is cut off later or earlier;
	// the core of a PowerLaw stretches.
	Radius []float64
	// Index holds the derivative with respect to the index of each layer, and last that of
	// the cladding. A graded Layer moves as a whole. They sum to about 1.
	Index []float64
}

// change is a first-order change of n^2 with a parameter.
type change struct {
	inside   func(piece int, r float64) float64 // of n^2 within the profile; nil for none
	edge     int                                // piece whose end moves
	jump     float64                            // n^2 inside less n^2 outside of it, over the radius (1/m)
	cladding float64                            // of n^2 of the cladding
}

// Sensitivity returns the derivatives of the effective index with respect to radii and
// indices at a vacuum wavelength (m), by the perturbation integral: a change g(r) of n^2
// moves n_eff^2 by the mean of g over the mode's power (A. W. Snyder and J. D. Love, Optical
// Waveguide Theory, 1983, section 18-2). Their relative error is about 1e-11. The errors are
// those of Solve.
func (m RadialLP) Sensitivity(wavelength float64) (Sensitivity, error) {
	p, err := m.problem(wavelength)
	if err != nil {
		return Sensitivity{}, err
	}
	s, err := radial.SolveField(p.profile, p.v, m.L, m.M)
	if err = p.fail(err); err != nil {
		return Sensitivity{}, fmt.Errorf("%v at wavelength %v m: %w", m, wavelength, err)
	}
	n2 := p.cladding[0]
	n := effectiveOf(n2, s.W*s.W/p.scale[0])
	of := func(c change) float64 {
		sum := c.cladding * s.Outside
		if c.inside != nil {
			sum += s.Mean(c.inside)
		}
		if c.jump != 0 {
			sum += c.jump * s.Edge(c.edge)
		}
		return sum / (2 * n)
	}
	var out Sensitivity
	for _, c := range p.radii {
		out.Radius = append(out.Radius, of(c))
	}
	for _, c := range p.indices {
		out.Index = append(out.Index, of(c))
	}
	if p.failed != nil {
		return Sensitivity{}, p.failed
	}
	return out, nil
}
