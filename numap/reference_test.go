package numap

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

// calls evaluates each function of the table from the arguments in a row.
var calls = map[string]func(x []float64) (float64, error){
	"NA":                   func(x []float64) (float64, error) { return NA(x[0], x[1]) },
	"Delta":                func(x []float64) (float64, error) { return Delta(x[0], x[1]) },
	"DeltaWeak":            func(x []float64) (float64, error) { return DeltaWeak(x[0], x[1]) },
	"NAWeak":               func(x []float64) (float64, error) { return NAWeak(x[0], x[1]) },
	"CladdingForNA":        func(x []float64) (float64, error) { return CladdingForNA(x[0], x[1]) },
	"CoreForNA":            func(x []float64) (float64, error) { return CoreForNA(x[0], x[1]) },
	"CladdingForDelta":     func(x []float64) (float64, error) { return CladdingForDelta(x[0], x[1]) },
	"CladdingForDeltaWeak": func(x []float64) (float64, error) { return CladdingForDeltaWeak(x[0], x[1]) },
	"CoreForDelta":         func(x []float64) (float64, error) { return CoreForDelta(x[0], x[1]) },
	"CoreForDeltaWeak":     func(x []float64) (float64, error) { return CoreForDeltaWeak(x[0], x[1]) },
	"AcceptanceAngle":      func(x []float64) (float64, error) { return AcceptanceAngle(x[0], x[1]) },
	"SolidAngle":           func(x []float64) (float64, error) { return SolidAngle(x[0], x[1]) },
	"SolidAngleWeak":       func(x []float64) (float64, error) { return SolidAngleWeak(x[0], x[1]) },
	"V":                    func(x []float64) (float64, error) { return V(x[0], x[1], x[2]) },
	"RadiusForV":           func(x []float64) (float64, error) { return RadiusForV(x[0], x[1], x[2]) },
	"NAForV":               func(x []float64) (float64, error) { return NAForV(x[0], x[1], x[2]) },
	"CutoffWavelength":     func(x []float64) (float64, error) { return CutoffWavelength(x[0], x[1], x[2]) },
	"PowerLawSingleModeV":  func(x []float64) (float64, error) { return PowerLawSingleModeV(x[0]) },
	"StepModeCount":        func(x []float64) (float64, error) { return StepModeCount(x[0]) },
	"PowerLawModeCount":    func(x []float64) (float64, error) { return PowerLawModeCount(x[0], x[1]) },
	"PowerLawModeGroups":   func(x []float64) (float64, error) { return PowerLawModeGroups(x[0], x[1]) },
	"PowerLawGroupB":       func(x []float64) (float64, error) { return PowerLawGroupB(x[0], x[1], x[2]) },
	"LocalNA":              func(x []float64) (float64, error) { return core(x).LocalNA(x[3]) },
	"LambertianShare":      func(x []float64) (float64, error) { return core(x).LambertianShare(x[3], x[4]) },
	"CosineShare":          func(x []float64) (float64, error) { return CosineShare(x[0], x[1], x[2]) },
	"CosineOrder":          func(x []float64) (float64, error) { return CosineOrder(x[0]) },
	"GaussianSpatialShare": func(x []float64) (float64, error) { return GaussianSpatialShare(x[0], x[1]) },
	"GaussianAngularShare": func(x []float64) (float64, error) { return GaussianAngularShare(x[0], x[1], x[2]) },
	"GaussianShare":        func(x []float64) (float64, error) { return core(x).GaussianShare(x[3], x[4]) },
	"SkewAcceptanceAngle":  func(x []float64) (float64, error) { return SkewAcceptanceAngle(x[0], x[1], x[2]) },
	"Beta": func(x []float64) (float64, error) {
		beta, _, err := core(x).Invariants(Ray{x[3], x[4], x[5]}, x[6])
		return beta, err
	},
	"L": func(x []float64) (float64, error) {
		_, l, err := core(x).Invariants(Ray{x[3], x[4], x[5]}, x[6])
		return l, err
	},
	"RayKind": func(x []float64) (float64, error) {
		kind, err := core(x).RayKind(Ray{x[3], x[4], x[5]})
		return float64(kind), err
	},
}

func core(x []float64) Core { return Core{Radius: x[0], NA: x[1], Alpha: x[2]} }

// worst is the relative error that is allowed: two units in the last place, but for
// those listed. The package comment states what was measured.
func worst(function string) float64 {
	switch function {
	case "RayKind":
		return 0
	case "SkewAcceptanceAngle": // the cosine next to pi/2 is package math's
		return 2e-15
	case "GaussianShare":
		return 2e-15
	}
	return 2 * 0x1p-52
}

// The values come from testdata/reference.py: mpmath at 50 digits.
func TestReferenceTable(t *testing.T) {
	file, err := os.Open("testdata/reference.csv")
	require.NoError(t, err)
	defer file.Close()
	rows, found, row := 0, map[string]float64{}, map[string]string{}
	for lines := bufio.NewScanner(file); lines.Scan(); {
		line := lines.Text()
		if strings.HasPrefix(line, "#") {
			continue
		}
		field := strings.Split(line, ",")
		require.Len(t, field, 3, line)
		var x []float64
		for _, word := range strings.Fields(field[1]) {
			value, err := strconv.ParseFloat(word, 64)
			require.NoError(t, err)
			x = append(x, value)
		}
		want, err := strconv.ParseFloat(field[2], 64)
		require.NoError(t, err)
		call := calls[field[0]]
		require.NotNil(t, call, field[0])
		got, err := call(x)
		require.NoError(t, err, line)
		rows++
		off := math.Abs(got - want)
		if want != 0 {
			off /= math.Abs(want)
		}
		if last, ok := found[field[0]]; !ok || off > last {
			found[field[0]], row[field[0]] = off, line
		}
		assert.LessOrEqual(t, off, worst(field[0]), "%s: got %v", line, got)
	}
	require.GreaterOrEqual(t, rows, 1090)
	for name := range calls {
		off, ok := found[name]
		assert.True(t, ok, "no row for %s", name)
		t.Logf("%-22s %.2g %s", name, off, row[name])
	}
}
