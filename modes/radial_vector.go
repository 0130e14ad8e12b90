package modes

import (
	"errors"
	"fmt"
	"math"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/modes/radial"
	"glassthread/numap"
)

// RadialVector is a vector mode of a fibre with a radial profile, for any contrast up to
// that of MaxDelta. It is a materials.Medium: its index is the effective index.
//
// Families are told by the field: an HE mode has the sign of E_z H_z, integrated over the
// profile, that HE11 has, an EH mode the other. For a step this is the usual definition; with weak
// guidance HE(nu, m) belongs to LP(nu-1, m) and EH(nu, m) to LP(nu+1, m). M counts within
// the family in falling effective index.
type RadialVector struct {
	Fibre  Radial
	Family Family
	Nu, M  int
}

// Vector returns a vector mode of the fibre: nu is 0 for TE and TM and from 1 for HE and
// EH, m is from 1. It can be asked at any wavelength; where it is not guided, or with
// labels out of range, it answers with an error.
func (f PowerLaw) Vector(family Family, nu, m int) RadialVector {
	return RadialVector{f, family, nu, m}
}

// Vector returns a vector mode of the fibre: nu is 0 for TE and TM and from 1 for HE and
// EH, m is from 1. It can be asked at any wavelength; where it is not guided, or with
// labels out of range, it answers with an error.
func (f Layered) Vector(family Family, nu, m int) RadialVector {
	return RadialVector{f, family, nu, m}
}

// String returns the mode's label, such as HE11 or HE(12,3).
func (m RadialVector) String() string { return vectorLabel(m.Family, m.Nu, m.M) }

// Degeneracy returns how many modes share the label: see Vector.Degeneracy.
func (m RadialVector) Degeneracy() int { return degeneracy(m.Family) }

// Group returns the LP mode of the same fibre that the mode belongs to: see Vector.Group.
func (m RadialVector) Group() RadialLP { return RadialLP{m.Fibre, groupOrder(m.Family, m.Nu), m.M} }

// radialVectorProblem returns the profile at a wavelength (m) and k a n2.
func radialVectorProblem(function string, f Radial, wavelength float64) (*radialProblem, float64, error) {
	if f == nil {
		return nil, 0, fmt.Errorf("%s: the fibre is nil", function)
	}
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return nil, 0, err
	}
	s, err := f.section(function, wavelength)
	if err != nil {
		return nil, 0, err
	}
	p, err := s.problem(function, wavelength)
	if err != nil {
		return nil, 0, err
	}
	n2 := s.cladding[0]
	if err = checkDelta(function, s.highest/(s.highest+n2*n2)/2); err != nil {
		return nil, 0, err
	}
	return p, math.Sqrt(p.scale[0]) * n2, nil
}

func (m RadialVector) problem(wavelength float64) (*radialProblem, float64, error) {
	const function = "modes.RadialVector"
	if err := checkVectorLabel(function, m.Family, m.Nu, m.M); err != nil {
		return nil, 0, err
	}
	return radialVectorProblem(function, m.Fibre, wavelength)
}

func (m RadialVector) fail(p *radialProblem, wavelength float64, err error) error {
	if err = p.fail(err); err != nil {
		return fmt.Errorf("%v at wavelength %v m: %w", m, wavelength, err)
	}
	return nil
}

// VectorSolution is a solved vector mode of a radial profile, in pure numbers. V is that of the
// profile's highest index n and outermost radius, (2 pi a/x) sqrt(n^2 - n2^2).
type VectorSolution struct {
	V, U, W float64 // U^2 + W^2 = V^2
	B       float64 // (n_eff^2 - n2^2)/(n^2 - n2^2)
}

