package modes

import (
	"fmt"
	"math"
	"sort"

	"glassthread/materials/domain"
	"glassthread/modes/bessel"
)

// Family is one of the four families of vector modes of a round fibre.
type Family int

// The families: no field along the fibre but the magnetic (TE) or the electric one
// (TM), both without azimuthal dependence; and the hybrid modes, HE and EH.
const (
	TE Family = iota
	TM
	HE
	EH
)

// String returns TE, TM, HE or EH.
func (f Family) String() string {
	switch f {
	case TE:
		return "TE"
	case TM:
		return "TM"
	case HE:
		return "HE"
	case EH:
		return "EH"
	}
	return fmt.Sprintf("Family(%d)", int(f))
}

// MaxDelta is the largest relative index difference accepted, (n1^2 - n2^2)/(2 n1^2): a
// core index ten times the cladding's. Up to there V rises with w along every mode, so
// that each label has one solution. From a ratio of about 12.8 on, HE11 has a stretch
// of backward waves, and with it three solutions at one V.
const MaxDelta = 0.495

// Vector is one solved vector mode of a step-index fibre, in pure numbers.
type Vector struct {
	Family Family
	Nu, M  int     // azimuthal order, 0 for TE and TM, from 1 for HE and EH; radial number, from 1
	V      float64 // normalised frequency
	Delta  float64 // relative index difference (n1^2 - n2^2)/(2 n1^2), exact by definition
	U, W   float64 // transverse parameters of core and cladding: U^2 + W^2 = V^2
	B      float64 // normalised effective index W^2/V^2, from 0 (cut-off) to 1
	Shift  float64 // B less that of the LP mode of its group at the same V; never above 0
}

// Degeneracy returns how many modes share the label: 1 for TE and TM, 2 for HE and EH,
// which have two orientations (Snyder and Love 1983, section 12-7).
func (p Vector) Degeneracy() int { return degeneracy(p.Family) }

// Group returns the label of the LP mode that the mode belongs to, whose effective index
// it takes on as the index difference shrinks: LP(1, m) for TE and TM, LP(nu-1, m) for
// HE, LP(nu+1, m) for EH (Snyder and Love 1983, table 14-1).
func (p Vector) Group() (l, m int) { return groupOrder(p.Family, p.Nu), p.M }

func degeneracy(f Family) int {
	if f == HE || f == EH {
		return 2
	}
	return 1
}

func groupOrder(f Family, nu int) int {
	if f == HE {
		return nu - 1
	}
	return nu + 1
}

// CutoffVectorV returns the V below which a vector mode is not guided (Snyder and Love
// 1983, table 12-4):
//
//	TE, TM(0, m)      j_{0,m}
//	HE(1, m)          j_{1,m-1}, and 0 for HE11, which has no cut-off
//	EH(nu, m)         j_{nu,m}
//	HE(nu >= 2, m)    (n1^2/n2^2 + 1) J_{nu-1}(V) = V J_nu(V)/(nu - 1)
//
// The last depends on the index ratio: its m-th root goes from j_{nu-2,m} to j_{nu-1,m}
// as delta = (n1^2 - n2^2)/(2 n1^2) grows from 0. delta is above 0 and at most MaxDelta,
// nu is 0 for TE and TM and from 1 otherwise, m is from 1, both below bessel.MaxOrder. The
// error is one unit in the last place or little more.
func CutoffVectorV(delta float64, family Family, nu, m int) (float64, error) {
	const function = "modes.CutoffVectorV"
	if err := checkVectorLabel(function, family, nu, m); err != nil {
		return 0, err
	}
	if err := checkDelta(function, delta); err != nil {
		return 0, err
	}
	e := newVectorEquation(family, nu, delta)
	high, _, err := e.cutoff(m)
	return high, err
}

// SolveVector returns a vector mode at a normalised frequency v above 0 and at most
// MaxV, for a relative index difference delta = (n1^2 - n2^2)/(2 n1^2) above 0 and at most
// MaxDelta, from the exact eigenvalue equation (Snyder and Love 1983, table 12-4). The
// error matches ErrCutoff when v is at or below the mode's cut-off.
//
// The worst relative errors against arbitrary precision, over delta from 1e-12 to 0.49 and
// to 1e3 in V and order, are 3e-16 for U, 6e-15 for W, 1e-14 for B and Shift where they are
// well conditioned (mean 5e-17, 9e-17, 2e-16 and 3e-16): Shift itself has that error at
// any delta, however small, which the difference of two values of B has not.
//
// Just above a cut-off V_c, W has a relative error of about 1e-16 (20 + l)/(v - V_c), l being the order of the group; for HE(1, m) that
// times c/(2 V_c (v - V_c)) where this exceeds 1, c = (n1^2 + n2^2)/n2^2. HE11 is guided at
// any v, but its W falls like exp(-c/v^2), so that a relative error of v grows by 2c/v^2,
// and W underflows to 0 in the end.
func SolveVector(v, delta float64, family Family, nu, m int) (Vector, error) {
	const function = "modes.SolveVector"
	if err := checkVectorLabel(function, family, nu, m); err != nil {
		return Vector{}, err
	}
	if err := checkDelta(function, delta); err != nil {
		return Vector{}, err
	}
	if err := checkV(function, v, MaxV); err != nil {
		return Vector{}, err
	}
	e := newVectorEquation(family, nu, delta)
	return e.solveLabel(function, v, delta, m)
}

