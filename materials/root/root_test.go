package root

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestFindKnownZeros(t *testing.T) {
	for _, c := range []struct {
		name       string
		f          func(float64) float64
		a, b, want float64
		calls      int
	}{
		// Exact answers; the last two are hard for interpolation.
		{"cosine", math.Cos, 1, 2, math.Pi / 2, 12},
		{"cube", func(x float64) float64 { return x*x*x - 27 }, 0, 10, 3, 20},
		{"reversed ends", func(x float64) float64 { return x*x - 2 }, 2, 0, math.Sqrt2, 20},
		{"J0, DLMF 10.21 j(0,1) = 2.40482 55576 95773", math.J0, 2, 3, 2.404825557695773, 12},
		{"step", func(x float64) float64 {
			if x < 0.3 {
				return -1
			}
			return 1e9
		}, -1, 1, 0.3, 120},
		{"steep pole side", func(x float64) float64 { return 1/(x-1) + 1e6 }, -5, 1 - 1e-9, 1 - 1e-6, 120},
	} {
		t.Run(c.name, func(t *testing.T) {
			calls := 0
			got, err := Find(func(x float64) (float64, error) { calls++; return c.f(x), nil }, c.a, c.b, 0)
			require.NoError(t, err)
			assert.InEpsilon(t, c.want, got, 4e-16)
			assert.LessOrEqual(t, calls, c.calls)
		})
	}
}

func TestFindRefuses(t *testing.T) {
	same := func(float64) (float64, error) { return 1, nil }
	_, err := Find(same, 0, 1, 0)
	assert.ErrorIs(t, err, ErrNoBracket)
	nan := func(float64) (float64, error) { return math.NaN(), nil }
	_, err = Find(nan, 0, 1, 0)
	assert.ErrorIs(t, err, ErrNotFinite)
	own := errors.New("own")
	_, err = Find(func(x float64) (float64, error) { return x - 0.5, own }, 0, 1, 0)
	assert.ErrorIs(t, err, own)
}

func FuzzFind(f *testing.F) {
	f.Add(0.0, 1.0, 0.25, 1.0)
	f.Add(-math.MaxFloat64, math.MaxFloat64, 3.0, 1e-300)
	f.Add(-1.0, 1.0, 0.0, 1e300)
	f.Add(math.Inf(-1), math.Inf(1), 0.0, 1.0)
	f.Fuzz(func(t *testing.T, a, b, zero, slope float64) {
		x, err := Find(func(x float64) (float64, error) { return slope * (x - zero), nil }, a, b, 0)
		if err == nil && math.IsNaN(x) {
			t.Fatalf("NaN without an error: a %v, b %v, zero %v, slope %v", a, b, zero, slope)
		}
	})
}

func TestAll(t *testing.T) {
	cube := func(x float64) (float64, float64, error) { return x * (x - 1) * (x - 2), 3*x*x - 6*x + 2, nil }
	zeros, err := All(cube, -0.5, 3, 10)
	require.NoError(t, err)
	assert.InDeltaSlice(t, []float64{0, 1, 2}, zeros, 1e-15)
	// Two zeros 2e-3 apart in a cell of width 1; a zero at each end; none.
	pair := func(x float64) (float64, float64, error) { return (x-0.3)*(x-0.3) - 1e-6, 2 * (x - 0.3), nil }
	zeros, err = All(pair, 0, 2, 2)
	require.NoError(t, err)
	assert.InDeltaSlice(t, []float64{0.299, 0.301}, zeros, 1e-12)
	zeros, err = All(func(x float64) (float64, float64, error) { return 1 - x*x, -2 * x, nil }, -1, 1, 4)
	require.NoError(t, err)
	assert.Equal(t, []float64{-1, 1}, zeros)
	zeros, err = All(func(x float64) (float64, float64, error) { return 1 + x*x, 2 * x, nil }, -1, 1, 5)
	require.NoError(t, err)
	assert.Empty(t, zeros)
	// A zero on a cell's end does not hide the one after it.
	zeros, err = All(func(x float64) (float64, float64, error) { return x * (x - 0.5), 2*x - 0.5, nil }, -1, 1, 2)
	require.NoError(t, err)
	assert.InDeltaSlice(t, []float64{0, 0.5}, zeros, 1e-15)
	// Of many zeros none is missed by cells narrower than their distance, while a cell
	// with three shows one.
	sine := func(x float64) (float64, float64, error) { return math.Sin(x), math.Cos(x), nil }
	zeros, err = All(sine, 1, 44*math.Pi-1, 48)
	require.NoError(t, err)
	require.Len(t, zeros, 43)
	for i, x := range zeros {
		assert.InEpsilon(t, float64(i+1)*math.Pi, x, 1e-15)
	}
	zeros, err = All(sine, 1, 4*math.Pi-1, 1)
	require.NoError(t, err)
	assert.Len(t, zeros, 1)
	_, err = All(func(x float64) (float64, float64, error) { return math.NaN(), 0, nil }, -1, 1, 5)
	assert.ErrorIs(t, err, ErrNotFinite)
	own := errors.New("own")
	_, err = All(func(x float64) (float64, float64, error) { return 0, 0, own }, -1, 1, 5)
	assert.ErrorIs(t, err, own)
}
