package modes

import (
	"errors"
	"fmt"
	"math"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/root"
	"glassthread/materials/taylor"
	"glassthread/modes/radial"
	"glassthread/numap"
)

// Radial is a fibre with a radial index profile in a cladding that is wide enough to be
// taken as unbounded: PowerLaw and Layered.
type Radial interface {
	// section returns the profile at a vacuum wavelength (m).
	section(function string, wavelength float64) (section, error)
}

// section is a profile at one wavelength: the index of the cladding, and by how much n^2
// exceeds its square at a radius, in units of the outermost layer's, within a piece.
type section struct {
	radius   float64 // of the outermost layer (m)
	cladding taylor.Series
	excess   func(piece int, r float64) (taylor.Series, error)
	pieces   []radial.Piece // F not yet set
	highest  float64        // value of excess, over the whole profile

	// What moves n^2: the outer radius of each layer, and the index of each and of the
	// cladding.
	radii, indices []change
}

// radialProblem is a section in pure numbers. The pieces' functions leave the first error
// in failed.
type radialProblem struct {
	section
	profile radial.Profile
	v       float64
	scale   taylor.Series // (2 pi a/x)^2
	failed  error
}

func (s section) problem(function string, wavelength float64) (*radialProblem, error) {
	if !(s.highest > 0) {
		return nil, &domain.Error{Func: function, Argument: "wavelength", Value: wavelength,
			Allowed: "where some layer's index exceeds the cladding's (m)", Kind: numap.ErrNotGuiding}
	}
	k := 2 * math.Pi * s.radius / wavelength
	p := &radialProblem{section: s, v: k * math.Sqrt(s.highest)}
	p.scale = taylor.Variable(wavelength).Inv().Scale(2 * math.Pi * s.radius).Square()
	for i, piece := range s.pieces {
		piece.F = func(r float64) float64 {
			e, err := p.excess(i, r)
			if err != nil && p.failed == nil {
				p.failed = err
			}
			return e[0] / p.highest
		}
		p.profile.Pieces = append(p.profile.Pieces, piece)
	}
	return p, nil
}

// fail prefers an error of the glasses over what followed from it.
func (p *radialProblem) fail(err error) error {
	if p.failed != nil {
		return p.failed
	}
	return err
}

// RadialLP is a scalar (LP) mode of a fibre with a radial profile, for weak guidance. It is
// a materials.Medium: its index is the effective index.
type RadialLP struct {
	Fibre Radial
	L, M  int
}

// String returns the mode's label, such as LP01 or LP(12,3).
func (m RadialLP) String() string { return StepLP{L: m.L, M: m.M}.String() }

var errNoFibre = errors.New("modes.RadialLP: the fibre is nil")

func (m RadialLP) problem(wavelength float64) (*radialProblem, error) {
	const function = "modes.RadialLP"
	if m.Fibre == nil {
		return nil, errNoFibre
	}
	if err := domain.Positive(function, "wavelength", wavelength, "m"); err != nil {
		return nil, err
	}
	s, err := m.Fibre.section(function, wavelength)
	if err != nil {
		return nil, err
	}
	return s.problem(function, wavelength)
}

// Solve returns the mode in pure numbers at a vacuum wavelength (m). V is that of the
// profile's highest index and outermost radius, (2 pi a/x) sqrt(n^2 - n2^2), and B is (n_eff^2
// - n2^2)/(n^2 - n2^2) with the same n. B is good to 5e-13 for smooth pieces
// (measured against arbitrary precision); in steep or thin layers up to 4e-11 was seen. The error
// matches ErrCutoff where the mode is not guided or has a B below 1e-13, and
// numap.ErrNotGuiding where no index exceeds the cladding's.
func (m RadialLP) Solve(wavelength float64) (LP, error) {
	p, err := m.problem(wavelength)
	if err != nil {
		return LP{}, err
	}
	solved, err := radial.Solve(p.profile, p.v, m.L, m.M)
	if err = p.fail(err); err != nil {
		return LP{}, fmt.Errorf("%v at wavelength %v m: %w", m, wavelength, err)
	}
	return LP(solved), nil
}

