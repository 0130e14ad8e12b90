package modes

import (
	"errors"
	"math"
	"math/rand"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/reftable"
	"glassthread/materials/taylor"
	"glassthread/numap"
)

// oneLayer is a Step as a Layered.
func oneLayer(f Step) Layered {
	return Layered{Layers: []Layer{{Outer: f.Radius, Glass: f.Core}}, Cladding: f.Cladding}
}

// forV is a fibre of constant indices with 1e-6 m as radius and a core whose V at the
// wavelength it returns is v.
func forV(alpha, v float64) (PowerLaw, float64) {
	const core, cladding, radius = 1.46, 1.45, 1e-6
	return PowerLaw{Radius: radius, Core: materials.Constant(core), Cladding: materials.Constant(cladding), Alpha: alpha},
		2 * math.Pi * radius * math.Sqrt((core-cladding)*(core+cladding)) / v
}

// b through glasses and wavelengths, against radial/testdata (mpmath). The rounding of the
// wavelength moves b by 1e-16 times its slope.
func TestPowerLawAgainstTable(t *testing.T) {
	var err reftable.Errors
	for _, r := range reftable.Read(t, "radial/testdata/power.csv", 170) {
		f, x := forV(r.Float("alpha"), r.Float("v"))
		p, e := f.LP(r.Int("l"), r.Int("m")).Solve(x)
		require.NoError(t, e, r)
		err.Add(math.Abs(r.Difference("b", p.B)), r)
	}
	for _, r := range reftable.Read(t, "radial/testdata/parabola.csv", 290) {
		if b := r.Float("b"); b > 1e-9 {
			f, x := forV(2, r.Float("v"))
			p, e := f.LP(r.Int("l"), r.Int("m")).Solve(x)
			require.NoError(t, e, r)
			err.Add(math.Abs(r.Difference("b", p.B)), r)
		}
	}
	err.Check(t, "PowerLaw, b", 1e-12)
}

// The effective index of a one-layer fibre and its four derivatives, against StepLP's.
func TestOneLayerIsStep(t *testing.T) {
	f := germaniaStep(t, 0.05, 5e-6)
	g := oneLayer(f)
	var worst [taylor.Order + 1]float64
	n := 0
	for x := 0.62e-6; x < 1.7e-6; x += 23e-9 {
		list, err := f.Guided(x)
		require.NoError(t, err)
		other, err := g.Guided(x)
		require.NoError(t, err)
		for i, e := range list {
			if e.Solution.B < 2e-13 { // as good as at cut-off
				require.InDelta(t, len(list), len(other), 1)
				break
			}
			require.Less(t, i, len(other))
			require.Equal(t, e.Mode.L, other[i].Mode.L)
			require.Equal(t, e.Mode.M, other[i].Mode.M)
			require.Equal(t, e.Degeneracy, other[i].Degeneracy)
			require.InDelta(t, e.Index, other[i].Index, 1e-14)
			want, err := e.Mode.Taylor(x)
			require.NoError(t, err)
			got, err := other[i].Mode.Taylor(x)
			require.NoError(t, err)
			assert.InDelta(t, want[0], got[0], 1e-14)
			b := e.Solution.B
			scale := x
			for k := 1; k <= taylor.Order; k++ {
				// Against the size of the term in a change of x by itself; next to cut-off
				// the error of b counts for more in each derivative.
				d := math.Abs(want[k]-got[k]) * scale / (1e-3 + math.Abs(want[k])*scale)
				scale *= x
				if b > 0.02 {
					worst[k] = math.Max(worst[k], d)
					n++
				} else {
					assert.Less(t, d, 1e-11*math.Pow(0.02/b, float64(k)), "%v at %v m, order %d, b = %v", e.Mode, x, k, b)
				}
			}
		}
	}
	t.Logf("%d derivatives; worst relative error of each order %.1e", n, worst[1:])
	assert.Less(t, worst[1], 1e-12)
	assert.Less(t, worst[2], 1e-11)
	assert.Less(t, worst[3], 1e-10)
	assert.Less(t, worst[4], 1e-9)
}

