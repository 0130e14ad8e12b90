package taylor

import (
	"bufio"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// poly is 2 + x - (3/8) x^2 + x^3/8, whose coefficients are exact.
func poly(x Series) Series {
	return x.Scale(0.125).Shift(-0.375).Mul(x).Shift(1).Mul(x).Shift(2)
}

// composites builds the functions of the table from the operations under test.
var composites = map[string]func(x Series, p float64) Series{
	"square":   func(x Series, _ float64) Series { return poly(x).Square() },
	"quotient": func(x Series, _ float64) Series { return poly(x).Quo(x.Square().Shift(1)) },
	"inverse":  func(x Series, _ float64) Series { return poly(x).Inv() },
	"sqrt":     func(x Series, _ float64) Series { return poly(x).Sqrt() },
	"exp":      func(x Series, _ float64) Series { return poly(x).Exp() },
	"log":      func(x Series, _ float64) Series { return poly(x).Log() },
	"pow":      func(x Series, p float64) Series { return poly(x).Pow(p) },
	"sellmeier": func(x Series, _ float64) Series {
		x2 := x.Square()
		return x2.Quo(x2.Shift(-1. / 64)).Scale(1.25).Add(x2.Quo(x2.Shift(-81)).Scale(0.75)).Shift(1).Sqrt()
	},
	"compose": func(x Series, _ float64) Series {
		u := poly(x)
		sin, cos := math.Sincos(u[0])
		return Series{sin, cos, -sin / 2, -cos / 6, sin / 24}.Compose(u)
	},
	"reverse": func(x Series, _ float64) Series {
		return x.Square().Mul(x).Scale(0.125).Add(x).Reverse(x[0])
	},
	"lambert": func(x Series, _ float64) Series { // y exp(y) = x
		y := math.Log1p(x[0])
		for range 50 {
			y -= (y - x[0]*math.Exp(-y)) / (1 + y)
		}
		return Implicit(y, (1+y)*math.Exp(y), func(y Series) Series { return y.Mul(y.Exp()).Sub(x) })
	},
	"kepler": func(x Series, p float64) Series { // y - p sin y = x
		y := x[0]
		for range 200 {
			y -= (y - p*math.Sin(y) - x[0]) / (1 - p*math.Cos(y))
		}
		sin, cos := math.Sincos(y)
		outer := Series{sin, cos, -sin / 2, -cos / 6, sin / 24}
		return Implicit(y, 1-p*cos, func(y Series) Series {
			return y.Sub(outer.Compose(y).Scale(p)).Sub(x)
		})
	},
}

// The values come from testdata/series.py: mpmath at 60 digits, by numerical
// differentiation of the whole function. Errors are relative to the largest
// coefficient of the row: at the scale of the table, x of order 1, all coefficients
// arise from sums of terms of that size. A few units in the last place are allowed
// for the few dozen roundings an operation makes; the quotient of poles and the
// implicit functions repeat them.
func TestReferenceTable(t *testing.T) {
	const ulp = 0x1p-52
	allowed := map[string]float64{"sellmeier": 16 * ulp, "lambert": 8 * ulp, "kepler": 16 * ulp}
	file, err := os.Open("testdata/series.csv")
	require.NoError(t, err)
	defer file.Close()
	rows, worst := map[string]int{}, map[string]float64{}
	for lines := bufio.NewScanner(file); lines.Scan(); {
		line := lines.Text()
		if strings.HasPrefix(line, "#") {
			continue
		}
		field := strings.Split(line, ",")
		require.Len(t, field, 3+Order+1, line)
		var number [3 + Order]float64
		for i := range number {
			number[i], err = strconv.ParseFloat(field[i+1], 64)
			require.NoError(t, err)
		}
		f := composites[field[0]]
		require.NotNil(t, f, field[0])
		got, want := f(Variable(number[0]), number[1]), Series(number[2:])
		require.True(t, got.Finite(), line)
		scale, off := 0.0, 0.0
		for k := range want {
			scale = math.Max(scale, math.Abs(want[k]))
			off = math.Max(off, math.Abs(got[k]-want[k]))
		}
		off /= scale
		limit := allowed[field[0]]
		if limit == 0 {
			limit = 4 * ulp
		}
		assert.LessOrEqual(t, off, limit, "%s\ngot %v", line, got)
		rows[field[0]]++
		worst[field[0]] = math.Max(worst[field[0]], off)
	}
	total := 0
	for name := range composites {
		assert.Positive(t, rows[name], name)
		t.Logf("%-10s %d rows, worst %.2g", name, rows[name], worst[name])
		total += rows[name]
	}
	require.GreaterOrEqual(t, total, 140)
}
