package modes

import (
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/interp"
	"gonum.org/v1/gonum/mat"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/root"
)

// MeasuredPoint is one entry of a measured profile.
type MeasuredPoint struct {
	Radius float64 // m
	Index  float64
}

// Measured is an index profile as an instrument gives it, at one wavelength. Fibre turns
// each index into a composition, so that the profile at any other wavelength follows from
// the glasses.
//
// Between the points the composition is a piecewise cubic that is monotone wherever the
// points are (F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5, 300, 1984): no
// ripple appears that the points do not have. The zero Measured gives errors.
type Measured struct {
	Wavelength float64 // vacuum wavelength of the indices (m)
	// Points are in rising radius, the first on the axis. Two of the same radius mark a
	// jump. The last is the cladding, which goes on beyond it. From 2 to MaxMeasured.
	Points []MeasuredPoint
	// Jump, if above 0, is a difference of index: two neighbours that differ by more, before
	// any smoothing, have a jump half-way between them.
	Jump float64
	// Smoothing is the rms amount by which indices are moved to smooth the table, 0 for
	// none: the noise of the instrument. The result is the cubic spline of least mean
	// square second derivative that stays so close (C. H. Reinsch, Numer. Math. 10, 177,
	// 1967), or a straight line if that does; jumps stay.
	Smoothing float64
	// Raising and Lowering are the families of glasses, of the package's catalogue, for
	// indices above and below that of the undoped glass, which must be the same for both.
	// One that is zero is not used; with both zero they are germania-silica-by-sunak and
	// fluorine-silica.
	Raising, Lowering materials.Entry
}

// MaxMeasured is the largest number of points of a Measured.
const MaxMeasured = 1000

// dopants is a scale of composition on both sides of the undoped glass: mole fractions of
// the raising dopant above 0, those of the lowering one with their sign changed below.
type dopants struct {
	raising, lowering materials.Entry
	host              float64 // index of the undoped glass at the measured wavelength
}

func (t Measured) dopants(function string) (d dopants, err error) {
	d = dopants{raising: t.Raising, lowering: t.Lowering}
	if d.raising.Name == "" && d.lowering.Name == "" {
		if d.raising, err = materials.Lookup("germania-silica-by-sunak"); err != nil {
			return
		}
		if d.lowering, err = materials.Lookup("fluorine-silica"); err != nil {
			return
		}
	}
	var hosts []float64
	for _, e := range []materials.Entry{d.raising, d.lowering} {
		if e.Name == "" {
			continue
		}
		g, err := e.Glass(0)
		if err != nil {
			return d, fmt.Errorf("%s: %s: %w", function, e.Name, err)
		}
		n, err := materials.Index(g, t.Wavelength)
		if err != nil {
			return d, fmt.Errorf("%s: %s: %w", function, e.Name, err)
		}
		hosts = append(hosts, n)
	}
	d.host = hosts[0]
	if len(hosts) == 2 && math.Abs(hosts[1]-d.host) > 1e-12 {
		return d, fmt.Errorf("%s: the undoped glass of %s has index %v and that of %s %v: they must be the same",
			function, d.raising.Name, hosts[0], d.lowering.Name, hosts[1])
	}
	return d, nil
}

// composition returns the composition of an index.
func (d dopants) composition(index, wavelength float64) (float64, error) {
	e, sign := d.raising, 1.0
	switch {
	case math.Abs(index-d.host) < 1e-15:
		return 0, nil
	case index < d.host:
		e, sign = d.lowering, -1
	}
	if e.Name == "" {
		side := "above"
		if sign < 0 {
			side = "below"
		}
		return 0, fmt.Errorf("%w: no family is given for an index %s that of the undoped glass, %v",
			materials.ErrNoFraction, side, d.host)
	}
	x, err := e.FractionForIndex(index, wavelength)
	return sign * x, err
}

func (d dopants) glass(composition float64) (materials.Medium, error) {
	if composition < 0 || d.raising.Name == "" {
		return d.lowering.Glass(math.Abs(composition))
	}
	return d.raising.Glass(composition)
}

