package modes

import (
	"errors"
	"math"
	"sort"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/modes/bessel"
	"glassthread/numap"
)

// determinant returns the function whose zeros in u are the vector modes of one azimuthal
// order, in Snyder and Love's own form (1983, table 12-4) times J_nu^2, which takes the
// poles away; for nu = 0 one factor each for TE and TM. J is math's.
func determinant(t *testing.T, v, delta float64, family Family, nu int) func(u float64) float64 {
	n := float64(nu)
	rest := 1 - 2*delta
	return func(u float64) float64 {
		w := math.Sqrt((v - u) * (v + u))
		ratio, err := bessel.KRatio(nu, w)
		require.NoError(t, err)
		kp := n/(w*w) - ratio/w // K'/(w K), DLMF 10.29.2
		j := math.Jn(nu, u)
		jp := (n*j/u - math.Jn(nu+1, u)) / u // J'/u, DLMF 10.6.2
		switch {
		case nu == 0 && family == TE:
			return jp + kp*j
		case nu == 0:
			return jp + rest*kp*j
		}
		d := 1/(u*u) + 1/(w*w)
		return (jp+kp*j)*(jp+rest*kp*j) - n*n*d*(1/(u*u)+rest/(w*w))*j*j
	}
}

// signChanges returns the zeros of f in (0, end) seen on a fine grid.
func signChanges(f func(float64) float64, end float64) []float64 {
	var zeros []float64
	const cells = 20000
	x0, y0 := end*1e-3, f(end*1e-3)
	for i := 1; i < cells; i++ {
		x := end * (1e-3 + (1-1e-3)*float64(i)/cells)
		y := f(x)
		if (y > 0) != (y0 > 0) {
			a, b := x0, x
			for range 60 {
				if c := (a + b) / 2; (f(c) > 0) == (y0 > 0) {
					a = c
				} else {
					b = c
				}
			}
			zeros = append(zeros, (a+b)/2)
		}
		x0, y0 = x, y
	}
	return zeros
}

// The list against every root of the determinant, order by order: as many, at the same u,
// and the count from cut-offs alone. Snyder and Love 1983, table 12-4.
func TestGuidedVectorHasEveryRootOfTheDeterminant(t *testing.T) {
	for _, c := range []struct{ v, delta float64 }{
		{1.5, 0.01}, {2.5, 0.001}, {4, 0.3}, {4, MaxDelta}, {7.3, 0.1}, {8.1, 0.2625}, {8.8, 0.4132},
		{11.2, 0.01}, {12.9, 0.46}, {13.5, MaxDelta}, {17, 0.4132}, {23, 0.05},
	} {
		list, err := GuidedVector(c.v, c.delta)
		require.NoError(t, err)
		byOrder := map[int][]float64{}
		te := []float64{}
		for _, p := range list {
			if p.W < 0.02*c.v { // HE(1, m) just above cut-off is too near u = V for the grid
				assert.True(t, p.Family == HE && p.Nu == 1, "%v", p)
				continue
			}
			if p.Family == TE {
				te = append(te, p.U)
				continue
			}
			byOrder[p.Nu] = append(byOrder[p.Nu], p.U)
		}
		agree := func(got, want []float64, nu int) {
			sort.Float64s(got)
			if assert.Len(t, got, len(want), "%v nu %d: %v, want %v", c, nu, got, want) {
				for i := range want {
					assert.InDelta(t, want[i], got[i], 1e-9, "%v nu %d", c, nu)
				}
			}
		}
		agree(te, signChanges(determinant(t, c.v, c.delta, TE, 0), c.v), 0)
		for nu := 0; nu <= int(c.v)+2; nu++ {
			agree(byOrder[nu], signChanges(determinant(t, c.v, c.delta, TM, nu), c.v), nu)
		}
		count := 0
		for _, family := range []Family{TE, TM, HE, EH} {
			for nu := 0; nu < int(c.v)+3; nu++ {
				if (nu == 0) != (family == TE || family == TM) {
					continue
				}
				for m := 1; ; m++ {
					cut, err := CutoffVectorV(c.delta, family, nu, m)
					require.NoError(t, err)
					if cut >= c.v {
						break
					}
					count++
				}
			}
		}
		assert.Len(t, list, count, c)
	}
}

