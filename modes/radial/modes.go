package radial

import (
	"math"
	"sort"

	"glassthread/materials/domain"
)

// Guided returns every guided scalar mode of the profile at v, in falling B: for each order
// l the modes that the count at b = 1e-13 proves, until an order has none. A mode below
// that b is as good as at cut-off and not listed. All orders share the mesh, and all modes
// of an order one reduction of it.
func Guided(p Profile, v float64) ([]Mode, error) {
	if err := p.check("radial.Guided", v); err != nil {
		return nil, err
	}
	mesh, err := p.mesh(v)
	if err != nil {
		return nil, err
	}
	top := highest(mesh) * v * v
	if top <= 0 {
		return nil, nil
	}
	var list []Mode
	var roots []float64
	for l := 0; ; l++ {
		s := newSystem(mesh, l, v, false)
		low := leastB * v * v
		n := s.count(low)
		if n == 0 {
			// With l^2/R^2 above, no higher order has one either.
			break
		}
		roots = s.roots(low, top, n, roots[:0])
		for m, lambda := range roots {
			list = append(list, newMode(l, m+1, v, lambda))
		}
	}
	sort.Slice(list, func(i, j int) bool {
		a, b := &list[i], &list[j]
		if a.B != b.B {
			return a.B > b.B
		}
		return a.L < b.L || a.L == b.L && a.M < b.M
	})
	return list, nil
}

// Solve returns the mode LP(l, m) of the profile at v. The error matches ErrCutoff where it
// is not guided.
func Solve(p Profile, v float64, l, m int) (Mode, error) {
	const function = "radial.Solve"
	if err := checkLabel(function, l, m); err != nil {
		return Mode{}, err
	}
	if err := p.check(function, v); err != nil {
		return Mode{}, err
	}
	mesh, err := p.mesh(v)
	if err != nil {
		return Mode{}, err
	}
	s := newSystem(mesh, l, v, false)
	lambda, err := s.root(function, mesh, v, m)
	if err != nil {
		return Mode{}, err
	}
	return newMode(l, m, v, lambda), nil
}

// root finds the m-th root.
func (s *system) root(function string, mesh []element, v float64, m int) (float64, error) {
	low, high := leastB*v*v, math.Max(highest(mesh), 0)*v*v
	nLow, nHigh := s.count(low), 0
	if nLow < m || !(high > low) {
		return 0, &domain.Error{Func: function, Argument: "v", Value: v, Allowed: "above the cut-off of the mode", Kind: ErrCutoff}
	}
	for nLow-nHigh > 1 {
		x := s.middle(low, high)
		if !(x > low && x < high) {
			return x, nil
		}
		if n := s.count(x); n >= m {
			low, nLow = x, n
		} else {
			high, nHigh = x, n
		}
	}
	return s.polish(low, high, nHigh), nil
}

func checkLabel(function string, l, m int) error {
	if l < 0 || l > 10000 {
		return &domain.Error{Func: function, Argument: "l", Value: float64(l), Allowed: "from 0 to 10000"}
	}
	if m < 1 || m > 10000 {
		return &domain.Error{Func: function, Argument: "m", Value: float64(m), Allowed: "from 1 to 10000"}
	}
	return nil
}

func highest(mesh []element) float64 {
	top := math.Inf(-1)
	for i := range mesh {
		for _, f := range mesh[i].f {
			top = math.Max(top, f)
		}
	}
	return top
}

func newMode(l, m int, v, lambda float64) Mode {
	w := math.Sqrt(lambda)
	u2 := (v - w) * (v + w)
	return Mode{L: l, M: m, V: v, U: math.Sqrt(math.Max(u2, 0)), W: w, B: (w / v) * (w / v)}
}

// CutoffV returns the v above which the mode LP(l, m) of the profile is guided: 0 for LP01
// of a profile whose mean over the cross-section is not negative, which has no cut-off.
// LP01 of a depressed profile (a W fibre) has one. At cut-off kappa is l exactly, and the
// number of modes guided rises with v, so it is found by halving on that count, to a
// relative error of about 1e-14 for smooth pieces. The error matches ErrCutoff where the
// mode is not guided up to MaxV.
func CutoffV(p Profile, l, m int) (float64, error) {
	const function = "radial.CutoffV"
	if err := checkLabel(function, l, m); err != nil {
		return 0, err
	}
	if err := p.check(function, 1); err != nil {
		return 0, err
	}
	count := func(v float64) (int, error) {
		mesh, err := p.mesh(v)
		if err != nil {
			return 0, err
		}
		return newSystem(mesh, l, v, false).count(0), nil
	}
	low, high := 0.0, 1.0
	if l == 0 && m == 1 {
		mesh, err := p.mesh(1)
		if err != nil {
			return 0, err
		}
		mean, size := 0.0, 0.0
		for i := range mesh {
			for j, f := range mesh[i].f {
				mean += mesh[i].mass[j] * f
				size += mesh[i].mass[j] * math.Abs(f)
			}
		}
		if mean >= -1e-15*size {
			return 0, nil
		}
	}
	for {
		n, err := count(high)
		if err != nil {
			return 0, err
		}
		if n >= m {
			break
		}
		if high == MaxV {
			return 0, &domain.Error{Func: function, Argument: "m", Value: float64(m),
				Allowed: "that of a mode guided at v up to 1000", Kind: ErrCutoff}
		}
		low, high = high, math.Min(2*high, MaxV)
	}
	for {
		v := low + (high-low)/2
		if !(v > low && v < high) {
			return v, nil
		}
		n, err := count(v)
		if err != nil {
			return 0, err
		}
		if n >= m {
			high = v
		} else {
			low = v
		}
	}
}