// Solve returns the mode in pure numbers at a vacuum wavelength (m). The worst errors
// measured are 3e-16 for the effective index against arbitrary precision (fibres of two or three
// layers up to 2.4 : 1), and 5e-13 times B + 0.001 for B (those, the step from 1e-7 to 2.4 : 1, and
// random graded profiles on another mesh; of 5725 of these one, at a B of 0.0018, was off by
// 3.5e-12 in B, 600 times what the rest keep). The
// error matches ErrCutoff where the mode is not guided or has a B below 1e-13, and
// numap.ErrNotGuiding where no index exceeds the cladding's.
func (m RadialVector) Solve(wavelength float64) (VectorSolution, error) {
	p, cladding, err := m.problem(wavelength)
	if err != nil {
		return VectorSolution{}, err
	}
	s, err := radial.SolveVector(p.profile, p.v, cladding, radial.VectorFamily(m.Family), m.Nu, m.M)
	if err = m.fail(p, wavelength, err); err != nil {
		return VectorSolution{}, err
	}
	return VectorSolution{s.V, s.U, s.W, s.B}, nil
}

// Taylor returns the series of the effective index about a vacuum wavelength (m), exact
// through the glasses and the eigenvalue (its perturbation series), with the errors of
// Solve. Against the step's own series the four derivatives have relative errors up to 1e-13,
// 1e-12, 1e-11 and 1e-10, for B above 0.05.
func (m RadialVector) Taylor(wavelength float64) (taylor.Series, error) {
	p, _, err := m.problem(wavelength)
	if err != nil {
		return taylor.Series{}, err
	}
	cladding := p.cladding.Square().Mul(p.scale)
	_, lambda, err := radial.VectorSeries(p.profile, p.v, cladding, radial.VectorFamily(m.Family), m.Nu, m.M,
		func(piece int, r float64) (taylor.Series, error) {
			e, err := p.excess(piece, r)
			return e.Mul(p.scale), err
		})
	if err = m.fail(p, wavelength, err); err != nil {
		return taylor.Series{}, err
	}
	n := p.effective(lambda)
	if !n.Finite() {
		return n, &domain.Error{Func: "modes.RadialVector", Argument: "wavelength", Value: wavelength,
			Allowed: "where the effective index and its derivatives are finite (m)"}
	}
	return n, nil
}

// IndexShift returns the effective index of the mode less that of the LP mode of its group
// at the same vacuum wavelength (m): the error that the weakly guiding approximation
// makes. It is formed without the difference, so that the shifts of two modes of one group also tell
// by how much polarisation splits it, however small the contrast. The error matches ErrCutoff where
// either mode is not guided.
func (m RadialVector) IndexShift(wavelength float64) (float64, error) {
	p, cladding, err := m.problem(wavelength)
	if err != nil {
		return 0, err
	}
	s, shift, err := radial.VectorShift(p.profile, p.v, cladding, radial.VectorFamily(m.Family), m.Nu, m.M)
	if err = m.fail(p, wavelength, err); err != nil {
		return 0, err
	}
	n2, lambda := p.cladding[0], s.W*s.W
	n := effectiveOf(n2, lambda/p.scale[0])
	lp := effectiveOf(n2, (lambda-shift)/p.scale[0])
	return shift / p.scale[0] / (n + lp), nil
}

// GuidedRadialVector is one entry of the list of guided vector modes of a radial profile.
type GuidedRadialVector struct {
	Mode       RadialVector
	Solution   VectorSolution
	Index      float64 // effective index
	Degeneracy int     // modes that share the label: 1 for TE and TM, else 2
}

// GuidedVector returns all guided vector modes at a vacuum wavelength (m) in falling
// effective index, for V up to radial.MaxVectorListV. None is missed: see
// radial.GuidedVector.
func (f PowerLaw) GuidedVector(wavelength float64) ([]GuidedRadialVector, error) {
	return guidedRadialVector("modes.PowerLaw.GuidedVector", f, wavelength)
}

// GuidedVector returns all guided vector modes at a vacuum wavelength (m) in falling
// effective index, for V up to radial.MaxVectorListV. None is missed: see
// radial.GuidedVector.
func (f Layered) GuidedVector(wavelength float64) ([]GuidedRadialVector, error) {
	return guidedRadialVector("modes.Layered.GuidedVector", f, wavelength)
}

func guidedRadialVector(function string, f Radial, wavelength float64) ([]GuidedRadialVector, error) {
	p, cladding, err := radialVectorProblem(function, f, wavelength)
	if err != nil {
		return nil, err
	}
	solved, err := radial.GuidedVector(p.profile, p.v, cladding)
	if err = p.fail(err); err != nil {
		return nil, err
	}
	list := make([]GuidedRadialVector, len(solved))
	for i, s := range solved {
		mode := RadialVector{f, Family(s.Family), s.Nu, s.M}
		n := effectiveOf(p.cladding[0], s.W*s.W/p.scale[0])
		list[i] = GuidedRadialVector{mode, VectorSolution{s.V, s.U, s.W, s.B}, n, mode.Degeneracy()}
	}
	return list, nil
}

