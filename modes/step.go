package modes

import (
	"errors"
	"fmt"
	"math"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/root"
	"glassthread/materials/taylor"
	"glassthread/numap"
)

// Step is a step-index fibre: a round core of one glass in a cladding of another,
// wide enough to be taken as unbounded. The zero Step gives errors.
type Step struct {
	Radius         float64 // of the core (m)
	Core, Cladding materials.Medium
}

// LP returns the mode LP(l, m) of the fibre, l from 0, m from 1. It can be asked at
// any wavelength; where it is not guided, or with labels out of range, it answers
// with an error.
func (f Step) LP(l, m int) StepLP { return StepLP{Fibre: f, L: l, M: m} }

// V returns the normalised frequency (2 pi a/x) sqrt(n1^2 - n2^2) at a vacuum
// wavelength x (m). The error matches numap.ErrNotGuiding where the core's index
// does not exceed the cladding's.
func (f Step) V(wavelength float64) (float64, error) {
	na, err := f.NA(wavelength)
	if err != nil {
		return 0, err
	}
	return numap.V(f.Radius, na, wavelength)
}

// NA returns the numerical aperture sqrt(n1^2 - n2^2) at a vacuum wavelength (m) where
// both glasses answer; their errors are passed on. The radius, though it does not enter,
// must be above 0. The error matches numap.ErrNotGuiding where the core's index does not
// exceed the cladding's.
func (f Step) NA(wavelength float64) (float64, error) {
	n1, n2, err := f.glasses("modes.Step.NA", wavelength)
	if err != nil {
		return 0, err
	}
	return numap.NA(n1[0], n2[0])
}

var errNoGlass = errors.New("modes.Step: the core or the cladding is nil")

// glasses returns the series of both indices.
func (f *Step) glasses(function string, wavelength float64) (core, cladding taylor.Series, err error) {
	if err = domain.Positive(function, "Radius", f.Radius, "m"); err != nil {
		return
	}
	if f.Core == nil || f.Cladding == nil {
		err = errNoGlass
		return
	}
	if core, err = f.Core.Taylor(wavelength); err != nil {
		err = fmt.Errorf("core: %w", err)
		return
	}
	if cladding, err = f.Cladding.Taylor(wavelength); err != nil {
		err = fmt.Errorf("cladding: %w", err)
		return
	}
	if err = domain.Positive(function, "core index", core[0], ""); err != nil {
		return
	}
	err = domain.Positive(function, "cladding index", cladding[0], "")
	return
}

// Guided is one entry of the list of guided modes at a wavelength.
type Guided struct {
	Mode       StepLP
	Solution   LP
	Index      float64 // effective index
	Degeneracy int     // modes that share the label: 2 for l = 0, else 4
}

// Guided returns all guided LP modes at a vacuum wavelength (m) in falling effective
// index. V must not exceed MaxListV. None is missed; see GuidedLP.
func (f Step) Guided(wavelength float64) ([]Guided, error) {
	n1, n2, err := f.glasses("modes.Step.Guided", wavelength)
	if err != nil {
		return nil, err
	}
	v, err := f.V(wavelength)
	if err != nil {
		return nil, err
	}
	solved, err := GuidedLP(v)
	if err != nil {
		return nil, err
	}
	list := make([]Guided, len(solved))
	for i, p := range solved {
		list[i] = Guided{f.LP(p.L, p.M), p, effectiveIndex(n1[0], n2[0], p.B), p.Degeneracy()}
	}
	return list, nil
}

// effectiveIndex returns sqrt(n2^2 + b (n1^2 - n2^2)), formed about n2.
func effectiveIndex(n1, n2, b float64) float64 {
	return effectiveOf(n2, b*(n1-n2)*(n1+n2))
}

// StepLP is an LP mode of a step-index fibre. It is a materials.Medium: its index is
// the effective index.
type StepLP struct {
	Fibre Step
	L, M  int
}

// String returns the mode's label, such as LP01 or LP(12,3).
func (m StepLP) String() string {
	if m.L >= 0 && m.L < 10 && m.M >= 0 && m.M < 10 {
		return fmt.Sprintf("LP%d%d", m.L, m.M)
	}
	return fmt.Sprintf("LP(%d,%d)", m.L, m.M)
}

// Taylor returns the series of the effective index about a vacuum wavelength (m),
// exact through both glasses and the eigenvalue. The error matches ErrCutoff where
// the mode is not guided and numap.ErrNotGuiding where no mode is.
func (m StepLP) Taylor(wavelength float64) (taylor.Series, error) {
	s, err := m.solve(wavelength)
	if err != nil {
		return taylor.Series{}, err
	}
	contrast := s.n1.Sub(s.n2).Mul(s.n1.Add(s.n2))
	// ln V = ln(2 pi a) - ln x + ln(n1^2 - n2^2)/2; its value is not needed.
	logV := contrast.Log().Scale(0.5).Sub(taylor.Variable(wavelength).Log())
	n := s.index(s.b.Compose(logV), contrast)
	return n, checkIndex(n, wavelength)
}

// Solve returns the mode in pure numbers at a vacuum wavelength (m), with the errors
// of Taylor.
func (m StepLP) Solve(wavelength float64) (LP, error) {
	s, err := m.solve(wavelength)
	return s.lp, err
}

// solved is a mode solved at a wavelength, with b as a series in ln V.
type solved struct {
	n1, n2, b taylor.Series
	lp        LP
}

