package radial

import (
	"errors"
	"fmt"
	"math"
	"sort"

	"glassthread/materials/domain"
)

// Vector modes. In R = 1 at the outermost layer's edge and with exp(i beta z - i omega t), let
//
//	z = beta E_z (up to i),   g = R E_phi,   e = E_r,
//	q = V^2 f = k^2 (n^2 - n2^2),   lambda = w^2 = beta^2 - k^2 n2^2,   eta = 1/beta^2.
//
// Maxwell's equations make this form stationary (curl of E squared, less k^2 n^2 E^2):
//
//	integral of (lambda - q)(g^2/R + R e^2) + 2 R e z' + (g' + nu e)^2/R - 2 nu z g/R - R z^2
//	   + eta (nu^2 z^2/R + R z'^2 + (lambda - q) R z^2),
//
// where the weak-guidance limit is the first line and nothing cancels as the contrast goes to
// 0. Beyond R = 1 the solution is exact, out of K_nu. z and g are continuous, of degree 16
// on each element; e, which jumps with the index, has values of its own at the Gauss points
// and is eliminated there. Gradients of a potential of degree 16 then are vectors of the
// discrete problem with a curl of 0 exactly, so that no spurious modes arise, and
//
//	number of modes above lambda = negative pivots - dimension of the gradients,
//
// as long as every mode carries its power forwards (x'(dT/dlambda) x > 0, which is checked
// of each). No derivative of the index occurs, and no condition at its jumps. For TE and TM
// modes one function suffices, h = R E_phi or R H_phi, with rho = 1 or n2^2/n^2:
//
//	integral of rho (h'^2 + (lambda - q) h^2)/R.

// VectorFamily is a family of vector modes.
type VectorFamily int

// The families of vector modes, numbered like those of package modes.
const (
	VectorTE VectorFamily = iota
	VectorTM
	VectorHE
	VectorEH
)

// VectorMode is one vector mode in pure numbers.
type VectorMode struct {
	Family VectorFamily
	Nu, M  int     // azimuthal order, 0 for TE and TM; radial number, from 1
	V      float64 // normalised frequency
	U, W   float64 // U^2 + W^2 = V^2
	B      float64 // W^2/V^2
}

// ErrBackward says that the count of vector modes is not what the count of forward waves can
// be: a mode carries its power backwards. HE11 of a step does from an index ratio of about 12.8 on; up to 10
// is accepted.
var ErrBackward = errors.New("the count of vector modes does not fall with the effective index")

// MaxVectorListV is the largest V that GuidedVector accepts.
const MaxVectorListV = 100

// vectorResolution is the largest V h sqrt(max |f|) on an element of width h: with degree 16
// it leaves an error of 1e-12 in b or below (measured, see the tests).
const vectorResolution = 8.0

func newVectorMode(family VectorFamily, nu, m int, v, lambda float64) VectorMode {
	p := newMode(0, m, v, lambda)
	return VectorMode{family, nu, m, v, p.U, p.W, p.B}
}

func checkVectorLabel(function string, family VectorFamily, nu, m int) error {
	switch family {
	case VectorTE, VectorTM:
		if nu != 0 {
			return &domain.Error{Func: function, Argument: "nu", Value: float64(nu), Allowed: "0 for a TE or TM mode"}
		}
	case VectorHE, VectorEH:
		if nu < 1 || nu > 10000 {
			return &domain.Error{Func: function, Argument: "nu", Value: float64(nu), Allowed: "from 1 to 10000 for an HE or EH mode"}
		}
	default:
		return &domain.Error{Func: function, Argument: "family", Value: float64(family), Allowed: "TE, TM, HE or EH"}
	}
	if m < 1 || m > 10000 {
		return &domain.Error{Func: function, Argument: "m", Value: float64(m), Allowed: "from 1 to 10000"}
	}
	return nil
}

// vectorProblem is a mesh, shared by all orders.
type vectorProblem struct {
	mesh        []vectorElement
	v, cladding float64 // cladding is (k a n2)^2
	low, high   float64 // bounds of lambda
}

// vectorProblem sets up the mesh; cladding is k a n2.
func (p Profile) vectorProblem(function string, v, cladding float64) (*vectorProblem, error) {
	if err := p.check(function, v); err != nil {
		return nil, err
	}
	if v < 1e-6 {
		return nil, &domain.Error{Func: function, Argument: "v", Value: v, Allowed: "at least 1e-6"}
	}
	if !(cladding > 0) {
		return nil, &domain.Error{Func: function, Argument: "cladding", Value: cladding, Allowed: "above 0, infinite included"}
	}
	for i, x := range p.Pieces {
		if x.To-x.From < 1e-9 {
			return nil, &domain.Error{Func: function, Argument: fmt.Sprintf("Pieces[%d].To", i), Value: x.To,
				Allowed: fmt.Sprintf("at least 1e-9 above From = %v", x.From)}
		}
	}
	mesh, err := p.vectorMesh(v, cladding*cladding)
	if err != nil {
		return nil, err
	}
	q := &vectorProblem{mesh: mesh, v: v, cladding: cladding * cladding, low: leastB * v * v}
	least := 0.0
	for k := range mesh {
		for _, x := range append(mesh[k].qn[:], mesh[k].qg[:]...) {
			q.high, least = math.Max(q.high, x), math.Min(least, x)
		}
	}
	if !(q.cladding > -least*(1+1e-9)) {
		return nil, &domain.Error{Func: function, Argument: "cladding", Value: cladding,
			Allowed: fmt.Sprintf("above %v, so that n^2 is above 0 everywhere", math.Sqrt(-least))}
	}
	if q.high > 99*(1+1e-9)*q.cladding {
		return nil, &domain.Error{Func: function, Argument: "cladding", Value: cladding,
			Allowed: fmt.Sprintf("above %v, so that no index is over ten times the cladding's", math.Sqrt(q.high/99))}
	}
	return q, nil
}

