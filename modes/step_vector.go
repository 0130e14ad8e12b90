package modes

import (
	"fmt"
	"math"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/numap"
)

// Vector returns a vector mode of the fibre: nu is 0 for TE and TM and from 1 for HE and
// EH, m is from 1. It can be asked at any wavelength; where it is not guided, or with
// labels out of range, it answers with an error.
func (f Step) Vector(family Family, nu, m int) StepVector {
	return StepVector{Fibre: f, Family: family, Nu: nu, M: m}
}

// StepVector is a vector mode of a step-index fibre of any index difference up to
// MaxDelta. It is a materials.Medium: its index is the effective index.
type StepVector struct {
	Fibre  Step
	Family Family
	Nu, M  int
}

// String returns the mode's label, such as HE11 or HE(12,3).
func (m StepVector) String() string { return vectorLabel(m.Family, m.Nu, m.M) }

// Degeneracy returns how many modes share the label: see Vector.Degeneracy.
func (m StepVector) Degeneracy() int { return degeneracy(m.Family) }

// Group returns the LP mode of the same fibre that the mode belongs to: see
// Vector.Group.
func (m StepVector) Group() StepLP { return m.Fibre.LP(groupOrder(m.Family, m.Nu), m.M) }

// solvedVector is a vector mode solved at a wavelength.
type solvedVector struct {
	n1, n2   taylor.Series
	v        float64
	contrast float64 // n1^2 - n2^2
	equation vectorEquation
	mode     Vector
}

// vectorGlass solves for the numbers that a fibre's vector modes depend on.
func (f *Step) vectorGlass(function string, wavelength float64) (s solvedVector, err error) {
	s.n1, s.n2, err = f.glasses(function, wavelength)
	if err != nil {
		return s, err
	}
	na, err := numap.NA(s.n1[0], s.n2[0])
	if err != nil {
		return s, err
	}
	if s.v, err = numap.V(f.Radius, na, wavelength); err != nil {
		return s, err
	}
	a, b := s.n1[0], s.n2[0]
	s.contrast = (a - b) * (a + b)
	s.equation.tau = (1 - b/a) * (1 + b/a)
	if b > a/2 {
		s.equation.tau = (a - b) / a * (1 + b/a) // a - b is exact
	}
	s.equation.rest = b / a * (b / a)
	return s, nil
}

func (m *StepVector) solve(wavelength float64) (solvedVector, error) {
	const function = "modes.StepVector"
	if err := checkVectorLabel(function, m.Family, m.Nu, m.M); err != nil {
		return solvedVector{}, err
	}
	s, err := m.Fibre.vectorGlass(function, wavelength)
	if err != nil {
		return s, err
	}
	e := &s.equation
	e.family, e.nu, e.l = m.Family, m.Nu, groupOrder(m.Family, m.Nu)
	if err = checkDelta(function, e.tau/2); err == nil {
		err = checkV(function, s.v, MaxV)
	}
	if err == nil {
		s.mode, err = e.solveLabel(function, s.v, e.tau/2, m.M)
	}
	if err != nil {
		return s, fmt.Errorf("%v at wavelength %v m: %w", *m, wavelength, err)
	}
	return s, nil
}

// Solve returns the mode in pure numbers at a vacuum wavelength (m). The error matches
// ErrCutoff where the mode is not guided and numap.ErrNotGuiding where no mode is.
func (m StepVector) Solve(wavelength float64) (Vector, error) {
	s, err := m.solve(wavelength)
	return s.mode, err
}

// Taylor returns the series of the effective index about a vacuum wavelength (m), exact
// through both glasses and the exact eigenvalue equation, with the errors of Solve. The
// worst relative errors against arbitrary precision, up to As2S3 in air, 1 % or more
// above cut-off, are 5e-16 for the index and, where their terms do not cancel, 1e-12 for D
// and the dispersion slope and 1e-11 for beta4.
func (m StepVector) Taylor(wavelength float64) (taylor.Series, error) {
	s, err := m.solve(wavelength)
	if err != nil {
		return taylor.Series{}, err
	}
	n := s.index(s.n1, s.n2, wavelength)
	return n, checkVectorIndex(n, wavelength)
}