// V rises with w along each mode up to MaxDelta, so that a label has one solution; beyond
// some 0.497 HE11 no longer does. At a given w, u is the one zero of x + G + L.
func TestVRisesWithW(t *testing.T) {
	least := func(e vectorEquation, m int) float64 {
		start := 0.0
		if e.l > 0 {
			start, _ = bessel.JZero(e.l-1, m)
		} else if m > 1 {
			start, _ = bessel.JZero(1, m-1)
		}
		end, err := bessel.JZero(e.l, m)
		require.NoError(t, err)
		worst, before := math.Inf(1), 0.0
		for w := 0.02; w < 40; w *= 1.1 {
			low, high := start, end
			for range 50 {
				u := (low + high) / 2
				below, at, err := bessel.JPair(e.l, u)
				require.NoError(t, err)
				if o := e.outside(u*u, w*w); u*below/at+o.value > 0 {
					low = u
				} else {
					high = u
				}
			}
			v2 := low*low + w*w
			if before > 0 {
				worst = math.Min(worst, (v2-before)/(w*w*(1-1/1.21)))
			}
			before = v2
		}
		return worst
	}
	for _, delta := range []float64{1e-6, 0.1, 0.2625, 0.4132, 0.48, MaxDelta} {
		for nu := 0; nu < 12; nu += 1 + nu/4 {
			for m := 1; m < 6; m++ {
				for _, f := range []Family{TE, TM, HE, EH} {
					if (nu == 0) == (f == TE || f == TM) {
						assert.Greater(t, least(newVectorEquation(f, nu, delta), m), 0.1, "%v%d%d at %v", f, nu, m, delta)
					}
				}
			}
		}
	}
	assert.Less(t, least(newVectorEquation(HE, 1, 0.498), 1), 0.0, "MaxDelta could be larger")
}

// TE(0, m) is LP(1, m) whatever the index difference: the same equation.
func TestTEIsLP1(t *testing.T) {
	for _, v := range []float64{2.41, 3, 7, 40} {
		lp, err := SolveLP(v, 1, 1)
		require.NoError(t, err)
		for _, delta := range []float64{1e-9, 0.1, 0.49} {
			p, err := SolveVector(v, delta, TE, 0, 1)
			require.NoError(t, err)
			assert.Equal(t, []float64{lp.U, lp.W, lp.B, 0}, []float64{p.U, p.W, p.B, p.Shift})
		}
	}
}

// The polarisation corrections of weak guidance to first order in the index difference, as
// differences of b, with K from the scaled functions (Snyder and Love 1983, table 14-1 and
// its step profile; from memory, rederived from the exact equation):
//
//	HE(l+1, m)  -2 delta (u^2 w/V^4) K_l/K_{l-1}
//	EH(l-1, m)  -2 delta (u^2 w/V^4) K_l/K_{l+1}
//	TM(0, m)    -4 delta (u^2 w/V^4) K_1/K_2
func TestShiftToFirstOrder(t *testing.T) {
	k := func(l int, w float64) float64 {
		y, err := bessel.KScaled(max(l, -l), w)
		require.NoError(t, err)
		return y
	}
	for _, v := range []float64{1.3, 2.2, 3.5, 6, 15, 60} {
		lps, err := GuidedLP(v)
		require.NoError(t, err)
		for i, lp := range lps {
			if i%(1+len(lps)/20) != 0 || lp.B < 0.02 {
				continue
			}
			l := lp.L
			common := -2 * lp.U * lp.U * lp.W / (v * v * v * v) * k(l, lp.W)
			for _, delta := range []float64{1e-3, 1e-6, 1e-12} {
				check := func(f Family, nu int, want float64) {
					p, err := SolveVector(v, delta, f, nu, lp.M)
					require.NoError(t, err)
					assert.InEpsilon(t, want, p.Shift/delta, 40*delta*math.Max(1, v/lp.W)+1e-13, "%v at V = %v, delta %v", p, v, delta)
				}
				check(HE, l+1, common/k(l-1, lp.W))
				if l == 1 {
					check(TM, 0, 2*common/k(2, lp.W))
				}
				if l > 1 {
					check(EH, l-1, common/k(l+1, lp.W))
				}
			}
		}
	}
}

// Shift is the difference of two values of B, and falls continuously through the change
// of method.
func TestShiftAgainstDifference(t *testing.T) {
	for _, c := range []struct {
		f     Family
		nu, m int
		v     float64
	}{{TM, 0, 1, 3}, {HE, 1, 1, 2}, {HE, 1, 2, 6}, {HE, 2, 1, 4}, {HE, 5, 2, 13}, {EH, 1, 1, 5}, {EH, 4, 3, 20}, {HE, 1, 1, 0.9}} {
		before := 0.0
		for delta := 1e-8; delta < MaxDelta; delta *= 1.3 {
			p, err := SolveVector(c.v, delta, c.f, c.nu, c.m)
			if errors.Is(err, ErrCutoff) {
				assert.Equal(t, HE, c.f)
				break
			}
			require.NoError(t, err)
			l, m := p.Group()
			lp, err := SolveLP(c.v, l, m)
			require.NoError(t, err)
			assert.InDelta(t, p.B-lp.B, p.Shift, 4e-16+1e-15*lp.B, "%v", p)
			assert.InDelta(t, c.v, math.Hypot(p.U, p.W), 1e-14*c.v)
			assert.Less(t, p.Shift, before, "%v %v", p, delta)
			before = p.Shift
		}
	}
}

