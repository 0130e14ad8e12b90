package materials

import (
	"math"
	"testing"

	"github.com/stretchr/testify/require"

	"glassthread/materials/root"
	"glassthread/materials/taylor"
)

var nan, inf = math.NaN(), math.Inf(1)

// nasty are the floats that slip through careless checks.
var nasty = []float64{nan, inf, -inf, 0, math.Copysign(0, -1), -1.55e-6, -math.MaxFloat64, -math.SmallestNonzeroFloat64}

// asMedium lets the result of a constructor be used in one expression.
func asMedium[M Medium](t testing.TB) func(m M, err error) Medium {
	return func(m M, err error) Medium {
		t.Helper()
		require.NoError(t, err)
		return m
	}
}

func indexAt(t testing.TB, m Medium, wavelength float64) float64 {
	t.Helper()
	n, err := Index(m, wavelength)
	require.NoError(t, err)
	return n
}

func groupAt(t testing.TB, m Medium, wavelength float64) float64 {
	t.Helper()
	n, err := GroupIndex(m, wavelength)
	require.NoError(t, err)
	return n
}

func seriesAt(t testing.TB, m Medium, wavelength float64) taylor.Series {
	t.Helper()
	s, err := m.Taylor(wavelength)
	require.NoError(t, err)
	return s
}

// zeroDispersion finds where the second derivative of the index vanishes.
func zeroDispersion(t testing.TB, m Medium, from, to float64) float64 {
	t.Helper()
	x, err := root.Find(func(x float64) (float64, error) {
		s, err := m.Taylor(x)
		return s[2], err
	}, from, to, 0)
	require.NoError(t, err)
	return x
}

// own is a medium of the caller's own, made of one function.
type own func(wavelength float64) (taylor.Series, error)

func (f own) Taylor(wavelength float64) (taylor.Series, error) { return f(wavelength) }

// grid returns count values from a to b, both included, in equal ratios.
func grid(a, b float64, count int) []float64 {
	x := make([]float64, count)
	for i := range x {
		x[i] = a * math.Pow(b/a, float64(i)/float64(count-1))
	}
	x[0], x[count-1] = a, b
	return x
}
