package snell

import (
	"math"
	"math/big"
	"testing"

	"github.com/stretchr/testify/assert"
)

func (x twofold) big() *big.Float {
	f := new(big.Float).SetPrec(300)
	return f.Add(f.SetFloat64(x.hi), new(big.Float).SetFloat64(x.lo))
}

// apart returns |x - want|/|want|.
func apart(x twofold, want *big.Float) float64 {
	d := new(big.Float).Sub(x.big(), want)
	f, _ := d.Quo(d, want).Float64()
	return math.Abs(f)
}

// sinSquared sums the series of DLMF 4.19.2 in 300 bits.
func sinSquared(x *big.Float) *big.Float {
	y := new(big.Float).Mul(x, x)
	term, sum := new(big.Float).Set(y), new(big.Float).SetPrec(300)
	for k := int64(1); k < 60; k++ {
		sum.Add(sum, term)
		term.Mul(term, y)
		term.Mul(term, big.NewFloat(-2).SetPrec(300))
		term.Quo(term, new(big.Float).SetPrec(300).SetInt64((k+1)*(2*k+1)))
	}
	return sum
}

func TestSineSeries(t *testing.T) {
	exact := new(big.Rat).SetInt64(1) // 2^(2k-1)/(2k)!
	for k, c := range sineSeries {
		want, _ := new(big.Float).SetPrec(300).SetString(exact.FloatString(120))
		assert.Less(t, apart(c, want), 0x1p-104, k)
		k := int64(k + 1)
		exact.Mul(exact, big.NewRat(2, (k+1)*(2*k+1)))
	}
}

func TestSineSquared(t *testing.T) {
	worst := 0.0
	for k := range 2000 {
		x := twofold{math.Pi / 4 * float64(k+1) / 2000, 0}
		x.lo = x.hi * 0x1p-54 * math.Sin(float64(k))
		worst = math.Max(worst, apart(sineSquared(x), sinSquared(x.big())))
	}
	t.Logf("worst %g", worst)
	assert.Less(t, worst, 0x1p-102)
	assert.Less(t, apart(sineSquared(twofold{1e-140, 0}), new(big.Float).SetPrec(300).Mul(big.NewFloat(1e-140).SetPrec(300), big.NewFloat(1e-140))), 0x1p-102)
	// pi/2 to 40 digits (DLMF 3.12.1).
	want, _ := new(big.Float).SetPrec(300).SetString("1.5707963267948966192313216916397514420985846996875529")
	sum := quarterTurn.big()
	sum.Add(sum, big.NewFloat(thirdPart))
	d, _ := sum.Sub(sum, want).Float64()
	assert.Less(t, math.Abs(d), 1e-47)
}

func TestTwofoldArithmetic(t *testing.T) {
	a, b := twofold{math.Pi, 1.2246467991473515e-16}, twofold{-math.E, -1.4456468917292502e-16}
	for _, c := range []struct {
		got  twofold
		want *big.Float
	}{
		{a.plus(b), new(big.Float).Add(a.big(), b.big())},
		{a.minus(b), new(big.Float).Sub(a.big(), b.big())},
		{a.times(b), new(big.Float).Mul(a.big(), b.big())},
	} {
		assert.Less(t, apart(c.got, c.want), 0x1p-103)
	}
}