// GuidedVector returns every guided vector mode at a normalised frequency v above 0 and
// at most MaxListV and a relative index difference delta, in falling B. Each label stands
// once; see Degeneracy.
//
// None is missed. Between two neighbouring zeros of the core's Bessel function, the
// interval of the LP mode of its group, each family has exactly one mode, guided where v
// is above its cut-off. So the labels are those of the LP modes guided at v: HE(1, m) for
// LP(0, m), TE(0, m), TM(0, m) and HE(2, m) for LP(1, m), HE(l+1, m) and EH(l-1, m) for
// LP(l, m), less those HE(nu >= 2, m) whose cut-off, above that of the LP mode, is not
// reached yet. Tests compare them with every root of the determinant.
func GuidedVector(v, delta float64) ([]Vector, error) {
	const function = "modes.GuidedVector"
	if err := checkDelta(function, delta); err != nil {
		return nil, err
	}
	if err := checkV(function, v, MaxListV); err != nil {
		return nil, err
	}
	return guidedVector(v, delta, 1-2*delta)
}

// guidedVector lists the modes; rest is n2^2/n1^2.
func guidedVector(v, delta, rest float64) ([]Vector, error) {
	groups, err := GuidedLP(v)
	if err != nil {
		return nil, err
	}
	list := make([]Vector, 0, 3*len(groups))
	add := func(lp LP, family Family, nu int) {
		e := vectorEquation{family, nu, groupOrder(family, nu), 2 * delta, rest}
		cut, guided, err2 := e.guided(v, lp)
		if err2 != nil {
			err = err2
		}
		if guided {
			list = append(list, e.solve(v, delta, lp, cut))
		}
	}
	for _, lp := range groups {
		if lp.L == 1 {
			add(lp, TE, 0)
			add(lp, TM, 0)
		}
		if lp.L > 1 {
			add(lp, EH, lp.L-1)
		}
		add(lp, HE, lp.L+1)
	}
	sort.SliceStable(list, func(i, j int) bool {
		a, b := &list[i], &list[j]
		if a.B != b.B {
			return a.B > b.B
		}
		return a.Shift > b.Shift
	})
	return list, err
}

func checkDelta(function string, delta float64) error {
	if delta > 0 && delta <= MaxDelta {
		return nil
	}
	return &domain.Error{Func: function, Argument: "delta", Value: delta,
		Allowed: "(n1^2 - n2^2)/(2 n1^2) above 0 and at most 0.495"}
}

func checkVectorLabel(function string, family Family, nu, m int) error {
	switch family {
	case TE, TM:
		if nu != 0 {
			return &domain.Error{Func: function, Argument: "nu", Value: float64(nu), Allowed: "0 for a TE or TM mode"}
		}
	case HE, EH:
		if nu < 1 || nu >= bessel.MaxOrder {
			return &domain.Error{Func: function, Argument: "nu", Value: float64(nu), Allowed: "from 1 to 99999 for an HE or EH mode"}
		}
	default:
		return &domain.Error{Func: function, Argument: "family", Value: float64(family), Allowed: "TE, TM, HE or EH"}
	}
	if m < 1 || m >= bessel.MaxOrder {
		return &domain.Error{Func: function, Argument: "m", Value: float64(m), Allowed: "from 1 to 99999"}
	}
	return nil
}

// solveLabel solves the m-th mode if it is guided.
func (e *vectorEquation) solveLabel(function string, v, delta float64, m int) (Vector, error) {
	lp, err := SolveLP(v, e.l, m)
	if err != nil {
		// The LP mode of the group is guided wherever the vector mode is.
		return Vector{}, e.cutoffError(function, v, m, err)
	}
	cut, guided, err := e.guided(v, lp)
	if err != nil || !guided {
		return Vector{}, e.cutoffError(function, v, m, err)
	}
	return e.solve(v, delta, lp, cut), nil
}

func (e *vectorEquation) cutoffError(function string, v float64, m int, err error) error {
	high, _, err2 := e.cutoff(m)
	if err2 != nil {
		return err2
	}
	if err != nil && v > high*(1+1e-9) { // not for want of a high enough V
		return err
	}
	return &domain.Error{Func: function, Argument: "v", Value: v,
		Allowed: "above the cut-off of the mode " + formatV(high), Kind: ErrCutoff}
}

// vectorLabel returns a label such as HE11 or HE(12,3).
func vectorLabel(family Family, nu, m int) string {
	if nu >= 0 && nu < 10 && m >= 0 && m < 10 {
		return fmt.Sprintf("%v%d%d", family, nu, m)
	}
	return fmt.Sprintf("%v(%d,%d)", family, nu, m)
}

// String returns the mode's label, such as HE11 or HE(12,3).
func (p Vector) String() string { return vectorLabel(p.Family, p.Nu, p.M) }

// setQ completes a mode from q = w^2 and, if it is above 0, s = u^2.
func (p *Vector) setQ(q, s, shift float64) {
	p.W = math.Sqrt(q)
	if s > 0 {
		p.U = math.Sqrt(s)
	} else {
		p.U = math.Sqrt((p.V - p.W) * (p.V + p.W))
	}
	r := p.W / p.V
	p.B = math.Min(1, r*r)
	p.Shift = shift / p.V / p.V
}