func (t Measured) check(function string) error {
	if err := domain.Positive(function, "Wavelength", t.Wavelength, "m"); err != nil {
		return err
	}
	if err := domain.NonNegative(function, "Jump", t.Jump, ""); err != nil {
		return err
	}
	if err := domain.NonNegative(function, "Smoothing", t.Smoothing, ""); err != nil {
		return err
	}
	if n := len(t.Points); n < 2 || n > MaxMeasured {
		return &domain.Error{Func: function, Argument: "len(Points)", Value: float64(n),
			Allowed: fmt.Sprintf("from 2 to %d", MaxMeasured)}
	}
	for i, p := range t.Points {
		name := fmt.Sprintf("Points[%d]", i)
		if err := domain.Positive(function, name+".Index", p.Index, ""); err != nil {
			return err
		}
		switch {
		case i == 0 && p.Radius != 0:
			return &domain.Error{Func: function, Argument: name + ".Radius", Value: p.Radius, Allowed: "0, the axis (m)"}
		case i == 1 && p.Radius == 0 || i > 1 && p.Radius == t.Points[i-2].Radius:
			return &domain.Error{Func: function, Argument: name + ".Radius", Value: p.Radius,
				Allowed: "above that of the point before it (m)"}
		case i > 0 && !(p.Radius >= t.Points[i-1].Radius && p.Radius <= math.MaxFloat64):
			return &domain.Error{Func: function, Argument: name + ".Radius", Value: p.Radius,
				Allowed: fmt.Sprintf("finite and at least %v, that of the point before it (m)", t.Points[i-1].Radius)}
		}
	}
	return nil
}

// stretch is the points between two jumps, and how many of the table come before them.
type stretch struct {
	r, n  []float64
	first int
	// end is where the stretch ends, at or beyond its last radius.
	end float64
}

func (t Measured) stretches() []stretch {
	list := []stretch{{}}
	for i, p := range t.Points {
		if i > 0 {
			last, before := &list[len(list)-1], t.Points[i-1]
			last.end = before.Radius
			if p.Radius == before.Radius || t.Jump > 0 && math.Abs(p.Index-before.Index) > t.Jump {
				last.end = before.Radius + (p.Radius-before.Radius)/2
				list = append(list, stretch{first: i})
			}
		}
		last := &list[len(list)-1]
		last.r, last.n = append(last.r, p.Radius), append(last.n, p.Index)
		last.end = p.Radius
	}
	return list
}

// smooth moves the indices of all stretches by the rms amount given.
func smooth(list []stretch, amount float64) error {
	count := 0
	scale := list[len(list)-1].end
	for _, s := range list {
		count += len(s.n)
	}
	// The moves at a weight of the second derivative, from 0 (none) to 1 (straight lines).
	moves := func(weight float64) (all [][]float64, rms float64, err error) {
		for _, s := range list {
			m, err := splineMoves(s.r, s.n, scale, weight)
			if err != nil {
				return nil, 0, err
			}
			for _, x := range m {
				rms += x * x
			}
			all = append(all, m)
		}
		return all, math.Sqrt(rms / float64(count)), nil
	}
	all, rms, err := moves(1)
	if err != nil {
		return err
	}
	if rms > amount {
		// In the logarithm of weight/(1 - weight), over which the rms goes from nothing to
		// straight lines.
		weight := func(y float64) float64 { return 1 / (1 + math.Exp(-y)) }
		y, err := root.Find(func(y float64) (float64, error) {
			_, rms, err := moves(weight(y))
			return rms - amount, err
		}, -80, 36, 1e-6)
		if err != nil {
			return err
		}
		if all, _, err = moves(weight(y)); err != nil {
			return err
		}
	}
	for i, s := range list {
		for k := range s.n {
			s.n[k] -= all[i][k]
		}
	}
	return nil
}