// index returns the series of the effective index for glasses of the given series, which
// must have the values of the solved mode's.
func (s *solvedVector) index(n1, n2 taylor.Series, wavelength float64) taylor.Series {
	contrast := n1.Sub(n2).Mul(n1.Add(n2))
	core, cladding := n1.Square(), n2.Square()
	rest := cladding.Quo(core)
	tau := rest.Neg()
	tau[0], rest[0] = s.equation.tau, s.equation.rest
	// (2 pi a/x)^2 and its inverse, so scaled that V^2 has the value solved for.
	scale := taylor.Variable(wavelength).Square()
	scale = scale.Scale(s.contrast / (s.v * s.v) / scale[0])
	v2 := contrast.Quo(scale)
	v2[0] = s.v * s.v
	n := cladding
	if q := s.mode.W * s.mode.W; q > 0 {
		small, isS := s.equation.series(&wave{v2, tau, rest}, s.mode.U*s.mode.U, q)
		if isS {
			n = core.Sub(small.Mul(scale))
		} else {
			n = cladding.Add(small.Mul(scale))
		}
	}
	n = n.Sqrt()
	n[0] = effectiveIndex(s.n1[0], s.n2[0], s.mode.B)
	return n
}

func checkVectorIndex(n taylor.Series, wavelength float64) error {
	if n.Finite() {
		return nil
	}
	return &domain.Error{Func: "modes.StepVector", Argument: "wavelength", Value: wavelength,
		Allowed: "where the effective index and its derivatives are finite (m)"}
}

// IndexShift returns the effective index of the mode less that of the LP mode of its group
// at the same vacuum wavelength (m): the error that the weakly guiding approximation
// makes, never above 0. Its relative error is that of Vector.Shift, however small the
// index difference, so that the shifts of two modes of one group also tell by how much
// polarisation splits it: the HE21, TE01 and TM01 of LP11, for example.
func (m StepVector) IndexShift(wavelength float64) (float64, error) {
	s, err := m.solve(wavelength)
	if err != nil {
		return 0, err
	}
	a, b := s.n1[0], s.n2[0]
	n := effectiveIndex(a, b, s.mode.B)
	lp := effectiveIndex(a, b, s.mode.B-s.mode.Shift)
	return s.mode.Shift * s.contrast / (n + lp), nil
}

// Parts returns two series about a vacuum wavelength (m) that keep one cause of
// dispersion each. In the first the field is frozen and the glasses disperse,
//
//	n^2(x) = n_eff^2 + P1 (n1^2(x) - n1^2) + P2 (n2^2(x) - n2^2)
//
// with P1 and P2 the derivatives of n_eff^2 with respect to n1^2 and n2^2, exact by first
// order perturbation; P1 is the share of power in the core where guidance is weak, and
// P1 + P2 exceeds 1 a little. In the second the glasses are frozen and V goes like 1/x.
// See dispersion.Split.
func (m StepVector) Parts(wavelength float64) (material, waveguide taylor.Series, err error) {
	s, err := m.solve(wavelength)
	if err != nil {
		return
	}
	n0 := effectiveIndex(s.n1[0], s.n2[0], s.mode.B)
	core, cladding := s.n1.Square(), s.n2.Square()
	core[0], cladding[0] = 0, 0
	p1, p2 := s.equation.weights(s.v, s.mode.U*s.mode.U, s.mode.W*s.mode.W)
	material = core.Scale(p1).Add(cladding.Scale(p2)).Shift(n0 * n0).Sqrt()
	if err = checkVectorIndex(material, wavelength); err != nil {
		return
	}
	waveguide = s.index(taylor.Constant(s.n1[0]), taylor.Constant(s.n2[0]), wavelength)
	return material, waveguide, checkVectorIndex(waveguide, wavelength)
}