// Orders of vector modes by cut-off: TE01 and TM01 share theirs, HE21 follows close above
// and falls with the index difference's end between j_{0,1} and j_{1,1} (Snyder and Love
// 1983, section 12-9).
func TestCutoffOrder(t *testing.T) {
	j01, err := bessel.JZero(0, 1)
	require.NoError(t, err)
	j11, err := bessel.JZero(1, 1)
	require.NoError(t, err)
	before := j01
	for _, delta := range []float64{1e-9, 1e-3, 0.1, 0.3, 0.49} {
		for _, f := range []Family{TE, TM} {
			v, err := CutoffVectorV(delta, f, 0, 1)
			require.NoError(t, err)
			assert.Equal(t, j01, v)
		}
		v, err := CutoffVectorV(delta, HE, 2, 1)
		require.NoError(t, err)
		assert.Greater(t, v, before)
		assert.Less(t, v, j11)
		before = v
		left := (1/(1-2*delta) + 1) * math.Jn(1, v)
		assert.InDelta(t, left, v*math.Jn(2, v), 1e-14)
		zero, err := CutoffVectorV(delta, HE, 1, 1)
		require.NoError(t, err)
		assert.Zero(t, zero)
	}
}

func TestSolveVectorNearCutoff(t *testing.T) {
	for _, f := range []Family{TM, HE, EH} {
		for _, nu := range []int{0, 1, 2, 9} {
			if (nu == 0) != (f == TM) {
				continue
			}
			for _, delta := range []float64{1e-4, 0.3, MaxDelta} {
				cut, err := CutoffVectorV(delta, f, nu, 2)
				require.NoError(t, err)
				_, err = SolveVector(math.Nextafter(cut, 0), delta, f, nu, 2)
				assert.ErrorIs(t, err, ErrCutoff)
				assert.ErrorContains(t, err, "above the cut-off of the mode")
				before := 0.0
				for _, above := range []float64{1e-13, 1e-9, 1e-5, 1e-2, 0.2, 0.49, 0.51, 0.88, 0.92, 1.5, 3, 10} {
					p, err := SolveVector(cut+above, delta, f, nu, 2)
					require.NoError(t, err)
					assert.True(t, p.W > before || p.W == 0 && f == HE && nu == 1, "%v %v %v", p, delta, above)
					before = p.W
				}
			}
		}
	}
}