// vectorRoot is a root of one order, and its family.
type vectorRoot struct {
	lambda float64
	family VectorFamily
}

// roots finds the roots of one order in falling order: all, or for m > 0 those down to the
// m-th of a family.
func (p *vectorProblem) roots(function string, family VectorFamily, nu, m int) ([]vectorRoot, error) {
	if !(p.high > p.low) {
		return nil, nil
	}
	w := vectorSearch{newVectorSystem(p.mesh, family, nu, p.cladding), function, family, m, [4]int{}, nil}
	n := w.s.factor(p.low)
	if n < 0 || w.s.factor(p.high) != 0 {
		return nil, w.lost()
	}
	err := w.between(p.low, n, p.high, 0)
	if err == nil && !w.done() && len(w.list) != n {
		err = w.lost()
	}
	return w.list, err
}

// vectorSearch looks for roots.
type vectorSearch struct {
	s        *vectorSystem
	function string
	family   VectorFamily
	m        int
	found    [4]int // of each family
	list     []vectorRoot
}

func (w *vectorSearch) lost() error {
	return lostCount(w.function, int(w.s.nu))
}

func lostCount(function string, nu int) error {
	return &domain.Error{Func: function, Argument: "nu", Value: float64(nu),
		Allowed: "one of whose modes none carries its power backwards", Kind: ErrBackward}
}

func (w *vectorSearch) done() bool { return w.m > 0 && w.found[w.family] >= w.m }

// between appends the roots of the counts nHigh+1 to nLow.
func (w *vectorSearch) between(low float64, nLow int, high float64, nHigh int) error {
	for nLow > nHigh && !w.done() {
		if w.s.fields == 1 && nLow < w.m { // TE and TM need no others for their label
			for range nLow - nHigh {
				w.append(low)
			}
			return nil
		}
		if nLow == nHigh+1 {
			return w.polish(low, high, nHigh)
		}
		m := w.s.middle(low, high)
		if !(m > low && m < high) { // as good as equal
			w.s.settle(low)
			for range nLow - nHigh {
				w.append(low)
			}
			return nil
		}
		n := w.s.factor(m)
		if n < nHigh || n > nLow {
			return w.lost()
		}
		if err := w.between(m, n, high, nHigh); err != nil {
			return err
		}
		high, nHigh = m, n
	}
	return nil
}

func (s *vectorSystem) middle(low, high float64) float64 {
	return (*system)(nil).middle(low, high)
}

// append adds a root, the system holding its vector.
func (w *vectorSearch) append(lambda float64) {
	r := vectorRoot{lambda, w.s.family}
	if w.s.fields == 2 {
		r.family = VectorHE
		if w.s.longitudinal() < 0 {
			r.family = VectorEH
		}
	}
	w.found[r.family]++
	w.list = append(w.list, r)
}

// polish finds the one root between low and high, above which there are nHigh, by Newton's
// method on the Rayleigh quotient of a vector that inverse iteration improves (cubic),
// safeguarded by the count. The quotient is that of the form itself, so that a small pivot in
// the factors does not matter.
func (w *vectorSearch) polish(low, high float64, nHigh int) error {
	s := w.s
	width := high - low
	x := s.middle(low, high)
	s.loadRandom()
	for range 200 {
		if n := s.factor(x); n > nHigh {
			low = x
		} else {
			high = x
		}
		s.solve()
		value, slope := s.form(x)
		step := -value / slope
		next := x + step
		// The step after this one is of the order of its cube.
		margin := math.Min(1e-9*x, 1e-6*width)
		if math.Abs(step) <= margin && next > low-margin && next < high+margin || math.Abs(step) < 2e-16*x {
			if !(slope > 0) {
				return w.lost()
			}
			w.append(next)
			return nil
		}
		if !(next > low && next < high) {
			if next = s.middle(low, high); !(next > low && next < high) {
				break
			}
		}
		s.loadSlope(x, math.Abs(slope))
		x = next
	}
	w.append(x)
	return nil
}

