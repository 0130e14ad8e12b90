package bessel

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"glassthread/materials/domain"
)

func refused(t *testing.T, err error, function, argument string) {
	t.Helper()
	var e *domain.Error
	if assert.ErrorAs(t, err, &e) {
		assert.Equal(t, function, e.Func)
		assert.Equal(t, argument, e.Argument)
		assert.NotEmpty(t, e.Allowed)
	}
}

// ofOrderAndArgument holds every function of an order and an argument.
var ofOrderAndArgument = map[string]func(int, float64) (float64, error){
	"bessel.J": J, "bessel.JRatio": JRatio, "bessel.KRatio": KRatio, "bessel.IRatio": IRatio,
	"bessel.KScaled": KScaled, "bessel.IScaled": IScaled, "bessel.Decay": Decay,
	"bessel.JPair": func(l int, x float64) (float64, error) {
		below, at, err := JPair(l, x)
		return below + at, err
	},
}

func TestRefusals(t *testing.T) {
	for name, f := range ofOrderAndArgument {
		for _, l := range []int{-1, MaxOrder + 1, math.MinInt, math.MaxInt} {
			_, err := f(l, 1.5)
			refused(t, err, name, "l")
		}
		for _, x := range []float64{0, math.Copysign(0, -1), -1, math.NaN(), math.Inf(1), math.Inf(-1), 1.0000001 * MaxArgument} {
			if name == "bessel.Decay" && x == 0 {
				continue // allowed, see below
			}
			_, err := f(1, x)
			refused(t, err, name, "x")
		}
	}
	for _, l := range []int{-1, MaxOrder + 1} {
		_, err := JZero(l, 1)
		refused(t, err, "bessel.JZero", "l")
		_, err = Decay(l, 0)
		refused(t, err, "bessel.Decay", "l")
	}
	for _, m := range []int{math.MinInt, -1, 0, MaxOrder + 1, math.MaxInt} {
		_, err := JZero(0, m)
		refused(t, err, "bessel.JZero", "m")
		_, _, err = JZeroParts(3, m)
		refused(t, err, "bessel.JZero", "m")
	}
	_, _, err := JPair(5, 5)
	refused(t, err, "bessel.JPair", "x")
}

// Results beyond a float64.
func TestOverflow(t *testing.T) {
	_, err := KRatio(0, 1e-308)
	assert.NoError(t, err) // 1/(x ln(1/x)) still fits
	_, err = KRatio(2, 1e-308)
	refused(t, err, "bessel.KRatio", "ratio (result)")
	_, err = KScaled(1000, 1)
	refused(t, err, "bessel.KScaled", "value (result)")
	for name, f := range map[string]func(int, float64) (float64, error){"J": J, "IScaled": IScaled} {
		got, err := f(1000, 1) // below the smallest float64
		assert.NoError(t, err, name)
		assert.Zero(t, got, name)
	}
	g, err := Decay(3, 0)
	assert.NoError(t, err)
	assert.Zero(t, g)
}