// CutoffWavelength returns the vacuum wavelength (m) between from and to above which the
// mode is no longer guided, with the glasses' dispersion; the longest, if there are several
// well apart. HE11 has one in a W fibre. The error matches ErrNoCutoff when there is none in
// the range. The glasses must answer over the whole range.
//
// It is where the count of modes of the order falls, with the exact limit of the exterior at
// cut-off, to a relative error of about 1e-13.
func (m RadialVector) CutoffWavelength(from, to float64) (float64, error) {
	const function = "modes.RadialVector.CutoffWavelength"
	if err := checkVectorLabel(function, m.Family, m.Nu, m.M); err != nil {
		return 0, err
	}
	if err := checkSpan(function, from, to); err != nil {
		return 0, err
	}
	guided := func(x float64) (bool, error) {
		rank, err := m.rank(x)
		return rank > 0, err
	}
	right := to
	above, err := guided(to)
	if err != nil {
		return 0, err
	}
	for i := radialCells - 1; i >= 0; i-- {
		left := from + (to-from)*float64(i)/radialCells
		g, err := guided(left)
		if err != nil {
			return 0, err
		}
		if g && !above {
			return m.cutoffBetween(left, right)
		}
		right, above = left, g
	}
	return 0, fmt.Errorf("%s: %v from %v m to %v m: %w", function, m, from, to, ErrNoCutoff)
}

// rank returns the place of the mode among all of its order, 0 where it is not guided.
func (m RadialVector) rank(x float64) (int, error) {
	p, cladding, err := m.problem(x)
	if errors.Is(err, numap.ErrNotGuiding) {
		return 0, nil
	}
	if err != nil {
		return 0, err
	}
	if m.M == 1 && (m.Nu == 0 || m.Nu == 1 && m.Family == HE) {
		// The first of its order, whose b may be of any smallness.
		n, err := m.count(x)
		return min(n, 1), err
	}
	rank, err := radial.VectorRank(p.profile, p.v, cladding, radial.VectorFamily(m.Family), m.Nu, m.M)
	if errors.Is(err, ErrCutoff) {
		return 0, nil
	}
	return rank, m.fail(p, x, err)
}

// count returns how many modes of the order are guided.
func (m RadialVector) count(x float64) (int, error) {
	p, cladding, err := m.problem(x)
	if errors.Is(err, numap.ErrNotGuiding) {
		return 0, nil
	}
	if err != nil {
		return 0, err
	}
	n, err := radial.CountVector(p.profile, p.v, cladding, radial.VectorFamily(m.Family), m.Nu)
	return n, m.fail(p, x, err)
}

// cutoffBetween halves between a wavelength where the mode is guided and one where not.
func (m RadialVector) cutoffBetween(left, right float64) (float64, error) {
	to := right
	for right-left > 1e-6*left {
		x := left + (right-left)/2
		rank, err := m.rank(x)
		if err != nil {
			return 0, err
		}
		if rank > 0 {
			left = x
		} else {
			right = x
		}
	}
	rank, err := m.rank(left)
	if err != nil {
		return 0, err
	}
	// Modes are labelled from b = 1e-13 on; the count gives the last digits, and may find the
	// cut-off a little further out.
	out := math.Min(to, right*(1+1e-6))
	n, err := m.count(out)
	if err != nil {
		return 0, err
	}
	beyond := n >= rank // the count falls with another mode
	if !beyond {
		right = out
	}
	for {
		x := left + (right-left)/2
		if !(x > left && x < right) {
			return x, nil
		}
		guided := false
		if beyond {
			r, err2 := m.rank(x)
			guided, err = r > 0, err2
		} else {
			n, err2 := m.count(x)
			guided, err = n >= rank, err2
		}
		if err != nil {
			return 0, err
		}
		if guided {
			left = x
		} else {
			right = x
		}
	}
}