// CutoffWavelength returns the vacuum wavelength (m) between from and to above which
// the mode is no longer guided, with the glasses' dispersion, as StepLP.CutoffWavelength
// does: the longest if there are several. The error matches ErrNoCutoff when there is
// none in the range; HE11 has none at all. Both glasses must answer over the whole range.
func (m StepVector) CutoffWavelength(from, to float64) (float64, error) {
	const function = "modes.StepVector.CutoffWavelength"
	if err := checkVectorLabel(function, m.Family, m.Nu, m.M); err != nil {
		return 0, err
	}
	if err := checkSpan(function, from, to); err != nil {
		return 0, err
	}
	if m.Family == HE && m.Nu == 1 && m.M == 1 {
		return 0, fmt.Errorf("%s: %v is guided at every wavelength: %w", function, m, ErrNoCutoff)
	}
	x, found, err := lastFall(func(x float64) (float64, float64, error) { return m.excess(function, x) }, from, to)
	if err == nil && !found {
		err = fmt.Errorf("%s: %v from %v m to %v m: %w", function, m, from, to, ErrNoCutoff)
	}
	return x, err
}

// excess returns V^2 over its cut-off less 1, and the slope with the wavelength.
func (m *StepVector) excess(function string, x float64) (value, slope float64, err error) {
	n1, n2, err := m.Fibre.glasses(function, x)
	if err != nil {
		return 0, 0, err
	}
	rest := n2.Quo(n1).Square()
	tau := rest.Neg()
	tau[0] = (n1[0] - n2[0]) / n1[0] * (1 + n2[0]/n1[0])
	e := vectorEquation{family: m.Family, nu: m.Nu, l: groupOrder(m.Family, m.Nu), tau: tau[0], rest: rest[0]}
	moves := 0.0 // d(V_c^2)/dtau
	if m.Family == HE && m.Nu > 1 {
		switch {
		case tau[0] > 2*MaxDelta:
			return 0, 0, checkDelta(function, tau[0]/2)
		case tau[0] <= 0: // not guiding; the cut-off's limit serves to find where it begins
			e.tau, e.rest = 0, 1
		default:
			moves = float64(e.l) / (e.rest * e.rest) // x = -l tau/(1 - tau)
		}
	}
	cut, _, err := e.cutoff(m.M)
	if err != nil {
		return 0, 0, err
	}
	if moves > 0 {
		moves /= -e.inside(cut*cut, -e.limit())
	}
	k := 2 * math.Pi * m.Fibre.Radius / cut
	v2 := n1.Sub(n2).Mul(n1.Add(n2)).Quo(taylor.Variable(x).Square()).Scale(k * k)
	slope = v2[1] - v2[0]*moves*tau[1]/(cut*cut)
	return v2[0] - 1, slope, domain.Result(function, "V", v2[0])
}

// GuidedVectorMode is one entry of the list of guided vector modes at a wavelength.
type GuidedVectorMode struct {
	Mode       StepVector
	Solution   Vector
	Index      float64 // effective index
	Degeneracy int     // modes that share the label: 1 for TE and TM, else 2
}

// GuidedVector returns all guided vector modes at a vacuum wavelength (m) in falling
// effective index. V must not exceed MaxListV. None is missed; see the function
// GuidedVector.
func (f Step) GuidedVector(wavelength float64) ([]GuidedVectorMode, error) {
	const function = "modes.Step.GuidedVector"
	s, err := f.vectorGlass(function, wavelength)
	if err != nil {
		return nil, err
	}
	e := &s.equation
	if err = checkDelta(function, e.tau/2); err == nil {
		err = checkV(function, s.v, MaxListV)
	}
	if err != nil {
		return nil, err
	}
	solved, err := guidedVector(s.v, e.tau/2, e.rest)
	if err != nil {
		return nil, err
	}
	list := make([]GuidedVectorMode, len(solved))
	for i, p := range solved {
		list[i] = GuidedVectorMode{f.Vector(p.Family, p.Nu, p.M), p,
			effectiveIndex(s.n1[0], s.n2[0], p.B), p.Degeneracy()}
	}
	return list, nil
}