func TestVectorErrors(t *testing.T) {
	for _, c := range []struct {
		v, delta float64
		f        Family
		nu, m    int
		argument string
	}{
		{5, 0, HE, 1, 1, "delta"}, {5, -0.1, HE, 1, 1, "delta"}, {5, 0.5, HE, 1, 1, "delta"}, {5, math.NaN(), HE, 1, 1, "delta"},
		{0, 0.1, HE, 1, 1, "v"}, {math.Inf(1), 0.1, HE, 1, 1, "v"}, {math.NaN(), 0.1, TE, 0, 1, "v"}, {2e5, 0.1, TE, 0, 1, "v"},
		{5, 0.1, TE, 1, 1, "nu"}, {5, 0.1, TM, -1, 1, "nu"}, {5, 0.1, HE, 0, 1, "nu"}, {5, 0.1, EH, 100000, 1, "nu"},
		{5, 0.1, HE, 1, 0, "m"}, {5, 0.1, HE, 1, 100000, "m"}, {5, 0.1, Family(9), 1, 1, "family"}, {5, 0.1, Family(-1), 1, 1, "family"},
	} {
		_, err := SolveVector(c.v, c.delta, c.f, c.nu, c.m)
		var e *domain.Error
		if assert.ErrorAs(t, err, &e, "%v", c) {
			assert.Equal(t, c.argument, e.Argument)
			assert.Equal(t, "modes.SolveVector", e.Func)
			assert.NotErrorIs(t, err, ErrCutoff)
		}
		if c.argument != "v" {
			_, err = CutoffVectorV(c.delta, c.f, c.nu, c.m)
			assert.ErrorAs(t, err, &e)
			assert.Equal(t, c.argument, e.Argument)
		}
	}
	_, err := SolveVector(2, 0.1, TE, 0, 1)
	assert.ErrorIs(t, err, ErrCutoff)
	_, err = SolveVector(2, 0.1, EH, 3000, 5000)
	assert.ErrorIs(t, err, ErrCutoff)
	_, err = GuidedVector(math.NaN(), 0.1)
	assert.Error(t, err)
	_, err = GuidedVector(1, 0.6)
	assert.Error(t, err)
	assert.Equal(t, "Family(7)", Family(7).String())

	silica, air := materials.FusedSilica(), materials.Constant(1)
	for _, f := range []Step{{}, {Radius: 1e-6, Core: air, Cladding: silica}, {Radius: 1e-6, Core: materials.Constant(30), Cladding: air}, {Radius: 1, Core: silica, Cladding: air}} {
		_, err := f.Vector(HE, 1, 1).Taylor(1e-6)
		assert.Error(t, err)
		_, _, err = f.Vector(HE, 1, 1).Parts(1e-6)
		assert.Error(t, err)
		_, err = f.Vector(HE, 1, 1).IndexShift(1e-6)
		assert.Error(t, err)
		_, err = f.GuidedVector(1e-6)
		assert.Error(t, err)
	}
	_, err = Step{Radius: 1e-6, Core: air, Cladding: silica}.Vector(HE, 1, 1).Solve(1e-6)
	assert.ErrorIs(t, err, numap.ErrNotGuiding)
	thread := Step{Radius: 0.2e-6, Core: silica, Cladding: air}
	_, err = thread.Vector(TE, 0, 1).Taylor(1e-6)
	assert.ErrorIs(t, err, ErrCutoff)
	assert.True(t, strings.Contains(err.Error(), "TE01"), err)
	_, err = thread.Vector(HE, 0, 1).Taylor(1e-6)
	assert.Error(t, err)
	for _, span := range [][2]float64{{1e-6, 1e-6}, {0, 1e-6}, {1e-6, math.NaN()}, {1e-7, 1e-6}} {
		_, err = thread.Vector(HE, 2, 1).CutoffWavelength(span[0], span[1])
		assert.Error(t, err, span)
	}
	_, err = thread.Vector(HE, 9, 9).CutoffWavelength(0.4e-6, 1e-6)
	assert.ErrorIs(t, err, ErrNoCutoff)
	_, err = thread.Vector(HE, 1, 1).CutoffWavelength(0.4e-6, 1e-6)
	assert.ErrorIs(t, err, ErrNoCutoff)
	_, err = thread.Vector(TM, 3, 1).CutoffWavelength(0.4e-6, 1e-6)
	assert.Error(t, err)
	_, err = Step{Radius: 0.2e-6, Core: materials.Constant(30), Cladding: air}.Vector(HE, 2, 1).CutoffWavelength(0.4e-6, 1e-6)
	assert.Error(t, err)
}

func TestVectorDoesNotAllocate(t *testing.T) {
	f := Step{Radius: 0.5e-6, Core: materials.FusedSilica(), Cladding: materials.Constant(1)}
	for _, m := range []StepVector{f.Vector(HE, 1, 1), f.Vector(TM, 0, 1), f.Vector(EH, 1, 1), f.Vector(HE, 2, 1)} {
		assert.Zero(t, testing.AllocsPerRun(20, func() {
			if _, err := m.Taylor(0.6e-6); err != nil {
				t.Error(err)
			}
			if _, err := m.IndexShift(0.6e-6); err != nil {
				t.Error(err)
			}
			if _, err := SolveVector(5, 0.2, m.Family, m.Nu, m.M); err != nil {
				t.Error(err)
			}
			if _, err := CutoffVectorV(0.2, m.Family, m.Nu, m.M); err != nil {
				t.Error(err)
			}
		}), m)
	}
}

func BenchmarkSolveVector(b *testing.B) {
	for _, c := range []struct {
		name     string
		v, delta float64
		f        Family
		nu, m    int
	}{{"HE11 weak", 2.2, 0.003, HE, 1, 1}, {"HE11 strong", 2.2, 0.26, HE, 1, 1}, {"TM01 strong", 5, 0.26, TM, 0, 1}, {"HE53 strong", 30, 0.26, HE, 5, 3},
		{"EH31 near cut-off", 6.5, 0.26, EH, 3, 1}} {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := SolveVector(c.v, c.delta, c.f, c.nu, c.m); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkStepVectorTaylor(b *testing.B) {
	f := Step{Radius: 0.5e-6, Core: materials.FusedSilica(), Cladding: materials.Constant(1)}
	for _, m := range []StepVector{f.Vector(HE, 1, 1), f.Vector(TM, 0, 1), f.Vector(EH, 1, 1)} {
		b.Run(m.String(), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := m.Taylor(0.6e-6); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
