package materials

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"glassthread/materials/domain"
	"glassthread/materials/taylor"
)

// sampled returns the table of a medium at the given wavelengths.
func sampled(t testing.TB, m Medium, wavelengths []float64) (Table, []float64) {
	indices := make([]float64, len(wavelengths))
	for i, x := range wavelengths {
		indices[i] = indexAt(t, m, x)
	}
	table, err := NewTable(wavelengths, indices, Source{})
	require.NoError(t, err)
	return table, indices
}

func evenly(a, b float64, count int) []float64 {
	x := make([]float64, count)
	for i := range x {
		x[i] = a + (b-a)*float64(i)/float64(count-1)
	}
	return x
}

// uneven points, with spacings from 4 to 300 nm.
var uneven = []float64{0.4e-6, 0.404e-6, 0.43e-6, 0.5e-6, 0.56e-6, 0.6e-6, 0.61e-6, 0.75e-6, 0.9e-6, 1e-6, 1.2e-6, 1.5e-6, 1.55e-6, 1.6e-6}

func TestTableReproducesPoints(t *testing.T) {
	for name, x := range map[string][]float64{
		"least":  evenly(0.5e-6, 1.7e-6, minPoints),
		"seven":  evenly(0.5e-6, 1.7e-6, 7),
		"even":   evenly(0.5e-6, 1.7e-6, 200),
		"uneven": uneven,
	} {
		table, indices := sampled(t, FusedSilica(), x)
		assert.Equal(t, Range{x[0], x[len(x)-1]}, table.Range(), name)
		for i := range x {
			assert.InEpsilon(t, indices[i], indexAt(t, table, x[i]), 1e-15, "%s, point %d", name, i)
		}
	}
}

// A polynomial of degree five is its own interpolating spline, derivatives and all.
func TestTableOfQuintic(t *testing.T) {
	const centre, width = 1e-6, 0.6e-6
	c := [6]float64{1.45, -0.02, 0.015, 0.03, -0.011, 0.007} // in u = (x - centre)/width
	quintic := own(func(x float64) (taylor.Series, error) {
		u := taylor.Variable(x).Shift(-centre).Scale(1 / width)
		s := taylor.Constant(c[5])
		for k := 4; k >= 0; k-- {
			s = s.Mul(u).Shift(c[k])
		}
		return s, nil
	})
	// The rounding of the indices, 1e-16, over the k-th power of the spacing, and times
	// what uneven points amplify.
	for _, c := range []struct {
		name   string
		points []float64
		limit  taylor.Series
	}{
		{"least", evenly(0.4e-6, 1.6e-6, minPoints), taylor.Series{2e-15, 1e-14, 5e-14, 5e-14, 3e-14}},
		{"even", evenly(0.4e-6, 1.6e-6, 30), taylor.Series{2e-15, 3e-14, 1e-12, 1.5e-11, 1e-10}},
		{"uneven", uneven, taylor.Series{1e-14, 2e-13, 2e-12, 2e-11, 3e-10}},
	} {
		table, _ := sampled(t, quintic, c.points)
		var worst taylor.Series
		for _, x := range evenly(0.4e-6, 1.6e-6, 301) {
			got, want := seriesAt(t, table, x), seriesAt(t, quintic, x)
			for k := range got {
				worst[k] = math.Max(worst[k], math.Abs(got[k]-want[k])*math.Pow(width, float64(k)))
			}
		}
		t.Logf("%s: errors %.1e", c.name, worst)
		for k := range worst {
			assert.LessOrEqual(t, worst[k], c.limit[k], "%s: order %d", c.name, k)
		}
	}
}