// GuidedVector returns every guided vector mode of the profile in falling B, at a V above 0
// and at most MaxVectorListV; cladding is k a n2, a the radius of R = 1, and infinite in the
// limit of weak guidance. The modes of each order are as many as the count at b = 1e-13
// proves; a mode below that is as good as at cut-off and not listed. It goes on to higher orders
// until two running have none. The error matches ErrBackward where the count fails.
//
// A mode is HE where the integral of E_z H_z has the sign that it has for HE11, else EH: for
// a step this is the usual definition at any contrast (the sign is the same at all radii: E.
// Snitzer, J. Opt. Soc. Am. 51, 491, 1961), and with weak guidance HE(nu, m) belongs to
// LP(nu-1, m) and EH(nu, m) to LP(nu+1, m). M counts within the family in falling B.
func GuidedVector(p Profile, v, cladding float64) ([]VectorMode, error) {
	const function = "radial.GuidedVector"
	if v > MaxVectorListV {
		return nil, &domain.Error{Func: function, Argument: "v", Value: v, Allowed: "at most 100"}
	}
	q, err := p.vectorProblem(function, v, cladding)
	if err != nil {
		return nil, err
	}
	var list []VectorMode
	add := func(family VectorFamily, nu int) (int, error) {
		roots, err := q.roots(function, family, nu, 0)
		var m [4]int
		for _, r := range roots {
			m[r.family]++
			list = append(list, newVectorMode(r.family, nu, m[r.family], v, r.lambda))
		}
		return len(roots), err
	}
	for _, f := range []VectorFamily{VectorTE, VectorTM} {
		if _, err := add(f, 0); err != nil {
			return nil, err
		}
	}
	for nu, none := 1, 0; none < 2; nu++ {
		n, err := add(VectorHE, nu)
		if err != nil {
			return nil, err
		}
		none++
		if n > 0 {
			none = 0
		}
	}
	sort.SliceStable(list, func(i, j int) bool { return list[i].B > list[j].B })
	return list, nil
}

// SolveVector returns one vector mode of the profile, for v up to MaxV; see GuidedVector. The
// error matches ErrCutoff where the mode is not guided.
func SolveVector(p Profile, v, cladding float64, family VectorFamily, nu, m int) (VectorMode, error) {
	_, root, err := p.vectorRoot("radial.SolveVector", v, cladding, family, nu, m)
	if err != nil {
		return VectorMode{}, err
	}
	return newVectorMode(family, nu, m, v, root.lambda), nil
}

// vectorRoot finds one root, and its rank among those of its order, from 1.
func (p Profile) vectorRoot(function string, v, cladding float64, family VectorFamily, nu, m int) (q *vectorProblem, r rankedRoot, err error) {
	if err = checkVectorLabel(function, family, nu, m); err != nil {
		return
	}
	if q, err = p.vectorProblem(function, v, cladding); err != nil {
		return
	}
	list, err := q.roots(function, family, nu, m)
	if err != nil {
		return
	}
	of := 0
	for i, x := range list {
		if x.family == family {
			of++
		}
		if of == m {
			return q, rankedRoot{x.lambda, i + 1, of}, nil
		}
	}
	return q, rankedRoot{0, len(list), of}, &domain.Error{Func: function, Argument: "v", Value: v, Allowed: "above the cut-off of the mode", Kind: ErrCutoff}
}

// rankedRoot is a root, its place among those of the order and its place in its family; or how
// many there are.
type rankedRoot struct {
	lambda   float64
	rank, of int
}

// VectorRank returns the place of a guided vector mode among all of its order, HE and EH
// alike, from 1, in falling B. Where the exact count at cut-off finds modes of order 1 below
// the b from which modes are solved, they are taken for HE modes, whose b alone is
// exponentially small in a range above cut-off. The error matches ErrCutoff where the mode is
// not guided.
func VectorRank(p Profile, v, cladding float64, family VectorFamily, nu, m int) (int, error) {
	const function = "radial.VectorRank"
	q, root, err := p.vectorRoot(function, v, cladding, family, nu, m)
	if !errors.Is(err, ErrCutoff) || nu != 1 || family != VectorHE {
		return root.rank, err
	}
	n, err2 := q.count(function, family, nu)
	if err2 != nil {
		return 0, err2
	}
	if rank := root.rank + m - root.of; rank <= n {
		return rank, nil
	}
	return 0, err
}

// CountVector returns the number of vector modes of one family and order that are guided at
// v, HE and EH counted together. It is the exact limit of the count at cut-off, where b is
// 0, so that it finds modes of any b.
func CountVector(p Profile, v, cladding float64, family VectorFamily, nu int) (int, error) {
	const function = "radial.CountVector"
	if err := checkVectorLabel(function, family, nu, 1); err != nil {
		return 0, err
	}
	q, err := p.vectorProblem(function, v, cladding)
	if err != nil {
		return 0, err
	}
	return q.count(function, family, nu)
}

// count counts the modes of an order at cut-off.
func (p *vectorProblem) count(function string, family VectorFamily, nu int) (int, error) {
	if !(p.high > 0) {
		return 0, nil
	}
	n := newVectorSystem(p.mesh, family, nu, p.cladding).factor(0)
	if n < 0 {
		return 0, lostCount(function, nu)
	}
	return n, nil
}