func (m *StepLP) solve(wavelength float64) (s solved, err error) {
	const function = "modes.StepLP"
	s.n1, s.n2, err = m.Fibre.glasses(function, wavelength)
	if err != nil {
		return s, err
	}
	na, err := numap.NA(s.n1[0], s.n2[0])
	if err != nil {
		return s, err
	}
	v, err := numap.V(m.Fibre.Radius, na, wavelength)
	if err != nil {
		return s, err
	}
	s.lp, err = SolveLP(v, m.L, m.M)
	if err != nil {
		return s, fmt.Errorf("%s at wavelength %v m: %w", m.String(), wavelength, err) // m itself would escape
	}
	s.b = s.lp.logSeries()
	return s, nil
}

// index returns sqrt(n2^2 + b contrast), with the value formed about n2.
func (s *solved) index(b, contrast taylor.Series) taylor.Series {
	n := s.n2.Square().Add(b.Mul(contrast)).Sqrt()
	n[0] = effectiveIndex(s.n1[0], s.n2[0], b[0])
	return n
}

func checkIndex(n taylor.Series, wavelength float64) error {
	if n.Finite() {
		return nil
	}
	return &domain.Error{Func: "modes.StepLP", Argument: "wavelength", Value: wavelength,
		Allowed: "where the effective index and its derivatives are finite (m)"}
}

// Parts returns two series about a vacuum wavelength (m) that keep one cause of
// dispersion each. In the first the field is frozen and the glasses disperse,
//
//	n^2(x) = n_eff^2 + P (n1^2(x) - n1^2) + (1 - P)(n2^2(x) - n2^2)
//
// with P the share of power in the core: each glass counts by the power it carries (W.
// A. Gambling, H. Matsumura and C. M. Ragdale, IEE J. Microw. Opt. Acoust. 3, 239,
// 1979; from memory). In the second the glasses are frozen and V goes like 1/x. See
// dispersion.Split.
func (m StepLP) Parts(wavelength float64) (material, waveguide taylor.Series, err error) {
	s, err := m.solve(wavelength)
	if err != nil {
		return
	}
	n0 := effectiveIndex(s.n1[0], s.n2[0], s.lp.B)
	core, cladding := s.n1.Square(), s.n2.Square()
	core[0], cladding[0] = 0, 0
	share := s.lp.CorePower()
	material = core.Scale(share).Add(cladding.Scale(1 - share)).Shift(n0 * n0).Sqrt()
	if err = checkIndex(material, wavelength); err != nil {
		return
	}
	frozen := solved{n1: taylor.Constant(s.n1[0]), n2: taylor.Constant(s.n2[0])}
	contrast := frozen.n1.Sub(frozen.n2).Mul(frozen.n1.Add(frozen.n2))
	logV := taylor.Variable(wavelength).Log().Neg()
	waveguide = frozen.index(s.b.Compose(logV), contrast)
	return material, waveguide, checkIndex(waveguide, wavelength)
}

// CutoffWavelength returns the vacuum wavelength (m) between from and to above which
// the mode is no longer guided, with the glasses' dispersion: V at it is the mode's
// cut-off. If there are several (glasses whose indices cross) it is the longest; a
// wavelength above which the mode begins to be guided does not count. The error
// matches ErrNoCutoff when there is none in the range; LP01 has none at all. Both
// glasses must answer over the whole range.
func (m StepLP) CutoffWavelength(from, to float64) (float64, error) {
	const function = "modes.StepLP.CutoffWavelength"
	if err := checkLabel(function, m.L, m.M); err != nil {
		return 0, err
	}
	if err := checkSpan(function, from, to); err != nil {
		return 0, err
	}
	cut, err := CutoffV(m.L, m.M)
	if err != nil {
		return 0, err
	}
	if cut == 0 {
		return 0, fmt.Errorf("%s: %v is guided at every wavelength: %w", function, m, ErrNoCutoff)
	}
	// Relative excess of V^2 over its cut-off; it may be negative where the indices
	// cross.
	excess := func(x float64) (value, slope float64, err error) {
		n1, n2, err := m.Fibre.glasses(function, x)
		if err != nil {
			return 0, 0, err
		}
		k := 2 * math.Pi * m.Fibre.Radius / cut
		e := n1.Sub(n2).Mul(n1.Add(n2)).Quo(taylor.Variable(x).Square()).Scale(k * k)
		return e[0] - 1, e[1], domain.Result(function, "V", e[0])
	}
	x, found, err := lastFall(excess, from, to)
	if err == nil && !found {
		err = fmt.Errorf("%s: %v from %v m to %v m: %w", function, m, from, to, ErrNoCutoff)
	}
	return x, err
}

// cutoffCells is into how many cells the range is cut in the search for a cut-off.
const cutoffCells = 64

// lastFall returns the last zero of f between from and to that f crosses falling.
func lastFall(f func(float64) (value, slope float64, err error), from, to float64) (x float64, found bool, err error) {
	zeros, err := root.All(f, from, to, cutoffCells)
	for i := len(zeros) - 1; i >= 0 && err == nil; i-- {
		var slope float64
		if _, slope, err = f(zeros[i]); err == nil && slope < 0 {
			return zeros[i], true, nil
		}
	}
	return 0, false, err
}

func checkSpan(function string, from, to float64) error {
	if err := domain.Positive(function, "from", from, "m"); err != nil {
		return err
	}
	if err := domain.Positive(function, "to", to, "m"); err != nil {
		return err
	}
	if to > from {
		return nil
	}
	return &domain.Error{Func: function, Argument: "to", Value: to, Allowed: fmt.Sprintf("above from = %v (m)", from)}
}
