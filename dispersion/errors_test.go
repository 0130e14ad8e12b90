package dispersion

import (
	"errors"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"glassthread/materials"
	"glassthread/materials/domain"
	"glassthread/materials/taylor"
	"glassthread/modes"
	"glassthread/numap"
)

func refused(t *testing.T, err error, argument string) {
	t.Helper()
	var e *domain.Error
	if assert.ErrorAs(t, err, &e) {
		assert.Equal(t, argument, e.Argument, "%v", err)
		assert.NotEmpty(t, e.Func)
		assert.NotEmpty(t, e.Allowed)
	}
}

// calls are all questions about a medium at one wavelength.
func calls(m materials.Medium, x float64) map[string]error {
	_, whole := At(m, x)
	_, delay := GroupDelay(m, x)
	list := map[string]error{"At": whole, "GroupDelay": delay}
	if mode, ok := m.(Separable); ok {
		_, list["Split"] = Split(mode, x)
	}
	return list
}

func TestRefusals(t *testing.T) {
	silica := materials.FusedSilica()
	mode := standardFibre(t).LP(0, 1)
	for _, x := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), -1e-6, 0} {
		for _, m := range []materials.Medium{silica, mode} {
			for name, err := range calls(m, x) {
				assert.Error(t, err, name)
				refused(t, err, "wavelength")
			}
		}
		_, err := ZeroDispersion(silica, x, 2e-6)
		refused(t, err, "from")
		_, err = ZeroDispersions(silica, 1e-6, x)
		refused(t, err, "to")
	}
	for _, to := range []float64{1e-6, 0.5e-6} {
		_, err := ZeroDispersions(silica, 1e-6, to)
		refused(t, err, "to")
		_, err = ZeroDispersion(silica, 1e-6, to)
		refused(t, err, "to")
		assert.NotErrorIs(t, err, ErrNoZero)
	}
	_, err := ZeroDispersion(silica, 0.4e-6, 1e-6)
	assert.ErrorIs(t, err, ErrNoZero)
	assert.ErrorContains(t, err, "from 4e-07 m to 1e-06 m")
	none, err := ZeroDispersions(silica, 0.4e-6, 1e-6)
	assert.NoError(t, err)
	assert.Empty(t, none)
}

func TestErrorsOfTheMedium(t *testing.T) {
	mode := standardFibre(t).LP(0, 1)
	for name, err := range calls(mode, 5e-6) { // beyond the core's data
		assert.ErrorIs(t, err, materials.ErrRange, name)
	}
	for name, err := range calls(materials.FusedSilica(), 0.1e-6) {
		assert.ErrorIs(t, err, materials.ErrRange, name)
	}
	for name, err := range calls(standardFibre(t).LP(1, 1), 1.31e-6) {
		assert.ErrorIs(t, err, modes.ErrCutoff, name)
	}
	inside := modes.Step{Radius: 4e-6, Core: materials.FusedSilica(), Cladding: materials.Germania()}
	for name, err := range calls(inside.LP(0, 1), 1.31e-6) {
		assert.ErrorIs(t, err, numap.ErrNotGuiding, name)
	}
	for name, err := range calls(modes.StepLP{}, 1.31e-6) {
		refused(t, err, "Radius")
		assert.Error(t, err, name)
	}
	for name, err := range calls(nil, 1.31e-6) {
		assert.ErrorContains(t, err, "nil", name)
	}
	_, err := Split(nil, 1e-6)
	assert.ErrorContains(t, err, "nil")
	_, err = ZeroDispersion(nil, 1e-6, 2e-6)
	assert.ErrorContains(t, err, "nil")

	own := errors.New("own")
	broken := medium(func(float64) (taylor.Series, error) { return taylor.Series{}, own })
	for name, err := range calls(broken, 1e-6) {
		assert.ErrorIs(t, err, own, name)
	}
	// The mode dies within the range.
	_, err = ZeroDispersion(standardFibre(t).LP(1, 1), 1.0e-6, 1.6e-6)
	assert.ErrorIs(t, err, modes.ErrCutoff)
	_, err = ZeroDispersion(mode, 0.3e-6, 2e-6)
	assert.ErrorIs(t, err, materials.ErrRange)
}

// Media that answer with nonsense, or with what overflows on the way.
func TestNonsenseMedia(t *testing.T) {
	for _, s := range []taylor.Series{{math.NaN()}, {math.Inf(1)}, {-1.5}, {}, {1.5, math.NaN()}, {1.5, 0, math.Inf(-1)},
		{1.5, 0, 0, math.NaN()}, {1.5, 0, 0, 0, math.Inf(1)}} {
		m := medium(func(float64) (taylor.Series, error) { return s, nil })
		for name, err := range calls(m, 1e-6) {
			assert.Error(t, err, "%s of %v", name, s)
			refused(t, err, "wavelength")
		}
	}
	huge := medium(func(float64) (taylor.Series, error) { return taylor.Series{1.5, -1e308, 1e308, 1e308, 1e308}, nil })
	_, err := At(huge, 10)
	refused(t, err, "dispersion (result)")
	_, err = GroupDelay(huge, 10)
	refused(t, err, "group index (result)")
}

// made is a Separable of the caller's own.
type made struct {
	medium
	material, waveguide taylor.Series
	err                 error
}

func (m made) Parts(float64) (material, waveguide taylor.Series, err error) {
	return m.material, m.waveguide, m.err
}

func TestSplitOfOwnModes(t *testing.T) {
	plain := medium(func(float64) (taylor.Series, error) { return taylor.Series{1.5, 0, 1e10}, nil })
	p, err := Split(made{plain, taylor.Series{1.5, 0, 2e10}, taylor.Series{1.5, 0, -4e9}, nil}, 1e-6)
	assert.NoError(t, err)
	unit := 2 * 1e-6 / materials.SpeedOfLight
	assert.InDeltaSlice(t, []float64{-1e10, -2e10, 4e9, 6e9}, []float64{p.D / unit, p.Material / unit, p.Waveguide / unit, p.Profile / unit}, 1e-3)
	own := errors.New("own")
	_, err = Split(made{medium: plain, err: own}, 1e-6)
	assert.ErrorIs(t, err, own)
	for _, x := range []float64{math.NaN(), math.Inf(1)} {
		_, err = Split(made{plain, taylor.Series{1.5, 0, x}, taylor.Series{1.5, 0, x}, nil}, 1e-6)
		refused(t, err, "dispersion (result)")
	}
}