// A core of germania-silica whose fraction falls outwards: layers cut anywhere are the same
// fibre, and nearly that of the power law between the glasses at its ends, since the index
// is nearly straight in the fraction.
func TestGradedComposition(t *testing.T) {
	const radius, most = 10e-6, 0.1
	vary := func(r float64) (materials.Medium, error) {
		return materials.GermaniaSilica(most * (1 - (r/radius)*(r/radius)))
	}
	pure, err := materials.GermaniaSilica(0)
	require.NoError(t, err)
	top, err := materials.GermaniaSilica(most)
	require.NoError(t, err)
	whole := Layered{Layers: []Layer{{Outer: radius, Vary: vary}}, Cladding: pure}
	power := PowerLaw{Radius: radius, Core: top, Cladding: pure, Alpha: 2}
	r := rand.New(rand.NewSource(3))
	for _, x := range []float64{0.85e-6, 1.31e-6} {
		list, err := whole.Guided(x)
		require.NoError(t, err)
		near, err := power.Guided(x)
		require.NoError(t, err)
		assert.Len(t, near, len(list))
		require.Greater(t, len(list), 5)
		for i, e := range list {
			assert.InDelta(t, near[i].Solution.B, e.Solution.B, 3e-3)
			cut := radius * (0.1 + 0.8*r.Float64())
			parts := Layered{Layers: []Layer{{Outer: cut, Vary: vary}, {Outer: radius, Vary: vary}}, Cladding: pure}
			p, err := parts.LP(e.Mode.L, e.Mode.M).Solve(x)
			require.NoError(t, err)
			assert.InDelta(t, e.Solution.B, p.B, 1e-12)
			if e.Solution.B > 0.05 {
				a, err := e.Mode.Taylor(x)
				require.NoError(t, err)
				b, err := parts.LP(e.Mode.L, e.Mode.M).Taylor(x)
				require.NoError(t, err)
				assert.InDelta(t, a[1], b[1], 1e-9*math.Abs(a[1]))
				assert.InDelta(t, a[2], b[2], 1e-9*math.Abs(a[2])+1e-2)
			}
		}
	}
}

// The derivative of the index with respect to wavelength against differences of the index,
// with dispersing glasses.
func TestRadialTaylorAgainstDifferences(t *testing.T) {
	core, err := materials.GermaniaSilica(0.08)
	require.NoError(t, err)
	ring, err := materials.GermaniaSilica(0.03)
	require.NoError(t, err)
	for _, m := range []RadialLP{
		PowerLaw{Radius: 6e-6, Core: core, Cladding: materials.FusedSilica(), Alpha: 1.8}.LP(1, 1),
		Layered{Layers: []Layer{{Outer: 2e-6, Glass: core}, {Outer: 4e-6, Glass: materials.FusedSilica()}, {Outer: 7e-6, Glass: ring}}, Cladding: materials.FusedSilica()}.LP(0, 1),
	} {
		const x, h = 1.2e-6, 20e-9
		s, err := m.Taylor(x)
		require.NoError(t, err)
		at := func(k float64) taylor.Series {
			s, err := m.Taylor(x + k*h)
			require.NoError(t, err)
			return s
		}
		// Each order from the one below, by a difference of sixth order.
		for k := 1; k <= taylor.Order; k++ {
			d := 0.0
			for i, c := range []float64{0.75, -0.15, 1.0 / 60} {
				d += c * (at(float64(i + 1))[k-1] - at(-float64(i + 1))[k-1])
			}
			assert.InEpsilon(t, d/h/float64(k), s[k], 2e-6, "%v, order %d", m, k)
		}
	}
}

