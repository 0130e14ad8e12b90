package bessel

import (
	"errors"
	"math"
	"testing"

	"glassthread/materials/domain"
)

func seed(f *testing.F) {
	for _, l := range []int{0, 1, 2, 7, 100, MaxOrder, MaxOrder + 1, -1, math.MinInt, math.MaxInt} {
		for _, x := range []float64{0, math.Copysign(0, -1), 5e-324, 1e-310, 1e-160, 1e-9, 0.5, 1, 2, 2.404825557695773,
			7, 8, 100, 1e5, 1e6, 1e7, math.MaxFloat64, -1, math.NaN(), math.Inf(1), math.Inf(-1)} {
			f.Add(l, x)
		}
	}
}

// within fails unless there is an error that names an argument, or a finite result
// between low and high.
func within(t *testing.T, name string, low, high float64) func(float64, error) {
	return func(x float64, err error) {
		t.Helper()
		if err != nil {
			var refused *domain.Error
			if !errors.As(err, &refused) || refused.Func != "bessel."+name || refused.Argument == "" {
				t.Errorf("%s: error %v", name, err)
			}
			return
		}
		if !(x >= low && x <= high) {
			t.Errorf("%s gives %v, not from %v to %v", name, x, low, high)
		}
	}
}

func FuzzOrderAndArgument(f *testing.F) {
	seed(f)
	f.Fuzz(func(t *testing.T, l int, x float64) {
		const most = math.MaxFloat64
		within(t, "J", -1, 1)(J(l, x))
		within(t, "JRatio", -most, most)(JRatio(l, x))
		below, at, err := JPair(l, x)
		within(t, "JPair", -1, 1)(below, err)
		within(t, "JPair", -1, 1)(at, err)
		within(t, "KRatio", 1, most)(KRatio(l, x))
		if theta, s, rho, ok := JPhase(l, x, 1); ok {
			within(t, "JPhase", -most, most)(theta, nil)
			within(t, "JPhase", 0, most)(s, nil)
			within(t, "JPhase", -most, 0)(rho, nil)
		}
		within(t, "IRatio", 0, 1)(IRatio(l, x))
		within(t, "KScaled", 0, most)(KScaled(l, x))
		within(t, "IScaled", 0, 1+slack)(IScaled(l, x))
		within(t, "Decay", 0, x+1)(Decay(l, x)) // G_0 is below x + 1/2
		if _, err := IRatio(l, x); err == nil && x > 1e-300 {
			checkBounds(t, l, x)
		}
	})
}

func FuzzSlopes(f *testing.F) {
	for _, x := range []float64{0, 5e-324, 1e-250, 1, 30, 1e6, math.Inf(1), math.NaN(), -1} {
		for _, y := range []float64{0, 1, -3, 1e200, math.MaxFloat64, math.Inf(-1), math.NaN()} {
			f.Add(3, x, y, y)
		}
	}
	f.Fuzz(func(t *testing.T, l int, x, value, ratio float64) {
		const most = math.MaxFloat64
		within(t, "JRatioSlope", -most, most)(JRatioSlope(l, x, ratio))
		within(t, "KRatioSlope", -most, most)(KRatioSlope(l, x, ratio))
		within(t, "IRatioSlope", -most, most)(IRatioSlope(l, x, ratio))
		within(t, "KScaledSlope", -most, most)(KScaledSlope(l, x, value, ratio))
		within(t, "IScaledSlope", -most, most)(IScaledSlope(l, x, value, ratio))
	})
}

func FuzzJZero(f *testing.F) {
	for _, l := range []int{0, 1, 2, 50, MaxOrder, MaxOrder + 1, -1} {
		for _, m := range []int{0, 1, 2, 50, MaxOrder, MaxOrder + 1, -1} {
			f.Add(l, m)
		}
	}
	f.Fuzz(func(t *testing.T, l, m int) {
		within(t, "JZero", float64(max(l, m)), 4.7*MaxOrder)(JZero(l, m))
		within(t, "JPrimeZero", 0, 4.7*MaxOrder)(JPrimeZero(l, m))
		high, low, err := JZeroParts(l, m)
		within(t, "JZero", -1e-10, 1e-10)(low, err)
		if err != nil {
			return
		}
		if l > 3000 {
			return // the count takes long
		}
		step := 1e-9 * high
		if a, b := zerosBelow(l, high-step), zerosBelow(l, high+step); a != m-1 || b != m {
			t.Errorf("j(%d,%d) = %v: %d zeros below it, %d with it", l, m, high, a, b)
		}
	})
}