// The index and four derivatives are continuous at every knot; the fifth jumps, except
// at the two points next to each end, where the spline has no knot.
func TestTableContinuity(t *testing.T) {
	for name, points := range map[string][]float64{"even": evenly(0.5e-6, 1.7e-6, 15), "uneven": uneven} {
		table, _ := sampled(t, FusedSilica(), points)
		for i := 1; i < len(points)-1; i++ {
			x := points[i]
			below, at, above := seriesAt(t, table, math.Nextafter(x, 0)), seriesAt(t, table, x), seriesAt(t, table, math.Nextafter(x, 1))
			for k := range at {
				// What one step of the last place moves it by, plus rounding of the
				// differences that derivatives are made of.
				h := math.Min(x-points[i-1], points[i+1]-x)
				move := 1e-15 * (math.Abs(at[k]) + math.Pow(h, -float64(k)))
				assert.InDelta(t, at[k], below[k], move, "%s: order %d, point %d, below", name, k, i)
				assert.InDelta(t, at[k], above[k], move, "%s: order %d, point %d, above", name, k, i)
			}
			// The fifth derivative, from the fourth: linear within a piece.
			left, right := (x-points[i-1])/2, (points[i+1]-x)/2
			before := (at[4] - seriesAt(t, table, x-left)[4]) / left
			after := (seriesAt(t, table, x+right)[4] - at[4]) / right
			jump := math.Abs(after-before) / (math.Abs(after) + math.Abs(before))
			if i <= 2 || i >= len(points)-3 {
				assert.Less(t, jump, 1e-3, "%s: not a knot, point %d", name, i)
			} else {
				assert.Greater(t, jump, 0.01, "%s: knot, point %d", name, i)
			}
		}
	}
}

// Halving the spacing divides the error of the k-th derivative by 2^(6-k): the spline of
// degree five has order six (C. de Boor, A Practical Guide to Splines, chapter XII).
func TestTableConverges(t *testing.T) {
	silica := FusedSilica()
	errors := func(count int) (worst taylor.Series) {
		table, _ := sampled(t, silica, evenly(0.8e-6, 1.7e-6, count))
		for _, x := range evenly(0.8e-6, 1.7e-6, 2003) {
			got, want := seriesAt(t, table, math.Min(x, 1.7e-6)), seriesAt(t, silica, math.Min(x, 1.7e-6))
			for k := range worst {
				worst[k] = math.Max(worst[k], math.Abs(got[k]-want[k]))
			}
		}
		return worst
	}
	coarse, fine := errors(41), errors(81)
	for k := range coarse {
		order := math.Log2(coarse[k] / fine[k])
		t.Logf("derivative %d: error %.2g at 22.5 nm, %.2g at 11.25 nm, order %.2f",
			k, coarse[k]*float64([]int{1, 1, 2, 6, 24}[k]), fine[k]*float64([]int{1, 1, 2, 6, 24}[k]), order)
		assert.InDelta(t, float64(6-k), order, 0.35, "derivative %d", k)
	}
	// Dispersion from a table of 22.5 nm spacing, away from the ends: D to 1e-6, the
	// fourth derivative to 1 %.
	table, _ := sampled(t, silica, evenly(0.8e-6, 1.7e-6, 41))
	got, want := seriesAt(t, table, 1.55e-6), seriesAt(t, silica, 1.55e-6)
	assert.InEpsilon(t, want[2], got[2], 1e-6)
	assert.InEpsilon(t, want[4], got[4], 1e-2)
}

// Scaling all wavelengths by a power of two scales the k-th coefficient by its k-th
// power exactly; a table of equal indices has no dispersion.
func TestTableScales(t *testing.T) {
	_, indices := sampled(t, FusedSilica(), uneven)
	const factor = 0x1p40
	far := make([]float64, len(uneven))
	for i, x := range uneven {
		far[i] = x * factor
	}
	near, err := NewTable(uneven, indices, Source{})
	require.NoError(t, err)
	table, err := NewTable(far, indices, Source{})
	require.NoError(t, err)
	for _, x := range grid(0.4e-6, 1.6e-6, 40) {
		got, want := seriesAt(t, table, x*factor), seriesAt(t, near, x)
		for k := range got {
			assert.Equal(t, want[k], got[k]*math.Pow(factor, float64(k)))
		}
	}
	for i := range indices {
		indices[i] = 1.5
	}
	flat, err := NewTable(uneven, indices, Source{})
	require.NoError(t, err)
	for _, x := range grid(0.4e-6, 1.6e-6, 40) {
		s := seriesAt(t, flat, x)
		assert.InDelta(t, 1.5, s[0], 5e-15)
		assert.InDelta(t, 1.5, groupAt(t, flat, x), 1e-12)
	}
}