// splineMoves returns Q g with ((1 - weight) R + weight Q'Q) g = weight Q'y, after Reinsch: the
// smoothing spline is y less these. Radii are in units of scale.
func splineMoves(r, y []float64, scale, weight float64) ([]float64, error) {
	out := make([]float64, len(r))
	n := len(r) - 2
	if n < 1 {
		return out, nil
	}
	h := make([]float64, n+1)
	for i := range h {
		h[i] = (r[i+1] - r[i]) / scale
	}
	q := func(i int) [3]float64 { return [3]float64{1 / h[i], -1/h[i] - 1/h[i+1], 1 / h[i+1]} }
	a := mat.NewSymBandDense(n, min(2, n-1), nil)
	b := mat.NewVecDense(n, nil)
	for i := range n {
		c := q(i)
		b.SetVec(i, weight*((y[i+2]-y[i+1])/h[i+1]-(y[i+1]-y[i])/h[i]))
		for k := 0; k <= 2 && i+k < n; k++ {
			d, sum := q(i+k), 0.0
			for j := k; j <= 2; j++ {
				sum += c[j] * d[j-k]
			}
			sum *= weight
			switch k {
			case 0:
				sum += (1 - weight) * (h[i] + h[i+1]) / 3
			case 1:
				sum += (1 - weight) * h[i+1] / 6
			}
			a.SetSymBand(i, i+k, sum)
		}
	}
	var f mat.BandCholesky
	var g mat.VecDense
	if !f.Factorize(a) {
		return nil, errors.New("the points lie too unevenly to be smoothed")
	}
	if err := f.SolveVecTo(&g, b); err != nil && g.Len() != n {
		return nil, err
	}
	for i := range n {
		c := q(i)
		for k := range c {
			out[i+k] += c[k] * g.AtVec(i)
		}
	}
	for _, x := range out {
		if err := domain.Result("modes.Measured", "smoothed index", x); err != nil {
			return nil, err
		}
	}
	return out, nil
}

// Fibre returns the profile as layers, one between each point and the next (two where the
// composition passes through that of the undoped glass, one more on either side of a jump
// that Jump found), in a cladding of the last point's glass. The error says which point
// cannot be; it matches materials.ErrNoFraction for an index that no composition gives and
// materials.ErrRange where the glasses do not answer at the wavelength.
func (t Measured) Fibre() (Layered, error) {
	f, _, err := t.fibre("modes.Measured.Fibre")
	return f, err
}

// fibre also returns, of each layer, the two points whose indices it stands between.
func (t Measured) fibre(function string) (f Layered, between [][2]int, err error) {
	if err = t.check(function); err != nil {
		return
	}
	d, err := t.dopants(function)
	if err != nil {
		return
	}
	list := t.stretches()
	if t.Smoothing > 0 {
		if err = smooth(list, t.Smoothing); err != nil {
			return f, nil, fmt.Errorf("%s: %w", function, err)
		}
	}
	inside := 0.0
	add := func(l Layer, a, b int) {
		if l.Outer > inside {
			f.Layers, between = append(f.Layers, l), append(between, [2]int{a, b})
			inside = l.Outer
		}
	}
	uniform := func(outer, x float64, point int) error {
		g, err := d.glass(x)
		add(Layer{Outer: outer, Glass: g}, point, point)
		return err
	}
	for _, s := range list {
		x := make([]float64, len(s.n))
		for i, n := range s.n {
			if x[i], err = d.composition(n, t.Wavelength); err != nil {
				return f, nil, fmt.Errorf("%s: Points[%d], index %v: %w", function, s.first+i, n, err)
			}
		}
		if err = uniform(s.r[0], x[0], s.first); err != nil {
			return
		}
		var curve interp.FritschButland
		if len(x) > 1 {
			if err = curve.Fit(s.r, x); err != nil {
				return f, nil, fmt.Errorf("%s: %w", function, err)
			}
		}
		for i := 1; i < len(x); i++ {
			a, b := s.first+i-1, s.first+i
			if x[i-1] == x[i] {
				if err = uniform(s.r[i], x[i], a); err != nil {
					return
				}
				between[len(between)-1][1] = b
				continue
			}
			vary := func(low, high float64) func(float64) (materials.Medium, error) {
				low, high = math.Min(low, high), math.Max(low, high)
				return func(r float64) (materials.Medium, error) {
					return d.glass(math.Min(math.Max(curve.Predict(r), low), high))
				}
			}
			if x[i-1]*x[i] < 0 { // the two families have kinks between them
				zero, err := root.Find(func(r float64) (float64, error) { return curve.Predict(r), nil }, s.r[i-1], s.r[i], 0)
				if err != nil {
					return f, nil, fmt.Errorf("%s: %w", function, err)
				}
				if zero > s.r[i-1] && zero < s.r[i] {
					add(Layer{Outer: zero, Vary: vary(x[i-1], 0)}, a, b)
					add(Layer{Outer: s.r[i], Vary: vary(0, x[i])}, a, b)
					continue
				}
			}
			add(Layer{Outer: s.r[i], Vary: vary(x[i-1], x[i])}, a, b)
		}
		last := len(x) - 1
		if err = uniform(s.end, x[last], s.first+last); err != nil {
			return
		}
		f.Cladding, err = d.glass(x[last])
		if err != nil {
			return
		}
	}
	return f, between, nil
}

