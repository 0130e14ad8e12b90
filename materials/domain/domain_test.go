package domain

import (
	"errors"
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

var inf, nan = math.Inf(1), math.NaN()

// What each check allows, at its ends and at the floats that slip through careless
// comparisons.
func TestChecks(t *testing.T) {
	positive := func(x float64) error { return Positive("pkg.F", "x", x, "m") }
	nonNegative := func(x float64) error { return NonNegative("pkg.F", "x", x, "m") }
	finite := func(x float64) error { return Finite("pkg.F", "x", x, "m") }
	within := func(x float64) error { return Within("pkg.F", "x", x, -1, 2, "m") }
	result := func(x float64) error { return Result("pkg.F", "x", x) }
	const most, least = math.MaxFloat64, math.SmallestNonzeroFloat64
	negativeZero := math.Copysign(0, -1)
	for _, c := range []struct {
		name             string
		check            func(float64) error
		allowed, refused []float64
	}{
		{"Positive", positive, []float64{least, 1, most}, []float64{0, negativeZero, -least, -1, -most, inf, -inf, nan}},
		{"NonNegative", nonNegative, []float64{0, negativeZero, least, most}, []float64{-least, -1, inf, -inf, nan}},
		{"Finite", finite, []float64{0, negativeZero, -1, most, -most}, []float64{inf, -inf, nan}},
		{"Within", within, []float64{-1, 0, 2}, []float64{math.Nextafter(-1, -2), math.Nextafter(2, 3), inf, -inf, nan}},
		{"Result", result, []float64{0, -1, most, -most}, []float64{inf, -inf, nan}},
	} {
		for _, x := range c.allowed {
			err := c.check(x)
			assert.True(t, err == nil, "%s(%v) = %v", c.name, x, err) // an untyped nil
		}
		for _, x := range c.refused {
			err := c.check(x)
			var refusal *Error
			require.ErrorAs(t, err, &refusal, "%s(%v)", c.name, x)
			assert.Equal(t, "pkg.F", refusal.Func)
			assert.Contains(t, refusal.Argument, "x")
			assert.Equal(t, math.Float64bits(x), math.Float64bits(refusal.Value))
			assert.Nil(t, refusal.Kind)
			assert.Contains(t, err.Error(), fmt.Sprintf("= %v: must be ", x))
		}
	}
}

// A range without members, and one with NaN ends, contains nothing.
func TestWithinEmptyRange(t *testing.T) {
	for _, x := range []float64{-1, 0, 1, nan} {
		assert.Error(t, Within("pkg.F", "x", x, 1, -1, ""))
		assert.Error(t, Within("pkg.F", "x", x, nan, 2, ""))
	}
	assert.NoError(t, Within("pkg.F", "x", inf, 0, inf, "")) // ends are the caller's choice
}

func TestMessages(t *testing.T) {
	for _, c := range []struct {
		err  error
		want string
	}{
		{Positive("numap.V", "radius", -1, "m"), "numap.V: radius = -1: must be finite and above 0 (m)"},
		{Positive("numap.V", "na", 0, ""), "numap.V: na = 0: must be finite and above 0"},
		{NonNegative("p.F", "r", nan, "m"), "p.F: r = NaN: must be finite and at least 0 (m)"},
		{Finite("p.F", "t", -inf, "K"), "p.F: t = -Inf: must be finite (K)"},
		{Within("p.F", "x", 1.5, 0, 1, ""), "p.F: x = 1.5: must be from 0 to 1"},
		{Within("p.F", "x", 3, 0.5, 1.5, "rad"), "p.F: x = 3: must be from 0.5 to 1.5 (rad)"},
		{Result("p.F", "V", inf), "p.F: V (result) = +Inf: must be within the range of a float64; the arguments are too extreme together"},
	} {
		assert.EqualError(t, c.err, c.want)
	}
}

func TestKind(t *testing.T) {
	sentinel := errors.New("not guiding")
	err := error(&Error{Func: "p.F", Argument: "v", Value: 1, Allowed: "above 2", Kind: sentinel})
	assert.EqualError(t, err, "p.F: v = 1: must be above 2 (not guiding)")
	assert.ErrorIs(t, err, sentinel)
	assert.ErrorIs(t, fmt.Errorf("wrapped: %w", err), sentinel)
	assert.NotErrorIs(t, err, errors.New("not guiding"))
	assert.NotErrorIs(t, Positive("p.F", "v", 0, ""), sentinel)
	assert.NoError(t, (&Error{}).Unwrap())
	assert.NotEmpty(t, (&Error{}).Error())
}

func TestAllowedDoesNotAllocate(t *testing.T) {
	x := 1.5
	failed := false
	assert.Zero(t, testing.AllocsPerRun(100, func() {
		failed = failed || Positive("p.F", "x", x, "m") != nil || NonNegative("p.F", "x", x, "m") != nil ||
			Finite("p.F", "x", x, "m") != nil || Within("p.F", "x", x, 1, 2, "m") != nil || Result("p.F", "x", x) != nil
	}))
	assert.False(t, failed)
}

// The checks agree with package math on every float64.
func FuzzChecks(f *testing.F) {
	for _, x := range []float64{0, math.Copysign(0, -1), 1, -1, nan, inf, -inf, 5e-324, -5e-324, math.MaxFloat64, -math.MaxFloat64} {
		f.Add(x, 0.0, 1.0)
		f.Add(1.0, x, 2.0)
		f.Add(1.0, -2.0, x)
	}
	f.Fuzz(func(t *testing.T, x, low, high float64) {
		finite := !math.IsNaN(x) && !math.IsInf(x, 0)
		for _, c := range []struct {
			name    string
			err     error
			allowed bool
		}{
			{"Positive", Positive("p.F", "x", x, "m"), finite && math.Copysign(1, x) == 1 && x != 0},
			{"NonNegative", NonNegative("p.F", "x", x, "m"), finite && (x == 0 || !math.Signbit(x))},
			{"Finite", Finite("p.F", "x", x, "m"), finite},
			{"Result", Result("p.F", "x", x), finite},
			{"Within", Within("p.F", "x", x, low, high, "m"),
				!(math.IsNaN(x) || math.IsNaN(low) || math.IsNaN(high) || math.Max(x, low) != x || math.Min(x, high) != x)},
		} {
			if (c.err == nil) != c.allowed {
				t.Errorf("%s(%v) in %v..%v: %v", c.name, x, low, high, c.err)
			}
			if c.err != nil && len(c.err.Error()) < len("p.F: x = 0: must be ") {
				t.Errorf("%s(%v): message %q", c.name, x, c.err)
			}
		}
	})
}

var sink error

func BenchmarkPositive(b *testing.B) {
	x := 1.5
	for b.Loop() {
		sink = Positive("p.F", "x", x, "m")
	}
}