func TestTableIsACopy(t *testing.T) {
	x, n := evenly(1e-6, 2e-6, 8), []float64{1.5, 1.49, 1.48, 1.475, 1.47, 1.466, 1.463, 1.46}
	source := Source{Citation: "own bench", FromMemory: true}
	table, err := NewTable(x, n, source)
	require.NoError(t, err)
	assert.Equal(t, source, table.Source())
	before := seriesAt(t, table, 1.3e-6)
	clear(x)
	clear(n)
	assert.Equal(t, before, seriesAt(t, table, 1.3e-6))
}

// Every bad number in every place is refused with its place and value.
func TestTableRefuses(t *testing.T) {
	x, n := evenly(1e-6, 2e-6, 8), evenly(1.5, 1.4, 8)
	refused := func(x, n []float64, argument string) {
		t.Helper()
		table, err := NewTable(x, n, Source{Citation: "x"})
		var refusal *domain.Error
		require.ErrorAs(t, err, &refusal, "%v %v", x, n)
		assert.Equal(t, "materials.NewTable", refusal.Func)
		assert.Equal(t, argument, refusal.Argument)
		assert.Equal(t, Table{}, table)
	}
	place := []string{"[0]", "[1]", "[2]", "[3]", "[4]", "[5]", "[6]", "[7]"}
	for i := range x {
		for _, bad := range nasty {
			changed := append([]float64(nil), x...)
			changed[i] = bad
			refused(changed, n, "wavelengths"+place[i])
			changed = append([]float64(nil), n...)
			changed[i] = bad
			refused(x, changed, "indices"+place[i])
		}
		if i > 0 { // twice the same, and out of order
			changed := append([]float64(nil), x...)
			changed[i] = x[i-1]
			refused(changed, n, "wavelengths"+place[i])
			changed[i], changed[i-1] = x[i-1], x[i]
			refused(changed, n, "wavelengths"+place[i])
		}
	}
	refused(x[:7], n, "len(indices)")
	refused(x, n[:7], "len(indices)")
	refused(nil, n, "len(indices)")
	refused(nil, nil, "len(wavelengths)")
	refused(x[:5], n[:5], "len(wavelengths)")
	refused([]float64{5e-324, 1e-323, 1.5e-323, 2e-323, 2.5e-323, 3e-323, 1e300}, n[:7], "spline coefficient (result)")
	// Neighbours one last place apart are a table still.
	for i := 1; i < len(x); i++ {
		x[i] = math.Nextafter(x[i-1], 1)
	}
	table, err := NewTable(x, evenly(1.5, 1.5, 8), Source{})
	require.NoError(t, err)
	assert.InEpsilon(t, 1.5, indexAt(t, table, x[4]), 1e-15)
}

func TestTableDoesNotExtrapolate(t *testing.T) {
	table, _ := sampled(t, FusedSilica(), uneven)
	for _, x := range []float64{math.Nextafter(0.4e-6, 0), math.Nextafter(1.6e-6, 1), 1e-9, 1} {
		_, err := table.Taylor(x)
		assert.ErrorIs(t, err, ErrRange)
	}
	for _, x := range nasty {
		_, err := table.Taylor(x)
		assert.Error(t, err)
	}
	_, err := Table{}.Taylor(1e-6)
	assert.EqualError(t, err, "materials.Table: the table is empty; make one with NewTable")
	assert.Equal(t, Range{}, Table{}.Range())
	assert.Equal(t, Source{}, Table{}.Source())
}
