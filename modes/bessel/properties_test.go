package bessel

import (
	"math"
	"math/rand"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// zerosBelow counts the zeros of J_l in (0, x) by a road that knows no zero: the signs
// of J_l, J_{l+1}, ... at x change once for each of them, since the zeros of neighbouring
// orders interlace (DLMF 10.21(i); a Sturm sequence). The recurrence runs towards
// lower orders (DLMF 3.6(ii)).
func zerosBelow(l int, x float64) int {
	above, at := 0.0, 1.0
	top := max(float64(l), x)
	changes := 0
	for k := int(top + 20*math.Cbrt(top) + 40); k > l; k-- {
		above, at = at, 2*float64(k)/x*at-above
		if (at < 0) != (above < 0) {
			changes++
		}
		if math.Abs(at) > 0x1p500 {
			above, at = above*0x1p-500, at*0x1p-500
		}
	}
	return changes
}

// Every zero has the rank that its number says, also for orders far beyond the table.
func TestRankOfZeros(t *testing.T) {
	check := func(l, m int) {
		z, err := JZero(l, m)
		require.NoError(t, err)
		step := 1e-9 * z
		assert.Equal(t, m-1, zerosBelow(l, z-step), "below j(%d,%d)", l, m)
		assert.Equal(t, m, zerosBelow(l, z+step), "above j(%d,%d)", l, m)
	}
	for l := 0; l <= 60; l++ {
		for m := 1; m <= 30; m++ {
			check(l, m)
		}
	}
	r := rand.New(rand.NewSource(1))
	for range 300 {
		check(int(math.Exp(r.Float64()*math.Log(2e4))), int(math.Exp(r.Float64()*math.Log(5e3))))
	}
	for _, c := range [][2]int{{MaxOrder, 1}, {MaxOrder, 2}, {0, MaxOrder}, {1, MaxOrder}, {MaxOrder, MaxOrder}, {70000, 3}} {
		check(c[0], c[1])
	}
}

// j_{l,m} < j_{l+1,m} < j_{l,m+1} (DLMF 10.21.2).
func TestZerosInterlace(t *testing.T) {
	r := rand.New(rand.NewSource(2))
	for range 400 {
		l, m := int(math.Exp(r.Float64()*math.Log(3e4)))-1, int(math.Exp(r.Float64()*math.Log(3e4)))
		a, err := JZero(l, m)
		require.NoError(t, err)
		b, err := JZero(l+1, m)
		require.NoError(t, err)
		c, err := JZero(l, m+1)
		require.NoError(t, err)
		assert.True(t, float64(l) < a && a < b && b < c, "l = %d, m = %d: %v, %v, %v", l, m, a, b, c)
	}
}

// slack covers the rounding of the bounds and of the ratio.
const slack = 3e-15

// D. E. Amos, Math. Comp. 28, 239 (1974), equations 9 and 11, and J. Segura, J. Math. Anal.
// Appl. 374, 516 (2011), from memory: for x > 0 and l >= 0
//
//	x/(h + sqrt(x^2 + (l + 3/2)^2)) <= I_{l+1}/I_l <= x/(h + sqrt(x^2 + h^2)),   h = l + 1/2,
//	(l + sqrt(x^2 + l^2))/x <= K_{l+1}/K_l <= (h + sqrt(x^2 + h^2))/x.
func checkBounds(t *testing.T, l int, x float64) {
	t.Helper()
	f := float64(l)
	h := f + 0.5
	i, err := IRatio(l, x)
	require.NoError(t, err)
	assert.GreaterOrEqual(t, i*(1+slack), x/(h+math.Hypot(x, f+1.5)), "I, l = %d, x = %v", l, x)
	assert.LessOrEqual(t, i*(1-slack), x/(h+math.Hypot(x, h)), "I, l = %d, x = %v", l, x)
	if k, err := KRatio(l, x); err == nil {
		assert.GreaterOrEqual(t, k*(1+slack), (f+math.Hypot(x, f))/x, "K, l = %d, x = %v", l, x)
		assert.LessOrEqual(t, k*(1-slack), (h+math.Hypot(x, h))/x, "K, l = %d, x = %v", l, x)
	}
}

func TestBoundsOfRatios(t *testing.T) {
	r := rand.New(rand.NewSource(3))
	for range 2000 {
		checkBounds(t, int(math.Exp(r.Float64()*math.Log(MaxOrder+1)))-1, math.Exp(r.Float64()*29)*1e-7)
	}
	checkBounds(t, MaxOrder, MaxArgument)
	checkBounds(t, 0, MaxArgument)
	checkBounds(t, MaxOrder, 1e-3)
}

// JPair, J and JRatio agree with each other.
func TestFormsOfJAgree(t *testing.T) {
	r := rand.New(rand.NewSource(4))
	for range 2000 {
		l := int(math.Exp(r.Float64()*math.Log(3001))) - 1
		x := float64(l) + math.Exp(r.Float64()*14)*1e-2
		below, at, err := JPair(l, x)
		require.NoError(t, err)
		amplitude := math.Hypot(below, at)
		j, err := J(l, x)
		require.NoError(t, err)
		small := 4e-16 * amplitude * math.Sqrt(1+float64(l))
		assert.InDelta(t, at, j, small, "l = %d, x = %v", l, x)
		// 10.6.1: J_{l-1} + J_{l+1} = (2 l/x) J_l. From order 32 the ratio comes from the
		// phase, so that the errors of the pair show.
		ratio, err := JRatio(l, x)
		require.NoError(t, err)
		assert.InDelta(t, 0, (below+ratio*at-2*float64(l)/x*at)/(1+math.Abs(ratio)), math.Max(4e-15*amplitude, small), "l = %d, x = %v", l, x)
		if l > 0 {
			previous, err := J(l-1, x)
			require.NoError(t, err)
			assert.InDelta(t, below, previous, small, "l = %d, x = %v", l, x)
		}
	}
	below, at, err := JPair(0, 1)
	require.NoError(t, err)
	assert.InDeltaSlice(t, []float64{-math.J1(1), math.J0(1)}, []float64{below, at}, 3e-16)
}

// J is continuous across x = l, where its method changes; J_l(l) tends to 0.4473
// l^(-1/3) (DLMF 10.19.8; A&S 9.3.31).
func TestTurningPoint(t *testing.T) {
	for _, l := range []int{1, 2, 7, 30, 100, 1000, 20000, MaxOrder} {
		x := float64(l)
		a, err := J(l, x)
		require.NoError(t, err)
		b, err := J(l, math.Nextafter(x, math.Inf(1)))
		require.NoError(t, err)
		assert.InEpsilon(t, a, b, 1e-16*(40+x), "l = %d", l)
		if l >= 100 {
			assert.InEpsilon(t, 0.4473073183648, a*math.Cbrt(x), 1e-4)
		}
		ra, err := JRatio(l, x)
		require.NoError(t, err)
		rb, err := JRatio(l, math.Nextafter(x, math.Inf(1)))
		require.NoError(t, err)
		assert.InEpsilon(t, ra, rb, 1e-16*(40+x), "l = %d", l)
	}
}

// Leading terms for x to 0 (DLMF 10.7.3, 10.30.1, 10.30.2, 10.30.3).
func TestSmallArguments(t *testing.T) {
	for _, x := range []float64{1e-9, 1e-30, 1e-150, 1e-300, 5e-324} {
		factorial := 1.0
		for l := range 12 {
			if l > 0 {
				factorial *= float64(l)
			}
			lead := math.Pow(x/2, float64(l)) / factorial
			j, err := J(l, x)
			require.NoError(t, err)
			i, err := IScaled(l, x)
			require.NoError(t, err)
			if lead > 1e-300 {
				assert.InEpsilon(t, lead, j, 1e-14)
				assert.InEpsilon(t, lead*math.Exp(-x), i, 1e-14)
			} else {
				assert.InDelta(t, lead, j, 1e-300)
				assert.InDelta(t, lead, i, 1e-300)
			}
			g, err := Decay(l, x)
			require.NoError(t, err)
			assert.False(t, math.IsNaN(g) || g < 0 || g > 0.1, "G_%d(%v) = %v", l, x, g)
			if l > 1 && x > 1e-140 {
				assert.InEpsilon(t, x*x/(2*float64(l-1)), g, 1e-14)
			}
		}
		k, err := KScaled(0, x)
		require.NoError(t, err)
		assert.InEpsilon(t, math.Ln2-math.Log(x)-eulerGamma, k, 1e-8)
	}
}