// Taylor returns the series of the effective index about a vacuum wavelength (m), exact
// through the glasses and the eigenvalue (its perturbation series), with the errors of
// Solve.
func (m RadialLP) Taylor(wavelength float64) (taylor.Series, error) {
	p, err := m.problem(wavelength)
	if err != nil {
		return taylor.Series{}, err
	}
	_, lambda, err := radial.Series(p.profile, p.v, m.L, m.M, func(piece int, r float64) (taylor.Series, error) {
		e, err := p.excess(piece, r)
		return e.Mul(p.scale), err
	})
	if err = p.fail(err); err != nil {
		return taylor.Series{}, fmt.Errorf("%v at wavelength %v m: %w", m, wavelength, err)
	}
	n := p.effective(lambda)
	return n, checkIndex(n, wavelength)
}

// effective returns sqrt(n2^2 + lambda/(2 pi a/x)^2), its value formed about n2.
func (p *radialProblem) effective(lambda taylor.Series) taylor.Series {
	above := lambda.Quo(p.scale)
	n := p.cladding.Square().Add(above).Sqrt()
	n[0] = effectiveOf(p.cladding[0], above[0])
	return n
}

// effectiveOf returns sqrt(n2^2 + above), formed about n2.
func effectiveOf(n2, above float64) float64 {
	return n2 + above/(n2+math.Sqrt(n2*n2+above))
}

// GuidedRadial is one entry of the list of guided LP modes of a radial profile.
type GuidedRadial struct {
	Mode       RadialLP
	Solution   LP
	Index      float64 // effective index
	Degeneracy int     // modes that share the label: 2 for l = 0, else 4
}

// guidedRadial lists the guided LP modes in falling effective index.
func guidedRadial(f Radial, wavelength float64) ([]GuidedRadial, error) {
	p, err := RadialLP{Fibre: f}.problem(wavelength)
	if err != nil {
		return nil, err
	}
	solved, err := radial.Guided(p.profile, p.v)
	if err = p.fail(err); err != nil {
		return nil, err
	}
	list := make([]GuidedRadial, len(solved))
	for i, s := range solved {
		lp := LP(s)
		n := p.effective(taylor.Constant(lp.W * lp.W))
		list[i] = GuidedRadial{RadialLP{f, lp.L, lp.M}, lp, n[0], lp.Degeneracy()}
	}
	return list, nil
}

// radialCells is into how many cells the range is cut in the search for a cut-off.
const radialCells = 16

// CutoffWavelength returns the vacuum wavelength (m) between from and to above which the
// mode is no longer guided, with the glasses' dispersion; the longest, if there are several
// well apart. LP01 has one where the profile's mean lies below the cladding (a W fibre). The
// error matches ErrNoCutoff when there is none in the range. The glasses must answer over
// the whole range.
func (m RadialLP) CutoffWavelength(from, to float64) (float64, error) {
	const function = "modes.RadialLP.CutoffWavelength"
	if err := checkLabel(function, m.L, m.M); err != nil {
		return 0, err
	}
	if err := checkSpan(function, from, to); err != nil {
		return 0, err
	}
	// V over its cut-off less 1; -1 where nothing is guided.
	excess := func(x float64) (float64, error) {
		p, err := m.problem(x)
		if errors.Is(err, numap.ErrNotGuiding) {
			return -1, nil
		}
		if err != nil {
			return 0, err
		}
		cut, err := radial.CutoffV(p.profile, m.L, m.M)
		if err = p.fail(err); errors.Is(err, ErrCutoff) {
			return -1, nil
		}
		if err != nil {
			return 0, err
		}
		if cut == 0 {
			return math.MaxFloat64, nil
		}
		return p.v/cut - 1, nil
	}
	right := to
	above, err := excess(to)
	if err != nil {
		return 0, err
	}
	for i := radialCells - 1; i >= 0; i-- {
		left := from + (to-from)*float64(i)/radialCells
		e, err := excess(left)
		if err != nil {
			return 0, err
		}
		if e > 0 && above <= 0 {
			return root.Find(excess, left, right, 0)
		}
		right, above = left, e
	}
	return 0, fmt.Errorf("%s: %v from %v m to %v m: %w", function, m, from, to, ErrNoCutoff)
}

// indexSquare returns the series of n^2 of a glass.
func indexSquare(m materials.Medium, function, what string, wavelength float64) (n, square taylor.Series, err error) {
	if m == nil {
		return n, square, fmt.Errorf("%s: %s is nil", function, what)
	}
	if n, err = m.Taylor(wavelength); err != nil {
		return n, square, fmt.Errorf("%s: %w", what, err)
	}
	if err = domain.Positive(function, what+" index", n[0], ""); err != nil {
		return n, square, err
	}
	return n, n.Square(), nil
}