// Cut-off wavelengths: that of the step; the published V of the parabola (Gambling, Payne and
// Matsumura 1977, from memory, recomputed: 3.51805); LP01 of a W fibre.
func TestRadialCutoffWavelength(t *testing.T) {
	f := germaniaStep(t, 0.05, 5e-6)
	for _, lm := range [][2]int{{1, 1}, {0, 2}, {2, 1}, {3, 1}} {
		want, err := f.LP(lm[0], lm[1]).CutoffWavelength(0.5e-6, 3e-6)
		require.NoError(t, err)
		got, err := oneLayer(f).LP(lm[0], lm[1]).CutoffWavelength(0.5e-6, 3e-6)
		require.NoError(t, err)
		assert.InEpsilon(t, want, got, 1e-11)
	}
	p, x := forV(2, 3.51805)
	got, err := p.LP(1, 1).CutoffWavelength(x/2, x*2)
	require.NoError(t, err)
	assert.InEpsilon(t, x, got, 2e-6)
	w := Layered{Layers: []Layer{{Outer: 3e-6, Glass: materials.Constant(1.46)}, {Outer: 9e-6, Glass: materials.Constant(1.447)}}, Cladding: materials.Constant(1.45)}
	at, err := w.LP(0, 1).CutoffWavelength(0.5e-6, 5e-6)
	require.NoError(t, err)
	_, err = w.LP(0, 1).Solve(at * 0.8)
	assert.NoError(t, err)
	for _, k := range []float64{1.0001, 1.1, 2} {
		_, err = w.LP(0, 1).Solve(at * k)
		assert.ErrorIs(t, err, ErrCutoff)
	}
	_, err = oneLayer(f).LP(0, 1).CutoffWavelength(0.5e-6, 3e-6)
	assert.ErrorIs(t, err, ErrNoCutoff)
}

func TestRadialErrors(t *testing.T) {
	const x = 1.3e-6
	high, low := materials.Constant(1.46), materials.Constant(1.45)
	fine := func(float64) (materials.Medium, error) { return high, nil }
	for _, c := range []struct {
		f    Radial
		text string
	}{
		{nil, "fibre is nil"},
		{PowerLaw{}, "Radius"},
		{PowerLaw{Radius: math.NaN(), Core: high, Cladding: low, Alpha: 2}, "Radius"},
		{PowerLaw{Radius: 1e-6, Core: high, Cladding: low}, "Alpha"},
		{PowerLaw{Radius: 1e-6, Core: high, Cladding: low, Alpha: 101}, "Alpha"},
		{PowerLaw{Radius: 1e-6, Core: high, Cladding: low, Alpha: math.NaN()}, "Alpha"},
		{PowerLaw{Radius: 1e-6, Cladding: low, Alpha: 2}, "core is nil"},
		{PowerLaw{Radius: 1e-6, Core: high, Alpha: 2}, "cladding is nil"},
		{Layered{}, "len(Layers)"},
		{Layered{Layers: []Layer{{}}, Cladding: low}, "Layers[0].Outer"},
		{Layered{Layers: []Layer{{Outer: 1e-6}}, Cladding: low}, "Layers[0] must have"},
		{Layered{Layers: []Layer{{Outer: 1e-6, Glass: high, Vary: fine}}, Cladding: low}, "Layers[0] must have"},
		{Layered{Layers: []Layer{{Outer: 1e-6, Glass: high}}}, "cladding is nil"},
		{Layered{Layers: []Layer{{Outer: 2e-6, Glass: high}, {Outer: 1e-6, Glass: high}}, Cladding: low}, "Layers[1].Outer"},
		{Layered{Layers: []Layer{{Outer: 2e-6, Glass: high}, {Outer: math.Inf(1), Glass: high}}, Cladding: low}, "Layers[1].Outer"},
		{Layered{Layers: []Layer{{Outer: 1e-6, Vary: func(float64) (materials.Medium, error) { return nil, nil }}}, Cladding: low}, "layer 0 is nil"},
	} {
		m := RadialLP{Fibre: c.f, L: 0, M: 1}
		_, e1 := m.Solve(x)
		_, e2 := m.Taylor(x)
		_, e3 := m.CutoffWavelength(x, 2*x)
		for _, err := range []error{e1, e2, e3} {
			assert.ErrorContains(t, err, c.text, "%+v", c.f)
		}
	}
	f := PowerLaw{Radius: 5e-6, Core: high, Cladding: low, Alpha: 2}
	for _, bad := range []float64{0, -1, math.NaN(), math.Inf(1)} {
		_, err := f.LP(0, 1).Solve(bad)
		refused(t, err, "wavelength")
		_, err = f.Guided(bad)
		refused(t, err, "wavelength")
	}
	_, err := f.LP(-1, 1).Solve(x)
	refused(t, err, "l")
	_, err = f.LP(0, 0).Taylor(x)
	refused(t, err, "m")
	_, err = f.LP(30, 1).Solve(x)
	assert.ErrorIs(t, err, ErrCutoff)
	_, err = PowerLaw{Radius: 5e-6, Core: low, Cladding: high, Alpha: 2}.LP(0, 1).Solve(x)
	assert.ErrorIs(t, err, numap.ErrNotGuiding)
	broken := Layered{Layers: []Layer{{Outer: 5e-6, Vary: func(float64) (materials.Medium, error) { return nil, assert.AnError }}}, Cladding: low}
	_, err = broken.Guided(x)
	assert.ErrorIs(t, err, assert.AnError)
	_, err = RadialLP{}.Solve(x)
	assert.Error(t, err)
}