// MeasuredError is how far the effective index of a mode of a Measured may be off.
type MeasuredError struct {
	// Interpolation is the change of the effective index when every second point between
	// jumps is left out: more than what a finer table would change, if it has enough points.
	Interpolation float64
	// Noise is the standard deviation of the effective index that follows from independent
	// errors of the points.
	Noise float64
}

// Error estimates the error of the effective index of LP(l, m) at a vacuum wavelength (m)
// when each index of the table has an independent random error with standard deviation
// noise. Noise follows to first order from the Sensitivity to each layer, half of which is
// taken as that to either of its points, and without credit for Smoothing. An error that
// all points share moves the effective index by as much and is in neither figure. The
// errors are those of Fibre and of RadialLP.Solve.
func (t Measured) Error(l, m int, wavelength, noise float64) (e MeasuredError, err error) {
	const function = "modes.Measured.Error"
	if err = domain.NonNegative(function, "noise", noise, ""); err != nil {
		return
	}
	f, between, err := t.fibre(function)
	if err != nil {
		return
	}
	n, err := f.LP(l, m).Taylor(wavelength)
	if err != nil {
		return
	}
	s, err := f.LP(l, m).Sensitivity(wavelength)
	if err != nil {
		return
	}
	points := make([]float64, len(t.Points))
	for i, x := range s.Index {
		if i == len(between) { // the cladding
			points[len(points)-1] += x
			continue
		}
		points[between[i][0]] += x / 2
		points[between[i][1]] += x / 2
	}
	norm := 0.0
	for _, x := range points {
		norm = math.Hypot(norm, x)
	}
	e.Noise = norm * noise
	coarse, _, err := t.halved().fibre(function)
	if err != nil {
		return
	}
	half, err := coarse.LP(l, m).Taylor(wavelength)
	if err != nil {
		return e, fmt.Errorf("with every second point: %w", err)
	}
	e.Interpolation = math.Abs(half[0] - n[0])
	return e, domain.Result(function, "noise of the effective index", e.Noise)
}

// halved leaves out every second point that is not next to a jump. All jumps are marked.
func (t Measured) halved() Measured {
	out := t
	out.Jump, out.Points = 0, nil
	add := func(radius, index float64) {
		if n := len(out.Points); n == 0 || out.Points[n-1] != (MeasuredPoint{radius, index}) {
			out.Points = append(out.Points, MeasuredPoint{radius, index})
		}
	}
	start := 0.0
	for _, s := range t.stretches() {
		last := len(s.r) - 1
		add(start, s.n[0])
		for i := range s.r {
			if i%2 == 0 || i == last {
				add(s.r[i], s.n[i])
			}
		}
		add(s.end, s.n[last])
		start = s.end
	}
	return out
}