func FuzzRadialLP(f *testing.F) {
	for i, x := range seeds {
		y := seeds[(i+5)%len(seeds)]
		f.Add(x, 4e-6, 8e-6, 1.46, 1.447, 1.45, 2.0, 0, 1)
		f.Add(1.3e-6, x, y, 1.46, 1.447, 1.45, 2.0, 1, 1)
		f.Add(1.3e-6, 4e-6, 8e-6, x, y, 1.45, 2.0, 0, 2)
		f.Add(1.3e-6, 4e-6, 8e-6, 1.46, 1.45, 1.45, x, -1, 0)
		f.Add(1.3e-6, 4e-6, 8e-6, 1.46, 1.45, x, 2.0, 0, 1)
	}
	f.Fuzz(func(t *testing.T, x, a, b, n1, n2, n3, alpha float64, l, m int) {
		if v := 2 * math.Pi * math.Max(math.Abs(a), math.Abs(b)) / math.Abs(x) * math.Sqrt(math.Max(n1*n1-n3*n3, n2*n2-n3*n3)); v > 40 && v <= 1000 {
			return // would only take longer
		}
		g := func(n float64) materials.Medium {
			return medium(func(float64) (taylor.Series, error) { return taylor.Constant(n), nil })
		}
		for _, fibre := range []Radial{
			PowerLaw{Radius: a, Core: g(n1), Cladding: g(n3), Alpha: alpha},
			Layered{Layers: []Layer{{Outer: a, Glass: g(n1)}, {Outer: b, Glass: g(n2)}}, Cladding: g(n3)},
		} {
			mode := RadialLP{Fibre: fibre, L: l, M: m}
			_ = mode.String()
			p, err := mode.Solve(x)
			if err == nil && !(p.B > 0 && p.U >= 0 && p.W > 0 && p.V <= 1000) {
				t.Errorf("%+v", p)
			}
			checkRadialError(t, err)
			s, err := mode.Taylor(x)
			if err == nil && !s.Finite() {
				t.Errorf("%v", s)
			}
			checkRadialError(t, err)
			list, err := guidedRadial(fibre, x)
			checkRadialError(t, err)
			for _, e := range list {
				if math.IsNaN(e.Index) || math.IsInf(e.Index, 0) {
					t.Errorf("%+v", e)
				}
			}
			if l > 2 || m > 2 || p.V > 10 {
				continue // a cut-off would take long
			}
			if cut, err := mode.CutoffWavelength(x, x*1.5); err == nil && !(cut >= x && cut <= x*1.5) {
				t.Errorf("cut-off %v of %v", cut, x)
			}
		}
	})
}

func checkRadialError(t *testing.T, err error) {
	t.Helper()
	if err == nil {
		return
	}
	var refused *domain.Error
	if !errors.As(err, &refused) || refused.Argument == "" {
		t.Errorf("error %v", err)
	}
}

// A 62.5 um graded core of NA 0.275 at 850 nm; ns/mode is the time of one label of the list.
func BenchmarkPowerLawGuided(b *testing.B) {
	const cladding = 1.4525
	f := PowerLaw{Radius: 31.25e-6, Core: materials.Constant(math.Sqrt(cladding*cladding + 0.275*0.275)), Cladding: materials.Constant(cladding), Alpha: 2}
	n := 0
	for b.Loop() {
		list, err := f.Guided(850e-9)
		if err != nil {
			b.Fatal(err)
		}
		n += len(list)
	}
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(n), "ns/mode")
}

func BenchmarkRadialTaylor(b *testing.B) {
	core, err := materials.GermaniaSilica(0.05)
	if err != nil {
		b.Fatal(err)
	}
	m := PowerLaw{Radius: 5e-6, Core: core, Cladding: materials.FusedSilica(), Alpha: 2}.LP(0, 1)
	for b.Loop() {
		sinkSeries, _ = m.Taylor(1.31e-6)
	}
}
